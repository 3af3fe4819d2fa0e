import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { DEFAULT_SHELF } from '@shared/shelf/default';
import { fluidClass } from '@shared/shelf/fluid-class';
import { describe, expect, it } from 'vitest';

/** Label osmolarity counts glucose as hydrate or anhydrous; anhydrous 180.16 g/mol is what these labels print. */
const GLUCOSE_G_PER_MMOL = 0.18016;

const byName = (name: string) => DEFAULT_SHELF.find((product) => product.name === name)!;

describe('the default shelf', () => {
  it.each(DEFAULT_SHELF.map((product) => [product.name, product] as const))(
    '%s is electrically neutral',
    (_, p) => {
      const positive = p.sodium + p.potassium + 2 * p.calcium + 2 * p.magnesium;
      const negative = p.chloride + p.lactate + p.acetate + p.gluconate;
      expect(Math.abs(positive - negative)).toBeLessThanOrEqual(0.5);
    },
  );

  it.each(DEFAULT_SHELF.map((product) => [product.name, product] as const))(
    '%s sums to its label osmolarity',
    (_, p) => {
      const ions =
        p.sodium + p.potassium + p.chloride + p.calcium + p.magnesium + p.lactate + p.acetate + p.gluconate;
      expect(Math.abs(ions + p.glucoseGPerL / GLUCOSE_G_PER_MMOL - p.osmolarity)).toBeLessThanOrEqual(2);
    },
  );

  it.each([
    ['Sodium chloride 0.9% + potassium chloride 20 mmol/L', 154, 20, 174, 348, 'label'],
    ['Sodium chloride 0.9% + potassium chloride 40 mmol/L', 154, 40, 194, 388, 'label'],
    ['Sodium chloride 0.9% + glucose 5% + potassium chloride 20 mmol/L', 154, 20, 174, 625, 'label'],
    ['Sodium chloride 0.9% + glucose 5% + potassium chloride 40 mmol/L', 154, 40, 194, 665, 'label'],
    ['Sodium chloride 0.9% + glucose 10%', 154, 0, 154, 863, 'label'],
    ['Compound sodium lactate', 131, 5, 111, 278, 'label'],
  ])(
    '%s: sodium %s, potassium %s, chloride %s mmol/L, %s mOsm/L (%s)',
    (name, sodium, potassium, chloride, osmolarity) => {
      expect(byName(name)).toMatchObject({ sodium, potassium, chloride, osmolarity });
    },
  );

  it('has one name for each product, and a base that differs in potassium only', () => {
    expect(new Set(DEFAULT_SHELF.map(({ name }) => name)).size).toBe(DEFAULT_SHELF.length);
    const bags = DEFAULT_SHELF.filter(({ base }) => base === 'Sodium chloride 0.9% + glucose 5%');
    expect(bags.map(({ addedPotassium }) => addedPotassium)).toEqual([0, 20, 40]);
    expect(new Set(bags.map(({ sodium, glucoseGPerL }) => `${sodium} ${glucoseGPerL}`)).size).toBe(1);
  });

  it('permits as a bolus only isotonic fluid without glucose and without a potassium bag', () => {
    const boluses = DEFAULT_SHELF.filter(({ permittedKinds }) => permittedKinds.includes('bolus'));
    expect(boluses.length).toBeGreaterThan(3);
    for (const product of boluses) {
      expect(fluidClass(product, DEFAULT_RULEBOOK)).toEqual({ tonicity: 'isotonic', hasGlucose: false });
      expect(product.potassium).toBeLessThanOrEqual(5);
    }
  });
});

describe('the class of a fluid', () => {
  it.each([
    ['Sodium chloride 0.9%', 'isotonic', false],
    ['Ringer’s lactate', 'isotonic', false],
    ['Sodium chloride 0.9% + glucose 10%', 'isotonic', true],
    ['Sodium chloride 0.45% + glucose 5%', 'hypotonic', true],
    ['Glucose 10%', 'hypotonic', true],
    ['Sodium chloride 2.7%', 'hypertonic', false],
  ])('%s is %s, glucose %s', (name, tonicity, hasGlucose) => {
    expect(fluidClass(byName(name), DEFAULT_RULEBOOK)).toEqual({ tonicity, hasGlucose });
  });
});
