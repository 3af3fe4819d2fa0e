import type { Flag, IntakeFacts, ResultFacts, Sex, WorkOutRequest } from '../calc/types';
import { parseRulebook } from '../rulebook/document';
import { parseInstant, type Instant } from '../time';
import { millilitres, millilitresPerHour } from '../units';
import { readFluid } from './fluid';
import type { CheckContext } from './own';
import type { z } from 'zod';
import type { contentFluidSchema } from '../orders/content';

type WireFluid = z.infer<typeof contentFluidSchema> & { bagSizesMl?: readonly string[] };

/** What of a check page (or of a draft's context, which has the same shape) the work-out reads. */
export type WireContext = {
  child: {
    bornOn: string;
    bornAt: string | null;
    sex: Sex | null;
    gestationWeeks: number | null;
    gestationDays: number | null;
    flags: readonly Flag[];
  };
  lastMeasuredAt?: string | null;
  results: readonly { analyte: string; value: string; at: string }[];
  urinePassedAt?: string | null;
  bolusesLast24h: readonly { ml: string; at: string; here: boolean }[];
  /** Without its composition a running fluid cannot be counted, and it changes no figure of the check. */
  running?: readonly { code: string; rateMlPerH: string; fluid: WireFluid }[];
  products: readonly WireFluid[];
  rulebook: { content: unknown };
  zone: string;
  now: string;
};

const momentOf = (text: string): Instant => {
  const at = parseInstant(text);
  if (at === undefined) throw new RangeError(`not an instant: ${text}`);
  return at;
};
const optional = <T>(value: T | null | undefined) => value ?? undefined;
const ANALYTES = ['sodium', 'potassium', 'glucose'] as const;

/** The context of a check as the calculation takes it. */
export function readContext(wire: WireContext, plan?: WorkOutRequest['plan']): CheckContext {
  const { child } = wire;
  return {
    at: momentOf(wire.now),
    zone: wire.zone,
    child: {
      bornOn: child.bornOn,
      bornAt: child.bornAt === null ? undefined : momentOf(child.bornAt),
      sex: optional(child.sex),
      gestationWeeks: optional(child.gestationWeeks),
      gestationDays: optional(child.gestationDays),
      flags: child.flags,
    },
    lastMeasuredAt: wire.lastMeasuredAt ? momentOf(wire.lastMeasuredAt) : undefined,
    results: resultsOf(wire),
    intake: intakeOf(wire),
    ...(plan === undefined ? {} : { plan }),
    rulebook: parseRulebook(wire.rulebook.content),
    products: wire.products.map(readFluid),
  };
}

function resultsOf({ results, urinePassedAt }: WireContext): ResultFacts {
  const facts: ResultFacts = urinePassedAt ? { urinePassedAt: momentOf(urinePassedAt) } : {};
  for (const analyte of ANALYTES) {
    const rows = results.filter((row) => row.analyte === analyte);
    const latest = rows.sort((a, b) => momentOf(b.at) - momentOf(a.at))[0];
    if (latest) facts[analyte] = { value: Number(latest.value), at: momentOf(latest.at) };
  }
  return facts;
}

const intakeOf = ({ bolusesLast24h, running = [] }: WireContext): IntakeFacts => ({
  bolusesLast24h: bolusesLast24h.map(({ ml, at, here }) => ({
    ml: millilitres(Number(ml)),
    at: momentOf(at),
    here,
  })),
  running: running.map(({ code, rateMlPerH, fluid }) => ({
    code,
    rate: millilitresPerHour(Number(rateMlPerH)),
    fluid: readFluid(fluid),
  })),
});
