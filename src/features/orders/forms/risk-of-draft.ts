import { ageAt } from '@shared/children/age';
import { rulebookOf } from '@shared/orders/chart-facts';
import { isHighRisk } from '@shared/orders/high-risk';
import type { WorkedOutDraft } from '@shared/orders/work-out-draft';
import type { DraftContext } from '@shared/routes/orders';

/** Whether this draft will need a senior checker or a pharmacist; the server decides it again at signing. */
export function isHighRiskDraft(
  { request, extras, workOut }: WorkedOutDraft,
  context: DraftContext,
): boolean {
  const z = context.weights.find(({ id }) => id === extras.weightId)?.z ?? null;
  const { fluid } = request.order;
  return isHighRisk(
    {
      potassium: fluid.potassium,
      isHighRiskProduct: fluid.highRisk,
      isNewborn: ageAt(request.child, request.at, request.zone).isNewborn,
      weightZ: z === null ? null : Number(z),
      limits: workOut.limits,
    },
    rulebookOf(context),
  );
}
