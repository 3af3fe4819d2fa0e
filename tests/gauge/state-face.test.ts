import { describe, expect, it } from 'vitest';
import { glyphShapes } from '@shared/gauge/glyphs';
import { stateFace } from '@shared/gauge/state-face';
import { VERSION_STATES } from '@shared/orders/states';

describe('the face of a state', () => {
  it.each(VERSION_STATES)('%s has a word and a glyph', (state) => {
    const face = stateFace(state);
    expect(face.word).not.toBe('');
    expect(glyphShapes(face.glyph).length).toBeGreaterThan(0);
  });

  it('gives no two states the same word or the same glyph', () => {
    const faces = VERSION_STATES.map(stateFace);
    expect(new Set(faces.map((face) => face.word)).size).toBe(VERSION_STATES.length);
    expect(new Set(faces.map((face) => JSON.stringify(glyphShapes(face.glyph)))).size).toBe(
      VERSION_STATES.length,
    );
  });
});
