import { Link } from 'react-router-dom';
import { BlankState } from '@/components/ui/blank-state';
import { Button, buttonClass } from '@/components/ui/button';
import { DataTable, SecondLine } from '@/components/ui/data-table';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Glyph } from '@/components/ui/glyph';
import { Reading } from '@/components/ui/reading';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { problemWords } from '@/features/orders/api/problem-words';
import { useTitle } from '@/features/orders/api/use-title';
import { KIND_WORDS } from '@shared/orders/words';
import { formatTime, parseInstant } from '@shared/time';
import { useQueue, type QueueRow } from '../api/use-queue';
import { hrefOf, inOrder, standingWords, waitedWords } from '../forms/queue-words';

const URGENCY = { routine: 'Routine', urgent: 'Urgent', emergency: 'Emergency' } as const;

function What({ row }: { row: QueueRow }) {
  return (
    <td>
      {KIND_WORDS[row.kind]}
      {row.act === 'countersign' && ': given, to countersign'}
      <SecondLine tone={row.urgency === 'routine' ? undefined : 'ochre'}>{URGENCY[row.urgency]}</SecondLine>
      {row.isHighRisk && (
        <span className="flag">
          <Glyph name="senior" />
          High risk
        </span>
      )}
    </td>
  );
}

function Due({ row, zone }: { row: QueueRow; zone: string }) {
  const due = parseInstant(row.dueAt ?? '');
  return (
    <td>
      {due === undefined ? 'No time set' : `Due ${formatTime(due, zone)}`}
      {row.isLate && <SecondLine tone="ochre">Late</SecondLine>}
    </td>
  );
}

/** The head of a row reads as a cell, and takes a line of its own on a phone. */
const NAME_CELL =
  'border-rule align-top text-base font-normal text-ink max-mid:block max-mid:border-0 max-mid:pb-0';

function Row({ row, zone }: { row: QueueRow; zone: string }) {
  const { child, barred } = row;
  return (
    <tr>
      <th scope="row" className={NAME_CELL}>
        <Link to={hrefOf(row)}>
          <b>{child.surname},</b> {child.given}
        </Link>
        <SecondLine>
          {child.number}, {child.ageText}
        </SecondLine>
      </th>
      <td>
        {row.wardName}
        <SecondLine>{child.bed ? `Bed ${child.bed}` : 'No bed'}</SecondLine>
      </td>
      <What row={row} />
      <td>
        Waited {waitedWords(row)}
        <SecondLine>{row.code}</SecondLine>
      </td>
      <Due row={row} zone={zone} />
      <td className="max-w-[26ch] whitespace-normal">
        {barred === null ? (
          standingWords(row)
        ) : (
          <>
            Not yours to check
            <SecondLine>{barred}</SecondLine>
          </>
        )}
      </td>
    </tr>
  );
}

const HEADS = ['Child', 'Ward', 'What for', 'Waited', 'Due', 'For you'];

function Table({ rows, zone }: { rows: readonly QueueRow[]; zone: string }) {
  return (
    <DataTable className="plain-table" caption="Orders that wait for a check">
      <thead>
        <tr>
          {HEADS.map((head) => (
            <th key={head} scope="col">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {inOrder(rows).map((row) => (
          <Row key={row.versionId} row={row} zone={zone} />
        ))}
      </tbody>
    </DataTable>
  );
}

/** Nothing to show yet, or nothing that could be read. */
function Unread({ error, retry }: { error: Error | null; retry: () => void }) {
  if (!error) return <Reading what="what waits for a check" lines={6} />;
  return (
    <ErrorPanel
      title="The queue could not be read"
      action={
        <Button kind="primary" onClick={retry}>
          Ask again
        </Button>
      }
    >
      {problemWords(error)}
    </ErrorPanel>
  );
}

const Nothing = () => (
  <BlankState
    title="No checks wait for you"
    action={
      <Link className={buttonClass()} to="/">
        Go to my ward
      </Link>
    }
  >
    When someone on your wards signs an order, it appears here by itself.
  </BlankState>
);

/** What waits for a check: the child, the kind and the time, never the figures. */
export function QueuePage() {
  const { zone } = useKnownMe().hospital;
  const { data, error, isError, refetch } = useQueue();
  useTitle('My checks');
  const at = parseInstant(data?.now ?? '');
  const open = data?.rows.filter(({ barred }) => barred === null).length ?? 0;
  return (
    <main className="page" id="main" tabIndex={-1}>
      <div className="wh">
        <h1>My checks</h1>
        {data && (
          <p>
            {open === 1 ? '1 waits' : `${open} wait`} that you can take.
            {isError && at !== undefined && ` As at ${formatTime(at, zone)}, not current.`}
          </p>
        )}
      </div>
      {!data && <Unread error={error} retry={() => void refetch()} />}
      {data && (data.rows.length === 0 ? <Nothing /> : <Table rows={data.rows} zone={zone} />)}
    </main>
  );
}
