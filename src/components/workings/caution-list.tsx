import type { ReactNode } from 'react';
import type { GlyphName } from '@shared/gauge/glyphs';
import { Glyph } from '../ui/glyph';

/** offer: a way out, within the rules. */
export type CautionStrength = 'caution' | 'senior' | 'brim' | 'met' | 'information' | 'offer';
export type CautionEntry = { strength: CautionStrength; title: string; text?: ReactNode; action?: ReactNode };

const GLYPHS: Readonly<Record<CautionStrength, GlyphName>> = {
  caution: 'caution',
  senior: 'senior',
  brim: 'brim',
  met: 'agrees',
  information: 'information',
  offer: 'brim',
};

/** What the rules say to this order, few and in words. */
export function CautionList({ entries }: { entries: readonly CautionEntry[] }) {
  return (
    <ul className="caut">
      {entries.map((entry) => (
        <li key={`${entry.strength} ${entry.title}`} className={entry.strength}>
          <Glyph name={GLYPHS[entry.strength]} />
          <div>
            <b>{entry.title}</b> {entry.text}
            {entry.action}
          </div>
        </li>
      ))}
    </ul>
  );
}
