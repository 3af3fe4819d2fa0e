import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { Row } from '@/components/ui/group';
import { InlinePanel } from '@/components/ui/inline-panel';
import { SelectField } from '@/components/ui/select-field';
import { problemCode } from '@/lib/query-client';
import { decimalText } from '@shared/canonical';
import type { WorkedOutDraft } from '@shared/orders/work-out-draft';
import type { Draft } from '@shared/routes/orders';
import type { DraftSaver } from '../api/draft-saver';
import { problemWords } from '../api/problem-words';
import { mattersOf, type SeniorMatter } from '../api/senior-matter';
import { useAct } from '../api/use-act';
import { colleagueOption, mayCheck, useColleagues } from '../api/use-colleagues';
import { rereadOrder } from '../api/use-order';
import { usePassword } from '../api/use-password';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId } from '../forms/order-words';
import { isHighRiskDraft } from '../forms/risk-of-draft';
import { shownFromWork } from '../forms/shown-order';
import { PasswordField } from './password-field';
import { ReadBack } from './read-back';
import { Refusal } from './refusal';
import { UrgencyStrip } from './times-group';

type SignPanelProps = {
  draft: Draft;
  work: WorkedOutDraft;
  saver: DraftSaver;
  /** Reads the chart, the rulebook and the exceptions again. */
  onRefresh: () => Promise<void>;
  /** The server asks for a senior about limits this page could not see. */
  onSeniorNeeded: (matters: SeniorMatter[]) => void;
  onClose: () => void;
};

type Trouble = { title: string; words: string };

/** What the author sees as they sign; the server signs nothing else. */
function seenFigures({ workOut }: WorkedOutDraft) {
  const { figures, rulebook } = workOut;
  return {
    rateMlPerH: figures.rate === undefined ? null : decimalText(figures.rate, 1),
    volumeMl: decimalText(figures.volume, 1),
    rulebook,
  };
}

const figureWords = (work: WorkedOutDraft): string => {
  const { figure, volume, over } = shownFromWork(work);
  return figure.unit === 'mL'
    ? `${volume} ${over}`
    : `${figure.value}\u00a0${figure.unit}, ${volume} ${over}`;
};

const TITLES: Readonly<Record<string, string>> = {
  'figures-moved': 'Nothing was signed: the figures have moved.',
  'draft-moved': 'Nothing was signed: the draft was changed elsewhere.',
  'exception-needed': 'Nothing was signed: a senior has to agree first.',
  'over-the-brim': 'Nothing was signed: the order is over a brim.',
  'reason-owed': 'Nothing was signed: a reason is owed.',
};

/** Who checks, how urgent: both are entries of the draft and are kept with it. */
function CheckerRow({ draft, isHighRisk }: { draft: Draft; isHighRisk: boolean }) {
  const { register } = useDraftForm();
  const { data: people = [] } = useColleagues(draft.context.child.ward?.id);
  const fit = people.filter((person) => mayCheck(person, isHighRisk)).map(colleagueOption);
  return (
    <Row>
      <SelectField
        label={FIELD_WORDS.checkerId}
        width="full"
        id={fieldId('checkerId')}
        options={[{ value: '', label: 'Anyone on the ward who may check' }, ...fit]}
        hint={isHighRisk ? 'High risk: a senior checker or a pharmacist.' : undefined}
        {...register('checkerId')}
      />
      <UrgencyStrip labelled />
    </Row>
  );
}

/** Read-back, checker, urgency, password: opens in the page, beside the figures it signs. */
export function SignPanel({ draft, work, saver, onRefresh, onSeniorNeeded, onClose }: SignPanelProps) {
  const { context } = useDraftForm();
  const navigate = useNavigate();
  const sign = useAct('sign');
  const password = usePassword();
  const [trouble, setTrouble] = useState<Trouble | null>(null);
  const [isPreparing, setPreparing] = useState(false);
  const { versionId } = draft;

  const refused = async (error: unknown, before: string) => {
    if (password.takes(error)) return;
    const matters = mattersOf(error);
    if (matters.length > 0) return onSeniorNeeded(matters);
    const code = problemCode(error);
    setTrouble({
      title: TITLES[code ?? ''] ?? 'The order was not signed.',
      words:
        code === 'figures-moved'
          ? `You saw ${before}. Read them again on this page, and sign again. ${problemWords(error)}`
          : problemWords(error),
    });
    // a refusal says that something moved; a silence says nothing
    if (code !== null) await onRefresh().catch(() => undefined);
  };

  const send = async () => {
    if (!password.isThere()) return;
    setTrouble(null);
    setPreparing(true);
    const isKept = await saver.flush();
    setPreparing(false);
    if (!isKept) {
      setTrouble({
        title: 'The order was not signed.',
        words: saver.snapshot().words || 'The last words are not kept yet. Try again.',
      });
      return;
    }
    const before = figureWords(work);
    try {
      await sign.mutateAsync({
        params: { id: versionId },
        body: { rev: saver.rev, seen: seenFigures(work), password: password.value },
      });
      await rereadOrder(versionId);
      await navigate(`/orders/${versionId}`, { replace: true });
    } catch (error) {
      await refused(error, before);
    }
  };

  return (
    <InlinePanel
      title="Sign, and ask for a check"
      aboveBar
      onClose={onClose}
      actions={
        <Button
          kind="primary"
          glyph="signed"
          busy={isPreparing || sign.isPending}
          busyLabel="Signing, please wait"
          onClick={() => void send()}
        >
          Sign and ask for a check
        </Button>
      }
    >
      {trouble && (
        <Refusal title={trouble.title}>
          {trouble.words} Now: <b>{figureWords(work)}</b>.
        </Refusal>
      )}
      <ReadBack text={work.workOut.readBack} />
      <CheckerRow draft={draft} isHighRisk={isHighRiskDraft(work, context)} />
      <PasswordField value={password.value} onType={password.type} error={password.error} />
    </InlinePanel>
  );
}
