import type { FluidComposition } from '../calc/types';
import type { StepVerdict } from '../routes/bedside';
import type { Rulebook } from '../rulebook/document';
import type { Instant } from '../time';

/** What the bedside is held against beside the signed content. */
export type BedsideContext = {
  at: Instant;
  zone: string;
  rulebook: Rulebook;
  products: readonly FluidComposition[];
  /** mL of this order given already. */
  infusedMl: number;
};

export type Finding = StepVerdict['findings'][number];
export const finding = (field: string, code: string, text: string): Finding => ({ field, code, text });
