import { buildContent } from '@shared/orders/build-content';
import { rulebookOf } from '@shared/orders/chart-facts';
import type { VersionState } from '@shared/orders/states';
import type { Act } from '@shared/orders/transitions';
import { workOutDraft } from '@shared/orders/work-out-draft';
import type { OrderView } from '@shared/routes/orders';
import { IDS, maintenanceForm, makeContext, NOW } from './make-draft';

const context = makeContext();
const form = maintenanceForm();

/** What the author would have signed: 41.1 mL/h. */
export function makeContent() {
  const work = workOutDraft(form, context);
  if (!('workOut' in work)) throw new Error('the fixture does not work out');
  const { request, extras, workOut } = work;
  return buildContent({
    code: 'BL-260610-014',
    version: 1,
    form,
    request,
    extras,
    workOut,
    context,
    rulebook: rulebookOf(context),
  });
}

const AUTHOR = { name: 'Noor Castellane', title: 'Registrar' };

export const makeOpen = (): NonNullable<OrderView['open']> => ({
  content: makeContent(),
  contentSha256: 'b'.repeat(64),
  author: AUTHOR,
  signatures: [
    {
      meaning: 'author',
      name: AUTHOR.name,
      role: 'Registrar',
      registrationNumber: '7012345',
      at: NOW,
      how: 'password typed again',
      note: '',
      isVoid: false,
    },
  ],
  exceptions: [],
  comparison: null,
  checkerName: null,
  nameCorrectedSince: null,
  infusions: [],
});

export const makeOrder = (
  state: VersionState,
  acts: readonly Act[],
  change: Partial<OrderView> = {},
): OrderView => ({
  orderId: IDS.order,
  versionId: IDS.version,
  code: 'BL-260610-014',
  version: 1,
  kind: 'maintenance',
  state,
  stateSince: NOW,
  isOverdue: false,
  isEmergency: false,
  child: context.child,
  reason: form.reason,
  askedStart: NOW,
  urgency: 'routine',
  checkDueAt: NOW,
  waitingWords: 'waits 38 min',
  open: makeOpen(),
  timeline: [{ seq: 1, at: NOW, who: AUTHOR.name, words: 'Signed, check asked for', outcome: 'done' }],
  otherVersions: [],
  you: { isAuthor: false },
  acts: acts.map((act) => ({ act, allowed: true, words: '' })),
  ...change,
});
