import { Glyph } from '@/components/ui/glyph';
import type { CheckFormField } from '@shared/checks/form';
import type { CheckPage } from '@shared/routes/checks';
import { checkRows, type CheckRow } from '../forms/check-rows';
import { dayTime } from '../forms/chart-words';
import type { CheckFormState } from '../forms/use-check-form';
import { EntryField } from './entry-field';
import { WorkedOut } from './worked-out';

const WIDTHS: Partial<Record<CheckFormField, string>> = { weightKg: 'fixw' };
const FOUR = 'grid grid-cols-[62px_minmax(0,1fr)_54px_90px] gap-s2';
/** Messages need more room than the fields. */
const TWO_BY_TWO = 'grid grid-cols-2 gap-s2';

type RowProps = { row: CheckRow; check: CheckFormState; products: CheckPage['products']; trouble?: string };

function Row({ row, check, products, trouble }: RowProps) {
  const isSeveral = row.entries.length > 1;
  const isMarked = row.entries.some(({ field }) => check.errorOf(field) !== undefined);
  const showsLabels = row.entries.length > 2 || row.key === 'intake' || row.key === 'method';
  return (
    <div
      className={row.isTall ? 'ln tall' : 'ln'}
      {...(isSeveral && { role: 'group', 'aria-labelledby': `row-${row.key}` })}
    >
      <span className="k" id={`row-${row.key}`}>
        {row.head}
        {row.note && <small>{row.note}</small>}
      </span>
      <div className={row.key === 'workedOutBy' ? 'py-s2' : undefined}>
        <div className={row.key === 'child' ? (isMarked ? TWO_BY_TWO : FOUR) : isSeveral ? 'two' : undefined}>
          {row.entries.map((entry) => (
            <EntryField
              key={entry.field}
              {...{ entry, check, products }}
              labelHidden={!(isSeveral && showsLabels)}
              isLarge={row.isTall && row.key === entry.field && entry.control.type === 'decimal'}
              width={WIDTHS[entry.field]}
            />
          ))}
        </div>
        {row.key === 'workedOutBy' && check.form.workedOutBy === 'program' && <WorkedOut check={check} />}
        {trouble && (
          <p className="err" role="alert">
            <Glyph name="refused" />
            <span>{trouble}</span>
          </p>
        )}
      </div>
    </div>
  );
}

function Hangs({ check }: { check: CheckFormState }) {
  const { hangs } = check;
  if (hangs === null) {
    return <p className="note pt-s3">When every entry is there, Brimline says whether they hang together.</p>;
  }
  const [first = '', ...rest] = hangs.words.split(/(?<=\.) /);
  return (
    <p className={hangs.agrees ? 'agree' : 'agree c-ochre'} role="status">
      <Glyph name={hangs.agrees ? 'agrees' : 'caution'} />
      <span>
        <b>{hangs.agrees ? first : 'Your own figures do not hang together.'}</b>{' '}
        {hangs.agrees ? rest.join(' ') : hangs.words}
      </span>
    </p>
  );
}

function keptWords({ status }: CheckFormState, zone: string): string {
  if (status.words !== '') return status.words;
  if (status.phase === 'waiting') return 'Keeping your figures…';
  if (status.savedAt === null) return 'Your figures are kept as you type, for you alone.';
  return `Your figures are kept, ${dayTime(status.savedAt, zone)}. Only you can see them.`;
}

type OwnFiguresProps = {
  page: CheckPage;
  check: CheckFormState;
  /** The re-entered child is another one: said beside those fields. */
  wrongChild: string | null;
  title?: string;
};

/** The checker's own figures: typed by hand from the chart, empty at first. */
export function OwnFigures({ page, check, wrongChild, title = 'Your own figures' }: OwnFiguresProps) {
  const rows = checkRows(check.asked.kind, check.asked.shortForm, check.form);
  return (
    <form
      className="mine"
      aria-labelledby="own-figures"
      autoComplete="off"
      onSubmit={(event) => event.preventDefault()}
    >
      <div className="hd">
        <h1 id="own-figures">{title}</h1>
        <p>Work it out as if the order were yours. Weigh, or read the scales yourself.</p>
      </div>
      <div className="lines">
        {rows.map((row) => (
          <Row
            key={row.key}
            {...{ row, check }}
            products={page.products}
            trouble={row.key === 'child' ? (wrongChild ?? undefined) : undefined}
          />
        ))}
      </div>
      <Hangs check={check} />
      <p className={`pt-s2 pr-s5 ${check.status.words === '' ? 'tag' : 'note text-ochre'}`} role="status">
        {keptWords(check, page.zone)}
      </p>
    </form>
  );
}
