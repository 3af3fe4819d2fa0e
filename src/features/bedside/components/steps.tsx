import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { useAct } from '@/features/orders/api/use-act';
import { problemWords } from '@/features/orders/api/problem-words';
import { Refusal } from '@/features/orders/components/refusal';
import { isByPump } from '@shared/bedside/compare-pump';
import { formatNumber } from '@shared/rounding';
import { BEDSIDE_STEPS, type BedsidePage, type BedsideStep, type StepVerdict } from '@shared/routes/bedside';
import { formatCivilDate, isCivilDate } from '@shared/time';
import { agrees, isFilled, stepInHand, type BedsideWork } from '../forms/bedside-work';
import { BY_HAND, STEP_WORDS } from '../forms/bedside-words';
import { BagFields, ChildFields, LINE_WORDS, LineFields, PumpFields } from './step-fields';
import { Read, StepFrame, type StepStanding } from './step-frame';

const FIRST_FIELD: Readonly<Record<BedsideStep, string>> = {
  child: 'number',
  bag: 'productId',
  pump: 'device',
  line: 'lineClass',
};

/** The cursor goes where the next thing is to be read, or to what was refused. */
const focusField = (field: string): void => {
  // after the row has been drawn anew
  setTimeout(() => document.getElementById(`bedside-${field}`)?.focus());
};

function useComparing(page: BedsidePage, work: BedsideWork) {
  const act = useAct('compareStep');
  const [step, setStep] = useState<BedsideStep | null>(null);
  const { entries, verdicts, judge } = work;

  const after = (verdict: StepVerdict) => {
    judge(verdict, entries);
    const [first] = verdict.findings;
    if (first) return focusField(first.field);
    const next = stepInHand({ ...verdicts, [verdict.step]: verdict });
    if (next === 'pump' && !isByPump(page.content)) return focusField('volume');
    if (next === null) setTimeout(() => document.getElementById('record-start')?.focus());
    else focusField(FIRST_FIELD[next]);
  };
  const compare = (which: BedsideStep) => {
    if (act.isPending) return;
    setStep(which);
    act.mutate({ params: { id: page.versionId }, body: { step: which, entries } }, { onSuccess: after });
  };
  return {
    compare,
    /** On leaving the last field, once everything is there and nothing was said of it yet. */
    compareIfFilled: (which: BedsideStep) => {
      if (verdicts[which] === undefined && isFilled(which, entries, page.content)) compare(which);
    },
    comparing: act.isPending ? step : null,
    trouble: act.error ? { step, words: problemWords(act.error) } : null,
  };
}

function Says({ page, step }: { page: BedsidePage; step: BedsideStep }): ReactNode {
  const { content, volumeToInfuse } = page;
  const { child, fluid, figures, line } = content;
  const n = (text: string | null) => formatNumber(Number(text), 1);
  switch (step) {
    case 'child':
      return (
        <>
          {child.surname}, {child.given}
          <small>
            {formatCivilDate(child.bornOn)}, {child.number}
          </small>
        </>
      );
    case 'bag':
      return fluid.name;
    case 'pump':
      return isByPump(content) ? (
        <>
          <b>{n(figures.rateMlPerH)} mL/h</b>
          <small>
            at most {n(volumeToInfuse.mostMl)} mL to be infused: {volumeToInfuse.words}
          </small>
        </>
      ) : (
        <>
          <b>{n(figures.volumeMl)} mL</b>
          <small>over {n(figures.overMinutes)} min, by hand</small>
        </>
      );
    case 'line':
      return LINE_WORDS[line];
  }
}

/** What was read at a step that agrees, in words. */
function readLines({ products }: BedsidePage, { entries }: BedsideWork, step: BedsideStep): string[] {
  const { child, bag, line } = entries;
  const date = (text: string) => (isCivilDate(text) ? formatCivilDate(text) : text);
  switch (step) {
    case 'child':
      return [
        `Wristband read: ${child.number.trim()}, ${date(child.bornOn)}`,
        child.saidBy && `Name and date of birth: ${child.saidBy.toLowerCase()}`,
      ];
    case 'bag':
      return [
        `${products.find(({ id }) => id === bag.productId)?.name ?? ''}, ${bag.sizeMl.trim()} mL`,
        [bag.batch.trim() && `Batch ${bag.batch.trim()}`, `expires ${date(bag.expiry)}`]
          .filter(Boolean)
          .join(', '),
      ];
    case 'line':
      return [`Traced from bag to ${line.site.trim()}, clamp open`, 'Site looks well'];
    case 'pump':
      return [];
  }
}

type FieldsProps = { page: BedsidePage; work: BedsideWork; step: BedsideStep; onLast: () => void };

function Fields({ page, work, step, onLast }: FieldsProps) {
  const { entries, verdicts, enter } = work;
  const common = { verdict: verdicts[step], onLast };
  switch (step) {
    case 'child':
      return <ChildFields {...common} entries={entries.child} enter={(changes) => enter('child', changes)} />;
    case 'bag':
      return (
        <BagFields
          {...common}
          entries={entries.bag}
          enter={(changes) => enter('bag', changes)}
          products={page.products}
          isHighRisk={page.content.isHighRisk}
        />
      );
    case 'pump':
      return (
        <PumpFields
          {...common}
          entries={entries.pump}
          enter={(changes) => enter('pump', changes)}
          byPump={isByPump(page.content)}
        />
      );
    case 'line':
      return <LineFields {...common} entries={entries.line} enter={(changes) => enter('line', changes)} />;
  }
}

const standingOf = ({ verdicts }: BedsideWork, step: BedsideStep): StepStanding => {
  if (agrees(verdicts, step)) return 'agrees';
  if (stepInHand(verdicts) !== step) return 'waiting';
  return verdicts[step] === undefined ? 'now' : 'refused';
};

/** Child, bag, pump, line: in that order, each compared before the next is in hand. */
export function Steps({
  page,
  work,
  isOffline,
}: {
  page: BedsidePage;
  work: BedsideWork;
  isOffline: boolean;
}) {
  const { compare, compareIfFilled, comparing, trouble } = useComparing(page, work);
  return (
    <>
      <div className="stp hd" aria-hidden="true">
        <span />
        <span>Step</span>
        <span>The order says</span>
        <span>At the bedside</span>
        <span>Verdict</span>
      </div>
      <ol>
        {BEDSIDE_STEPS.map((step, index) => {
          const standing = standingOf(work, step);
          const { title, how } = step === 'pump' && !isByPump(page.content) ? BY_HAND : STEP_WORDS[step];
          const isOpen = standing === 'now' || standing === 'refused';
          const keepsFields = step === 'pump' && standing === 'agrees';
          return (
            <StepFrame
              key={step}
              id={`step-${step}`}
              number={index + 1}
              {...{ title, how, standing }}
              isComparing={comparing === step}
              isPump={step === 'pump'}
              says={<Says page={page} step={step} />}
            >
              {(isOpen || keepsFields) && (
                <Fields {...{ page, work, step }} onLast={() => compareIfFilled(step)} />
              )}
              {isOpen && (
                <div className="mt-s3 grid gap-s2">
                  {trouble?.step === step && <Refusal title="Not compared.">{trouble.words}</Refusal>}
                  <Button
                    busy={comparing === step}
                    busyLabel="Comparing, please wait"
                    shutReason={isOffline ? 'The line is down.' : undefined}
                    onClick={() => compare(step)}
                  >
                    Compare with the order
                  </Button>
                </div>
              )}
              {standing === 'agrees' && !keepsFields && (
                <Read lines={readLines(page, work, step)} title={title} onChange={() => work.reopen(step)} />
              )}
              {standing === 'waiting' && <p className="soft">After the step before it agrees.</p>}
            </StepFrame>
          );
        })}
      </ol>
    </>
  );
}
