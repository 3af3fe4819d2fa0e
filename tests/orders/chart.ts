import { canonicalText, decimalText } from '@shared/canonical';
import type { DraftContext } from '@shared/routes/orders';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { rulebookContent } from '@shared/rulebook/document';
import { DEFAULT_SHELF } from '@shared/shelf/default';

/** An invented girl of 16.4 kg on the default shelf and rulebook; noon in London. */
export function chart(
  change: Partial<DraftContext> = {},
  child: Partial<DraftContext['child']> = {},
): DraftContext {
  return {
    child: {
      id: 'child-1',
      number: 'SM 418 207',
      surname: 'Hartnoll',
      given: 'Edie',
      bornOn: '2022-03-14',
      bornAt: null,
      ageText: '4 y',
      sex: 'female',
      gestationWeeks: null,
      gestationDays: null,
      allergies: 'Ibuprofen: wheeze',
      flags: [],
      ward: { id: 'ward-1', name: 'Heron' },
      bed: '4',
      rev: 1,
      ...child,
    },
    weights: [weight('weight-1', '16.400')],
    lastMeasuredAt: '2026-06-10T06:50:00.000Z',
    products: DEFAULT_SHELF.map((fluid, i) => ({
      id: `product-${i}`,
      name: fluid.name,
      base: fluid.base,
      addedPotassium: decimalText(fluid.addedPotassium, 2),
      sodium: decimalText(fluid.sodium, 2),
      potassium: decimalText(fluid.potassium, 2),
      chloride: decimalText(fluid.chloride, 2),
      calcium: decimalText(fluid.calcium, 2),
      magnesium: decimalText(fluid.magnesium, 2),
      lactate: decimalText(fluid.lactate, 2),
      acetate: decimalText(fluid.acetate, 2),
      gluconate: decimalText(fluid.gluconate, 2),
      glucoseGPerL: decimalText(fluid.glucoseGPerL, 2),
      osmolarity: decimalText(fluid.osmolarity, 2),
      readyMixed: fluid.readyMixed,
      highRisk: fluid.highRisk,
      bagSizesMl: fluid.bagSizes.map(String),
      kinds: [...fluid.permittedKinds],
      newbornOnly: fluid.newbornOnly,
      rev: 1,
    })),
    results: [],
    urinePassedAt: null,
    bolusesLast24h: [],
    running: [],
    plan: null,
    rulebook: {
      number: 1,
      sha256: 'f'.repeat(64),
      content: JSON.parse(canonicalText(rulebookContent(DEFAULT_RULEBOOK))),
    },
    zone: 'Europe/London',
    now: '2026-06-10T11:00:00.000Z',
    ...change,
  };
}

export const weight = (
  id: string,
  kg: string,
  change: Partial<DraftContext['weights'][number]> = {},
): DraftContext['weights'][number] => ({
  id,
  kg,
  method: 'scales',
  at: '2026-06-10T06:50:00.000Z',
  recordedBy: 'Orla Finch',
  confirmedBy: null,
  z: null,
  usable: true,
  stale: '',
  ...change,
});

export const productNamed = (context: DraftContext, name: string): string => {
  const product = context.products.find((row) => row.name === name);
  if (product === undefined) throw new Error(`the shelf has no ${name}`);
  return product.id;
};
