import { useState } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { Choice } from '@/components/ui/choice';
import { Notice } from '@/components/ui/notice';
import { TextField } from '@/components/ui/text-field';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { useAct } from '@/features/orders/api/use-act';
import { problemWords } from '@/features/orders/api/problem-words';
import { Refusal } from '@/features/orders/components/refusal';
import { problemCode } from '@/lib/query-client';
import { ProblemError } from '@/lib/server-answer';
import { serverNow } from '@/lib/server-clock';
import { isOnPump } from '@shared/orders/states';
import { isByPump } from '@shared/bedside/compare-pump';
import { formatNumber } from '@shared/rounding';
import { stepVerdictSchema, type BedsidePage } from '@shared/routes/bedside';
import { formatTime } from '@shared/time';
import { z } from 'zod';
import { rereadBedside } from '../api/use-bedside';
import { stepInHand, type BedsideWork } from '../forms/bedside-work';
import { barWords } from '../forms/bedside-words';
import { StepFrame } from './step-frame';
import { Steps } from './steps';

const WITNESS_REFUSALS = ['witness-needed', 'sign-in-refused', 'account-locked'];

type Witness = { email: string; password: string };

function useStart(page: BedsidePage, work: BedsideWork) {
  const act = useAct('recordStart');
  const [witness, setWitness] = useState<Witness>({ email: '', password: '' });
  const [replaces, setReplaces] = useState<string | null>(null);
  const { entries } = work;

  const failed = (error: unknown) => {
    if (!(error instanceof ProblemError)) return;
    setWitness((before) => ({ ...before, password: '' }));
    const read = z.object({ verdicts: z.array(stepVerdictSchema) }).safeParse(error.problem.data);
    if (error.code === 'bedside-differs' && read.success)
      read.data.verdicts.forEach((verdict) => work.judge(verdict, entries));
    // an answer says that something moved: what runs, what may be started
    void rereadBedside(page.versionId);
  };
  const send = () =>
    act.mutate(
      {
        params: { id: page.versionId },
        body: {
          entries,
          witness: page.witnessNeeded ? { ...witness, email: witness.email.trim() } : null,
          replacesVersionId: replaces,
        },
      },
      {
        onSuccess: () => {
          void rereadBedside(page.versionId).then(() => work.forget());
        },
        onError: failed,
      },
    );
  return { act, witness, setWitness, replaces, setReplaces, send };
}
type Start = ReturnType<typeof useStart>;

/** Maintenance that is connected now: named as replaced, or stopped first. */
function Connected({ page, start }: { page: BedsidePage; start: Start }) {
  return page.connected.map(({ versionId, code, state, fluid, rateMlPerH }) => (
    <Notice
      key={versionId}
      kind="caution"
      title={`${code} is connected to this child now:`}
      action={
        <Link className="btn" to={`/orders/${versionId}/bedside`}>
          Go to it and stop it
        </Link>
      }
    >
      {fluid}, {formatNumber(Number(rateMlPerH), 1)} mL/h.
      {isOnPump(state) && (
        <Choice
          className="min-h-[48px]"
          checked={start.replaces === versionId}
          onChange={({ target }) => start.setReplaces(target.checked ? versionId : null)}
        >
          This order replaces it: it ends at the start
        </Choice>
      )}
    </Notice>
  ));
}

function WitnessStep({ start }: { start: Start }) {
  const { witness, setWitness, act } = start;
  const isRefused = WITNESS_REFUSALS.includes(problemCode(act.error) ?? '');
  return (
    <ol start={5}>
      <StepFrame
        id="step-witness"
        number={5}
        title="Witness"
        how="another person"
        standing={isRefused ? 'refused' : 'now'}
        says="A second person, not the starter, sees bag, pump and line, and signs in here."
      >
        <div className="two">
          <TextField
            id="bedside-witness"
            label="Witness: e-mail"
            size="big"
            type="email"
            value={witness.email}
            onChange={({ target }) => setWitness({ ...witness, email: target.value })}
            error={isRefused && act.error ? problemWords(act.error) : undefined}
          />
          <TextField
            label="Witness: password"
            size="big"
            type="password"
            autoComplete="off"
            value={witness.password}
            onChange={({ target }) => setWitness({ ...witness, password: target.value })}
          />
        </div>
      </StepFrame>
    </ol>
  );
}

/** Why the start is shut although all four agree; empty when it is open. */
function shutWords(page: BedsidePage, { witness, replaces }: Start, isOffline: boolean): string {
  if (isOffline) return 'The line is down: nothing can be started until it is back.';
  const left = page.connected.find(({ versionId }) => versionId !== replaces);
  if (left) return `${left.code} is still connected: say that this order replaces it, or stop it first.`;
  if (page.witnessNeeded && (witness.email.trim() === '' || witness.password === ''))
    return 'The witness signs in first.';
  return '';
}

type BarProps = { page: BedsidePage; work: BedsideWork; start: Start; isOffline: boolean };

function StartBar({ page, work, start, isOffline }: BarProps) {
  const { account } = useKnownMe();
  const agreeAll = stepInHand(work.verdicts) === null;
  const words = barWords(page.content, work.entries, work.verdicts);
  const shut = agreeAll ? shutWords(page, start, isOffline) : 'steps';
  const { device } = work.entries.pump;
  const pump = isByPump(page.content) ? ` and pump ${device.trim()}` : '';
  const { act } = start;
  const isTrouble =
    agreeAll && act.error !== null && !WITNESS_REFUSALS.includes(problemCode(act.error) ?? '');
  return (
    <footer className="gobar">
      <div id="start-words" role="status">
        {isTrouble ? (
          <Refusal title="Nothing is started.">{problemWords(act.error)}</Refusal>
        ) : (
          <>
            <b className={`c-${words.tone}`}>{words.head}</b>
            <p>
              {words.text ||
                shut ||
                `Starting writes your name, ${account.name}, ${formatTime(serverNow(), page.zone)}${pump} to the record. You start the pump yourself.`}
            </p>
          </>
        )}
      </div>
      <Button
        id="record-start"
        kind="go"
        glyph={shut ? undefined : 'running'}
        reasonId={shut ? 'start-words' : undefined}
        busy={act.isPending}
        busyLabel="Recording, please wait"
        onClick={start.send}
      >
        Record start
      </Button>
    </footer>
  );
}

type StartViewProps = { page: BedsidePage; work: BedsideWork; isOffline: boolean };

/** Four comparisons, a witness where asked, and a start that is shut until all of them agree. */
export function StartView({ page, work, isOffline }: StartViewProps) {
  const start = useStart(page, work);
  const agreeAll = stepInHand(work.verdicts) === null;
  return (
    <>
      <main className="steps" id="main" tabIndex={-1}>
        <h1 className="vh">At the bedside: compare with the signed order, then start</h1>
        <Connected page={page} start={start} />
        <Steps page={page} work={work} isOffline={isOffline} />
        {agreeAll && page.witnessNeeded && <WitnessStep start={start} />}
      </main>
      <StartBar {...{ page, work, start, isOffline }} />
    </>
  );
}
