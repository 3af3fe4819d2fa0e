import { Group } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { TextareaField } from '@/components/ui/textarea-field';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId } from '../forms/order-words';

const LINES = [
  { amount: 'feedsMl', note: 'feedsNote', example: 'What is counted' },
  { amount: 'drugsMl', note: 'drugsNote', example: 'Drugs, flushes, other lines' },
] as const;

/** What the child gets besides: stated, 0 only when typed as 0. */
export function TakeAwayGroup() {
  const { register, errorOf } = useDraftForm();
  return (
    <Group head="Take away" note="other intake" align="label">
      {LINES.map(({ amount, note, example }) => (
        <div
          key={amount}
          className="grid grid-cols-[1fr_150px] items-start gap-x-[14px] gap-y-[6px] mid:grid-cols-[118px_146px_1fr]"
        >
          <span className="leading-[34px]" aria-hidden="true">
            {FIELD_WORDS[amount]}
          </span>
          <NumberField
            label={`${FIELD_WORDS[amount]}, mL in 24 hours`}
            labelHidden
            unit="mL / 24 h"
            id={fieldId(amount)}
            error={errorOf(amount)}
            {...register(amount)}
          />
          <div className="col-span-2 mid:col-span-1">
            <TextareaField
              rows={1}
              label={FIELD_WORDS[note]}
              labelHidden
              placeholder={example}
              id={fieldId(note)}
              error={errorOf(note)}
              {...register(note)}
            />
          </div>
        </div>
      ))}
    </Group>
  );
}
