import { HOUR, instant, MINUTE, type Instant } from '@shared/time';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { createTransport } from 'nodemailer';
import { CURLEW } from '../../fixtures/demo/curlew';
import { HERON_BACK } from '../../fixtures/demo/heron-back';
import { HERON_FRONT } from '../../fixtures/demo/heron-front';
import { PLOVER } from '../../fixtures/demo/plover';
import { WREN } from '../../fixtures/demo/wren';
import { makeApp } from '../app';
import { hashPassword } from '../auth/password';
import { fixedClock } from '../clock';
import { openDatabase } from '../db/client';
import { parseEnv } from '../env';
import type { Deps } from '../http/deps';
import { makeLog } from '../http/make-log';
import { verifyChain } from '../ledger/verify';
import { deliverDue, type Post } from '../mail/deliver-due';
import { startSmtpFake } from '../mail/smtp-fake';
import { sweepHospital } from '../sweep/sweep';
import { Screens } from './call-api';
import { makeHospital, type MadeHospital } from './make-hospital';
import {
  DEMO_HOSPITAL,
  DEMO_PASSWORD,
  DEMO_PEOPLE,
  DEMO_WARDS,
  DEMO_ZONE,
  type DemoPersonKey,
} from './people';
import { play, timelineOf } from './play';
import type { Scene } from './scene';

export type SeedPlace = { ownerUrl: string; appUrl: string; now: number };

const STORIES = [...HERON_FRONT, ...HERON_BACK, ...CURLEW, ...PLOVER, ...WREN];

/** The hospital is there before the first child is. */
const BEGINS_BEFORE = 72 * HOUR;
/** Mail younger than this is left for the program itself, so that the demo's mailbox is not empty. */
const MAIL_LEFT = 2 * HOUR;

/** Often enough that reminders and lapses come at about their own time. */
const SWEEP_EVERY = 10 * MINUTE;

const closed = (server: Server): Promise<void> =>
  new Promise((done) => {
    server.close(() => done());
    server.closeAllConnections();
  });

/**
 * Plays the demo hospital's last three days through the program's own API, with the clock stepped from −3 days to
 * `now` (epoch ms): signatures, hashes, mails and the ledger are as real as any. The database is migrated and empty.
 */
export async function seedDemo({ ownerUrl, appUrl, now }: SeedPlace): Promise<void> {
  const clock = fixedClock(now - BEGINS_BEFORE);
  const owner = openDatabase(ownerUrl, { clock, max: 2, applicationName: 'brimline-seed' });
  const db = openDatabase(appUrl, { clock, applicationName: 'brimline-seed' });
  const server = createServer();
  await new Promise<void>((ready) => server.listen(0, '127.0.0.1', ready));
  const origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const deps: Deps = { db, clock, env: seedEnv(appUrl, origin), log: makeLog('error') };
  // one process plays a ward's three days in seconds: no limit of requests a minute
  server.on('request', makeApp(deps, { rates: { all: 1e6, signIn: 1e6 } }));
  const post = await openPost(deps);
  try {
    const hospital = await makeSaltmarsh(owner);
    const scene: Scene = { screens: new Screens(origin), hospital, owner, now: instant(now) };
    await playAll(deps, scene, post.post, (at) => clock.set(at));
    await assertWhole(deps, hospital.id);
  } finally {
    await closed(server);
    await post.stop();
    await Promise.all([db.close(), owner.close()]);
  }
}

/** Sessions outlive the steps between two acts of one person; they are signed out at the end. */
const seedEnv = (appUrl: string, origin: string) =>
  parseEnv({
    NODE_ENV: 'production',
    DATABASE_URL: appUrl,
    PUBLIC_URL: origin,
    LOG_LEVEL: 'error',
    SESSION_IDLE_MINUTES: '1440',
    SESSION_ABSOLUTE_HOURS: '168',
  });

async function openPost(deps: Deps): Promise<{ post: Post; stop: () => Promise<void> }> {
  const fake = await startSmtpFake();
  // one connection for all of it: opening one for each letter takes longer than the letter
  const transporter = createTransport({ url: fake.smtpUrl, pool: true } as never);
  const post = { transporter, from: deps.env.MAIL_FROM, publicUrl: deps.env.PUBLIC_URL };
  const stop = async () => {
    transporter.close();
    await fake.stop();
  };
  return { post, stop };
}

const makeSaltmarsh = async (owner: Scene['owner']): Promise<MadeHospital<DemoPersonKey>> =>
  makeHospital(owner, {
    name: DEMO_HOSPITAL,
    zone: DEMO_ZONE,
    wards: DEMO_WARDS.map((name) => ({ name, isHighDependency: name === 'Plover' })),
    people: DEMO_PEOPLE,
    rulebookBy: ['consultant', 'pharmacist'],
    passwordHash: await hashPassword(DEMO_PASSWORD),
  });

async function playAll(
  deps: Deps,
  scene: Scene,
  post: Post,
  moveClock: (at: Instant) => void,
): Promise<void> {
  const { hospital, now } = scene;
  let swept = now - BEGINS_BEFORE;
  const sweepAt = async (at: number) => {
    swept = at;
    moveClock(instant(at));
    await sweepHospital(deps, hospital.id);
    if (now - at > MAIL_LEFT) await deliverDue(deps.db, post, hospital);
  };
  for (const planned of timelineOf(STORIES, now)) {
    // what falls due between two steps happens before the second
    while (planned.at - swept >= SWEEP_EVERY) await sweepAt(Math.min(swept + HOUR, planned.at));
    moveClock(planned.at);
    await play(scene, planned);
  }
  await sweepAt(now);
  await scene.screens.signOutAll();
}

async function assertWhole({ db }: Deps, hospitalId: string): Promise<void> {
  const verdict = await verifyChain(db, hospitalId);
  if (!verdict.whole) throw new Error(`the demo's ledger is broken at row ${verdict.seq}: ${verdict.fault}`);
}
