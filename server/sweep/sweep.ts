import { ruleValues } from '@shared/rulebook/read';
import { DAY, HOUR, instant, type Instant } from '@shared/time';
import { sql } from 'drizzle-orm';
import { sessionAdapter } from '../auth/session-adapter';
import { forgetAnswers } from '../db/answers';
import { inHospital, readInHospital, theProgram, type Outcome } from '../db/in-hospital';
import { done } from '../db/outcome';
import { hospitals } from '../db/schema/hospitals';
import { INSTALLATION, type Tx } from '../db/transaction';
import type { Deps } from '../http/deps';
import type { LoadedVersion } from '../orders/facts';
import { lockVersion } from '../orders/lock-version';
import { rulebookInForce } from '../rulebook/in-force';
import { discardUntouched, expireReservations, lapse } from './end-by-clock';
import {
  findGivenOverdue,
  findLapsed,
  findLapsing,
  findUncountersigned,
  findUnsigned,
  findUntouched,
  findWaiting,
} from './find-due';
import { callForExceptions, callForGiven, remind, tellLapsing } from './remind';

const SWEEP_MS = 15_000;

type Errand = {
  find: (tx: Tx, now: Instant) => Promise<string[]>;
  run: (tx: Tx, held: LoadedVersion, now: Instant) => Promise<Outcome<null>>;
};

/** What the clock does to one hospital; every errand asks its guards again on the held version. */
async function errandsOf(tx: Tx, now: Instant): Promise<Errand[]> {
  const { rulebook } = await rulebookInForce(tx);
  const untouchedBefore = instant(Math.round(now - ruleValues(rulebook, 'windows').draftHours * HOUR));
  return [
    { find: findLapsed, run: lapse },
    { find: findUnsigned, run: expireReservations },
    { find: findWaiting, run: (inner, held, at) => remind(inner, held, at, rulebook) },
    { find: findLapsing, run: tellLapsing },
    { find: findGivenOverdue, run: callForGiven },
    { find: findUncountersigned, run: callForExceptions },
    {
      find: (inner) => findUntouched(inner, untouchedBefore),
      run: (inner, held, at) => discardUntouched(inner, held, at, untouchedBefore),
    },
  ];
}

/**
 * Does what has fallen due in one hospital by its clock, each version in a transaction of its own. Several processes
 * may call it: one of them holds the hospital's lock, the others leave it alone.
 */
export async function sweepHospital(deps: Deps, hospitalId: string): Promise<void> {
  await readInHospital(deps.db, { hospitalId }, async (tx, now) => {
    if (!(await takeLock(tx, hospitalId))) return;
    for (const { find, run } of await errandsOf(tx, now)) {
      for (const versionId of await find(tx, now)) await runErrand(deps, hospitalId, versionId, run);
    }
    await inHospital(deps.db, theProgram(hospitalId), {}, async (inner) => {
      await forgetAnswers(inner, instant(now - DAY));
      return done(null);
    });
  });
}

async function takeLock(tx: Tx, hospitalId: string): Promise<boolean> {
  const rows = await tx.execute<{ taken: boolean }>(
    sql`select pg_try_advisory_xact_lock(hashtextextended(${`sweep:${hospitalId}`}, 0)) as taken`,
  );
  return rows[0]?.taken === true;
}

/** One version that cannot be done does not hold up the others. */
async function runErrand(
  deps: Deps,
  hospitalId: string,
  versionId: string,
  run: Errand['run'],
): Promise<void> {
  try {
    await inHospital(deps.db, theProgram(hospitalId), {}, async (tx, now) => {
      const held = await lockVersion(tx, { id: INSTALLATION }, versionId, now);
      return held === null ? done(null) : run(tx, held, now);
    });
  } catch (error) {
    deps.log.error({ err: error, versionId }, 'the sweep could not do what is due');
  }
}

/** Sweeps every hospital now and every 15 s; returns what stops it and waits for a round under way. */
export function startSweep(deps: Deps): () => Promise<void> {
  let isStopped = false;
  let round: Promise<void> | undefined;
  const sweepAll = async (): Promise<void> => {
    try {
      const all = await deps.db.db.select({ id: hospitals.id }).from(hospitals);
      for (const { id } of all) if (!isStopped) await sweepHospital(deps, id);
      await sessionAdapter(deps).deleteExpiredSessions();
    } catch (error) {
      deps.log.warn({ err: error }, 'the sweep waits: the database could not be read');
    }
  };
  const tick = () => {
    round ??= sweepAll().finally(() => (round = undefined));
  };
  tick();
  const timer = setInterval(tick, SWEEP_MS);
  return async () => {
    isStopped = true;
    clearInterval(timer);
    await round;
  };
}
