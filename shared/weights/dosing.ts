import { ageAt } from '../children/age';
import { DAY, HOUR, type Instant } from '../time';
import { isMeasured, latestBefore, METHOD_WORDS, type ChartWeight, type WeighedChild } from './chart-weight';
import { DEFAULT_WEIGHT_LIMITS, type WeightLimits } from './limits';

export type DosingChoice<W extends ChartWeight> = {
  weight: W;
  /** Why this one. */
  basis: 'measured' | 'birth-weight' | 'estimated' | 'stated';
  /** Not measured: the order lives half as long and every page says so. */
  isEstimate: boolean;
};

/** The weight to propose for an order: the latest usable measured one, else the latest guess; none invented. */
export function dosingWeight<W extends ChartWeight>(
  weights: readonly W[],
  child: WeighedChild,
  at: Instant,
  zone: string,
): DosingChoice<W> | undefined {
  const usable = weights.filter((weight) => weight.usable && weight.at <= at);
  const weighed = latestBefore(
    usable.filter(({ method }) => isMeasured(method) && method !== 'birth-weight'),
    at,
  );
  const atBirth = latestBefore(
    usable.filter(({ method }) => method === 'birth-weight'),
    at,
  );
  // a newborn loses weight in the first days and regains it: until then the birth weight holds (RCH)
  if (atBirth && ageAt(child, at, zone).isNewborn && !(weighed && weighed.kg >= atBirth.kg)) {
    return { weight: atBirth, basis: 'birth-weight', isEstimate: false };
  }
  if (weighed) return { weight: weighed, basis: 'measured', isEstimate: false };
  const guessed = latestBefore(
    usable.filter(({ method }) => !isMeasured(method)),
    at,
  );
  if (guessed)
    return { weight: guessed, basis: guessed.method === 'stated' ? 'stated' : 'estimated', isEstimate: true };
  return atBirth && { weight: atBirth, basis: 'birth-weight', isEstimate: false };
}

/** `ok`; `due` to weigh again on running fluids; `senior` before a new order; `never` measured. */
export type Freshness = 'ok' | 'due' | 'senior' | 'never';

/** How the age of the last measured weight stands: due beyond 24 h, senior beyond 7 days, for a newborn 48 h. */
export function weightFreshness(
  lastMeasuredAt: Instant | undefined,
  at: Instant,
  isNewborn: boolean,
  limits: WeightLimits = DEFAULT_WEIGHT_LIMITS,
): Freshness {
  if (lastMeasuredAt === undefined) return 'never';
  const age = at - lastMeasuredAt;
  const longest = isNewborn ? limits.freshHoursNewborn * HOUR : limits.freshDays * DAY;
  if (age > longest) return 'senior';
  return age > limits.dueHours * HOUR ? 'due' : 'ok';
}

/** When the child was last measured, birth weight included; undefined if never. */
export const lastMeasuredAt = (weights: readonly ChartWeight[], at: Instant): Instant | undefined =>
  latestBefore(
    weights.filter(({ method, usable }) => usable && isMeasured(method)),
    at,
  )?.at;

/** What a page adds to a weight that is not fresh and measured: 'estimated from age', '9 days old', '31 h old'; else ''. */
export function staleText(
  weight: Pick<ChartWeight, 'method' | 'at'>,
  at: Instant,
  isNewborn: boolean,
  limits: WeightLimits = DEFAULT_WEIGHT_LIMITS,
): string {
  const words: string[] = isMeasured(weight.method) ? [] : [METHOD_WORDS[weight.method]];
  if (weightFreshness(weight.at, at, isNewborn, limits) !== 'ok')
    words.push(`${oldText(at - weight.at)} old`);
  return words.join(', ');
}

function oldText(ms: number): string {
  const hours = Math.floor(ms / HOUR);
  return hours < 48 ? `${hours} h` : `${Math.floor(hours / 24)} days`;
}
