import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Choice } from '@/components/ui/choice';
import { Row } from '@/components/ui/group';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextareaField } from '@/components/ui/textarea-field';
import type { SeniorMatter } from '../api/senior-matter';
import type { Draft } from '@shared/routes/orders';
import type { DraftSaver } from '../api/draft-saver';
import { problemWords } from '../api/problem-words';
import { useAct } from '../api/use-act';
import {
  colleagueOption,
  isClinicalColleague,
  isSenior,
  useColleagues,
  type Colleague,
} from '../api/use-colleagues';
import { usePassword } from '../api/use-password';
import { PasswordField } from './password-field';
import { Refusal } from './refusal';

type Way = 'here' | 'telephone';
const WAYS = [
  { value: 'here', label: 'Ask in Brimline' },
  { value: 'telephone', label: 'By telephone' },
];
const MIN_REASON = 3;

type ExceptionPanelProps = {
  draft: Draft;
  limits: readonly SeniorMatter[];
  saver: DraftSaver;
  readBack: string;
  onRefresh: () => Promise<void>;
  onClose: () => void;
};

type Entries = { seniorId: string; heardById: string; reason: string; isReadBack: boolean };
type Errors = Partial<Record<keyof Entries, string>>;

function errorsIn({ seniorId, heardById, reason, isReadBack }: Entries, way: Way): Errors {
  const errors: Errors = {};
  if (reason.trim().length < MIN_REASON) errors.reason = 'Say why this order needs it, in a few words.';
  if (way === 'here') return errors;
  if (seniorId === '') errors.seniorId = 'Name the senior who agreed.';
  if (heardById === '') errors.heardById = 'Name who heard the read-back.';
  if (heardById !== '' && heardById === seniorId)
    errors.heardById = 'The one who heard it is another person.';
  if (!isReadBack) errors.isReadBack = 'Read it back first.';
  return errors;
}

type PartProps = {
  entries: Entries;
  errors: Errors;
  people: readonly Colleague[];
  change: (entries: Partial<Entries>) => void;
};

function ByTelephone({ entries, errors, people, change, readBack }: PartProps & { readBack: string }) {
  return (
    <>
      <Row>
        <SelectField
          label="Who agreed"
          width="full"
          placeholder="Name the senior"
          options={people.filter(isSenior).map(colleagueOption)}
          value={entries.seniorId}
          onChange={({ target }) => change({ seniorId: target.value })}
          error={errors.seniorId}
        />
        <SelectField
          label="Who heard the read-back"
          width="full"
          placeholder="Name a second person"
          options={people.filter(isClinicalColleague).map(colleagueOption)}
          value={entries.heardById}
          onChange={({ target }) => change({ heardById: target.value })}
          error={errors.heardById}
        />
      </Row>
      <p className="soft">Read back: {readBack}</p>
      <div>
        <Choice
          checked={entries.isReadBack}
          onChange={({ target }) => change({ isReadBack: target.checked })}
        >
          I read this back on the telephone, and the second person heard it
        </Choice>
        {errors.isReadBack && (
          <p className="err" role="alert">
            {errors.isReadBack}
          </p>
        )}
      </div>
      <p className="note">The senior countersigns within 12&nbsp;h.</p>
    </>
  );
}

function Here({ entries, people, change }: PartProps) {
  return (
    <SelectField
      label="Who is asked"
      options={[
        { value: '', label: 'Any senior on the ward' },
        ...people.filter(isSenior).map(colleagueOption),
      ]}
      value={entries.seniorId}
      onChange={({ target }) => change({ seniorId: target.value })}
    />
  );
}

const WORDS: Readonly<Record<Way, { act: string; busy: string; failed: string }>> = {
  here: { act: 'Ask for agreement', busy: 'Asking, please wait', failed: 'Nobody was asked.' },
  telephone: {
    act: 'Record the agreement',
    busy: 'Recording, please wait',
    failed: 'The agreement was not recorded.',
  },
};

function useExceptionActs(draft: Draft, saver: DraftSaver) {
  const ask = useAct('askException');
  const telephone = useAct('telephoneException');
  const params = { id: draft.versionId };
  return {
    isPending: ask.isPending || telephone.isPending,
    send: async (way: Way, { seniorId, heardById, reason }: Entries, password: string) => {
      if (!(await saver.flush()))
        throw new Error(saver.snapshot().words || 'The last words are not kept yet. Try again.');
      const rev = saver.rev;
      if (way === 'here')
        return ask.mutateAsync({ params, body: { rev, seniorId: seniorId || null, reason } });
      return telephone.mutateAsync({
        params,
        body: { rev, seniorId, heardById, readBack: true, reason, password },
      });
    },
  };
}

/** A senior who is neither author nor checker agrees, here or on the telephone; it is bound to this text. */
export function ExceptionPanel({ draft, limits, saver, readBack, onRefresh, onClose }: ExceptionPanelProps) {
  const { data: people = [] } = useColleagues(draft.context.child.ward?.id);
  const [way, setWay] = useState<Way>('here');
  const [entries, setEntries] = useState<Entries>({
    seniorId: '',
    heardById: '',
    reason: '',
    isReadBack: false,
  });
  const [isAsked, setAsked] = useState(false);
  const [trouble, setTrouble] = useState('');
  const password = usePassword();
  const acts = useExceptionActs(draft, saver);
  const found = errorsIn(entries, way);
  const errors = isAsked ? found : {};
  const change = (next: Partial<Entries>) => setEntries({ ...entries, ...next });

  const send = async () => {
    setAsked(true);
    setTrouble('');
    if (Object.keys(found).length > 0 || (way === 'telephone' && !password.isThere())) return;
    try {
      await acts.send(way, entries, password.value);
      await onRefresh().catch(() => undefined);
      onClose();
    } catch (error) {
      if (!password.takes(error))
        setTrouble(error instanceof Error && error.name === 'Error' ? error.message : problemWords(error));
    }
  };

  const parts = { entries, errors, people, change };
  return (
    <InlinePanel
      title="A senior has to agree"
      tone="ochre"
      aboveBar
      onClose={onClose}
      actions={
        <Button
          kind="primary"
          glyph="senior"
          busy={acts.isPending}
          busyLabel={WORDS[way].busy}
          onClick={() => void send()}
        >
          {WORDS[way].act}
        </Button>
      }
    >
      {trouble && <Refusal title={WORDS[way].failed}>{trouble}</Refusal>}
      <ul>
        {limits.map(({ code, title, text }) => (
          <li key={code}>
            <b>{title}.</b> {text}
          </li>
        ))}
      </ul>
      <Segmented
        label="How they agree"
        labelHidden
        options={WAYS}
        value={way}
        onChoose={(next) => setWay(next === 'telephone' ? 'telephone' : 'here')}
      />
      {way === 'here' ? <Here {...parts} /> : <ByTelephone {...parts} readBack={readBack} />}
      <TextareaField
        label="Why this order needs it"
        rows={2}
        value={entries.reason}
        onChange={({ target }) => change({ reason: target.value })}
        error={errors.reason}
      />
      {way === 'telephone' && (
        <PasswordField value={password.value} onType={password.type} error={password.error} />
      )}
    </InlinePanel>
  );
}
