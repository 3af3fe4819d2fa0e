import type { Instant } from '../time';

type Fluid = { potassium: number; glucoseGPerL: number };

export type MaintenanceAgain = {
  kind: 'maintenance';
  method: 'bands-daily' | 'bands-hourly' | 'who' | 'newborn';
  fraction: 'full' | 'four-fifths' | 'two-thirds' | 'half';
  temperatureC?: number;
  newbornMlPerKgPerDay?: number;
  feeds: number;
  drugs: number;
  typedRate?: number;
  hours: number;
  fluid: Fluid;
};

export type BolusAgain = {
  kind: 'bolus';
  dose: { by: 'weight'; mlPerKg: number } | { by: 'volume'; volume: number };
  over: number;
  route: 'pump' | 'syringe' | 'pressure-bag' | 'gravity';
};

/** What the second derivation reads of a request: typed here again, so that it leans on nothing of the first. */
export type RequestAgain = {
  at: Instant;
  zone: string;
  child: { bornOn: string; bornAt?: Instant; sex?: 'female' | 'male' };
  weight: { kg: number };
  line: 'peripheral' | 'central' | 'intraosseous';
  intake: {
    bolusesLast24h: readonly { ml: number; at: Instant }[];
    running: readonly { rate: number; fluid: Fluid }[];
  };
  order: MaintenanceAgain | BolusAgain;
};

/** Rate in mL/h and volume in mL as they are ordered; a volume given by hand has no rate. */
export type SecondFigures = { ok: true; rate?: number; volume: number } | { ok: false; code: string };
