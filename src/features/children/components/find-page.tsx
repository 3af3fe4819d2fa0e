import { useQuery } from '@tanstack/react-query';
import { useDeferredValue, useEffect, useState } from 'react';
import { Link } from 'react-router-dom';
import { BlankState } from '@/components/ui/blank-state';
import { SecondLine } from '@/components/ui/data-table';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Glyph } from '@/components/ui/glyph';
import { TextField } from '@/components/ui/text-field';
import { call } from '@/lib/api';
import type { ChildHead } from '@shared/routes/children';
import { formatCivilDate } from '@shared/time';

const LEAST = 2;

function Found({ children, more }: { children: readonly ChildHead[]; more: boolean }) {
  return (
    <>
      <table className="wt">
        <caption className="vh">Children found</caption>
        <thead>
          <tr>
            <th scope="col" className="nmc">
              Child
            </th>
            <th scope="col">Born</th>
            <th scope="col">Ward</th>
            <th scope="col" className="bed">
              Bed
            </th>
          </tr>
        </thead>
        <tbody>
          {children.map((child) => (
            <tr key={child.id}>
              <th scope="row" className="nmc">
                <Link className="nm" to={`/children/${child.id}`}>
                  {child.surname}, <i>{child.given}</i>
                </Link>
                <SecondLine>{child.number}</SecondLine>
              </th>
              <td>
                {formatCivilDate(child.bornOn)}
                <SecondLine>{child.ageText}</SecondLine>
              </td>
              <td>{child.ward ? `${child.ward.name} ward` : 'Discharged'}</td>
              <td className="bed">{child.bed}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {more && <p className="tag">There are more. Type more of the name or the number.</p>}
    </>
  );
}

/** Search is sent in the body: no name ever stands in an address. */
export function FindPage() {
  const [text, setText] = useState('');
  const wanted = useDeferredValue(text.trim());
  const { data, error } = useQuery({
    queryKey: ['children', 'search', wanted],
    queryFn: ({ signal }) => call('searchChildren', { body: { text: wanted }, signal }),
    enabled: wanted.length >= LEAST,
    placeholderData: (earlier) => earlier,
  });
  useEffect(() => {
    document.title = 'Find a child · Brimline';
  }, []);
  return (
    <main className="page narrow-page" id="main">
      <div className="wh">
        <h1>Find a child</h1>
      </div>
      <TextField
        label="Surname, first name or hospital number"
        autoFocus
        before={<Glyph name="find" />}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <div role="status" className="vh">
        {data && wanted.length >= LEAST ? `${data.children.length} found` : ''}
      </div>
      {error ? (
        <ErrorPanel title="The search got no answer" takesFocus={false}>
          {error.message}
        </ErrorPanel>
      ) : wanted.length < LEAST ? (
        <p className="tag">Type at least two letters. You find children of your own wards.</p>
      ) : data && data.children.length === 0 ? (
        <BlankState title="No child found">
          Nobody on your wards has a name or number that begins so.
        </BlankState>
      ) : (
        data && <Found {...data} />
      )}
    </main>
  );
}
