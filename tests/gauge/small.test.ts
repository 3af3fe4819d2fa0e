import { describe, expect, it } from 'vitest';
import { drawSmallGauge } from '@shared/gauge/small';

describe('the small gauge', () => {
  // ours: the reference drawing of the ward page
  it('stands as drawn for 1056 of 2000 mL', () => {
    expect(drawSmallGauge({ value: 1056, brim: 2000, notches: [1000, 1320], widthPx: 124 })).toMatchObject({
      fill: 'M53.79 6H5.5q-2.5 0-2.5 2.5v1q0 2.5 2.5 2.5H53.79z',
      engraved: ['M51.1 6V12'],
      dashed: ['M66.49 6V12'],
      brim: 'M99.2 1V17',
      hatch: [],
    });
  });

  it('stops at the brim and hatches what passes it', () => {
    const over = drawSmallGauge({ value: 620, brim: 500, widthPx: 124 });
    expect(over.fill).toContain('H99.2z');
    expect(over.hatch).toHaveLength(4);
  });

  it('hatches at least once, however little it is over', () => {
    expect(drawSmallGauge({ value: 500.1, brim: 500, widthPx: 124 }).hatch).toHaveLength(1);
  });

  it('is empty when nothing is ordered', () => {
    expect(drawSmallGauge({ value: 0, brim: 2000, widthPx: 124 }).fill).toBeNull();
  });
});
