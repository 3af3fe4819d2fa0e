import { useMemo, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Group, Owed, Row } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextareaField } from '@/components/ui/textarea-field';
import { FRACTIONS } from '@shared/calc/types';
import { formatNumber } from '@shared/rounding';
import { useDraftForm } from '../forms/draft-form';
import { fractionConsequences } from '../forms/full-maintenance';
import { FIELD_WORDS, FRACTION_LABELS, METHOD_OPTIONS, fieldId } from '../forms/order-words';

function FractionStrip() {
  const { values, context, set, errorOf, isOver } = useDraftForm();
  const consequences = useMemo(() => fractionConsequences(values, context), [values, context]);
  return (
    <Segmented
      label="Fraction of full maintenance"
      id={fieldId('fraction')}
      options={FRACTIONS.map((value) => ({
        value,
        label: FRACTION_LABELS[value],
        consequence: consequences[value],
      }))}
      value={values.fraction}
      onChoose={(fraction) => set({ fraction })}
      error={errorOf('fraction')}
      overBrim={isOver('fraction')}
    />
  );
}

/** What only one method asks for. */
function MethodDetail() {
  const { values, register, errorOf, isOver } = useDraftForm();
  if (values.method === 'who') {
    return (
      <Row>
        <NumberField
          label="Temperature, if raised"
          unit="°C"
          id={fieldId('temperatureC')}
          hint="Each degree above 37 adds a tenth."
          error={errorOf('temperatureC')}
          {...register('temperatureC')}
        />
      </Row>
    );
  }
  if (values.method !== 'newborn') return null;
  return (
    <Row>
      <NumberField
        label={FIELD_WORDS.newbornMlPerKgPerDay}
        unit="mL/kg/day"
        id={fieldId('newbornMlPerKgPerDay')}
        hint="Left empty, the lower end of the band for the hours since birth."
        error={errorOf('newbornMlPerKgPerDay')}
        overBrim={isOver('newbornMlPerKgPerDay')}
        {...register('newbornMlPerKgPerDay')}
      />
    </Row>
  );
}

function TypedRate() {
  const { values, work, register, set, errorOf, isOver } = useDraftForm();
  const [isAskedFor, setAskedFor] = useState(false);
  const figures = 'workOut' in work ? work.workOut.figures : undefined;
  const workedOut = figures?.kind === 'maintenance' ? formatNumber(figures.workedOutRate, 1) : undefined;
  if (values.typedRate === '' && !isAskedFor) {
    return (
      <Button kind="quiet" small className="-ml-[13px] mid:min-h-[24px]" onClick={() => setAskedFor(true)}>
        Set another rate
      </Button>
    );
  }
  const giveUp = () => {
    set({ typedRate: '' });
    setAskedFor(false);
  };
  return (
    <Row>
      <NumberField
        label="Rate, instead of the worked-out one"
        unit="mL/h"
        id={fieldId('typedRate')}
        autoFocus={isAskedFor && values.typedRate === ''}
        hint={workedOut && `Worked out: ${workedOut}\u00a0mL/h.`}
        error={errorOf('typedRate')}
        overBrim={isOver('typedRate')}
        {...register('typedRate')}
      />
      <Button kind="quiet" small className="mt-[20px]" onClick={giveUp}>
        Use the worked-out rate
      </Button>
    </Row>
  );
}

/** How full maintenance is reckoned and how much of it the child gets. */
export function MethodGroup() {
  const { values, register, errorOf, owes } = useDraftForm();
  const share = FRACTIONS.find((each) => each === values.fraction);
  const isOwnFigure = values.method === 'newborn' || values.typedRate !== '' || share === undefined;
  return (
    <Group head="Method">
      <Row>
        <SelectField
          label={FIELD_WORDS.method}
          width="m basis-[196px]"
          id={fieldId('method')}
          placeholder="Choose"
          options={METHOD_OPTIONS}
          error={errorOf('method')}
          {...register('method')}
        />
        <FractionStrip />
      </Row>
      <MethodDetail />
      {owes('fractionReason') && (
        <Owed>
          <TextareaField
            label={
              isOwnFigure ? 'Why this much for this child' : `Why ${FRACTION_LABELS[share]} for this child`
            }
            id={fieldId('fractionReason')}
            rows={1}
            error={errorOf('fractionReason')}
            {...register('fractionReason')}
          />
        </Owed>
      )}
      <TypedRate />
    </Group>
  );
}
