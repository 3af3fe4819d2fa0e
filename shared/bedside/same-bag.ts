import type { FluidComposition } from '../calc/types';
import { snap } from '../rounding';
import type { Finding } from './finding';

const mmol = (n: number): string => `${n} mmol/L`;

/** Two bags of one base that differ in their potassium, in words. */
export function potassiumFinding(
  ordered: { name: string; addedPotassium: string },
  picked: FluidComposition,
): Finding {
  const wanted = Number(ordered.addedPotassium);
  const has = picked.addedPotassium;
  const field = 'productId';
  const order = wanted === 0 ? 'the order has none' : `the order has ${mmol(wanted)}`;
  if (wanted > 0 && has === 0) {
    return { field, code: 'no-potassium', text: `Same fluid, but no potassium: ${order}. Take another bag.` };
  }
  if (wanted === 0 && has > 0) {
    const text = `Same fluid, but with potassium ${mmol(has)}: ${order}. Take this bag away.`;
    return { field, code: 'potassium-added', text };
  }
  const times = snap(has / wanted);
  const much = times === 2 ? 'Twice' : times === 0.5 ? 'Half' : 'Other than';
  if (wanted === has) {
    // the same composition under another name is another product until a pharmacist says otherwise
    return { field, code: 'another-product', text: `Another product. The order says ${ordered.name}.` };
  }
  return {
    field,
    code: times > 1 ? 'more-potassium' : 'less-potassium',
    text: `${much} the potassium: this bag has ${mmol(has)}, ${order}. Take another bag.`,
  };
}
