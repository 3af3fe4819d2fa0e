import { isConnected, isDraft, isSigned, VERSION_STATES, type VersionState } from '@shared/orders/states';
import { TRANSITIONS } from '@shared/orders/transitions';
import { HOUR, instant, type Instant } from '@shared/time';
import { and, eq, inArray, isNotNull, isNull, lt, ne, or } from 'drizzle-orm';
import { checks, exceptions } from '../db/schema/checks';
import { drafts, orderVersions, versionIsLive } from '../db/schema/orders';
import type { Tx } from '../db/transaction';

/** How long before its end an order's author is told. Ours. */
export const LAPSING_MS = HOUR;

const statesOf = (test: (state: VersionState) => boolean): VersionState[] => VERSION_STATES.filter(test);
const WAITING = [...TRANSITIONS.lapse.from];
const DRAFT = statesOf(isDraft);
const SIGNED = statesOf(isSigned);
const CONNECTED = statesOf(isConnected);
const AWAITING = [...TRANSITIONS['open-check'].from];
const GIVEN = [...TRANSITIONS.countersign.from];

const ids = async (query: PromiseLike<{ id: string }[]>): Promise<string[]> =>
  (await query).map(({ id }) => id);

/** Versions that can no longer be started. */
export const findLapsed = (tx: Tx, now: Instant): Promise<string[]> =>
  ids(
    tx
      .select({ id: orderVersions.id })
      .from(orderVersions)
      .where(
        and(
          versionIsLive,
          inArray(orderVersions.state, WAITING),
          lt(orderVersions.startBy, now),
          isNull(orderVersions.givenAt),
        ),
      ),
  );

/** Versions whose agreed figures were not signed in time. */
export const findUnsigned = (tx: Tx, now: Instant): Promise<string[]> =>
  ids(
    tx
      .selectDistinct({ id: checks.versionId })
      .from(checks)
      .where(and(eq(checks.state, 'locked-agreed'), lt(checks.reservedUntil, now))),
  );

/** Versions that wait for a check and may owe a reminder; an emergency is checked at once and has none. */
export const findWaiting = (tx: Tx): Promise<string[]> =>
  ids(
    tx
      .select({ id: orderVersions.id })
      .from(orderVersions)
      .where(
        and(
          versionIsLive,
          inArray(orderVersions.state, AWAITING),
          isNotNull(orderVersions.checkDueAt),
          lt(orderVersions.reminderStage, 4),
          ne(orderVersions.urgency, 'emergency'),
        ),
      ),
  );

/** Signed orders that must soon start, and running ones that soon end. */
export function findLapsing(tx: Tx, now: Instant): Promise<string[]> {
  const soon = instant(now + LAPSING_MS);
  return ids(
    tx
      .select({ id: orderVersions.id })
      .from(orderVersions)
      .where(
        and(
          versionIsLive,
          isNull(orderVersions.lapsingToldAt),
          ne(orderVersions.urgency, 'emergency'),
          or(
            and(inArray(orderVersions.state, SIGNED), lt(orderVersions.startBy, soon)),
            and(inArray(orderVersions.state, CONNECTED), lt(orderVersions.lapsesAt, soon)),
          ),
        ),
      ),
  );
}

/** Drafts nobody has typed in since then. */
export const findUntouched = (tx: Tx, before: Instant): Promise<string[]> =>
  ids(
    tx
      .select({ id: orderVersions.id })
      .from(orderVersions)
      .innerJoin(drafts, eq(drafts.versionId, orderVersions.id))
      .where(and(versionIsLive, inArray(orderVersions.state, DRAFT), lt(drafts.savedAt, before))),
  );

/** What was given in an emergency and is not countersigned in time. */
export const findGivenOverdue = (tx: Tx, now: Instant): Promise<string[]> =>
  ids(
    tx
      .select({ id: orderVersions.id })
      .from(orderVersions)
      .where(
        and(
          versionIsLive,
          inArray(orderVersions.state, GIVEN),
          lt(orderVersions.checkDueAt, now),
          lt(orderVersions.reminderStage, 4),
        ),
      ),
  );

/** Versions with a senior's countersignature that is overdue and has not been called for. */
export const findUncountersigned = (tx: Tx, now: Instant): Promise<string[]> =>
  ids(
    tx
      .selectDistinct({ id: exceptions.versionId })
      .from(exceptions)
      .where(
        and(
          inArray(exceptions.state, ['asked', 'granted']),
          lt(exceptions.countersignDueAt, now),
          isNull(exceptions.countersignedAt),
          isNull(exceptions.overdueToldAt),
        ),
      ),
  );
