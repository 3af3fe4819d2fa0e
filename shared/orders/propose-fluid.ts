import type { FluidComposition, Kind, WorkOutRequest } from '../calc/types';
import { workOut } from '../calc/work-out';
import { ageAt, type Age } from '../children/age';
import { atLeast, atMost } from '../rounding';
import { ruleValues } from '../rulebook/read';
import type { Rulebook } from '../rulebook/document';

/** mmol/L of the ready-mixed bag that is usual where potassium may be given. Common practice. */
const USUAL_POTASSIUM = 20;
/** g/L: 5% from 8 days, 10% before. NICE NG29 1.4. */
const GLUCOSE_5 = 50;
const GLUCOSE_10 = 100;

/**
 * The fluid proposed for a first draft: the usual one of the child's age, with potassium only where no limit speaks
 * against it; undefined where the shelf has none.
 */
export function proposeFluid(
  request: Omit<WorkOutRequest, 'order'>,
  order: (fluid: FluidComposition) => WorkOutRequest['order'],
  fluids: readonly FluidComposition[],
  rulebook: Rulebook,
): FluidComposition | undefined {
  const kind = (fluid: FluidComposition): Kind => order(fluid).kind;
  const age = ageAt(request.child, request.at, request.zone);
  const usual = fluids.filter(
    (fluid) =>
      (fluid.permittedKinds?.includes(kind(fluid)) ?? true) &&
      (fluid.newbornOnly !== true || age.isNewborn) &&
      (kind(fluid) === 'bolus' ? isForBolus(fluid, rulebook) : isForMaintenance(fluid, age, rulebook)),
  );
  const withPotassium = usual.find(
    (fluid) => fluid.addedPotassium === USUAL_POTASSIUM && speaksNothing(fluid),
  );
  return withPotassium ?? usual.find((fluid) => fluid.addedPotassium === 0);

  function speaksNothing(fluid: FluidComposition): boolean {
    const worked = workOut({ ...request, order: order(fluid) }, rulebook);
    return worked.ok && worked.limits.every((limit) => limit.met || !limit.code.startsWith('potassium'));
  }
}

function isForMaintenance(fluid: FluidComposition, age: Age, rulebook: Rulebook): boolean {
  const rules = ruleValues(rulebook, 'tonicity');
  const hours = age.hours ?? age.days * 24;
  if (age.isNewborn && hours < rules.noSodiumHours) {
    return fluid.glucoseGPerL === GLUCOSE_10 && fluid.sodium === 0;
  }
  if (age.isNewborn && age.days < rules.isotonicFromDays) {
    return (
      fluid.glucoseGPerL === GLUCOSE_10 &&
      atLeast(fluid.sodium, rules.newbornSodiumLow) &&
      atMost(fluid.sodium, rules.newbornSodiumHigh)
    );
  }
  return fluid.glucoseGPerL === GLUCOSE_5 && isIsotonic(fluid, rulebook);
}

const isForBolus = (fluid: FluidComposition, rulebook: Rulebook): boolean =>
  fluid.glucoseGPerL === 0 && isIsotonic(fluid, rulebook);

function isIsotonic({ sodium }: FluidComposition, rulebook: Rulebook): boolean {
  const { isotonicFrom, hypertonicAbove } = ruleValues(rulebook, 'tonicity');
  return atLeast(sodium, isotonicFrom) && atMost(sodium, hypertonicAbove);
}
