import type { ReactNode } from 'react';
import { useId, useState } from 'react';
import { Link } from 'react-router-dom';
import { Glyph } from './glyph';
import { Mark } from './mark';

type TopBarProps = {
  /** Links of the main navigation; NavLink marks the current one. */
  children?: ReactNode;
  home?: string;
  /** The hospital's clock: "10:42". */
  time?: string;
  who?: { name: string; grade: string };
  /** Where this screen stands: "Heron ward, bed 2". */
  place?: string;
  /** The theme switch, or another small control. */
  extras?: ReactNode;
  onLock?: () => void;
};

/** Brand, ways to go, who is signed in. On a phone the ways fold behind "Menu". */
export function TopBar({ children, home = '/', time, who, place, extras, onLock }: TopBarProps) {
  const [isOpen, setIsOpen] = useState(false);
  const menuId = useId();
  const close = () => setIsOpen(false);
  return (
    <header
      className={isOpen ? 'top open' : 'top'}
      onKeyDown={(event) => {
        if (event.key === 'Escape') close();
      }}
    >
      <Link className="brand" to={home}>
        <Mark />
        Brimline
      </Link>
      {children && (
        <nav aria-label="Main" id={menuId} onClick={close}>
          {children}
        </nav>
      )}
      <span className="sp" />
      <div className="who">
        {place && <span className="soft in-menu">{place}</span>}
        {time && <span className="soft in-menu">{time}</span>}
        {who && (
          <span className="in-menu">
            <b>{who.name}</b> <span className="soft">{who.grade}</span>
          </span>
        )}
        {extras && <span className="in-menu">{extras}</span>}
        {onLock && (
          <button type="button" className="lock" onClick={onLock}>
            Lock screen
          </button>
        )}
      </div>
      {children && (
        <button
          type="button"
          className="menu-button"
          aria-expanded={isOpen}
          aria-controls={menuId}
          onClick={() => setIsOpen(!isOpen)}
        >
          <Glyph name={isOpen ? 'close' : 'menu'} />
          Menu
        </button>
      )}
      <div className="who-menu">
        {who && (
          <p>
            <b>{who.name}</b>, <span className="soft">{who.grade}</span>
          </p>
        )}
        {isOpen && extras}
      </div>
    </header>
  );
}
