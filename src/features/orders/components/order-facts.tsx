import { BOLUS_ROUTES } from '@shared/calc/types';
import { FRACTION_WORDS, METHOD_WORDS } from '@shared/checks/words';
import type { OrderContent } from '@shared/orders/content';
import { formatNumber } from '@shared/rounding';
import { LINE_WORDS, ROUTE_WORDS, URGENCY_WORDS, weightWords, dayTime } from '../forms/order-words';

type Fact = { label: string; value: string; note?: string };

const amount = (text: string, unit: string): string => `${formatNumber(Number(text), 1)}\u00a0${unit}`;

function inputFacts({ inputs }: OrderContent): Fact[] {
  if (inputs.kind === 'bolus') {
    const dose =
      inputs.mlPerKg === null ? amount(inputs.volumeMl ?? '0', 'mL, typed') : amount(inputs.mlPerKg, 'mL/kg');
    const route = BOLUS_ROUTES.find((each) => each === inputs.route);
    return [
      { label: 'Dose', value: dose },
      { label: 'Give over', value: amount(inputs.overMinutes, 'min'), note: route && ROUTE_WORDS[route] },
      ...(inputs.advisedBy === null ? [] : [{ label: 'Advised by', value: inputs.advisedBy }]),
    ];
  }
  const { fractionReason, temperatureC, newbornMlPerKgPerDay, typedRate } = inputs;
  const optional = (label: string, text: string | null, unit: string): Fact[] =>
    text === null ? [] : [{ label, value: amount(text, unit) }];
  return [
    { label: 'Method', value: METHOD_WORDS[inputs.method] },
    { label: 'Fraction', value: FRACTION_WORDS[inputs.fraction], note: fractionReason ?? undefined },
    ...optional('Temperature', temperatureC, '°C'),
    ...optional('Volume by weight', newbornMlPerKgPerDay, 'mL/kg/day'),
    ...optional('Rate, typed', typedRate, 'mL/h'),
    { label: 'Feeds and drinks', value: amount(inputs.feedsMl, 'mL in 24 h'), note: inputs.feedsNote },
    { label: 'Drug volumes', value: amount(inputs.drugsMl, 'mL in 24 h'), note: inputs.drugsNote },
  ];
}

function timeFacts(content: OrderContent, zone: string): Fact[] {
  const by = (label: string, at: string | null): Fact[] =>
    at === null ? [] : [{ label, value: dayTime(at, zone) }];
  return [
    ...by('Planned start', content.plannedStart),
    ...by('Start it by', content.startBy),
    ...by('Lapses', content.lapsesAt),
    ...by('Review by', content.reviewBy),
    ...by('Bloods by', content.bloodsBy),
  ];
}

/** Everything that was signed besides the figures. */
export function OrderFacts({ content, zone }: { content: OrderContent; zone: string }) {
  const facts: Fact[] = [
    { label: 'Reason', value: content.reason },
    { label: 'Dosing weight', value: weightWords(content.weight, zone) },
    ...inputFacts(content),
    { label: 'Line', value: LINE_WORDS[content.line] },
    { label: 'Urgency', value: URGENCY_WORDS[content.urgency] },
    ...timeFacts(content, zone),
    {
      label: 'Made under',
      value: `Rulebook ${content.rulebook.number}`,
      note: `calculation ${content.calc}`,
    },
  ];
  return (
    <section className="sec">
      <h2>What was ordered</h2>
      <dl className="grid gap-x-s5 mid:grid-cols-2">
        {facts.map(({ label, value, note }) => (
          <div key={label} className="border-b border-rule py-[6px]">
            <dt className="text-note text-ink-soft">{label}</dt>
            <dd className="font-semibold">
              {value}
              {note && <span className="block text-small font-normal text-ink-soft">{note}</span>}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
