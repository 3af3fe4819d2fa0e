import { Group, Owed } from '@/components/ui/group';
import { TextareaField } from '@/components/ui/textarea-field';
import { reasonFor } from '@shared/orders/sort-limits';
import { useDraftForm } from '../forms/draft-form';
import { inSentence } from '../forms/order-words';

/** Reasons that limits ask for and no entry of the form holds; one that was typed stays in view. */
export function ReasonsGroup({ isAsked }: { isAsked: boolean }) {
  const { work, values, register } = useDraftForm();
  if (!('workOut' in work)) return null;
  const asking = work.workOut.limits.filter(
    ({ met, reasonOwed, owes, code }) =>
      !met && owes === undefined && (reasonOwed === true || reasonFor(values, code) !== ''),
  );
  if (asking.length === 0) return null;
  const owed = new Set(work.reasonsOwed.map(({ code }) => code));
  return (
    <Group head="Your reasons" note="printed with the order">
      {asking.map(({ code, title }) => (
        <Owed key={code}>
          <TextareaField
            label={`Why: ${inSentence(title)}`}
            id={`order-reason-${code}`}
            rows={1}
            error={isAsked && owed.has(code) ? 'Say why, in a few words.' : undefined}
            {...register(`limitReasons.${code}`)}
          />
        </Owed>
      ))}
    </Group>
  );
}
