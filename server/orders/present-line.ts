import { decimalText } from '@shared/canonical';
import { orderContentSchema, type OrderContent } from '@shared/orders/content';
import { isOverdue, type VersionState } from '@shared/orders/states';
import { titleOf } from '@shared/orders/words';
import type { OrderLine } from '@shared/routes/children';
import { formatDuration, formatRelativeDay, HOUR, instant, toRfc3339, type Instant } from '@shared/time';

/** What a line reads of stored content; the rest is not parsed for a list. */
const lineContentSchema = orderContentSchema.pick({
  inputs: true,
  figures: true,
  fluid: true,
  gauge: true,
  limits: true,
});
type LineContent = Pick<OrderContent, 'inputs' | 'figures' | 'fluid' | 'gauge' | 'limits'>;

/** Title, fluid, figures and small gauge of a version that is open to the reader, from its stored content. */
export const presentOpen = (content: string, author: string): OrderLine['open'] =>
  presentContent(lineContentSchema.parse(JSON.parse(content)), author);

/** The same from content that is not stored yet: an own draft as it would be signed. */
export function presentContent(content: LineContent, author: string): NonNullable<OrderLine['open']> {
  const { figures, fluid, gauge, limits } = content;
  const over = limits.find((limit) => limit.strength === 'brim' && !limit.met);
  return {
    title: titleOf(content),
    fluid: fluid.name,
    rateMlPerH: figures.rateMlPerH,
    volumeMl: figures.volumeMl,
    gauge: { orderMl: gauge.orderMl, brimMl: gauge.brimMl, notches: notchesOf(gauge.bands) },
    author,
    overBrimText: over === undefined ? null : over.title,
  };
}

/** Band boundaries, the last one the full maintenance. */
function notchesOf(bands: OrderContent['gauge']['bands']): string[] {
  let sum = 0;
  return bands.map(({ ml }) => {
    sum += Number(ml);
    return decimalText(Math.round(sum * 10) / 10, 1);
  });
}

/** Moments of a version; those that would tell its duration are null while it is covered to the reader. */
export type LineTimes = {
  state: VersionState;
  stateSince: Instant;
  signedAt: Instant | null;
  checkDueAt: Instant | null;
  startBy: Instant | null;
  lapsesAt: Instant | null;
  endReason: string | null;
};

export type LineClock = { now: Instant; zone: string; holdHours: number };

type NextDue = OrderLine['nextDue'];

/** '12:00' today, with its day otherwise. */
const when = (at: Instant, { now, zone }: LineClock): string =>
  formatRelativeDay(at, now, zone).replace(/^today, /, '');

const due = (text: string, at: Instant | null, isLate: boolean, note = ''): NextDue => ({
  text,
  at: at === null ? null : toRfc3339(at),
  isLate,
  note,
});

type Rule = (times: LineTimes, clock: LineClock) => NextDue;

/** A moment that was to come: its words before it, and how long it is over after it. */
function deadline(words: string, at: Instant | null, note: string, clock: LineClock): NextDue {
  if (at === null) return due(words.replace(/ by$/, ''), null, false, note);
  const { now } = clock;
  const isLate = now > at;
  return due(
    `${words} ${when(at, clock)}`,
    at,
    isLate,
    isLate ? `late by ${formatDuration(now - at)}` : note,
  );
}

const since =
  (text: string, word: string): Rule =>
  ({ stateSince }, clock) =>
    due(text, null, false, `${word} ${when(stateSince, clock)}`);

const runs: Rule = ({ state, stateSince, lapsesAt }, clock) => {
  const { now } = clock;
  const note = `since ${when(stateSince, clock)}`;
  if (lapsesAt === null || !isOverdue(state, lapsesAt, now)) return deadline('Lapses', lapsesAt, note, clock);
  return due('Overdue', lapsesAt, true, `lapsed ${when(lapsesAt, clock)}, still connected`);
};

const holds: Rule = ({ stateSince }, clock) =>
  deadline('Hold ends', instant(Math.round(stateSince + clock.holdHours * HOUR)), '', clock);

const waits: Rule = ({ signedAt, checkDueAt, stateSince }, clock) => {
  const from = signedAt ?? stateSince;
  const isLate = checkDueAt !== null && clock.now > checkDueAt;
  const waited = formatDuration(Math.max(0, clock.now - from));
  return due(`Waited ${waited}`, checkDueAt, isLate, `signed ${when(from, clock)}`);
};

const ended = (word: string): Rule => since('Ended', word);

const RULES: Readonly<Record<VersionState, Rule>> = {
  draft: since('Draft open', 'since'),
  'awaiting-check': waits,
  disputed: since('Figures differ', 'since'),
  returned: since('With prescriber', 'returned'),
  'awaiting-pharmacist': since('With pharmacist', 'since'),
  signed: ({ startBy, stateSince }, clock) =>
    deadline('Start by', startBy, `signed ${when(stateSince, clock)}`, clock),
  running: runs,
  held: holds,
  away: since('Away', 'since'),
  stopped: ({ stateSince, endReason }, clock) =>
    due(
      'New order or none',
      null,
      false,
      [`stopped ${when(stateSince, clock)}`, endReason].filter(Boolean).join(', '),
    ),
  finished: ended('finished'),
  replaced: ended('replaced'),
  revised: ended('revised'),
  withdrawn: ended('withdrawn'),
  discarded: ended('discarded'),
  lapsed: since('New order or none', 'lapsed'),
  given: ({ checkDueAt }, clock) => deadline('Countersign by', checkDueAt, '', clock),
  countersigned: ended('countersigned'),
};

/** What a version waits for next, in words for a list. */
export const nextDue = (times: LineTimes, clock: LineClock): NextDue => RULES[times.state](times, clock);
