import { bolus, circulating, glucose, osmolarity, potassium } from './default-bolus';
import { fraction, maintenance, newborn, scope, tonicity, who } from './default-maintenance';
import { check, pharmacist, pump, risk, weight, windows } from './default-work';
import type { Rulebook } from './document';

/** Every section this edition of the program reads, at the values it ships with. */
export const DEFAULT_SECTIONS = {
  scope,
  maintenance,
  who,
  newborn,
  fraction,
  tonicity,
  bolus,
  circulating,
  potassium,
  glucose,
  osmolarity,
  pump,
  weight,
  check,
  windows,
  risk,
  pharmacist,
};

/** Number 1: what a hospital starts with until two of its people approve another. */
export const DEFAULT_RULEBOOK: Rulebook = { number: 1, sections: DEFAULT_SECTIONS };
