import type { Strength } from '../calc/types';
import { ageAt, DUE_WEEKS, isPretermNow, TERM_WEEKS, type Age } from '../children/age';
import { weightForAge } from '../growth/weight-for-age';
import { snap, toDecimals } from '../rounding';
import { DAY, formatDayTime } from '../time';
import { isMeasured, kgText, latestBefore, type ChartWeight, type WeighedChild } from './chart-weight';
import { DEFAULT_WEIGHT_LIMITS, type WeightLimits } from './limits';
import { lookAlike } from './look-alike';

export type WeightAssessment = Omit<ChartWeight, 'usable'> & {
  child: WeighedChild;
  /** The weights on the chart, in any order. */
  history: readonly ChartWeight[];
  zone: string;
};

export type WeightFindingCode =
  'far-outside' | 'outside' | 'looks-like-pounds' | 'slipped-point' | 'changed-much' | 'no-reference';

export type WeightFinding = {
  code: WeightFindingCode;
  strength: Strength;
  text: string;
  /** A weight that may have been meant; the person takes it or measures again, the program never does. */
  offer?: { field: 'kg'; value: string; label: string };
};

/** What a weight needs before an order may use it. */
export type WeightVerdict = 'accept' | 'second-measurement' | 'second-person';

export type WeightOpinion = {
  verdict: WeightVerdict;
  /** Weight for age, unrounded; absent where no reference fits. */
  z?: number;
  findings: WeightFinding[];
};

/** Holds a weight against the growth references, its look-alikes and the weights before it. */
export function assessWeight(
  entry: WeightAssessment,
  limits: WeightLimits = DEFAULT_WEIGHT_LIMITS,
): WeightOpinion {
  const age = ageAt(entry.child, entry.at, entry.zone);
  const days = referenceDays(entry, age);
  const z = days === undefined ? undefined : weightForAge(entry.kg, entry.child.sex, days);
  const found = [
    z === undefined || days === undefined ? noReference : outside(entry, z, limits),
    z === undefined || days === undefined ? undefined : meant({ entry, age, z, days }, limits),
    changed(entry, limits),
  ];
  const findings = found.filter((finding) => finding !== undefined);
  return { verdict: verdictOf(findings), z, findings };
}

function verdictOf(findings: readonly WeightFinding[]): WeightVerdict {
  if (findings.some(({ code }) => code === 'far-outside')) return 'second-person';
  return findings.some(({ strength }) => strength !== 'information') ? 'second-measurement' : 'accept';
}

/**
 * The age in days to look up: none before 40+0 weeks for a child born before 37+0, counted from that day until
 * the second birthday (common practice), as it is afterwards and for everyone else.
 */
function referenceDays({ child, at, zone }: WeightAssessment, age: Age): number | undefined {
  if (age.isUnborn || isPretermNow(child, at, zone)) return undefined;
  if (child.gestationWeeks === undefined || child.gestationWeeks >= TERM_WEEKS || age.years >= 2)
    return age.days;
  const early = DUE_WEEKS * 7 - (child.gestationWeeks * 7 + (child.gestationDays ?? 0));
  return Math.max(0, age.days - early);
}

const noReference: WeightFinding = {
  code: 'no-reference',
  strength: 'information',
  text: 'No growth reference fits this age and gestation: read the scales twice.',
};

function outside({ kg }: WeightAssessment, z: number, limits: WeightLimits): WeightFinding | undefined {
  const far = Math.abs(z);
  if (far <= limits.zCaution) return undefined;
  const said = (how: string) =>
    `${kgText(kg)} is ${how} ${z < 0 ? 'light' : 'heavy'} for this age (z ${signed(z)})`;
  return far > limits.zStop
    ? {
        code: 'far-outside',
        strength: 'brim',
        text: `${said('far too')}: no order until another person has measured again.`,
      }
    : { code: 'outside', strength: 'caution', text: `${said('unusually')}: measure again.` };
}

/** A z-score for people: one decimal and its sign. */
const signed = (z: number): string => `${z < 0 ? '−' : '+'}${toDecimals(Math.abs(z), 1).toFixed(1)}`;

type Placed = { entry: WeightAssessment; age: Age; z: number; days: number };

function meant({ entry, age, z, days }: Placed, limits: WeightLimits): WeightFinding | undefined {
  const isYounger = age.years < limits.lookalikeYears;
  if (Math.abs(z) <= (isYounger ? limits.lookalikeZYounger : limits.lookalikeZOlder)) return undefined;
  // an older child may well be that heavy: a recent measured weight that agrees settles it
  if (!isYounger && recentAgrees(entry, limits)) return undefined;
  const found = lookAlike(entry.kg, entry.child.sex, days, limits);
  if (found === undefined) return undefined;
  const value = String(found.kg);
  return {
    code: found.code,
    strength: 'caution',
    text: `${found.text} Measure again.`,
    offer: { field: 'kg', value, label: `Use ${kgText(found.kg)}` },
  };
}

const measuredOf = (history: readonly ChartWeight[]) =>
  history.filter(({ method, usable }) => usable && isMeasured(method));

/** The difference as a percentage of the earlier weight, free of binary noise. */
const changePercent = (now: number, before: number): number => snap(((now - before) / before) * 100);

function recentAgrees({ kg, at, history }: WeightAssessment, limits: WeightLimits): boolean {
  return measuredOf(history).some(
    (weight) =>
      weight.at <= at &&
      at - weight.at <= limits.agreesDays * DAY &&
      Math.abs(changePercent(kg, weight.kg)) <= limits.agreesPercent,
  );
}

function changed(
  { kg, at, history, zone }: WeightAssessment,
  limits: WeightLimits,
): WeightFinding | undefined {
  const last = latestBefore(measuredOf(history), at);
  if (last === undefined || at - last.at > limits.changeDays * DAY) return undefined;
  const percent = changePercent(kg, last.kg);
  if (Math.abs(percent) <= limits.changePercent) return undefined;
  const difference = kgText(toDecimals(Math.abs(kg - last.kg), 3));
  const words = `${difference} (${toDecimals(Math.abs(percent), 0)} %) ${percent < 0 ? 'less' : 'more'}`;
  return {
    code: 'changed-much',
    strength: 'caution',
    text: `${words} than ${kgText(last.kg)} on ${formatDayTime(last.at, zone)}: measure again.`,
  };
}
