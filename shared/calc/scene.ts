import { ageAt, inScope } from '../children/age';
import type { Age } from '../children/age';
import type { OpenRulebook, RuleValues } from '../rulebook/read';
import type { Steps } from '../rounding';
import type { WorkOut, WorkOutRequest } from './types';

export type Refusal = Extract<WorkOut, { ok: false }>;

/** What is known before anything is chosen. */
export type BeforeOrder = Omit<WorkOutRequest, 'order'>;

/** One request with everything the rules ask about it, looked up once. */
export type Scene<Request extends BeforeOrder = WorkOutRequest> = {
  request: Request;
  rules: RuleValues;
  sources: OpenRulebook['sources'];
  rulebook: number;
  steps: Steps;
  age: Age;
  /** Kinds for which senior matters never delay. */
  emergency: boolean;
  /** Everything but a central line is held to the peripheral limits. */
  peripheral: boolean;
};

export const refuse = (code: string, detail: string, field?: string, offer?: Refusal['offer']): Refusal => ({
  ok: false,
  code,
  detail,
  ...(field === undefined ? {} : { field }),
  ...(offer === undefined ? {} : { offer }),
});

const stepsOf = new WeakMap<RuleValues, Steps>();

/** The pump's and the volumes' steps of a rulebook, made once. */
export function stepsIn(rules: RuleValues): Steps {
  const known = stepsOf.get(rules);
  if (known) return known;
  const { stepLow, stepHigh, stepFrom, volumeStep, smallVolumeStep, smallVolumeBelow } = rules.pump;
  const steps: Steps = {
    low: stepLow,
    high: stepHigh,
    from: stepFrom,
    volume: volumeStep,
    smallVolume: smallVolumeStep,
    smallBelow: smallVolumeBelow,
  };
  stepsOf.set(rules, steps);
  return steps;
}

/** Sets the scene, or refuses a child outside the scope of clinical use. */
export function setScene<Request extends BeforeOrder>(
  request: Request,
  open: OpenRulebook,
  emergency: boolean,
): Scene<Request> | Refusal {
  const { child, at, zone } = request;
  const scope = inScope(child, at, zone, { maxYears: open.values.scope.untilYears, emergency });
  if (!scope.ok)
    return refuse(
      scope.code,
      scope.message,
      scope.code === 'gestation-unknown' ? 'gestationWeeks' : undefined,
    );
  return {
    request,
    rules: open.values,
    sources: open.sources,
    rulebook: open.number,
    steps: stepsIn(open.values),
    age: ageAt(child, at, zone),
    emergency,
    peripheral: request.line !== 'central',
  };
}

export const isRefusal = (outcome: object): outcome is Refusal => 'ok' in outcome && outcome.ok === false;

/** Other intake of 24 h that counts against maintenance, mL. */
export const countedIntake = (order: { feeds: number; drugs: number }): number => order.feeds + order.drugs;
