declare const brand: unique symbol;

type Unit<Name extends string> = number & { readonly [brand]: Name };

export type Kilograms = Unit<'kg'>;
export type Millilitres = Unit<'mL'>;
export type MillilitresPerHour = Unit<'mL/h'>;
export type MillilitresPerKg = Unit<'mL/kg'>;
export type MillilitresPerKgPerDay = Unit<'mL/kg/day'>;
export type MillilitresPerKgPerHour = Unit<'mL/kg/h'>;
export type Hours = Unit<'h'>;
export type Minutes = Unit<'min'>;
export type MmolPerLitre = Unit<'mmol/L'>;
export type MmolPerHour = Unit<'mmol/h'>;
export type MmolPerKgPerHour = Unit<'mmol/kg/h'>;
export type MmolPerKgPerDay = Unit<'mmol/kg/day'>;
export type MilliosmolesPerLitre = Unit<'mOsm/L'>;
export type GramsPerLitre = Unit<'g/L'>;
export type MgPerKgPerMinute = Unit<'mg/kg/min'>;
export type KilocaloriesPerKgPerDay = Unit<'kcal/kg/day'>;

const fault = (unit: string, wants: string, n: number): never => {
  throw new RangeError(`${unit} wants ${wants}, got ${String(n)}`);
};

const positive = (n: number, unit: string): number =>
  n > 0 && n < Infinity ? n : fault(unit, 'a finite number above 0', n);

const zeroOrMore = (n: number, unit: string): number =>
  n >= 0 && n < Infinity ? n : fault(unit, 'a finite number of at least 0', n);

/** Body weight in kg, above 0; throws RangeError otherwise. */
export const kilograms = (n: number): Kilograms => positive(n, 'kg') as Kilograms;

/** A volume in mL, 0 or more; throws RangeError otherwise. */
export const millilitres = (n: number): Millilitres => zeroOrMore(n, 'mL') as Millilitres;

/** A flow in mL/h, 0 or more; throws RangeError otherwise. */
export const millilitresPerHour = (n: number): MillilitresPerHour =>
  zeroOrMore(n, 'mL/h') as MillilitresPerHour;

/** A dose in mL per kg of body weight, 0 or more; throws RangeError otherwise. */
export const millilitresPerKg = (n: number): MillilitresPerKg => zeroOrMore(n, 'mL/kg') as MillilitresPerKg;

/** A day's volume in mL per kg, 0 or more; throws RangeError otherwise. */
export const millilitresPerKgPerDay = (n: number): MillilitresPerKgPerDay =>
  zeroOrMore(n, 'mL/kg/day') as MillilitresPerKgPerDay;

/** A flow in mL per kg per hour, 0 or more; throws RangeError otherwise. */
export const millilitresPerKgPerHour = (n: number): MillilitresPerKgPerHour =>
  zeroOrMore(n, 'mL/kg/h') as MillilitresPerKgPerHour;

/** A length of time in hours, above 0; throws RangeError otherwise. */
export const hours = (n: number): Hours => positive(n, 'h') as Hours;

/** A length of time in minutes, above 0; throws RangeError otherwise. */
export const minutes = (n: number): Minutes => positive(n, 'min') as Minutes;

/** A concentration in mmol/L, 0 or more; throws RangeError otherwise. */
export const mmolPerLitre = (n: number): MmolPerLitre => zeroOrMore(n, 'mmol/L') as MmolPerLitre;

/** A concentration in mOsm/L, 0 or more; throws RangeError otherwise. */
export const milliosmolesPerLitre = (n: number): MilliosmolesPerLitre =>
  zeroOrMore(n, 'mOsm/L') as MilliosmolesPerLitre;

/** Glucose content in g/L, 0 or more; throws RangeError otherwise. */
export const gramsPerLitre = (n: number): GramsPerLitre => zeroOrMore(n, 'g/L') as GramsPerLitre;

/** The volume a flow gives in a time, mL. */
export const volumeIn = (rate: MillilitresPerHour, time: Hours): Millilitres => (rate * time) as Millilitres;

/** The flow that gives a volume in a number of hours, mL/h. */
export const flowOver = (volume: Millilitres, time: Hours): MillilitresPerHour =>
  (volume / time) as MillilitresPerHour;

/** The flow that gives a volume in a number of minutes, mL/h. */
export const flowOverMinutes = (volume: Millilitres, time: Minutes): MillilitresPerHour =>
  ((volume * 60) / time) as MillilitresPerHour;

/** The volume of a dose by weight, mL. */
export const volumeFor = (dose: MillilitresPerKg, weight: Kilograms): Millilitres =>
  (dose * weight) as Millilitres;

/** A volume in mL per kg of body weight. */
export const perKg = (volume: Millilitres, weight: Kilograms): MillilitresPerKg =>
  (volume / weight) as MillilitresPerKg;

/** A flow in mL per kg per hour. */
export const flowPerKg = (rate: MillilitresPerHour, weight: Kilograms): MillilitresPerKgPerHour =>
  (rate / weight) as MillilitresPerKgPerHour;

/** What a flow of a solution carries each hour, mmol/h. */
export const molesPerHour = (content: MmolPerLitre, rate: MillilitresPerHour): MmolPerHour =>
  ((content * rate) / 1000) as MmolPerHour;

/** What a flow of a solution carries each hour for each kg, mmol/kg/h. */
export const molesPerKgPerHour = (perHour: MmolPerHour, weight: Kilograms): MmolPerKgPerHour =>
  (perHour / weight) as MmolPerKgPerHour;

/** What a day's volume of a solution carries for each kg, mmol/kg/day. */
export const molesPerKgPerDay = (
  content: MmolPerLitre,
  day: Millilitres,
  weight: Kilograms,
): MmolPerKgPerDay => ((content * day) / 1000 / weight) as MmolPerKgPerDay;

/** Glucose given by a flow, mg/kg/min: g/L × mL/h ÷ 60 ÷ kg, which is % × mL/h ÷ (6 × kg). */
export const glucoseRate = (
  content: GramsPerLitre,
  rate: MillilitresPerHour,
  weight: Kilograms,
): MgPerKgPerMinute => ((content * rate) / 60 / weight) as MgPerKgPerMinute;

/** Energy of a day's volume at 4 kcal for each gram of glucose, kcal/kg/day. */
export const glucoseEnergy = (
  content: GramsPerLitre,
  day: Millilitres,
  weight: Kilograms,
): KilocaloriesPerKgPerDay => ((((content * day) / 1000) * 4) / weight) as KilocaloriesPerKgPerDay;

/** Glucose content in g per 100 mL, the percentage printed on the bag. */
export const percentOf = (content: GramsPerLitre): number => content / 10;
