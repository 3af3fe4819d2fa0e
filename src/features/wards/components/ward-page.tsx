import { useEffect, useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { BlankState } from '@/components/ui/blank-state';
import { Button, buttonClass } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Glyph } from '@/components/ui/glyph';
import { Reading } from '@/components/ui/reading';
import { TextField } from '@/components/ui/text-field';
import { useKnownMe } from '@/features/accounts/api/use-me';
import type { Answer } from '@/lib/api';
import { stateFace } from '@shared/gauge/state-face';
import { can } from '@shared/orders/can';
import { isIn, type VersionState } from '@shared/orders/states';
import { formatDate, formatTime, parseInstant } from '@shared/time';
import { useWard } from '../api/use-ward';
import { useActor } from '@/features/accounts/api/use-actor';
import { countStates, filterRows } from './ward-filter';
import { WardTable } from './ward-table';

type Ward = Answer<'ward'>;

const TONES = {
  checks: 'plum',
  exceptions: 'ochre',
  returned: 'ochre',
  lapsing: 'ink',
  overdue: 'ochre',
  'over-brim': 'brim',
  countersign: 'ochre',
} as const;

function ForYou({ matters }: { matters: Ward['forYou'] }) {
  if (matters.length === 0) return null;
  return (
    <nav className="foryou" aria-label="Waiting for you">
      {matters.slice(0, 4).map(({ code, count, words, detail, href }) => (
        <Link key={code} to={href}>
          <span className={`n c-${TONES[code]}`}>{count}</span>
          <b>{words}</b>
          <span className="d">{detail}</span>
        </Link>
      ))}
    </nav>
  );
}

type FilterProps = {
  rows: Ward['rows'];
  text: string;
  state: VersionState | null;
  onText: (text: string) => void;
  onState: (state: VersionState | null) => void;
};

function Filter({ rows, text, state, onText, onState }: FilterProps) {
  return (
    <div className="filt">
      <TextField
        label="Find by name, bed or hospital number"
        labelHidden
        placeholder="Name, bed or hospital no."
        before={<Glyph name="find" />}
        value={text}
        onChange={(event) => onText(event.target.value)}
      />
      <div className="opts" role="group" aria-label="Show by state">
        <button type="button" aria-pressed={state === null} onClick={() => onState(null)}>
          All {rows.length}
        </button>
        {countStates(rows).map((option) => (
          <button
            key={option.state}
            type="button"
            aria-pressed={state !== null && isIn(option.state, state)}
            onClick={() => onState(state !== null && isIn(option.state, state) ? null : option.state)}
          >
            <Glyph name={stateFace(option.state).glyph} /> {option.word} {option.count}
          </button>
        ))}
      </div>
    </div>
  );
}

function Head({ ward, asAt, isStale }: { ward: Ward; asAt: string; isStale: boolean }) {
  const me = useKnownMe();
  const actor = useActor();
  const verdict = can(actor, 'register-child', ward.ward.id);
  const at = parseInstant(ward.now);
  const count = ward.rows.length;
  return (
    <div className="wh">
      <h1>{ward.ward.name} ward</h1>
      <p>
        {me.hospital.name}. {at === undefined ? '' : formatDate(at, me.hospital.zone)}.{' '}
        {count === 1 ? '1 child' : `${count} children`}.{isStale ? ` As at ${asAt}, not current.` : ''}
      </p>
      {verdict.allowed && (
        <Link className={buttonClass('secondary')} to={`/children/new?ward=${ward.ward.id}`}>
          Register a child
        </Link>
      )}
    </div>
  );
}

/** The ward at a glance: who is here, what runs, what is due. */
export function WardPage() {
  const { wardId = '' } = useParams();
  const { zone } = useKnownMe().hospital;
  const { data, error, refetch, dataUpdatedAt, isError } = useWard(wardId);
  const [text, setText] = useState('');
  const [state, setState] = useState<VersionState | null>(null);
  useEffect(() => {
    if (!data) return;
    document.title = `${data.ward.name} ward · Brimline`;
    localStorage.setItem('brimline-ward', wardId);
  }, [data, wardId]);

  if (!data)
    return (
      <main className="page ward" id="main">
        {error ? (
          <ErrorPanel
            title="The ward could not be read"
            action={
              <Button kind="primary" onClick={() => void refetch()}>
                Ask again
              </Button>
            }
          >
            {error.message}
          </ErrorPanel>
        ) : (
          <Reading what="the ward" lines={8} />
        )}
      </main>
    );
  const at = parseInstant(data.now);
  const shown = filterRows(data.rows, text, state);
  return (
    <main className="page ward" id="main" data-updated={dataUpdatedAt}>
      <Head ward={data} asAt={at === undefined ? '' : formatTime(at, zone)} isStale={isError} />
      <ForYou matters={data.forYou} />
      <Filter rows={data.rows} text={text} state={state} onText={setText} onState={setState} />
      {data.rows.length === 0 ? (
        <BlankState title="No child is on this ward">
          When a child is admitted, a row appears here.
        </BlankState>
      ) : shown.length === 0 ? (
        <BlankState
          title="Nothing matches"
          action={
            <Button
              onClick={() => {
                setText('');
                setState(null);
              }}
            >
              Show the whole ward
            </Button>
          }
        >
          No child here has that name, bed, number or state.
        </BlankState>
      ) : (
        <WardTable rows={shown} zone={zone} caption={`Children on ${data.ward.name} ward`} />
      )}
      <p className="tag">
        A bold rate and a solid fill are on a pump now. What its checker has not signed is covered.
      </p>
    </main>
  );
}
