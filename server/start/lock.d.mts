export type ProcessFacts = { pid: number; startedAt: string | null };
/** What a lock file holds: its owner, and what the owner chose to tell. */
export type Holder = ProcessFacts & { address?: string; children?: ProcessFacts[] };
export type Lock = { tell(more: Omit<Partial<Holder>, keyof ProcessFacts>): void; release(): void };

export function processStart(pid: number): string | null;
export function processFacts(pid: number): ProcessFacts;
export function isAlive(facts: ProcessFacts): boolean;
export function readLock(path: string): Holder | null;
export function takeLock(
  path: string,
): Promise<{ taken: true; lock: Lock; left: Holder | null } | { taken: false; holder: Holder }>;
export function waitForLock(
  path: string,
  options: { timeoutMs: number; onWait?: (holder: Holder) => void },
): Promise<Lock>;
