import { ghostWords } from '@shared/gauge/ghost-words';
import type { GaugeInput } from '@shared/gauge/input';
import type { WorkedOutDraft } from '@shared/orders/work-out-draft';
import type { OrderContent } from '@shared/orders/content';
import type { LimitFinding } from '@shared/calc/types';
import { formatNumber } from '@shared/rounding';

/** One order's figures as a page shows them, from a draft being typed or from what was signed. */
export type ShownOrder = {
  /** The figure that goes on the pump, or into the syringe. */
  figure: { lead: string; value: string; unit: string };
  /** "1250 mL" and "over 24 h". */
  volume: string;
  over: string;
  fluid: string;
  gauge: Omit<GaugeInput, 'heightPx'>;
  otherBrims: { label: string; text: string; ratio: number }[];
  steps: {
    label: string;
    working: string;
    result: string;
    unit: string;
    source: string;
    mark?: 'sum' | 'answer' | 'stop';
  }[];
  gives: { label: string; value: string; unit: string }[];
};

const ml = (value: number): string => `${formatNumber(value, 1)}\u00a0mL`;

type Amount = {
  rate: number | undefined;
  volume: number;
  hours: number | undefined;
  minutes: number | undefined;
};

function amountWords({
  rate,
  volume,
  hours,
  minutes,
}: Amount): Pick<ShownOrder, 'figure' | 'volume' | 'over'> {
  const over =
    hours === undefined
      ? `over ${formatNumber(minutes ?? 0, 1)}\u00a0min`
      : `over ${formatNumber(hours, 1)}\u00a0h`;
  const figure =
    rate === undefined
      ? { lead: 'Give', value: formatNumber(volume, 1), unit: 'mL' }
      : { lead: 'Set the pump to', value: formatNumber(rate, 1), unit: 'mL/h' };
  return { figure, volume: ml(volume), over };
}

/** A draft as it is worked out this moment. */
export function shownFromWork({ workOut, request }: WorkedOutDraft): ShownOrder {
  const { figures, gauge, otherBrims, steps, gives } = workOut;
  const amount: Amount =
    figures.kind === 'maintenance'
      ? { rate: figures.rate, volume: figures.volume, hours: figures.hours, minutes: undefined }
      : { rate: figures.rate, volume: figures.volume, hours: undefined, minutes: figures.over };
  return {
    ...amountWords(amount),
    fluid: request.order.fluid.name,
    gauge: withBrimBand(gauge),
    otherBrims: otherBrims.map(({ label, text, value, limit }) => ({
      label,
      text,
      ratio: ratioOf(value, limit),
    })),
    steps: steps.map(({ label, working, result, unit, source, mark }) => ({
      label,
      working,
      result,
      unit,
      source,
      mark,
    })),
    gives: gives.map(({ label, text, unit }) => ({ label, value: text, unit })),
  };
}

/** What was signed, from its content. */
export function shownFromContent(content: OrderContent): ShownOrder {
  const { figures, gauge } = content;
  const optional = (text: string | null) => (text === null ? undefined : Number(text));
  const numbers = <Row extends { ml: string }>(rows: Row[]) =>
    rows.map((row) => ({ ...row, ml: Number(row.ml) }));
  return {
    ...amountWords({
      rate: optional(figures.rateMlPerH),
      volume: Number(figures.volumeMl),
      hours: optional(figures.hours),
      minutes: optional(figures.overMinutes),
    }),
    fluid: content.fluid.name,
    gauge: withBrimBand({
      orderMl: Number(gauge.orderMl),
      brimMl: Number(gauge.brimMl),
      brimNote: gauge.brimNote,
      bands: numbers(gauge.bands).map((band) => ({ ...band, fullMl: Number(band.fullMl) })),
      ghosts: numbers(gauge.ghosts),
    }),
    otherBrims: content.otherBrims.map(({ label, text, value, limit }) => ({
      label,
      text,
      ratio: ratioOf(Number(value), Number(limit)),
    })),
    steps: content.steps.map(({ mark, ...step }) => ({ ...step, ...(mark && { mark }) })),
    gives: content.gives.map(({ label, text, unit }) => ({ label, value: text, unit })),
  };
}

const ratioOf = (value: number, limit: number): number => (limit > 0 ? value / limit : 0);

/** A bolus has no weight bands: its one bracket shows what the brim leaves room for. Ghosts carry their amount. */
function withBrimBand(gauge: ShownOrder['gauge']): ShownOrder['gauge'] {
  const ghosts = gauge.ghosts.map(({ label, ml: amount }) => ({
    label: ghostWords(label, amount),
    ml: amount,
  }));
  const toTheBrim = { label: 'to the brim', ml: gauge.brimMl, fullMl: gauge.brimMl };
  return { ...gauge, ghosts, bands: gauge.bands.length > 0 ? gauge.bands : [toTheBrim] };
}

/** The lines a passed ceiling adds to the workings; nothing is then the answer. */
export function stepsOverBrim(steps: ShownOrder['steps'], brim: LimitFinding): ShownOrder['steps'] {
  const plain = steps.map((step) => (step.mark === 'answer' ? { ...step, mark: undefined } : step));
  const { value, limit, unit } = brim;
  if (value === undefined || limit === undefined || unit === undefined || value <= limit) return plain;
  const [asked, most] = [formatNumber(value, 2), formatNumber(limit, 2)];
  const over = formatNumber(value - limit, 2);
  return [
    ...plain,
    { label: 'brim', working: 'at most', result: most, unit, source: brim.source, mark: 'stop' },
    { label: 'over by', working: `${asked} − ${most}`, result: over, unit, source: '', mark: 'stop' },
  ];
}
