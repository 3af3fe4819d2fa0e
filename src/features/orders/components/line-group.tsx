import { Group } from '@/components/ui/group';
import { Segmented } from '@/components/ui/segmented';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId, LINE_OPTIONS, ROUTE_OPTIONS } from '../forms/order-words';

/** The class of line, which limits hold to; the cannula itself is bedside matter. A bolus also says how. */
export function LineGroup() {
  const { values, set, errorOf } = useDraftForm();
  const isBolus = values.kind === 'bolus';
  return (
    <Group head={isBolus ? 'Line, and how' : 'Line'} align="label">
      <Segmented
        label={FIELD_WORDS.line}
        labelHidden
        id={fieldId('line')}
        options={LINE_OPTIONS}
        value={values.line}
        onChoose={(line) => set({ line })}
        error={errorOf('line')}
      />
      {isBolus && (
        <Segmented
          label={FIELD_WORDS.route}
          labelHidden
          id={fieldId('route')}
          options={ROUTE_OPTIONS}
          value={values.route}
          onChoose={(route) => set({ route })}
          error={errorOf('route')}
        />
      )}
    </Group>
  );
}
