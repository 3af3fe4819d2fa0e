import { useMutation } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from '@/lib/api';
import type { Kind } from '@shared/calc/types';
import { ORDER_FORM_FIELDS, type OrderForm } from '@shared/orders/form';
import type { Draft } from '@shared/routes/orders';
import { permittedProducts } from '../forms/fluid-choice';
import type { DraftSaver } from './draft-saver';

/** What was typed goes along; what the other kind needs and was never typed comes from its own proposals. */
export function formOfOtherKind(former: OrderForm, fresh: Draft): OrderForm {
  const entries = ORDER_FORM_FIELDS.map((field) => [field, former[field] || fresh.form[field]]);
  const merged = { ...(Object.fromEntries(entries) as OrderForm), limitReasons: former.limitReasons };
  const isPermitted = permittedProducts(fresh.context, fresh.form.kind).some(
    ({ id }) => id === former.productId,
  );
  return {
    ...merged,
    kind: fresh.form.kind,
    urgency: fresh.form.urgency,
    plannedStart: fresh.form.plannedStart,
    productId: isPermitted ? former.productId : fresh.form.productId,
  };
}

/** An order is of one kind for good: the other kind is a new order, which takes over the text; this draft is discarded. */
export function useChangeKind(draft: Draft, saver: DraftSaver, formNow: () => OrderForm) {
  const navigate = useNavigate();
  return useMutation({
    mutationFn: async (kind: Kind) => {
      if (!(await saver.flush()))
        throw new Error(saver.snapshot().words || 'The last words are not kept yet. Try again.');
      const { versionId } = await call('startDraft', {
        params: { id: draft.context.child.id },
        body: { kind, followsOrderId: null },
      });
      const fresh = await call('draft', { params: { id: versionId } });
      await call('saveDraft', {
        params: { id: versionId },
        body: { rev: fresh.rev, form: formOfOtherKind(formNow(), fresh) },
      });
      await call('discardDraft', { params: { id: draft.versionId }, body: {} });
      return versionId;
    },
    onSuccess: (versionId) => navigate(`/drafts/${versionId}`, { replace: true }),
  });
}
