import { Glyph } from './glyph';

const SHUT =
  'You can read what was here then. Signing, checking and starting are shut until the line is back.';

/** Under the top bar while the line is down; `since` is the time of the last answer. */
export function OfflineBar({ since, children = SHUT }: { since: string; children?: string }) {
  return (
    <div className="offline" role="status">
      <Glyph name="offline" />
      <span>
        <b>Offline since {since}.</b> {children}
      </span>
    </div>
  );
}
