import { useMutation } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from '@/lib/api';
import type { Kind } from '@shared/calc/types';
import { ORDER_FORM_FIELDS, type OrderForm } from '@shared/orders/form';
import type { Draft } from '@shared/routes/orders';
import type { DraftSaver } from './draft-saver';

/** What was typed goes along; the times, the fluid and what was never typed come from the other kind's proposals. */
export function formOfOtherKind(former: OrderForm, fresh: Draft): OrderForm {
  const entries = ORDER_FORM_FIELDS.map((field) => [field, former[field] || fresh.form[field]]);
  const merged = { ...(Object.fromEntries(entries) as OrderForm), limitReasons: former.limitReasons };
  return {
    ...merged,
    kind: fresh.form.kind,
    urgency: fresh.form.urgency,
    plannedStart: fresh.form.plannedStart,
    reviewBy: fresh.form.reviewBy,
    bloodsBy: fresh.form.bloodsBy,
    // one kind's fluid is not meant for the other, even where the shelf permits it
    productId: fresh.form.productId,
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
