import { z } from 'zod';
import { ABSOLUTE } from './absolute';

/** How sure the product is of a value; everything but `read` is on the list to verify before clinical use. */
export const CERTAINTIES = ['read', 'secondary', 'from-memory', 'common-practice', 'ours'] as const;
export type Certainty = (typeof CERTAINTIES)[number];

const common = {
  unit: z.string(),
  source: z.string().min(1),
  certainty: z.enum(CERTAINTIES),
  label: z.string().min(1),
};

/** A number with the range a hospital may choose from; ends included. */
const numberEntrySchema = z
  .strictObject({ type: z.literal('number'), value: z.number(), min: z.number(), max: z.number(), ...common })
  .refine((entry) => entry.min <= entry.value && entry.value <= entry.max, {
    error: 'the value is outside its own range',
    path: ['value'],
  });

/** One of a few words. */
const choiceEntrySchema = z
  .strictObject({
    type: z.literal('choice'),
    value: z.string(),
    choices: z.array(z.string()).min(1),
    ...common,
  })
  .refine((entry) => entry.choices.includes(entry.value), {
    error: 'the value is none of its choices',
    path: ['value'],
  });

const entrySchema = z.union([numberEntrySchema, choiceEntrySchema]);
const sectionSchema = z.strictObject({
  label: z.string().min(1),
  entries: z.record(z.string(), entrySchema),
});

export type NumberEntry = z.infer<typeof numberEntrySchema>;
export type ChoiceEntry<Choice extends string = string> = Omit<z.infer<typeof choiceEntrySchema>, 'value'> & {
  value: Choice;
};
export type RulebookEntry = NumberEntry | ChoiceEntry;
export type RulebookSection = { label: string; entries: Record<string, RulebookEntry> };

/** One numbered edition of a hospital's limits; `hash` is the SHA-256 of its stored text. */
export type Rulebook = { number: number; hash?: string; sections: Record<string, RulebookSection> };

/** Entries that the database bounds too: no rulebook may go past them. */
const LAST_RESORT: [section: string, entry: string, most: number][] = [
  ['maintenance', 'ceilingBoys', ABSOLUTE.maintenanceMlPer24h],
  ['maintenance', 'ceilingGirls', ABSOLUTE.maintenanceMlPer24h],
  ['bolus', 'brimMl', ABSOLUTE.bolusMl],
  ['bolus', 'brimMlPerKg', ABSOLUTE.bolusMlPerKg],
];

export const rulebookSchema = z
  .strictObject({
    number: z.int().min(1),
    hash: z.string().optional(),
    sections: z.record(z.string(), sectionSchema),
  })
  .superRefine((rulebook, check) => {
    for (const [section, entry, most] of LAST_RESORT) {
      const value = rulebook.sections[section]?.entries[entry]?.value;
      if (typeof value !== 'number' || value <= most) continue;
      check.addIssue({
        code: 'custom',
        path: ['sections', section, 'entries', entry, 'value'],
        message: `at most ${most}`,
      });
    }
  });

const numberText = z.string().regex(/^-?(0|[1-9]\d*)(\.\d+)?$/);
const storedSchema = z.object({
  number: z.int(),
  sections: z.record(
    z.string(),
    z.object({
      label: z.string(),
      entries: z.record(z.string(), z.looseObject({ type: z.string(), value: z.string() })),
    }),
  ),
});

const NUMBERS = ['value', 'min', 'max'] as const;

/** The rulebook as it is stored and hashed, with every number a decimal string; hand it to `canonicalText`. */
export function rulebookContent(rulebook: Rulebook): Record<string, unknown> {
  const texts = (entry: RulebookEntry) =>
    entry.type === 'number'
      ? { ...entry, value: String(entry.value), min: String(entry.min), max: String(entry.max) }
      : entry;
  const sections = Object.entries(rulebook.sections).map(([name, section]) => [
    name,
    { label: section.label, entries: mapValues(section.entries, texts) },
  ]);
  return { number: rulebook.number, sections: Object.fromEntries(sections) as unknown };
}

/** Reads what `rulebookContent` made; throws a ZodError where the text is no rulebook. */
export function parseRulebook(content: unknown): Rulebook {
  const stored = storedSchema.parse(content);
  const sections = mapValues(stored.sections, (section) => ({
    label: section.label,
    entries: mapValues(section.entries, numbersOf),
  }));
  return rulebookSchema.parse({ number: stored.number, sections });
}

function numbersOf(entry: Record<string, unknown>): Record<string, unknown> {
  if (entry.type !== 'number') return entry;
  const numbers = NUMBERS.map((key) => [key, Number(numberText.parse(entry[key]))]);
  return { ...entry, ...(Object.fromEntries(numbers) as Record<string, number>) };
}

function mapValues<A, B>(record: Record<string, A>, change: (value: A) => B): Record<string, B> {
  return Object.fromEntries(Object.entries(record).map(([key, value]) => [key, change(value)]));
}
