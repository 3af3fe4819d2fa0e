import { zodResolver } from '@hookform/resolvers/zod';
import { useRef, useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { DateTimeField } from '@/components/ui/date-time-field';
import { Row } from '@/components/ui/group';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Notice } from '@/components/ui/notice';
import { NumberField } from '@/components/ui/number-field';
import { SelectField } from '@/components/ui/select-field';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { call, type Answer } from '@/lib/api';
import { putProblem } from '@/lib/put-problem';
import { serverNow } from '@/lib/server-clock';
import { newKey } from '@/lib/server-answer';
import { WEIGHT_METHODS } from '@shared/calc/types';
import { decimalInput } from '@shared/decimal-input';
import { localDateTime } from '@shared/time';
import { KG_FIELD } from '@shared/weights/limits';
import { METHOD_WORDS } from '@shared/weights/chart-weight';
import { refreshChild } from '../api/use-chart';

const schema = z.object({
  kg: z.string().refine((text) => decimalInput(KG_FIELD).safeParse(text).success, {
    error: (issue) =>
      decimalInput(KG_FIELD).safeParse(issue.input).error?.issues[0]?.message ?? 'Type the weight in kg.',
  }),
  method: z.enum(WEIGHT_METHODS, 'Say how it was weighed.'),
  at: z.string().min(1, 'Give the date and time.'),
});
type Typed = { kg: string; method: string; at: string };
type Taken = Answer<'recordWeight'>;

const METHODS = WEIGHT_METHODS.map((method) => ({ value: method, label: METHOD_WORDS[method] }));

type WeightPanelProps = {
  childId: string;
  /** A weight that waits for its second measurement; absent for a new weight. */
  confirms?: { id: string; words: string };
  onClose: () => void;
  onTaken?: (weightId: string, usable: boolean) => void;
};

/** Records a weight as read, or measures a doubtful one again. What looks wrong is asked about, never changed. */
export function WeightPanel({ childId, confirms, onClose, onTaken }: WeightPanelProps) {
  const { zone } = useKnownMe().hospital;
  const [problem, setProblem] = useState<string | null>(null);
  const [taken, setTaken] = useState<Taken | null>(null);
  const key = useRef(newKey());
  const form = useForm<Typed, unknown, z.output<typeof schema>>({
    resolver: zodResolver(schema) as never,
    mode: 'onTouched',
    defaultValues: { kg: '', method: '', at: localDateTime(serverNow(), zone) },
  });
  const { register, formState, watch } = form;

  const record = form.handleSubmit(async (body) => {
    setProblem(null);
    try {
      if (confirms) {
        const answer = await call('confirmWeight', { params: { id: confirms.id }, key: key.current, body });
        if (!answer.usable) setProblem(answer.words);
        else onClose();
      } else {
        const answer = await call('recordWeight', {
          params: { id: childId },
          key: key.current,
          body: { ...body, secondReadingKg: null },
        });
        onTaken?.(answer.weightId, answer.usable);
        if (answer.needs === 'nothing') onClose();
        else setTaken(answer);
      }
      key.current = newKey();
      await refreshChild(childId);
    } catch (error) {
      key.current = newKey();
      setProblem(putProblem(error, form.setError, ['kg', 'method', 'at']));
    }
  });

  if (taken)
    return (
      <InlinePanel
        title="Measure again"
        tone="ochre"
        onClose={onClose}
        closeLabel="Later: no order can use it until then"
      >
        <Notice
          kind="caution"
          title={
            taken.needs === 'second-person'
              ? 'Another person measures again.'
              : 'A second measurement is owed.'
          }
        >
          {taken.words}
        </Notice>
        {taken.needs === 'second-measurement' && (
          <WeightPanelAgain childId={childId} weight={taken} onClose={onClose} />
        )}
      </InlinePanel>
    );
  return (
    <InlinePanel
      title={confirms ? 'Measure this weight again' : 'Record a weight'}
      onClose={onClose}
      closeLabel="Close without recording"
      actions={
        <Button
          kind="primary"
          busy={formState.isSubmitting}
          busyLabel="Recording, please wait"
          onClick={() => void record()}
        >
          Record this weight
        </Button>
      }
    >
      <form onSubmit={record} noValidate>
        {confirms && <p className="note">{confirms.words}</p>}
        {problem && (
          <Notice kind="stop" title="Not taken." live>
            {problem}
          </Notice>
        )}
        <Row>
          <NumberField
            label="Weight"
            unit="kg"
            width="w"
            error={formState.errors.kg?.message}
            {...register('kg')}
          />
          <SelectField
            label="How"
            placeholder="Choose"
            width="w2"
            options={METHODS}
            error={formState.errors.method?.message}
            {...register('method')}
          />
          <DateTimeField
            label="When"
            width="w2"
            value={watch('at')}
            error={formState.errors.at?.message}
            {...register('at')}
          />
        </Row>
        <button type="submit" hidden aria-hidden="true" tabIndex={-1} />
      </form>
    </InlinePanel>
  );
}

const WeightPanelAgain = ({
  childId,
  weight,
  onClose,
}: {
  childId: string;
  weight: Taken;
  onClose: () => void;
}) => (
  <WeightPanel
    childId={childId}
    confirms={{
      id: weight.weightId,
      words: 'Take the child off the scales, zero them, and read them afresh.',
    }}
    onClose={onClose}
  />
);
