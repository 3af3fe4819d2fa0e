import { Glyph } from '@/components/ui/glyph';
import type { ComparedRow, Comparison } from '@shared/checks/form';

function Verdict({ row }: { row: ComparedRow }) {
  return (
    <span className={`vd ${row.agrees ? 'c-leaf' : 'c-ochre'}`}>
      <Glyph name={row.agrees ? 'agrees' : 'caution'} />
      <b>
        {row.agrees ? 'agrees' : 'differs'}
        {row.apart && <span>{row.apart}</span>}
      </b>
    </span>
  );
}

/** Both sets of figures side by side. Which of them is right is never said. */
export function ComparisonTable({ comparison }: { comparison: Comparison }) {
  return (
    <>
      <table className="cmp">
        <caption className="vh">The author’s figures and the checker’s</caption>
        <thead>
          <tr>
            <th scope="col">
              <span className="vh">Entry</span>
            </th>
            <th scope="col" className="pp">
              <b>Author</b>
            </th>
            <th scope="col" className="mine">
              <b>Checker</b>
            </th>
            <th scope="col">
              <span className="vh">Verdict</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {comparison.rows.map((row) => (
            <tr key={row.field} className={row.agrees ? undefined : 'diff'}>
              <th scope="row">{row.label}</th>
              <td className="pp">{row.author}</td>
              <td className="mine">{row.checker}</td>
              <td className="v">
                <Verdict row={row} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {comparison.effect && <p className="mt-s2">{comparison.effect}</p>}
    </>
  );
}
