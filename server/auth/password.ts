import { hash, verify } from '@node-rs/argon2';

/** The package's default is argon2id; the parameters are those of common practice for a shared server. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

/** One verification uses a core for about 15 ms and 19 MB: more than two at once would starve everything else. */
const AT_ONCE = 2;

let running = 0;
const waiting: (() => void)[] = [];

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) await new Promise<void>((go) => waiting.push(go));
  else running += 1;
  try {
    return await work();
  } finally {
    // the place is handed on; it is only given up when nobody waits
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

/** The stored form of a password. */
export const hashPassword = (password: string): Promise<string> =>
  inTurn(() => hash(password.normalize('NFC'), COST));

let decoy: Promise<string> | undefined;

/** Runs `work` in one of the two places where passwords are verified. */
export const inPasswordTurn = inTurn;

/** Whether the password is the stored one; without a stored one it takes as long and says no. Call it in turn. */
export async function isPassword(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hash('nobody has this password', COST);
  const against = stored ?? (await decoy);
  return (await verify(against, password.normalize('NFC'))) && stored !== null;
}
