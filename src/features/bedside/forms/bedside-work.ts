import { useEffect, useState } from 'react';
import { isByPump } from '@shared/bedside/compare-pump';
import type { OrderContent } from '@shared/orders/content';
import {
  BEDSIDE_STEPS,
  type BedsideEntries,
  type BedsideStep,
  type StepVerdict,
} from '@shared/routes/bedside';

/** Nothing is prefilled from the order: every entry is read from the child, the bag, the pump and the line. */
export const emptyEntries = (): BedsideEntries => ({
  child: { number: '', bornOn: '', saidBy: '' },
  bag: { productId: '', sizeMl: '', batch: '', expiry: '', bagNumber: '' },
  pump: { device: '', channel: '', rate: '', volume: '', minutes: '' },
  line: { lineClass: '', site: '', traced: false, clampOpen: false, siteLooksWell: false },
});

export type Verdicts = Partial<Record<BedsideStep, StepVerdict>>;
type Work = { entries: BedsideEntries; verdicts: Verdicts };

/** In memory only, and gone with the page: where a nurse left the bedside, they go on. */
const kept = new Map<string, Work>();

/** What a step's comparison also rests on: the most to be infused depends on the bag. */
const RESTS_ON: Partial<Record<BedsideStep, BedsideStep>> = { pump: 'bag' };

export function useBedsideWork(versionId: string) {
  const [work, setWork] = useState<Work>(
    () => kept.get(versionId) ?? { entries: emptyEntries(), verdicts: {} },
  );
  useEffect(() => {
    kept.set(versionId, work);
  }, [versionId, work]);
  const hasEntries = JSON.stringify(work.entries) !== JSON.stringify(emptyEntries());
  useEffect(() => {
    if (!hasEntries) return undefined;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [hasEntries]);
  return {
    ...work,
    /** A changed entry takes back what was said of its step, and of what rests on it. */
    enter: <S extends BedsideStep>(step: S, changes: Partial<BedsideEntries[S]>) =>
      setWork(({ entries, verdicts }) => ({
        entries: { ...entries, [step]: { ...entries[step], ...changes } },
        verdicts: Object.fromEntries(
          Object.entries(verdicts).filter(
            ([other]) => other !== step && RESTS_ON[other as BedsideStep] !== step,
          ),
        ),
      })),
    /** Takes a verdict, unless what it was about has been changed since. */
    judge: (verdict: StepVerdict, about: BedsideEntries) =>
      setWork((now) => {
        const steps = [verdict.step, RESTS_ON[verdict.step] ?? verdict.step];
        const isOld = steps.some((step) => now.entries[step] !== about[step]);
        return isOld ? now : { ...now, verdicts: { ...now.verdicts, [verdict.step]: verdict } };
      }),
    reopen: (step: BedsideStep) =>
      setWork(({ entries, verdicts }) => ({ entries, verdicts: { ...verdicts, [step]: undefined } })),
    forget: () => {
      kept.delete(versionId);
      setWork({ entries: emptyEntries(), verdicts: {} });
    },
  };
}
export type BedsideWork = ReturnType<typeof useBedsideWork>;

/** Whether everything a step asks for is there, so that leaving it may compare it. */
export function isFilled(
  step: BedsideStep,
  { child, bag, pump, line }: BedsideEntries,
  content: OrderContent,
): boolean {
  const there = (...texts: string[]) => texts.every((text) => text.trim() !== '');
  switch (step) {
    case 'child':
      return there(child.number, child.bornOn);
    case 'bag':
      return there(bag.productId, bag.sizeMl, bag.expiry) && (!content.isHighRisk || there(bag.batch));
    case 'pump':
      return isByPump(content)
        ? there(pump.device, pump.rate, pump.volume)
        : there(pump.volume, pump.minutes);
    case 'line':
      return there(line.lineClass, line.site) && line.traced && line.clampOpen && line.siteLooksWell;
  }
}

export const agrees = (verdicts: Verdicts, step: BedsideStep): boolean => verdicts[step]?.agrees === true;

/** The step in hand: the first that does not agree yet; null when all four do. */
export const stepInHand = (verdicts: Verdicts): BedsideStep | null =>
  BEDSIDE_STEPS.find((step) => !agrees(verdicts, step)) ?? null;
