import { existsSync, readFileSync } from 'node:fs';
import { round, tell } from './interleave';

/** Card, Moran & Newell 1980: a key 0.2 s (skilled), pointing 1.1 s, hand between mouse and keys 0.4 s, a mental step 1.35 s. */
const K = 0.2;
const P = 1.1;
const H = 0.4;
const M = 1.35;

type Count = { keys: number; clicks: number; handMoves: number; mentalSteps: number };

export const estimate = ({ keys, clicks, handMoves, mentalSteps }: Count): number =>
  keys * K + clicks * (P + K) + handMoves * H + mentalSteps * M;

/** Counted by the browser stories from the real keys and clicks of the last `npm test`. */
export function benchKeystrokes(): void {
  const file = '.state/keystrokes.json';
  if (!existsSync(file)) return tell('keystroke estimate', 'not counted yet: run npm test first');
  const counts = JSON.parse(readFileSync(file, 'utf8')) as Record<string, Count>;
  for (const [task, count] of Object.entries(counts))
    tell(
      `keystroke estimate, ${task}`,
      `${round(estimate(count))} s (${count.keys} keys, ${count.clicks} clicks)`,
      '≤ 60 s',
    );
}
