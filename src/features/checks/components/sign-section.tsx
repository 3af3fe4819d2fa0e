import { useState } from 'react';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button } from '@/components/ui/button';
import { TextareaField } from '@/components/ui/textarea-field';
import { GlyphWord } from '@/components/ui/state-word';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { usePassword } from '@/features/orders/api/use-password';
import { PasswordField } from '@/features/orders/components/password-field';
import { Refusal } from '@/features/orders/components/refusal';
import { useServerNow } from '@/lib/server-clock';
import { useOfflineSince } from '@/lib/use-online';
import type { ReturnMatter } from '@shared/checks/words';
import { isSigned } from '@shared/orders/states';
import type { CheckPage } from '@shared/routes/checks';
import { formatTime, MINUTE, parseInstant } from '@shared/time';
import { useCheckActs, type CheckSource } from '../api/check-source';
import type { EndedBy } from './covered-view';

const LEAST_WORDS = 3;
const MATTER_OF: Readonly<Record<string, ReturnMatter>> = {
  base: 'fluid',
  addedPotassium: 'additives',
  fraction: 'fraction',
  hours: 'rate-or-time',
  overMinutes: 'rate-or-time',
  typedRate: 'rate-or-time',
};

/** What the order is returned for: the first choice that differs. */
function matterOf({ rows }: NonNullable<CheckPage['uncovered']>['comparison']): ReturnMatter {
  const choice = rows.find(({ agrees, nature }) => !agrees && nature === 'choice');
  return MATTER_OF[choice?.field ?? ''] ?? 'something-else';
}

/** How long the check is still this person's to sign. */
export function useTimeLeft(page: CheckPage) {
  const now = useServerNow(page.now);
  const signBy = parseInstant(page.uncovered?.signBy ?? '');
  if (signBy === undefined) return { isOver: false, words: '' };
  const left = Math.ceil((signBy - now) / MINUTE);
  if (left <= 0) return { isOver: true, words: 'The time to sign has run out: another checker is needed.' };
  return { isOver: false, words: `Sign by ${formatTime(signBy, page.zone)}, ${left} min left.` };
}

/** Everything that signing or returning needs, for the section and for the bar under it. */
export function useSigning(source: CheckSource, page: CheckPage, onEnded: (how: EndedBy) => void) {
  const acts = useCheckActs(source);
  const cannotVerify = useAct('cannotVerify');
  const password = usePassword();
  const [reason, setReason] = useState('');
  const [reasonError, setReasonError] = useState<string>();
  const [trouble, setTrouble] = useState<{ title: string; words: string } | null>(null);
  const { uncovered } = page;
  const differs = uncovered?.comparison.outcome === 'choices-differ';

  const hasReason = (): boolean => {
    const isThere = reason.trim().length >= LEAST_WORDS;
    setReasonError(isThere ? undefined : 'Say why, in a few words.');
    if (!isThere) document.getElementById('sign-reason')?.focus();
    return isThere;
  };
  const sign = async () => {
    setTrouble(null);
    if (uncovered === null || (differs && !hasReason()) || !password.isThere()) return;
    try {
      const { state } = await acts.sign({
        contentSha256: uncovered.contentSha256,
        acceptReason: differs ? reason.trim() : null,
        password: password.value,
      });
      onEnded(isSigned(state) ? 'signed' : 'signed-pharmacist');
    } catch (error) {
      if (!password.takes(error)) setTrouble({ title: 'Nothing was signed.', words: problemWords(error) });
    }
  };
  const giveBack = async (versionId: string) => {
    setTrouble(null);
    if (uncovered === null || !hasReason()) return;
    const body = { what: matterOf(uncovered.comparison), reason: reason.trim() };
    try {
      await cannotVerify.mutateAsync({ params: { id: versionId }, body });
      onEnded('returned');
    } catch (error) {
      setTrouble({ title: 'The order was not returned.', words: problemWords(error) });
    }
  };
  return {
    differs,
    mayAccept: uncovered?.comparison.mayAccept === true,
    password,
    reason: { value: reason, error: reasonError, type: setReason },
    trouble,
    isSigning: acts.isSigning,
    isReturning: cannotVerify.isPending,
    sign,
    giveBack,
  };
}
type Signing = ReturnType<typeof useSigning>;

/** The signature's own part of the page: what it means, the reason where a choice is accepted, the password. */
export function SignSection({ signing, isOwn }: { signing: Signing; isOwn: boolean }) {
  const { differs, mayAccept, password, reason, trouble } = signing;
  return (
    <section className="sec" aria-labelledby="sign-head">
      <h2 id="sign-head">
        {differs
          ? mayAccept
            ? 'Accept the author’s choice, or return it'
            : 'Return it'
          : 'Sign as independent checker'}
        <span>{differs ? 'the reason is kept and printed' : 'your name, role and the time are kept'}</span>
      </h2>
      <div className="mt-s2 grid gap-s3">
        {trouble && <Refusal title={trouble.title}>{trouble.words}</Refusal>}
        {differs && !mayAccept && (
          <p>This difference cannot be accepted: one of the two sets is outside what the rulebook allows.</p>
        )}
        {differs && (
          <TextareaField
            id="sign-reason"
            label="Your reason, in a sentence"
            value={reason.value}
            error={reason.error}
            onChange={({ target }) => reason.type(target.value)}
            hint={isOwn ? undefined : 'To return it, sign in on your own screen: it stays yours until then.'}
          />
        )}
        {(!differs || mayAccept) && (
          <PasswordField value={password.value} onType={password.type} error={password.error} />
        )}
      </div>
    </section>
  );
}

type SignBarProps = { source: CheckSource; page: CheckPage; signing: Signing };

/** The foot of the page while the check is this person's to sign. */
export function SignBar({ source, page, signing }: SignBarProps) {
  const left = useTimeLeft(page);
  const isOffline = useOfflineSince() !== null;
  const { differs, mayAccept } = signing;
  const isShut = left.isOver || isOffline;
  return (
    <BottomBar
      state={
        <GlyphWord glyph={differs ? 'caution' : 'agrees'} tone={differs ? 'ochre' : 'leaf'}>
          {differs ? 'A choice differs' : 'Figures agree'}
        </GlyphWord>
      }
      say={
        <span id="sign-say">
          <b>{left.words}</b>{' '}
          {isOffline
            ? 'The line is down: nothing can be signed until it is back.'
            : differs
              ? 'Neither set counts until both agree. The program does not say who is right.'
              : 'Until then the check is kept for you.'}
        </span>
      }
    >
      {differs && source.via === 'own' && (
        <Button
          glyph="returned"
          busy={signing.isReturning}
          busyLabel="Returning, please wait"
          reasonId={isOffline ? 'sign-say' : undefined}
          onClick={() => void signing.giveBack(source.versionId)}
        >
          Return to prescriber with this reason
        </Button>
      )}
      {(!differs || mayAccept) && (
        <Button
          kind="primary"
          glyph="signed"
          busy={signing.isSigning}
          busyLabel="Signing, please wait"
          reasonId={isShut ? 'sign-say' : undefined}
          onClick={() => void signing.sign()}
        >
          {differs ? 'Accept this choice and sign' : 'Sign this check'}
        </Button>
      )}
    </BottomBar>
  );
}
