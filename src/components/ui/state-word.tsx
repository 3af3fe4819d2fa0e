import type { VersionState } from '@shared/orders/states';
import type { GlyphName } from '@shared/gauge/glyphs';
import type { Tone } from '@shared/gauge/state-face';
import { stateFace } from '@shared/gauge/state-face';
import { Glyph } from './glyph';

type WordProps = { glyph: GlyphName; tone: Tone; children: React.ReactNode };

/** Glyph and word in one colour, for what is not a state of an order ("Does not agree"). */
export function GlyphWord({ glyph, tone, children }: WordProps) {
  return (
    <span className={`st c-${tone}`}>
      <Glyph name={glyph} />
      {children}
    </span>
  );
}

/** The state of a version; `word` replaces the usual word where a page needs a narrower one. */
export function StateWord({ state, word }: { state: VersionState; word?: string }) {
  const face = stateFace(state);
  return (
    <GlyphWord glyph={face.glyph} tone={face.tone}>
      {word ?? face.word}
    </GlyphWord>
  );
}
