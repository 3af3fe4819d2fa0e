import { Link } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { SecondLine } from '@/components/ui/data-table';
import { Glyph } from '@/components/ui/glyph';
import { StateWord } from '@/components/ui/state-word';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { isDraft } from '@shared/orders/states';
import { KIND_WORDS } from '@shared/orders/words';
import type { Chart, OrderLine, WeightRow } from '@shared/routes/children';
import { formatDateTime, parseInstant } from '@shared/time';
import { METHOD_WORDS } from '@shared/weights/chart-weight';
import { kgWords } from './child-strip';

export const useMoment = (): ((at: string) => string) => {
  const { zone } = useKnownMe().hospital;
  return (at) => {
    const moment = parseInstant(at);
    return moment === undefined ? '' : formatDateTime(moment, zone);
  };
};

type WeightsProps = {
  weights: readonly WeightRow[];
  dosingWeightId: string | null;
  onConfirm: (weight: WeightRow) => void;
};

export function WeightList({ weights, dosingWeightId, onConfirm }: WeightsProps) {
  const moment = useMoment();
  if (weights.length === 0)
    return <p className="soft">Not weighed yet. No order can be worked out without a weight.</p>;
  return (
    <table className="plain-table">
      <caption className="vh">Weights</caption>
      <thead>
        <tr>
          <th scope="col" className="r">
            Weight
          </th>
          <th scope="col">When and how</th>
          <th scope="col">By</th>
          <th scope="col" className="r">
            For age, z
          </th>
          <th scope="col">Standing</th>
        </tr>
      </thead>
      <tbody>
        {weights.map((weight) => (
          <tr key={weight.id}>
            <td className="r">
              <b>{kgWords(weight.kg)}</b>
            </td>
            <td>
              {moment(weight.at)}
              <SecondLine>{METHOD_WORDS[weight.method]}</SecondLine>
            </td>
            <td>
              {weight.recordedBy}
              {weight.confirmedBy && <SecondLine>again by {weight.confirmedBy}</SecondLine>}
            </td>
            <td className="r">
              {weight.z === null ? <span className="soft">none</span> : weight.z.replace('-', '−')}
            </td>
            <td>
              {weight.usable ? (
                <>
                  {weight.id === dosingWeightId ? <b>Dosing weight</b> : <span className="soft">kept</span>}
                  {weight.stale && <SecondLine tone="ochre">{weight.stale}</SecondLine>}
                </>
              ) : (
                <>
                  <span className="st c-ochre">
                    <Glyph name="caution" /> Not usable
                  </span>{' '}
                  <Button small onClick={() => onConfirm(weight)}>
                    Measure again
                  </Button>
                </>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

const orderPath = ({ state, versionId, isYours }: OrderLine): string =>
  isDraft(state) && isYours ? `/drafts/${versionId}` : `/orders/${versionId}`;

export function OrderList({ orders }: { orders: readonly OrderLine[] }) {
  const moment = useMoment();
  if (orders.length === 0) return <p className="soft">No fluids have been ordered on this stay.</p>;
  return (
    <table className="plain-table">
      <caption className="vh">Orders</caption>
      <thead>
        <tr>
          <th scope="col">Order</th>
          <th scope="col">Fluid</th>
          <th scope="col" className="r">
            Rate or volume
          </th>
          <th scope="col">State</th>
          <th scope="col">Next due</th>
        </tr>
      </thead>
      <tbody>
        {orders.map((order) => (
          <tr key={order.versionId}>
            <td>
              <Link to={orderPath(order)}>{order.open?.title ?? KIND_WORDS[order.kind]}</Link>
              <SecondLine>
                {order.code}, version {order.version}
              </SecondLine>
            </td>
            <td>
              <FluidWords order={order} />
            </td>
            <td className="r">
              {order.open &&
                (order.open.rateMlPerH === null
                  ? `${Number(order.open.volumeMl)}\u00a0mL`
                  : `${Number(order.open.rateMlPerH)}\u00a0mL/h`)}
            </td>
            <td>
              <StateWord state={order.state} {...(order.isOverdue ? { word: 'Overdue' } : {})} />
              <SecondLine under>{moment(order.stateSince)}</SecondLine>
            </td>
            <td>
              <span className={order.nextDue.isLate ? 'c-ochre due' : ''}>{order.nextDue.text}</span>
              {order.nextDue.note && <SecondLine>{order.nextDue.note}</SecondLine>}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

const FluidWords = ({ order }: { order: OrderLine }) => {
  if (order.open) return order.open.fluid;
  return order.isYours ? <span className="soft">Not worked out yet</span> : <CoveredChip />;
};

const CoveredChip = () => (
  <span className="hatch-chip">
    <span>Covered</span>
  </span>
);

export function IntakeList({ intakes }: { intakes: Chart['intakes'] }) {
  const moment = useMoment();
  if (intakes.length === 0) return <p className="soft">None recorded from elsewhere in the last 24 h.</p>;
  return (
    <ul className="lines-list">
      {intakes.map((intake) => (
        <li key={intake.id}>
          <b>{Number(intake.ml)} mL</b> {moment(intake.at)}, {intake.where}{' '}
          <span className="soft">({intake.recordedBy})</span>
        </li>
      ))}
    </ul>
  );
}

export function ResultList({ results }: { results: Chart['results'] }) {
  const moment = useMoment();
  if (results.length === 0) return <p className="soft">No blood results on the chart.</p>;
  return (
    <ul className="lines-list">
      {results.map((result) => (
        <li key={`${result.analyte}${result.at}`}>
          {result.analyte} <b>{String(Number(result.value))}</b> {result.unit}{' '}
          <span className="soft">{moment(result.at)}</span>
        </li>
      ))}
    </ul>
  );
}
