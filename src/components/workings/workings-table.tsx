export type WorkingRow = {
  label: string;
  working: string;
  result: string;
  unit: string;
  source?: string;
  /** sum: a total under a rule; answer: what goes on the pump; stop: at a brim. */
  mark?: 'sum' | 'answer' | 'stop';
};

const ROW_CLASS = { sum: 'sum', answer: 'ans', stop: 'stopat' } as const;

/** A ruled page: what, the sum, the result, its unit, its source. */
export function WorkingsTable({
  rows,
  caption = 'Workings',
}: {
  rows: readonly WorkingRow[];
  caption?: string;
}) {
  return (
    <table className="work">
      <caption className="vh">{caption}</caption>
      <thead className="vh">
        <tr>
          <th scope="col">Line</th>
          <th scope="col">Sum</th>
          <th scope="col">Result</th>
          <th scope="col">Unit</th>
          <th scope="col">Source</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row, index) => (
          <tr key={`${index} ${row.label}`} className={row.mark && ROW_CLASS[row.mark]}>
            <th scope="row">{row.label}</th>
            <td className="sum-of">{row.working}</td>
            <td className="res">{row.result}</td>
            <td className="unit">{row.unit}</td>
            <td className="src">{row.source}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
