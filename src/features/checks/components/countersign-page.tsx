import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button, buttonClass } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Segmented } from '@/components/ui/segmented';
import { StateWord } from '@/components/ui/state-word';
import { TextareaField } from '@/components/ui/textarea-field';
import { problemWords } from '@/features/orders/api/problem-words';
import { rereadOrder, useOrder } from '@/features/orders/api/use-order';
import { useAct } from '@/features/orders/api/use-act';
import { usePassword } from '@/features/orders/api/use-password';
import { useTitle } from '@/features/orders/api/use-title';
import { PasswordField } from '@/features/orders/components/password-field';
import { Refusal } from '@/features/orders/components/refusal';
import type { Answer } from '@/lib/api';
import { problemCode } from '@/lib/query-client';
import { ProblemError } from '@/lib/server-answer';
import { useOfflineSince } from '@/lib/use-online';
import type { CheckPage } from '@shared/routes/checks';
import { useCheckPage, verdictOf, type CheckSource } from '../api/check-source';
import { dayTime } from '../forms/chart-words';
import { useCheckForm } from '../forms/use-check-form';
import { CheckStrip } from './check-strip';
import { CheckUnread } from './check-page';
import { CompareTable } from './compare-table';
import { MaySee } from './may-see';
import { MovedFigures } from './moved-figures';
import { OwnFigures } from './own-figures';

const LEAST_WORDS = 3;
const VERDICTS = [
  { value: 'agree', label: 'It was right' },
  { value: 'differ', label: 'Something differs' },
];

type Given = Answer<'order'>;
type Outcome = Answer<'countersignGiven'>;

/** What was recorded as given: a fact of the chart, so nothing of it is covered. */
function WhatWasGiven({ order, zone }: { order: Given; zone: string }) {
  const { open } = order;
  if (open === null) return null;
  return (
    <section className="sec" aria-labelledby="was-given">
      <h2 id="was-given">
        What was given
        <span>{order.code}</span>
      </h2>
      <p className="mt-s2 text-under">{open.content.readBack}</p>
      <ul className="mt-s2 grid gap-s1">
        {open.signatures.map(({ meaning, name, role, at, note }) => (
          <li key={`${meaning} ${at}`} className="text-small">
            <b>{name}</b>, {role}, {dayTime(at, zone)}
            {note && <span className="block text-ink-soft">{note}</span>}
          </li>
        ))}
      </ul>
    </section>
  );
}

type DecideProps = { page: CheckPage; order: Given; source: CheckSource; onDone: (outcome: Outcome) => void };

function useDeciding(page: CheckPage, source: CheckSource, onDone: DecideProps['onDone']) {
  const check = useCheckForm(source, page);
  const act = useAct('countersignGiven');
  const password = usePassword();
  const [verdict, setVerdict] = useState('');
  const [reason, setReason] = useState('');
  const [isTried, setTried] = useState(false);
  const [wrongChild, setWrongChild] = useState<string | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const isReasoned = verdict !== 'differ' || reason.trim().length >= LEAST_WORDS;

  const failed = (error: unknown) => {
    check.saver.reopen();
    if (password.takes(error)) return;
    const namesFields = check.takeRefusal(error);
    if (problemCode(error) === 'wrong-child' && error instanceof ProblemError)
      setWrongChild(error.problem.detail);
    else if (!namesFields) setTrouble(problemWords(error));
  };
  const send = async () => {
    setTried(true);
    setTrouble(null);
    setWrongChild(null);
    if (!check.isComplete() || verdict === '' || !isReasoned || !password.isThere()) return;
    check.saver.close();
    try {
      const { versionId } = page.order;
      const body = {
        agree: verdict === 'agree',
        form: check.form,
        reason: reason.trim(),
        password: password.value,
      };
      onDone(await act.mutateAsync({ params: { id: versionId }, body }));
      void rereadOrder(versionId);
    } catch (error) {
      failed(error);
    }
  };
  return {
    check,
    password,
    verdict: {
      value: verdict,
      choose: setVerdict,
      error: isTried && verdict === '' ? 'Choose one.' : undefined,
    },
    reason: {
      value: reason,
      type: setReason,
      error: isTried && !isReasoned ? 'Say what differs, in a few words.' : undefined,
    },
    wrongChild,
    trouble,
    isSending: act.isPending,
    send,
  };
}

function Decide({ page, order, source, onDone }: DecideProps) {
  const deciding = useDeciding(page, source, onDone);
  const isOffline = useOfflineSince() !== null;
  const { check, password, verdict, reason, wrongChild, trouble } = deciding;
  const { allowed, words } = verdictOf(page, 'countersign');
  const shut = !allowed
    ? words
    : isOffline
      ? 'The line is down: nothing can be signed until it is back.'
      : '';
  return (
    <>
      <main className="chk" id="main" tabIndex={-1}>
        <MaySee page={page} sentence="The child, the chart and why it was given." />
        <OwnFigures {...{ page, check, wrongChild }} title="Your own figures" />
        <section aria-label="Countersign" className="max-mid:px-s4">
          <WhatWasGiven order={order} zone={page.zone} />
          <section className="sec" aria-labelledby="countersign">
            <h2 id="countersign">
              Countersign
              <span>what was given cannot be changed</span>
            </h2>
            <div className="mt-s2 grid gap-s3">
              {trouble && <Refusal title="Nothing was recorded.">{trouble}</Refusal>}
              <Segmented
                label="By your own figures"
                tone="plum"
                options={VERDICTS}
                value={verdict.value}
                onChoose={verdict.choose}
                error={verdict.error}
              />
              {verdict.value === 'differ' && (
                <TextareaField
                  label="What differs"
                  value={reason.value}
                  error={reason.error}
                  onChange={({ target }) => reason.type(target.value)}
                />
              )}
              <PasswordField value={password.value} onType={password.type} error={password.error} />
            </div>
          </section>
        </section>
      </main>
      {check.status.theirs !== null && <MovedFigures {...{ page, check }} theirs={check.status.theirs} />}
      <BottomBar
        state={<StateWord state={page.state} />}
        say={
          <span id="countersign-say">
            <b>A second person looks afterwards.</b> Work it out yourself, then say whether it was right.{' '}
            {shut}
          </span>
        }
      >
        <Button
          kind="primary"
          glyph="countersigned"
          busy={deciding.isSending}
          busyLabel="Recording, please wait"
          reasonId={shut ? 'countersign-say' : undefined}
          onClick={() => void deciding.send()}
        >
          {verdict.value === 'differ' ? 'Record that it differs' : 'Countersign what was given'}
        </Button>
      </BottomBar>
    </>
  );
}

function Recorded({ page, order, outcome }: { page: CheckPage; order: Given; outcome: Outcome }) {
  const { comparison, state } = outcome;
  const giver = order.open?.author;
  return (
    <>
      <main className="page" id="main" tabIndex={-1}>
        <Notice kind={comparison.outcome === 'agreed' ? 'agrees' : 'caution'} title="It is recorded." live>
          {comparison.effect || 'Your figures agree with what was given.'}
        </Notice>
        <div className="mt-s4">
          <CompareTable
            comparison={comparison}
            author={{ name: giver?.name ?? 'As given', note: giver?.title ?? '' }}
            checker={{ name: 'You', note: 'by your own figures' }}
          />
        </div>
      </main>
      <BottomBar state={<StateWord state={state} />} say={<b>What was given is not changed by it.</b>}>
        <Link className={buttonClass()} to={`/orders/${page.order.versionId}`}>
          Go to the order
        </Link>
        <Link className={buttonClass('primary')} to="/checks">
          Back to my checks
        </Link>
      </BottomBar>
    </>
  );
}

/** The look afterwards at what was given in an emergency: by one's own figures, against what was recorded. */
export function CountersignPage() {
  const { versionId = '' } = useParams();
  const source: CheckSource = { via: 'own', versionId };
  const page = useCheckPage(source);
  const order = useOrder(versionId);
  const [outcome, setOutcome] = useState<Outcome | null>(null);
  useTitle('Countersign');
  if (!page.data || !order.data) {
    const retry = () => void Promise.all([page.refetch(), order.refetch()]);
    return <CheckUnread error={page.error ?? order.error} retry={retry} />;
  }
  return (
    <>
      <CheckStrip page={page.data} given={order.data.open?.content}>
        <Link to={`/children/${page.data.child.id}`}>Chart</Link>
      </CheckStrip>
      {outcome ? (
        <Recorded page={page.data} order={order.data} outcome={outcome} />
      ) : (
        <Decide key={versionId} {...{ source }} page={page.data} order={order.data} onDone={setOutcome} />
      )}
    </>
  );
}
