import type { Instant } from '@shared/time';
import type { Step, Story } from '../../fixtures/demo/script';
import * as bedside from './bedside-acts';
import * as checks from './check-acts';
import * as child from './child-acts';
import * as orders from './order-acts';
import { agoAt, StepRefused, type AnyTurn, type PlayedChild, type Scene, type Turn } from './scene';

type Players = { [Do in Step['do']]: (turn: Turn<Do>) => Promise<void> };

const PLAYERS: Players = {
  register: child.register,
  weigh: child.weigh,
  results: child.addResults,
  'bolus-elsewhere': child.bolusElsewhere,
  plan: child.plan,
  draft: orders.draft,
  retype: orders.retype,
  sign: orders.sign,
  discard: orders.discard,
  ask: orders.ask,
  telephone: orders.telephone,
  decide: orders.decide,
  'write-check': checks.writeCheck,
  'lock-in': checks.lockIn,
  agree: checks.agree,
  return: checks.cannotVerify,
  'pass-on': checks.passOn,
  slip: checks.slip,
  settle: orders.settle,
  revise: orders.revise,
  withdraw: orders.withdraw,
  compare: bedside.compare,
  start: bedside.start,
  hold: bedside.hold,
  resume: bedside.resume,
  'send-away': bedside.sendAway,
  stop: bedside.stop,
  finish: bedside.finish,
  given: checks.given,
  countersign: checks.countersign,
  print: bedside.print,
};

export type Planned = { at: Instant; child: PlayedChild; step: Step };

/** Every step of every story in the order of the clock; steps of one moment in the order they are written. */
export function timelineOf(stories: readonly Story[], now: Instant): Planned[] {
  return stories
    .flatMap((story) => {
      const played: PlayedChild = { story, childId: '', orders: new Map() };
      return story.steps.map((step) => ({ at: agoAt(now, step.ago), child: played, step }));
    })
    .sort((a, b) => a.at - b.at);
}

/** Plays one step; throws, naming the step, when the program answers otherwise than the story says. */
export async function play(scene: Scene, planned: Planned): Promise<void> {
  const { step } = planned;
  const player = PLAYERS[step.do] as (turn: AnyTurn) => Promise<void>;
  const where = `${planned.child.story.child.surname}, ${step.ago} ago, ${step.by}: ${step.do}`;
  try {
    await player({ scene, ...planned });
  } catch (error) {
    if (error instanceof StepRefused && step.refused === error.code) return;
    throw new Error(where, { cause: error });
  }
  if (step.refused !== undefined) throw new Error(`${where} was not refused with ${step.refused}`);
}
