import { Link } from 'react-router-dom';
import { Group, Row } from '@/components/ui/group';
import { SelectField } from '@/components/ui/select-field';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId, weightWords } from '../forms/order-words';

/** The weight is one of the chart's: an order never has a weight of its own. */
export function WeightGroup({ versionId }: { versionId: string }) {
  const { values, context, register, errorOf } = useDraftForm();
  const chosen = context.weights.find(({ id }) => id === values.weightId);
  const weigh = `/children/${context.child.id}?record=weight&back=${encodeURIComponent(`/drafts/${versionId}`)}`;
  const options = context.weights.map((weight) => ({
    value: weight.id,
    label: `${weightWords(weight, context.zone)}${weight.usable ? '' : ': a second measurement is owed'}`,
    disabled: !weight.usable,
  }));
  if (options.length === 0) {
    return (
      <Group head="Weight" align="label">
        <p id={fieldId('weightId')} tabIndex={-1}>
          <b>No weight on the chart.</b> <Link to={weigh}>Record a weight</Link>
        </p>
      </Group>
    );
  }
  return (
    <Group head="Weight" align="label">
      <Row>
        <SelectField
          label={FIELD_WORDS.weightId}
          labelHidden
          width="w4 full"
          id={fieldId('weightId')}
          placeholder="Choose the weight to dose on"
          options={options}
          error={errorOf('weightId')}
          caution={chosen?.stale ? `This weight is ${chosen.stale}.` : undefined}
          {...register('weightId')}
        />
        <Link className="btn q sm" to={weigh}>
          Record a weight
        </Link>
      </Row>
    </Group>
  );
}
