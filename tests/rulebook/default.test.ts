import { canonicalText } from '@shared/canonical';
import { ABSOLUTE } from '@shared/rulebook/absolute';
import { DEFAULT_RULEBOOK, DEFAULT_SECTIONS } from '@shared/rulebook/default';
import { parseRulebook, rulebookContent, rulebookSchema } from '@shared/rulebook/document';
import type { Rulebook } from '@shared/rulebook/document';
import { openRulebook, ruleValues } from '@shared/rulebook/read';
import { describe, expect, it } from 'vitest';

/** The default rulebook with one number changed. */
function withValue(section: string, entry: string, value: number): Rulebook {
  const before = DEFAULT_RULEBOOK.sections[section]!;
  const entries = { ...before.entries, [entry]: { ...before.entries[entry]!, value } };
  return {
    number: 2,
    sections: { ...DEFAULT_RULEBOOK.sections, [section]: { ...before, entries } },
  } as Rulebook;
}

describe('the default rulebook', () => {
  it('is a valid document whose every entry has unit, source and label', () => {
    expect(rulebookSchema.safeParse(DEFAULT_RULEBOOK).error).toBeUndefined();
  });

  it('survives being stored as text and read back', () => {
    const text = canonicalText(rulebookContent(DEFAULT_RULEBOOK));
    expect(parseRulebook(JSON.parse(text))).toEqual({ ...DEFAULT_RULEBOOK });
    expect(canonicalText(rulebookContent(parseRulebook(JSON.parse(text))))).toBe(text);
  });

  it.each([
    ['maintenance', 'ceilingBoys', 2500, 'NICE NG29 1.4'],
    ['maintenance', 'ceilingGirls', 2000, 'NICE NG29 1.4'],
    ['bolus', 'brimMl', 500, 'common practice'],
    ['bolus', 'brimMlPerKg', 20, 'NICE NG29 1.3'],
    ['bolus', 'totalSenior', 40, 'NICE NG29'],
    ['potassium', 'peripheralMost', 40, 'MSF, NHS Highland'],
    ['potassium', 'peripheralPerKg', 0.2, 'Irish formulary, PCH'],
    ['osmolarity', 'peripheralBrim', 1000, 'ASPEN 2014'],
    ['glucose', 'peripheralPercent', 12.5, 'Leeds'],
    ['weight', 'freshDays', 7, 'common practice'],
    ['check', 'weightPercent', 1, 'ours'],
    ['check', 'dueRoutine', 60, 'ours, to verify'],
    ['windows', 'startHoursBolus', 2, 'ours, to verify'],
  ])('%s.%s is %s (%s)', (section, entry, value) => {
    expect(DEFAULT_RULEBOOK.sections[section]?.entries[entry]?.value).toBe(value);
  });
});

describe('what no rulebook may say', () => {
  it.each([
    ['maintenance', 'ceilingBoys', ABSOLUTE.maintenanceMlPer24h],
    ['bolus', 'brimMl', ABSOLUTE.bolusMl],
    ['bolus', 'brimMlPerKg', ABSOLUTE.bolusMlPerKg],
  ])('%s.%s above the last resort of %s', (section, entry, most) => {
    expect(rulebookSchema.safeParse(withValue(section, entry, most)).success).toBe(true);
    const past = withValue(section, entry, most + 1);
    const widened = { ...past.sections[section]!.entries[entry]!, max: most * 2 };
    const sections = {
      ...past.sections,
      [section]: {
        ...past.sections[section]!,
        entries: { ...past.sections[section]!.entries, [entry]: widened },
      },
    };
    expect(rulebookSchema.safeParse({ number: 2, sections }).error?.issues[0]?.message).toBe(
      `at most ${most}`,
    );
  });

  it('a value outside its own range, or a choice it does not offer', () => {
    expect(rulebookSchema.safeParse(withValue('potassium', 'peripheralMost', 61)).success).toBe(false);
    expect(rulebookSchema.safeParse(withValue('pharmacist', 'verify', 3)).success).toBe(false);
  });

  it('a number that is not a plain decimal text in storage', () => {
    const content = JSON.parse(canonicalText(rulebookContent(DEFAULT_RULEBOOK)));
    content.sections.bolus.entries.brimMl.value = '5e2';
    expect(() => parseRulebook(content)).toThrow();
  });
});

describe('reading', () => {
  it('gives typed values and their sources', () => {
    const open = openRulebook(DEFAULT_RULEBOOK);
    expect(open.values.bolus.brimMl).toBe(500);
    expect(open.values.pharmacist.verify).toBe('never');
    expect(open.sources.bolus.brimMl).toBe('common practice');
    expect(openRulebook(DEFAULT_RULEBOOK)).toBe(open);
    expect(open.silent.size).toBe(0);
  });

  it('says where a rulebook is silent', () => {
    const { check: _, ...sections } = DEFAULT_SECTIONS;
    const silent = { number: 3, sections };
    expect([...openRulebook(silent).silent]).toEqual(['check']);
    expect(() => ruleValues(silent, 'check')).toThrow('says nothing of check');
    expect(ruleValues(silent, 'windows').startHours).toBe(6);
  });
});
