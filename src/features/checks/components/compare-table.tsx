import { Figure, figureParts } from '@/components/ui/figure';
import { Glyph } from '@/components/ui/glyph';
import type { ComparedRow, Comparison } from '@shared/checks/form';
import { arithmeticHolds, causeOf, figureOf, shownRows } from '../forms/compare-words';

export type Side = { name: string; note: string };

function Value({ text, row, tone }: { text: string; row: ComparedRow; tone: 'tide' | 'plum' }) {
  if (row.agrees) return <>{text}</>;
  const figure = figureOf(text);
  if (figure === null) return <span className="text-lead font-semibold">{text}</span>;
  if (row.field === 'rate') return <Figure {...figure} size="m" tone={tone} />;
  const { whole, decimals } = figureParts(figure.value);
  return (
    <span className="mid">
      {whole}
      {decimals && <small className="text-[.62em]">.{decimals}</small>}
      <em>{figure.unit}</em>
    </span>
  );
}

function Verdict({ row, isCause }: { row: ComparedRow; isCause: boolean }) {
  const more = row.apart || (isCause ? 'this is the cause' : '');
  return (
    <span className={`vd ${row.agrees ? 'c-leaf' : 'c-ochre'}`}>
      <Glyph name={row.agrees ? 'agrees' : 'caution'} />
      <b>
        {row.agrees ? 'agrees' : 'differs'}
        {more && <span>{more}</span>}
      </b>
    </span>
  );
}

/** What agrees keeps low, so that what differs is in view. */
const QUIET_ROW = 'mid:[&>*]:py-[7px]';

type CompareTableProps = { comparison: Comparison; author: Side; checker: Side };

/** Both sets side by side, frozen. The program never says who is right. */
export function CompareTable({ comparison, author, checker }: CompareTableProps) {
  const cause = causeOf(comparison);
  return (
    <>
      <table className="cmp">
        <caption className="vh">The author’s figures beside yours</caption>
        <thead>
          <tr>
            <th scope="col">
              <span className="vh">Entry</span>
            </th>
            <th scope="col" className="pp">
              <b>{author.name}</b>
              {author.note}
            </th>
            <th scope="col" className="mine">
              <b>{checker.name}</b>
              {checker.note}
            </th>
            <th scope="col">
              <span className="vh">Verdict</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {shownRows(comparison).map((row) => (
            <tr key={row.field} className={row.agrees ? QUIET_ROW : 'diff'}>
              <th scope="row">{row.label}</th>
              <td className="pp">
                <Value text={row.author} row={row} tone="tide" />
              </td>
              <td className="mine">
                <Value text={row.checker} row={row} tone="plum" />
              </td>
              <td className="v">
                <Verdict row={row} isCause={row.field === cause} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {arithmeticHolds(comparison) && (
        <p className="note pt-s2 pl-s3">
          Worked out again on your weight: each set follows from its own entries.
        </p>
      )}
    </>
  );
}
