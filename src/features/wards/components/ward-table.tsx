import { Link } from 'react-router-dom';
import { SmallGauge } from '@/components/gauge/small-gauge';
import { SecondLine } from '@/components/ui/data-table';
import { Figure } from '@/components/ui/figure';
import { Glyph } from '@/components/ui/glyph';
import { StateWord } from '@/components/ui/state-word';
import { isDraft, isOnPump } from '@shared/orders/states';
import { KIND_WORDS } from '@shared/orders/words';
import type { OrderLine, WardRow } from '@shared/routes/children';
import { formatDate, parseInstant } from '@shared/time';
import { METHOD_WORDS } from '@shared/weights/chart-weight';
import { kgWords } from '@/features/children/components/child-strip';

/** A draft opens in its form, everything else on its page. */
export const orderHref = ({ state, versionId, isYours }: OrderLine): string =>
  isDraft(state) && isYours ? `/drafts/${versionId}` : `/orders/${versionId}`;

function WeightCells({ weight, zone }: { weight: WardRow['weight']; zone: string }) {
  if (weight === null)
    return (
      <>
        <td className="r kg">
          <span className="soft">none</span>
        </td>
        <td className="wn">
          <span className="stale">Weigh</span>
        </td>
      </>
    );
  const at = parseInstant(weight.at);
  const when = at === undefined ? '' : formatDate(at, zone).replace(/ \d{4}$/, '');
  return (
    <>
      <td className="r kg">{kgWords(weight.kg)}</td>
      <td className="wn">
        {weight.stale ? (
          <span className="stale">
            <Glyph name="clock" />
            {weight.stale}
          </span>
        ) : (
          when
        )}
        <SecondLine>
          {weight.stale ? `${when}, ${METHOD_WORDS[weight.method]}` : METHOD_WORDS[weight.method]}
        </SecondLine>
      </td>
    </>
  );
}

function FluidCells({ order }: { order: OrderLine | undefined }) {
  if (!order)
    return (
      <>
        <td className="pr soft">No fluids ordered</td>
        <td className="r rt" />
        <td className="un" />
        <td className="gg" />
      </>
    );
  const { open, kind } = order;
  if (open === null)
    return (
      <>
        <td className="pr">
          <Link to={orderHref(order)}>{KIND_WORDS[kind]}</Link>
          <SecondLine>{order.code}</SecondLine>
        </td>
        <td className="r rt" colSpan={3}>
          {order.isYours ? <span className="soft">Not worked out yet</span> : <CoveredChip />}
        </td>
      </>
    );
  return (
    <>
      <td className="pr">
        <Link to={orderHref(order)}>{open.title}</Link>
        <SecondLine>{open.fluid}</SecondLine>
      </td>
      <td className="r rt">
        <Figure size="row" value={open.rateMlPerH ?? open.volumeMl} />
      </td>
      <td className="un">
        <span className="soft sm">{open.rateMlPerH === null ? 'mL once' : 'mL/h'}</span>
      </td>
      <td className="gg">{open.gauge && <RowGauge gauge={open.gauge} onPump={isOnPump(order.state)} />}</td>
    </>
  );
}

const CoveredChip = () => (
  <span className="hatch-chip">
    <span>Covered</span>
  </span>
);

type GaugeProps = { gauge: NonNullable<NonNullable<OrderLine['open']>['gauge']>; onPump: boolean };
function RowGauge({ gauge, onPump }: GaugeProps) {
  const words = `${Number(gauge.orderMl)} of ${Number(gauge.brimMl)} mL`;
  return (
    <>
      <SmallGauge
        value={Number(gauge.orderMl)}
        brim={Number(gauge.brimMl)}
        notches={gauge.notches.map(Number)}
        label={words}
        onPump={onPump}
      />
      <SecondLine>{words}</SecondLine>
    </>
  );
}

function DueCells({ order }: { order: OrderLine | undefined }) {
  if (!order)
    return (
      <>
        <td className="sta" />
        <td className="nxt" />
      </>
    );
  const { nextDue, open } = order;
  const over = open?.overBrimText;
  return (
    <>
      <td className="sta">
        <StateWord state={order.state} {...(order.isOverdue ? { word: 'Overdue' } : {})} />
        {over && (
          <SecondLine tone="brim" under>
            {over}
          </SecondLine>
        )}
      </td>
      <td className="nxt">
        <span className={nextDue.isLate ? 'c-ochre due' : ''}>{nextDue.text}</span>
        {nextDue.note && <SecondLine>{nextDue.note}</SecondLine>}
      </td>
    </>
  );
}

function ChildRows({ row, zone }: { row: WardRow; zone: string }) {
  const { child, weight } = row;
  const [first, ...more] = row.orders;
  const name = (
    <th scope="row" className="nmc">
      <Link className="nm" to={`/children/${child.id}`}>
        {child.surname}, <i>{child.given}</i>
      </Link>
      <SecondLine>{child.number}</SecondLine>
    </th>
  );
  return (
    <>
      <tr className={first && isOnPump(first.state) ? '' : 'idle'}>
        <td className="bed">{child.bed}</td>
        {name}
        <td className="age">{child.ageText}</td>
        <WeightCells weight={weight} zone={zone} />
        <FluidCells order={first} />
        <DueCells order={first} />
      </tr>
      {more.map((order) => (
        <tr key={order.versionId} className={isOnPump(order.state) ? '' : 'idle'}>
          <td className="bed" />
          <td className="nmc">
            <span className="soft sm">also</span>
          </td>
          <td className="age" />
          <td className="kg" />
          <td className="wn" />
          <FluidCells order={order} />
          <DueCells order={order} />
        </tr>
      ))}
    </>
  );
}

const HEADS = [
  ['bed', 'Bed'],
  ['nmc', 'Child'],
  ['age', 'Age'],
  ['r kg', 'Weight'],
  ['wn', 'Measured'],
  ['pr', 'Fluids'],
  ['r rt', 'Rate'],
  ['un', ''],
  ['gg', 'Against the brim'],
  ['sta', 'State'],
  ['nxt', 'Next due'],
] as const;

export function WardTable({
  rows,
  zone,
  caption,
}: {
  rows: readonly WardRow[];
  zone: string;
  caption: string;
}) {
  return (
    <table className="wt">
      <caption className="vh">{caption}</caption>
      <thead>
        <tr>
          {HEADS.map(([className, words]) =>
            words === '' ? (
              <td key={className} className={className} />
            ) : (
              <th key={className} scope="col" className={className}>
                {words}
              </th>
            ),
          )}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <ChildRows key={row.child.id} row={row} zone={zone} />
        ))}
      </tbody>
    </table>
  );
}
