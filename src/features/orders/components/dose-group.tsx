import { Glyph } from '@/components/ui/glyph';
import { Group, Owed, Row } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { TextField } from '@/components/ui/text-field';
import { rulebookOf } from '@shared/orders/chart-facts';
import { formatNumber } from '@shared/rounding';
import { ruleValues } from '@shared/rulebook/read';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId } from '../forms/order-words';

/** The dose: by weight or by volume, whichever was typed last; the other box shows what it comes to. */
export function DoseGroup() {
  const { values, work, register, set, errorOf, isOver } = useDraftForm();
  const figures = 'workOut' in work ? work.workOut.figures : undefined;
  const bolus = figures?.kind === 'bolus' ? figures : undefined;
  const isBy = (way: string) => values.doseBy === way;
  const over = isOver('volumeMl') ? errorOf('volumeMl') : undefined;
  const box = over === undefined ? '' : 'bad';
  // an untyped dose is owed by the box for the weight
  const unsaid = errorOf('doseBy');
  return (
    <Group head="Dose">
      <Row>
        <NumberField
          label={FIELD_WORDS.mlPerKg}
          unit="mL/kg"
          id={fieldId('mlPerKg')}
          className={box}
          placeholder={isBy('volume') && bolus ? formatNumber(bolus.mlPerKg, 1) : undefined}
          error={errorOf('mlPerKg') ?? unsaid}
          {...register('mlPerKg', { onChange: () => set({ doseBy: 'weight', volumeMl: '' }) })}
        />
        <NumberField
          label={FIELD_WORDS.volumeMl}
          unit="mL"
          id={fieldId('volumeMl')}
          className={box}
          placeholder={isBy('weight') && bolus ? formatNumber(bolus.volume, 1) : undefined}
          error={over === undefined ? errorOf('volumeMl') : undefined}
          {...register('volumeMl', { onChange: () => set({ doseBy: 'volume', mlPerKg: '' }) })}
        />
        <NumberField
          label={FIELD_WORDS.overMinutes}
          unit="min"
          id={fieldId('overMinutes')}
          error={errorOf('overMinutes')}
          overBrim={isOver('overMinutes')}
          {...register('overMinutes')}
        />
      </Row>
      {over !== undefined && (
        <p className="err" role="alert">
          <Glyph name="brim" />
          <span>{over}</span>
        </p>
      )}
    </Group>
  );
}

/** Boluses of the last 24 h, here and elsewhere: they count towards this one's total. */
export function AlreadyGivenGroup() {
  const { context, register, errorOf, owes } = useDraftForm();
  const { totalSenior } = ruleValues(rulebookOf(context), 'bolus');
  return (
    <Group head="Already given" note="last 24 h" align="label">
      <div className="pt-[8px]">
        {context.bolusesLast24h.length === 0 ? (
          <p>
            No bolus so far.{' '}
            <span className="soft">From {totalSenior}&nbsp;mL/kg in 24 h a senior agrees.</span>
          </p>
        ) : (
          <ul>
            {context.bolusesLast24h.map(({ at, words }) => (
              <li key={`${at} ${words}`}>{words}</li>
            ))}
          </ul>
        )}
      </div>
      {owes('advisedBy') && (
        <Owed>
          <TextField
            label="Which intensive-care doctor or consultant advised this"
            id={fieldId('advisedBy')}
            error={errorOf('advisedBy')}
            {...register('advisedBy')}
          />
        </Owed>
      )}
    </Group>
  );
}
