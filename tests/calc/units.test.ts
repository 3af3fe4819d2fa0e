import { describe, expect, it } from 'vitest';
import {
  flowOver,
  flowOverMinutes,
  flowPerKg,
  glucoseEnergy,
  glucoseRate,
  gramsPerLitre,
  hours,
  kilograms,
  millilitres,
  millilitresPerHour,
  millilitresPerKg,
  minutes,
  mmolPerLitre,
  molesPerHour,
  molesPerKgPerDay,
  molesPerKgPerHour,
  percentOf,
  perKg,
  volumeFor,
  volumeIn,
} from '@shared/units';

describe('units do not mix', () => {
  it('refuses to compile a swapped unit', () => {
    const kg = kilograms(10);
    const rate = millilitresPerHour(50);
    const day = hours(24);
    const bag = millilitres(500);
    // @ts-expect-error kg are not mL/h
    volumeIn(kg, day);
    // @ts-expect-error time and flow are swapped
    volumeIn(day, rate);
    // @ts-expect-error minutes are not hours
    flowOver(bag, minutes(60));
    // @ts-expect-error hours are not minutes
    flowOverMinutes(bag, day);
    // @ts-expect-error a plain number has no unit
    volumeFor(10, kg);
    // @ts-expect-error dose and weight are swapped
    volumeFor(kg, millilitresPerKg(10));
    // @ts-expect-error mmol/L are not g/L
    glucoseRate(mmolPerLitre(50), rate, kg);
    // @ts-expect-error a flow is not a day's volume
    glucoseEnergy(gramsPerLitre(50), rate, kg);
    expect(volumeIn(rate, day)).toBe(1200);
  });
});

describe('constructors', () => {
  it.each([NaN, Infinity, -Infinity, -0.001])('throw on %s', (bad) => {
    expect(() => kilograms(bad)).toThrow(RangeError);
    expect(() => millilitres(bad)).toThrow(RangeError);
    expect(() => millilitresPerHour(bad)).toThrow(RangeError);
    expect(() => hours(bad)).toThrow(RangeError);
  });

  it('take nothing for a volume and a flow, but not for a weight or a time', () => {
    expect(millilitres(0)).toBe(0);
    expect(millilitresPerHour(0)).toBe(0);
    expect(() => kilograms(0)).toThrow('kg wants a finite number above 0');
    expect(() => hours(0)).toThrow(RangeError);
    expect(() => minutes(0)).toThrow(RangeError);
  });
});

describe('conversions', () => {
  it('agree with values worked by hand', () => {
    const kg = kilograms(20);
    // Koletzko, derived: 20 kg, 62.5 mL/h of 5% is 2.60 mg/kg/min
    expect(glucoseRate(gramsPerLitre(50), millilitresPerHour(62.5), kg)).toBeCloseTo(2.604, 3);
    // derived: 3 kg, 7.5 mL/h of 10% is 4.17 mg/kg/min
    expect(glucoseRate(gramsPerLitre(100), millilitresPerHour(7.5), kilograms(3))).toBeCloseTo(4.167, 3);
    expect(glucoseEnergy(gramsPerLitre(50), millilitres(1250), kilograms(16.4))).toBeCloseTo(15.24, 2);
    expect(flowOverMinutes(millilitres(500), minutes(10))).toBe(3000); // common practice: beyond a pump
    expect(flowPerKg(millilitresPerHour(50), kilograms(10))).toBe(5);
    expect(perKg(millilitres(500), kilograms(62))).toBeCloseTo(8.06, 2);
    expect(molesPerKgPerHour(molesPerHour(mmolPerLitre(40), millilitresPerHour(50)), kilograms(10))).toBe(
      0.2,
    );
    expect(molesPerKgPerDay(mmolPerLitre(154), millilitres(1000), kilograms(10))).toBeCloseTo(15.4, 9);
    expect(percentOf(gramsPerLitre(125))).toBe(12.5);
  });
});
