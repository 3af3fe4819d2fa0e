import { DateTimeField } from '@/components/ui/date-time-field';
import { Group, Row } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { rulebookOf } from '@shared/orders/chart-facts';
import { orderWindows } from '@shared/orders/order-windows';
import { ruleValues } from '@shared/rulebook/read';
import { formatRelativeDay, instant, parseInstant } from '@shared/time';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId, urgencyOptions } from '../forms/order-words';

/** "Lapses 11 Jun, 12:00", once the order can be worked out. */
function useLapses(): string | undefined {
  const { work, context } = useDraftForm();
  if (!('workOut' in work)) return undefined;
  const { request, extras } = work;
  const windows = orderWindows(request.order, extras.plannedStart, rulebookOf(context));
  const now = parseInstant(context.now) ?? instant(0);
  const at = request.order.kind === 'bolus' ? windows.startBy : windows.lapsesAt;
  const says = request.order.kind === 'bolus' ? 'Start it by' : 'Lapses';
  return `${says} ${formatRelativeDay(at, now, context.zone)}`;
}

/** How urgent the check is; an emergency bolus waits for no senior. */
export function UrgencyStrip({ labelled = false }: { labelled?: boolean }) {
  const { values, set, errorOf } = useDraftForm();
  return (
    <Segmented
      label={FIELD_WORDS.urgency}
      id={labelled ? 'sign-urgency' : fieldId('urgency')}
      options={urgencyOptions(values.kind)}
      value={values.urgency}
      onChoose={(urgency) => set({ urgency })}
      error={errorOf('urgency')}
    />
  );
}

function Moment({ field, width }: { field: 'plannedStart' | 'reviewBy' | 'bloodsBy'; width?: string }) {
  const { values, register, errorOf } = useDraftForm();
  return (
    <DateTimeField
      value={values[field]}
      short
      label={FIELD_WORDS[field]}
      width={width}
      id={fieldId(field)}
      error={errorOf(field)}
      {...register(field)}
    />
  );
}

/** When it starts, how long it holds, and when someone looks again. */
export function TimesGroup() {
  const { values, context, work, register, errorOf, isOver } = useDraftForm();
  const lapses = useLapses();
  const rulebook = rulebookOf(context);
  if (values.kind === 'bolus') {
    const { startHoursBolus } = ruleValues(rulebook, 'windows');
    return (
      <Group head="Valid for" note={lapses ?? `${startHoursBolus} h to start`}>
        <Row>
          <Moment field="plannedStart" width="full" />
          <UrgencyStrip />
        </Row>
      </Group>
    );
  }
  const { hoursMost } = ruleValues(rulebook, 'maintenance');
  // usually said at signing; here when what stands does not fit this kind
  const isUrgencyWrong = 'fields' in work && work.fields.urgency !== undefined;
  return (
    <Group head="Valid for" note={lapses ?? `${hoursMost} h at most`}>
      <Row>
        <Moment field="plannedStart" width="w2 full" />
        <NumberField
          label="For"
          unit="h"
          width="w2"
          id={fieldId('hours')}
          error={errorOf('hours')}
          overBrim={isOver('hours')}
          {...register('hours')}
        />
      </Row>
      <Row>
        <Moment field="reviewBy" width="w2 full" />
        <Moment field="bloodsBy" width="w2 full" />
      </Row>
      {isUrgencyWrong && <UrgencyStrip />}
    </Group>
  );
}
