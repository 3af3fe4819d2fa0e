import type { BrowserContext } from '@playwright/test';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';

/** Card, Moran & Newell 1980, the keystroke-level model: s for a key, a pointing, a change of hand, a thought. */
const MODEL = { K: 0.2, P: 1.1, H: 0.4, M: 1.35 };
const FILE = '.state/keystrokes.json';

export type HandCount = { keys: number; clicks: number; handMoves: number; mentalSteps: number };
type HandEvent = { tool: 'keys' | 'mouse'; target: string };

/** Expert task time, s. */
export const expertSeconds = ({ keys, clicks, handMoves, mentalSteps }: HandCount): number =>
  keys * MODEL.K + clicks * (MODEL.P + MODEL.K) + handMoves * MODEL.H + mentalSteps * MODEL.M;

/**
 * Counts real keys and clicks in a window from now on: a hand moves when keys follow the mouse or the other way, a
 * thought comes with every field or button that is taken up anew.
 */
export async function countHands(context: BrowserContext): Promise<() => HandCount> {
  const count: HandCount = { keys: 0, clicks: 0, handMoves: 0, mentalSteps: 0 };
  let last: HandEvent = { tool: 'mouse', target: '' };
  await context.exposeBinding('tellHands', (_source, event: HandEvent & { isTab: boolean }) => {
    if (event.tool === 'keys') count.keys += 1;
    else count.clicks += 1;
    if (event.tool !== last.tool) count.handMoves += 1;
    if (!event.isTab && event.target !== last.target) count.mentalSteps += 1;
    last = { tool: event.tool, target: event.isTab ? last.target : event.target };
  });
  const listen = () => {
    const names = new WeakMap<EventTarget, string>();
    let made = 0;
    const nameOf = (target: EventTarget | null): string => {
      if (target === null) return '';
      if (!names.has(target)) names.set(target, `${location.pathname}#${++made}`);
      return names.get(target) ?? '';
    };
    const tell = (tool: 'keys' | 'mouse', event: Event, isTab: boolean) =>
      void (window as unknown as { tellHands: (event: unknown) => void }).tellHands({
        tool,
        target: nameOf(event.target),
        isTab,
      });
    window.addEventListener('keydown', (event) => tell('keys', event, event.key === 'Tab'), true);
    window.addEventListener('pointerdown', (event) => tell('mouse', event, false), true);
  };
  await context.addInitScript(listen);
  for (const page of context.pages()) await page.evaluate(listen);
  return () => ({ ...count });
}

/** Keeps a task's count for the bench, and prints the estimate. */
export function keepCount(task: string, count: HandCount): number {
  const earlier = existsSync(FILE)
    ? (JSON.parse(readFileSync(FILE, 'utf8')) as Record<string, HandCount>)
    : {};
  mkdirSync('.state', { recursive: true });
  writeFileSync(FILE, `${JSON.stringify({ ...earlier, [task]: count }, null, 2)}\n`);
  const seconds = expertSeconds(count);
  const { keys, clicks, handMoves, mentalSteps } = count;
  process.stdout.write(
    `${task}: ${seconds.toFixed(1)} s expert task time (${keys} keys, ${clicks} clicks, ${handMoves} hand moves, ${mentalSteps} thoughts)\n`,
  );
  return seconds;
}
