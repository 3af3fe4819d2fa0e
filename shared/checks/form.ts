import { z } from 'zod';

/** Every field of the checker's own figures. Unsent figures are a draft of the checker's, as typed. */
export const CHECK_FORM_FIELDS = [
  'initials',
  'sex',
  'age',
  'ageUnit',
  'weightKg',
  'weightSource',
  'feedsMl',
  'drugsMl',
  'method',
  'fraction',
  'temperatureC',
  'newbornMlPerKgPerDay',
  'base',
  'addedPotassium',
  'rate',
  'volumeMl',
  'hours',
  'overMinutes',
  'workedOutBy',
] as const;
export type CheckFormField = (typeof CHECK_FORM_FIELDS)[number];
export type CheckForm = Record<CheckFormField, string>;

const text = z.string().max(400);

export const checkFormSchema: z.ZodType<CheckForm> = z.object(
  Object.fromEntries(CHECK_FORM_FIELDS.map((field) => [field, text])) as Record<CheckFormField, typeof text>,
);

/** Nothing is filled in for a checker: no default, no earlier value. */
export const emptyCheckForm = (): CheckForm =>
  Object.fromEntries(CHECK_FORM_FIELDS.map((field) => [field, ''])) as CheckForm;

export const WEIGHT_SOURCES = ['weighed-now', 'read-from-scales', 'read-from-chart'] as const;
export type WeightSource = (typeof WEIGHT_SOURCES)[number];
/** By hand, or worked out by the program from the checker's own entries: which one is recorded. */
export const WORKED_OUT_BY = ['hand', 'program'] as const;

/** One compared row, after lock-in. */
export const comparedRowSchema = z.object({
  field: z.string(),
  label: z.string(),
  nature: z.enum(['fact', 'choice', 'follows']),
  author: z.string(),
  checker: z.string(),
  agrees: z.boolean(),
  /** How far apart, in words with unit; empty when it agrees. */
  apart: z.string(),
});
export type ComparedRow = z.infer<typeof comparedRowSchema>;

export const comparisonSchema = z.object({
  outcome: z.enum(['agreed', 'choices-differ', 'facts-differ']),
  /** Whether a differing choice may be accepted with a reason: both are allowed by the rulebook. */
  mayAccept: z.boolean(),
  rows: z.array(comparedRowSchema),
  /** What the difference would have done to the child, in a sentence; empty when all agrees. */
  effect: z.string(),
});
export type Comparison = z.infer<typeof comparisonSchema>;
