import type { VersionState } from '@shared/orders/states';
import { STATE_WORDS } from '@shared/orders/states';
import type { GlyphName } from './glyphs';

/** The colour tokens a word or a glyph may take. */
export type Tone = 'ink' | 'soft' | 'tide' | 'plum' | 'leaf' | 'ochre' | 'brim';

/** How a state is told: by word, glyph and colour, in that order of importance. */
export type StateFace = { word: string; glyph: GlyphName; tone: Tone };

const TONES: Readonly<Record<VersionState, Tone>> = {
  draft: 'soft',
  'awaiting-check': 'plum',
  disputed: 'ochre',
  returned: 'ochre',
  'awaiting-pharmacist': 'plum',
  signed: 'leaf',
  running: 'tide',
  held: 'ochre',
  away: 'ochre',
  stopped: 'ink',
  finished: 'soft',
  replaced: 'soft',
  revised: 'soft',
  withdrawn: 'soft',
  discarded: 'soft',
  lapsed: 'ochre',
  given: 'ochre',
  countersigned: 'leaf',
};

/** The word, glyph and colour of a state. */
export const stateFace = (state: VersionState): StateFace => ({
  word: STATE_WORDS[state],
  glyph: state,
  tone: TONES[state],
});
