import type { UseFormReturn } from 'react-hook-form';
import { Choice } from '@/components/ui/choice';
import { DateTimeField } from '@/components/ui/date-time-field';
import { Group, Row } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';
import { FLAGS } from '@shared/calc/types';
import { FLAG_WORDS } from '@shared/children/flags';
import type { Me } from '@shared/routes/accounts';
import type { TypedChild } from '../forms/child-form';

type Form = UseFormReturn<TypedChild, unknown, never>;
type Props = { form: UseFormReturn<TypedChild, unknown, unknown>; wards: Me['wards'] | null };

const SEXES = [
  { value: 'female', label: 'Female' },
  { value: 'male', label: 'Male' },
  { value: 'not-recorded', label: 'Not recorded' },
];

/** Everything the program asks about a child, in the order a referral tells it. */
export function ChildFields({ form: anyForm, wards }: Props) {
  const form = anyForm as unknown as Form;
  const { register, watch, formState } = form;
  const wrong = (field: keyof TypedChild) => formState.errors[field]?.message;
  return (
    <>
      <Group head="Who">
        <Row>
          <TextField label="Surname" error={wrong('surname')} {...register('surname')} />
          <TextField label="First name" error={wrong('given')} {...register('given')} />
        </Row>
        <Row>
          <TextField label="Hospital number" error={wrong('number')} {...register('number')} />
          {wards && (
            <>
              <SelectField
                label="Ward"
                error={wrong('wardId')}
                options={wards.map(({ id, name }) => ({ value: id, label: name }))}
                {...register('wardId')}
              />
              <TextField label="Bed" error={wrong('bed')} {...register('bed')} />
            </>
          )}
        </Row>
      </Group>
      <Group head="Birth" note="time too for a newborn">
        <Row>
          <DateTimeField
            kind="date"
            label="Date of birth"
            value={watch('bornOn')}
            error={wrong('bornOn')}
            {...register('bornOn')}
          />
          <DateTimeField
            kind="time"
            label="Time of birth, if known"
            error={(formState.errors as Record<string, { message?: string }>).bornAt?.message}
            {...register('bornTime')}
          />
        </Row>
        <Row>
          <NumberField
            label="Gestation at birth, weeks"
            unit="weeks"
            hint="Needed under 13 weeks of age"
            error={wrong('gestationWeeks')}
            {...register('gestationWeeks')}
          />
          <NumberField
            label="and days"
            unit="days"
            error={wrong('gestationDays')}
            {...register('gestationDays')}
          />
        </Row>
        <Segmented
          label="Sex"
          options={SEXES}
          value={watch('sex') || null}
          error={wrong('sex')}
          {...register('sex')}
        />
      </Group>
      <Group head="Allergies">
        <TextField
          label="Allergies and what happened"
          hint="Or “None known”, or “Not asked”"
          error={wrong('allergies')}
          {...register('allergies')}
        />
      </Group>
      <Group head="Flags" note="what changes the fluids" align="label">
        <fieldset>
          <legend className="vh">Clinical flags</legend>
          <ul className="flag-list">
            {FLAGS.map((flag) => (
              <li key={flag}>
                <Choice value={flag} {...register('flags')}>
                  <b>{FLAG_WORDS[flag].label}</b> <span className="soft sm">{FLAG_WORDS[flag].means}</span>
                </Choice>
              </li>
            ))}
          </ul>
        </fieldset>
      </Group>
    </>
  );
}
