import type { DraftContext } from '../routes/orders';
import { localDateTime, parseInstant } from '../time';
import type { OrderContent } from './content';
import { emptyOrderForm, type OrderForm } from './form';
import { proposeTimes } from './propose-form';

/** A stored decimal as a person would type it: "44.0" is "44". */
const typed = (text: string | null): string => (text === null ? '' : String(Number(text)));

/**
 * The form that led to this content, for a revision or a copy. Times that have passed are proposed anew; reasons
 * owed by limits are not carried over: they are given again for the new version.
 */
export function formFromContent(content: OrderContent, context: DraftContext): OrderForm {
  return {
    ...emptyOrderForm(content.kind),
    reason: content.reason,
    weightId: content.weight.id,
    productId: content.fluid.id,
    line: content.line,
    urgency: content.urgency,
    ...inputTexts(content),
    ...times(content, context),
  };
}

function inputTexts({ inputs }: OrderContent): Partial<OrderForm> {
  if (inputs.kind === 'bolus') {
    return {
      doseBy: inputs.doseBy,
      mlPerKg: typed(inputs.mlPerKg),
      volumeMl: typed(inputs.volumeMl),
      overMinutes: typed(inputs.overMinutes),
      route: inputs.route,
      advisedBy: inputs.advisedBy ?? '',
    };
  }
  return {
    method: inputs.method,
    fraction: inputs.fraction,
    fractionReason: inputs.fractionReason ?? '',
    temperatureC: typed(inputs.temperatureC),
    newbornMlPerKgPerDay: typed(inputs.newbornMlPerKgPerDay),
    feedsMl: typed(inputs.feedsMl),
    feedsNote: inputs.feedsNote,
    drugsMl: typed(inputs.drugsMl),
    drugsNote: inputs.drugsNote,
    typedRate: typed(inputs.typedRate),
    hours: typed(inputs.hours),
  };
}

function times(content: OrderContent, context: DraftContext): Partial<OrderForm> {
  const start = parseInstant(content.plannedStart);
  const now = parseInstant(context.now);
  const isAhead = start !== undefined && now !== undefined && start >= now;
  if (!isAhead) return proposeTimes(content.kind, context, Number(content.figures.hours ?? 24));
  const local = (text: string | null) => {
    const at = text === null ? undefined : parseInstant(text);
    return at === undefined ? '' : localDateTime(at, context.zone);
  };
  return {
    plannedStart: local(content.plannedStart),
    reviewBy: local(content.reviewBy),
    bloodsBy: local(content.bloodsBy),
  };
}
