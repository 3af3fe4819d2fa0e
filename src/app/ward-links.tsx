import { useEffect, useRef } from 'react';
import { NavLink, useLocation } from 'react-router-dom';
import { Glyph } from '@/components/ui/glyph';
import type { Me } from '@shared/routes/accounts';

type Wards = Me['wards'];

const IN_A_ROW = 2;

/** The ward being looked at, else the one last looked at on this device, else the first. */
function currentOf(wards: Wards, pathname: string): Wards[number] | undefined {
  const id = /^\/wards\/([0-9a-f-]+)/.exec(pathname)?.[1] ?? localStorage.getItem('brimline-ward');
  return wards.find((ward) => ward.id === id) ?? wards[0];
}

const WardLink = ({ ward }: { ward: Wards[number] }) => (
  <NavLink to={`/wards/${ward.id}`}>{ward.name} ward</NavLink>
);

/** Two wards stand in a row; with more, the current one stands and the others open below "Other wards". */
export function WardLinks({ wards }: { wards: Wards }) {
  const { pathname } = useLocation();
  const more = useRef<HTMLDetailsElement>(null);
  useEffect(() => {
    more.current?.removeAttribute('open');
  }, [pathname]);
  if (wards.length <= IN_A_ROW) return wards.map((ward) => <WardLink key={ward.id} ward={ward} />);
  const current = currentOf(wards, pathname);
  return (
    <>
      {current && <WardLink ward={current} />}
      <details
        className="more-wards"
        ref={more}
        onKeyDown={(event) => {
          if (event.key !== 'Escape') return;
          event.currentTarget.removeAttribute('open');
          event.currentTarget.querySelector('summary')?.focus();
        }}
        onBlur={(event) => {
          if (!event.currentTarget.contains(event.relatedTarget)) event.currentTarget.removeAttribute('open');
        }}
      >
        <summary>
          Other wards <Glyph name="chevron-down" />
        </summary>
        <ul>
          {wards
            .filter(({ id }) => id !== current?.id)
            .map((ward) => (
              <li key={ward.id}>
                <WardLink ward={ward} />
              </li>
            ))}
        </ul>
      </details>
    </>
  );
}
