import { decimalText } from '@shared/canonical';
import type { Kind } from '@shared/calc/types';
import { isConnected, isLive, isSigned, type VersionState } from '@shared/orders/states';
import { readContent } from '@shared/orders/build-content';
import type { DraftContext } from '@shared/routes/orders';
import { HOUR, instant, toRfc3339, type Instant } from '@shared/time';
import { and, desc, eq, gt, isNull, or } from 'drizzle-orm';
import { intakes } from '../db/schema/children';
import { infusions } from '../db/schema/bedside';
import { orders, orderVersions, versionIsLive } from '../db/schema/orders';
import type { Tx } from '../db/transaction';

type Bolus = DraftContext['bolusesLast24h'][number];
export type HiddenBolus = { ml: number; at: Instant };

export type CountedFluids = {
  /** Given, started, or signed by a checker: facts of the chart. */
  boluses: Bolus[];
  /** Boluses that wait for their check: nobody reads them, the signing counts them. */
  hidden: HiddenBolus[];
  running: DraftContext['running'];
};

/** A little more than a day, as an order may be planned to start an hour ago. */
const LOOK_BACK_MS = 25 * HOUR;

/** What else the child gets, but this order and the one it follows. */
export async function countFluids(
  tx: Tx,
  childId: string,
  except: readonly string[],
  now: Instant,
): Promise<CountedFluids> {
  const since = instant(now - LOOK_BACK_MS);
  const rows = (await selectVersions(tx, childId, since)).filter((row) => !except.includes(row.orderId));
  const boluses = rows.filter((row) => row.kind === 'bolus');
  return {
    boluses: [...(await givenElsewhere(tx, childId, since)), ...boluses.flatMap(countBolus)].sort((a, b) =>
      a.at.localeCompare(b.at),
    ),
    hidden: boluses.flatMap(hideBolus),
    running: rows.filter(flows).map(presentRunning),
  };
}

const selectVersions = (tx: Tx, childId: string, since: Instant) =>
  tx
    .select({
      orderId: orderVersions.orderId,
      code: orders.code,
      kind: orderVersions.kind,
      state: orderVersions.state,
      content: orderVersions.content,
      volumeMl: orderVersions.volumeMl,
      plannedStart: orderVersions.plannedStart,
      checkedAt: orderVersions.checkedAt,
      givenAt: orderVersions.givenAt,
      startedAt: infusions.startedAt,
      endedAt: infusions.endedAt,
      infusedMl: infusions.infusedMl,
    })
    .from(orderVersions)
    .innerJoin(orders, eq(orders.id, orderVersions.orderId))
    .leftJoin(infusions, eq(infusions.versionId, orderVersions.id))
    .where(
      and(
        eq(orderVersions.childId, childId),
        or(versionIsLive, gt(infusions.startedAt, since), gt(orderVersions.givenAt, since)),
      ),
    )
    .orderBy(orders.code);
type CountedRow = Awaited<ReturnType<typeof selectVersions>>[number];

const ofKind = (row: CountedRow, kind: Kind) => row.kind === kind;

/** A stopped bolus counts what went in where that was read, else all of it. */
function countBolus(row: CountedRow): Bolus[] {
  const counted = (ml: number, at: Instant, words: string): Bolus[] => [
    { ml: decimalText(ml, 1), at: toRfc3339(at), here: true, words: `${row.code}, ${words}` },
  ];
  if (row.volumeMl === null) return [];
  if (row.givenAt !== null) return counted(row.volumeMl, row.givenAt, 'given in an emergency');
  if (row.startedAt !== null) return counted(row.infusedMl ?? row.volumeMl, row.startedAt, 'started');
  if (isSigned(row.state) && row.plannedStart !== null) {
    return counted(row.volumeMl, row.plannedStart, 'signed, not started');
  }
  return [];
}

const isPending = (state: VersionState): boolean => isLive(state) && !isSigned(state) && !isConnected(state);

const hideBolus = (row: CountedRow): HiddenBolus[] =>
  isPending(row.state) && row.givenAt === null && row.volumeMl !== null && row.plannedStart !== null
    ? [{ ml: row.volumeMl, at: row.plannedStart }]
    : [];

const flows = (row: CountedRow): boolean =>
  ofKind(row, 'maintenance') && (isConnected(row.state) || isSigned(row.state)) && row.content !== null;

function presentRunning(row: CountedRow): DraftContext['running'][number] {
  const content = readContent(row.content ?? '');
  return {
    code: row.code,
    rateMlPerH: content.figures.rateMlPerH ?? '0',
    fluid: content.fluid,
    state: row.state,
  };
}

/** Boluses of the ambulance or another department, newest entries, corrected ones left out. */
async function givenElsewhere(tx: Tx, childId: string, since: Instant): Promise<Bolus[]> {
  const rows = await tx
    .select({ ml: intakes.ml, at: intakes.at, place: intakes.place })
    .from(intakes)
    .where(
      and(
        eq(intakes.childId, childId),
        eq(intakes.what, 'bolus'),
        gt(intakes.at, since),
        isNull(intakes.supersededBy),
      ),
    )
    .orderBy(desc(intakes.at))
    .limit(50);
  return rows.map(({ ml, at, place }) => ({
    ml: decimalText(ml, 1),
    at: toRfc3339(at),
    here: false,
    words: place ?? 'given elsewhere',
  }));
}
