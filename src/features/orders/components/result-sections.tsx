import { GivesGrid } from '@/components/workings/gives-grid';
import { WorkingsTable } from '@/components/workings/workings-table';
import type { ShownOrder } from '../forms/shown-order';

/** The calculation, line by line. */
export function WorkingsSection({ steps }: Pick<ShownOrder, 'steps'>) {
  return (
    <section className="sec">
      <h2>Workings</h2>
      <WorkingsTable rows={steps} />
    </section>
  );
}

/** What the order comes to for this child. */
export function GivesSection({ gives }: Pick<ShownOrder, 'gives'>) {
  return (
    <section className="sec">
      <h2>What this gives</h2>
      <GivesGrid figures={gives} />
    </section>
  );
}

/** As asked and with the way out taken, side by side. */
export function TwoGivesSection({ asked, offered }: { asked: ShownOrder; offered: ShownOrder }) {
  const rows = [
    { label: 'Volume', unit: 'mL', asked: asked.volume, offered: offered.volume },
    ...asked.gives.map(({ label, unit, value }) => ({
      label,
      unit,
      asked: value,
      offered: offered.gives.find((each) => each.label === label)?.value ?? '',
    })),
  ];
  return (
    <section className="sec">
      <h2>
        What this gives<span>as asked, and as offered</span>
      </h2>
      <table className="brims">
        <caption className="vh">As asked, and as offered</caption>
        <thead>
          <tr>
            <th scope="col">
              <span className="vh">What</span>
            </th>
            <th scope="col">As asked</th>
            <th scope="col">As offered</th>
          </tr>
        </thead>
        <tbody>
          {rows.slice(0, 6).map((row) => (
            <tr key={row.label}>
              <th scope="row">{row.label}</th>
              <td>{row.asked.replace(/\u00a0mL$/, '')}</td>
              <td>
                <b>{row.offered.replace(/\u00a0mL$/, '')}</b> {row.unit}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
