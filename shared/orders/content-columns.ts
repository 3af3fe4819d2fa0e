import type { Kilograms, Millilitres, MillilitresPerHour, Minutes } from '../units';
import { parseInstant, type Instant } from '../time';
import type { OrderContent } from './content';

const moment = (text: string): Instant => {
  const at = parseInstant(text);
  if (at === undefined) throw new RangeError(`not an instant: ${text}`);
  return at;
};

/** The query columns of a version, every one of them derived from its content and from nothing else. */
export function columnsOf(content: OrderContent) {
  const { figures } = content;
  return {
    reason: content.reason,
    urgency: content.urgency,
    askedStart: moment(content.plannedStart),
    rulebookNumber: content.rulebook.number,
    productId: content.fluid.id,
    isHighRisk: content.isHighRisk,
    lineClass: content.line,
    weightId: content.weight.id,
    weightKg: Number(content.weight.kg) as Kilograms,
    rateMlH: figures.rateMlPerH === null ? null : (Number(figures.rateMlPerH) as MillilitresPerHour),
    volumeMl: Number(figures.volumeMl) as Millilitres,
    overMin: figures.overMinutes === null ? null : (Number(figures.overMinutes) as Minutes),
    plannedStart: moment(content.plannedStart),
    startBy: moment(content.startBy),
    lapsesAt: moment(content.lapsesAt),
  };
}
