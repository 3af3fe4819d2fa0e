import type { ReactNode } from 'react';
import { Glyph } from '@/components/ui/glyph';
import { flagLabels } from '@shared/children/flags';
import { KIND_WORDS } from '@shared/orders/words';
import { formatNumber } from '@shared/rounding';
import type { CheckPage } from '@shared/routes/checks';
import { formatRelativeDay, parseInstant } from '@shared/time';
import { dayTime, resultLines, weightLines } from '../forms/chart-words';

const URGENCY = { routine: '', urgent: ', urgent', emergency: ', emergency' } as const;

function Item({ term, full = false, children }: { term: string; full?: boolean; children: ReactNode }) {
  return (
    <div className={full ? 'full' : undefined}>
      <dt>{term}</dt>
      <dd>{children}</dd>
    </div>
  );
}

function askedWords({ order, zone, now }: CheckPage) {
  const nowAt = parseInstant(now);
  const relative = (text: string | null) => {
    const moment = text === null ? undefined : parseInstant(text);
    return moment === undefined || nowAt === undefined ? '' : formatRelativeDay(moment, nowAt, zone);
  };
  return { start: relative(order.askedStart), due: relative(order.dueAt) };
}

function Given({ page }: { page: CheckPage }) {
  const { bolusesLast24h, running, plan, zone } = page;
  return (
    <>
      <Item term="Boluses in the last 24 h" full>
        {bolusesLast24h.length === 0
          ? 'None on the chart'
          : bolusesLast24h.map(({ ml, at, words }) => (
              <span key={`${at} ${ml}`}>
                {formatNumber(Number(ml), 1)} mL, {dayTime(at, zone)}
                {words && `, ${words}`}
              </span>
            ))}
      </Item>
      <Item term="Running now" full>
        {running.length === 0
          ? 'Nothing else runs'
          : running.map(({ code, rateMlPerH, fluid }) => (
              <span key={code}>
                {fluid}, {formatNumber(Number(rateMlPerH), 1)} mL/h ({code})
              </span>
            ))}
      </Item>
      {plan !== null && (
        <Item term="Fluid plan" full>
          {plan}
        </Item>
      )}
    </>
  );
}

/** The child, the chart and the reason: what a checker works from. Nothing here is the author's. */
export function MaySee({ page, sentence }: { page: CheckPage; sentence?: string }) {
  const { order, child } = page;
  const asked = askedWords(page);
  const results = resultLines(page);
  const weights = weightLines(page);
  return (
    <section className="may" aria-labelledby="may-see">
      <div className="hd">
        <h2 id="may-see">What you may see</h2>
        <p>{sentence ?? 'The child, the chart and the reason. Not the order’s weight, fluid or rate.'}</p>
      </div>
      <dl className="see lines">
        <Item term="Asked for">
          {KIND_WORDS[order.kind]} fluids{URGENCY[order.urgency]}
          {asked.start && <span>From {asked.start}</span>}
          {order.isHighRisk && <span className="font-semibold text-ochre">High risk</span>}
        </Item>
        <Item term="Order">
          {order.code}
          <span>Version {order.version}</span>
          {asked.due && <span>Check due {asked.due}</span>}
        </Item>
        <Item term="Reason" full>
          {order.reason}
        </Item>
        <Item term="Allergies">{child.allergies}</Item>
        <Item term="Flags">
          {child.flags.length === 0
            ? 'None'
            : flagLabels(child.flags).map((label) => (
                <span className="flag" key={label}>
                  <Glyph name="caution" />
                  {label}
                </span>
              ))}
        </Item>
        <Item term="Weights on the chart" full>
          {weights.length === 0
            ? 'None'
            : weights.slice(0, 5).map(({ id, text, how }) => (
                <span key={id}>
                  <b>{text}</b>, {how}
                </span>
              ))}
        </Item>
        <Item term="Other intake" full>
          Read feeds and drug volumes from the feed and drug charts
        </Item>
        <Item term="Blood tests" full>
          {results.length === 0
            ? 'None on the chart'
            : results.map(({ when, text }) => (
                <span key={when}>
                  <b>{text}</b>, {when}
                </span>
              ))}
        </Item>
        <Given page={page} />
      </dl>
    </section>
  );
}
