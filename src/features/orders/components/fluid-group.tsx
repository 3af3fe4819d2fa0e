import { useState } from 'react';
import { Group, Row } from '@/components/ui/group';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { useDraftForm } from '../forms/draft-form';
import { baseFluids, permittedProducts, potassiumSteps, productOfBase } from '../forms/fluid-choice';
import { fieldId } from '../forms/order-words';

/** The bag: its base fluid, and the potassium it is bought with. */
export function FluidGroup() {
  const { values, context, set, errorOf, isOver } = useDraftForm();
  const product = context.products.find(({ id }) => id === values.productId);
  const [chosenBase, setChosenBase] = useState('');
  const base = product?.base ?? chosenBase;
  const isBolus = values.kind === 'bolus';
  const stocked = potassiumSteps(context, values.kind, base);
  const steps = [
    ...new Set(permittedProducts(context, values.kind).map((each) => Number(each.addedPotassium))),
  ];
  const chooseBase = (next: string) => {
    setChosenBase(next);
    set({ productId: productOfBase(context, values.kind, next, values.productId) });
  };
  const needsPotassium = base !== '' && product === undefined;
  const error = errorOf('productId');
  return (
    <Group head="Fluid" note={isBolus ? undefined : 'from the shelf'}>
      <Row tight>
        <SelectField
          label="Base fluid"
          width={isBolus ? 'full' : 'full b'}
          id={fieldId('productId')}
          placeholder="Choose the fluid"
          options={baseFluids(context, values.kind, values.productId).map((each) => ({
            value: each,
            label: each,
          }))}
          value={base}
          onChange={({ target }) => chooseBase(target.value)}
          error={needsPotassium ? undefined : error}
          overBrim={isOver('productId')}
          hint={isBolus ? 'A bolus carries no glucose and no added potassium.' : undefined}
        />
        {!isBolus && (
          <Segmented
            label="Potassium in it, mmol/L"
            width="full"
            options={steps
              .sort((a, b) => a - b)
              .map((mmolPerL) => ({
                value: String(mmolPerL),
                label: mmolPerL === 0 ? 'None' : String(mmolPerL),
                disabled: !stocked.some((each) => each.mmolPerL === mmolPerL),
              }))}
            value={product ? String(Number(product.addedPotassium)) : ''}
            onChoose={(step) =>
              set({ productId: stocked.find(({ mmolPerL }) => String(mmolPerL) === step)?.productId ?? '' })
            }
            error={needsPotassium && error ? 'Choose the potassium.' : undefined}
          />
        )}
      </Row>
    </Group>
  );
}
