import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { GaugeInput } from '@shared/gauge/input';
import { drawGauge, markStep } from '@shared/gauge/geometry';

const first = { label: 'first 10 kg', ml: 1000, fullMl: 1000 };
const order: GaugeInput = {
  orderMl: 1250,
  brimMl: 2000,
  brimNote: 'in 24 h',
  bands: [first, { label: 'next 6.4 kg', ml: 320, fullMl: 320 }],
  ghosts: [{ label: '70 mL as drugs', ml: 70 }],
  heightPx: 548,
};
const texts = (input: GaugeInput) => drawGauge(input).ticks.flatMap((tick) => tick.text?.text ?? []);

describe('the brim gauge', () => {
  // ours: the reference drawing of the order page, 548 px high
  it('stands as drawn for 1250 of 2000 mL', () => {
    const drawing = drawGauge(order);
    expect(drawing.fillY).toBeCloseTo(286.1, 0);
    expect(drawing.ghostY).toBeCloseTo(272.2, 0);
    expect(drawing.brimY).toBeCloseTo(136.2, 0);
    expect(drawing.engraved).toEqual(['M87 336.12H137']);
    expect(drawing.brackets.map((bracket) => bracket.path)).toEqual([
      'M75 337.62h-5V534.5h5',
      'M75 273.66h-5V334.62h5',
    ]);
    expect(drawing.wall).toBe('M76 10q6 0 6 6V522q0 14 14 14H128q14 0 14-14V16q0-6 6-6');
    expect(drawing.inside).toBe('M87 10V523q0 8 8 8H129q8 0 8-8V10z');
    expect(texts(order)).toEqual(['500', '1000', '1500']);
    expect(drawing.pointer?.volume).toEqual({ x: 158, y: 293.15, text: '1250 mL' });
    expect(drawing.ghostLabel?.lines).toEqual([{ x: 158, y: 267.16, text: '70 mL as drugs' }]);
  });

  it('has its brim at 0.76 of the inner height whatever its value', () => {
    const amount = fc.double({ min: 1, max: 20_000, noNaN: true });
    fc.assert(
      fc.property(amount, amount, fc.integer({ min: 200, max: 700 }), (brimMl, orderMl, heightPx) => {
        const { vessel, brimY, fillY } = drawGauge({
          ...order,
          brimMl,
          orderMl,
          heightPx,
          bands: [],
          ghosts: [],
        });
        expect((vessel.bottom - brimY) / (vessel.bottom - vessel.top)).toBeCloseTo(0.76, 3);
        expect(fillY).toBeGreaterThanOrEqual(brimY);
      }),
    );
  });

  it('drops numbers that would touch the order’s volume or the ghost’s label', () => {
    const held = { ...order, orderMl: 1056, ghosts: [{ label: 'held back 264', ml: 264 }], heightPx: 360 };
    expect(texts(held)).toEqual(['500']);
  });

  it('moves the words below the line when the fill is close to the brim', () => {
    const full = drawGauge({ ...order, orderMl: 2000, ghosts: [], heightPx: 360 });
    expect(full.pointer?.volume.y).toBeCloseTo(full.brimY + 25, 1);
  });

  it('stops the fill at the line and hatches the rest when over', () => {
    const over = drawGauge({
      orderMl: 620,
      brimMl: 500,
      brimNote: 'in one bolus',
      bands: [{ label: 'to the brim', ml: 500, fullMl: 500 }],
      ghosts: [],
      heightPx: 360,
    });
    expect(over.fillY).toBe(over.brimY);
    expect(over.pointer).toBeNull();
    expect(over.over?.box.y).toBeCloseTo(29.5, 1);
    expect(over.over?.words.map((word) => word.text)).toEqual(['120 mL', 'over']);
    expect(over.sentence).toBe(
      'Brim gauge: the order asks for 620 mL. The fill stops at the brim, 500 mL in one bolus, and 120 mL is shown hatched above it.',
    );
  });

  it('keeps the hatch inside the vessel however far over', () => {
    const far = drawGauge({ ...order, orderMl: 9000, ghosts: [] });
    expect(far.over!.box.y).toBeGreaterThan(far.vessel.top);
  });

  it('says how much of a band lies under the brim', () => {
    const cut = drawGauge({
      ...order,
      orderMl: 2000,
      bands: [first, { label: 'last 38.3 kg', ml: 500, fullMl: 766 }],
    });
    expect(cut.brackets[1]?.volume.text).toBe('500 of 766');
  });

  it('never lets two band labels touch', () => {
    const short = drawGauge({
      ...order,
      orderMl: 1500,
      bands: [
        first,
        { label: 'next 10 kg', ml: 500, fullMl: 500 },
        { label: 'last 0.2 kg', ml: 4, fullMl: 4 },
      ],
      heightPx: 240,
    });
    const ys = short.brackets.map((bracket) => bracket.label.y);
    ys.slice(1).forEach((y, index) => expect(ys[index]! - y).toBeGreaterThanOrEqual(34));
  });

  it('says order, bands, reductions and brim in a sentence', () => {
    expect(drawGauge(order).sentence).toBe(
      'Brim gauge: the order gives 1250 mL in 24 h. In full, first 10 kg gives 1000 mL and next 6.4 kg gives 320 mL. Taken off: 70 mL as drugs. The brim is 2000 mL in 24 h.',
    );
  });
});

describe('the marks', () => {
  it.each([
    // ours: 24 h as drawn, one bolus as drawn, then brims of small children
    [2000, 500],
    [2500, 500],
    [500, 100],
    [630, 200],
    [60, 20],
    [9, 2],
  ])('of a brim of %d mL are numbered every %d mL', (brimMl, step) => {
    expect(markStep(brimMl)).toBe(step);
  });
});
