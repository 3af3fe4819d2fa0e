import type { RouteDefinition } from '@shared/routes/define';
import {
  DAY,
  HOUR,
  instant,
  localDateTime,
  localDateTimeToInstant,
  MINUTE,
  type Instant,
} from '@shared/time';
import type { z } from 'zod';
import type { Ago, Step, Story } from '../../fixtures/demo/script';
import type { Database } from '../db/client';
import type { CallParts, Screens } from './call-api';
import type { MadeHospital } from './make-hospital';
import type { DemoPersonKey } from './people';

/** An order of a story: its newest version and who wrote it. */
export type PlayedOrder = { orderId: string; versionId: string; author: DemoPersonKey };

/** One child's story as far as it has been played. */
export type PlayedChild = { story: Story; childId: string; orders: Map<string, PlayedOrder> };

/** Everything a step is played with. */
export type Scene = {
  screens: Screens;
  hospital: MadeHospital<DemoPersonKey>;
  owner: Database;
  /** The end of the timeline. */
  now: Instant;
};

/** Whose turn it is, whatever they do. */
export type AnyTurn = { scene: Scene; child: PlayedChild; step: { by: DemoPersonKey }; at: Instant };

/** One step as it is played, at its time. */
export type Turn<Do extends Step['do']> = AnyTurn & { step: Extract<Step, { do: Do }> };

const UNITS: Readonly<Record<string, number>> = { d: DAY, h: HOUR, m: MINUTE };

/** Milliseconds of "2d 3h 20m"; throws RangeError on anything else. */
export function agoMs(ago: Ago): number {
  const parts = ago.split(' ').map((part) => /^(\d+)([dhm])$/.exec(part));
  if (parts.includes(null)) throw new RangeError(`not a time before now: ${ago}`);
  return parts.reduce((sum, part) => sum + Number(part?.[1]) * (UNITS[part?.[2] ?? ''] ?? 0), 0);
}

export const agoAt = (now: Instant, ago: Ago): Instant => instant(now - agoMs(ago));

/** A moment as a form field takes it; on a clock-change night the next hour that exists once. */
export function typedMoment(at: Instant, zone: string, shift = HOUR): string {
  const text = localDateTime(at, zone);
  return localDateTimeToInstant(text, zone).ok ? text : typedMoment(instant(at + shift), zone, shift);
}

/** Calls the API as the step's person; throws with the story's place when the answer is a problem. */
export async function call<Route extends RouteDefinition>(
  turn: AnyTurn,
  route: Route,
  parts: CallParts = {},
  who: DemoPersonKey = turn.step.by,
): Promise<z.output<Route['response']>> {
  const answer = await turn.scene.screens.tryCall(who, route, parts);
  if (answer.ok) return answer.value;
  throw new StepRefused(answer.code, `${route.method} ${route.path} ${JSON.stringify(answer.problem)}`);
}

/** The program refused what a step asked for. */
export class StepRefused extends Error {
  constructor(
    readonly code: string,
    message: string,
  ) {
    super(message);
  }
}

export function orderOf({ child }: AnyTurn, name: string): PlayedOrder {
  const order = child.orders.get(name);
  if (order === undefined) throw new Error(`no order "${name}" for ${child.story.child.surname} yet`);
  return order;
}
