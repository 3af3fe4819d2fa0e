import { checkLink, draftLink, exceptionLink, orderLink } from '@shared/orders/links';
import { toRfc3339, type Instant } from '@shared/time';
import type { Mail } from '../db/outcome';
import type { MailKind } from '../mail/letters';
import type { LoadedVersion } from './facts';

const LINKS: Readonly<Record<MailKind, (versionId: string) => string>> = {
  'check-asked': checkLink,
  'check-reminder': checkLink,
  'check-second': checkLink,
  'check-senior': checkLink,
  'check-author': orderLink,
  'order-returned': orderLink,
  'order-disputed': orderLink,
  'order-signed': orderLink,
  'order-lapsing': orderLink,
  'order-lapsed': orderLink,
  'exception-asked': exceptionLink,
  'exception-decided': draftLink,
  'exception-countersign': () => '/exceptions',
  'countersign-asked': (versionId) => `${orderLink(versionId)}/countersign`,
};

/** One message to one person: the order's code, ward, urgency, due time and a link, and nothing else. */
export function mailTo(
  kind: MailKind,
  toAccount: string,
  { row, code, ward }: Pick<LoadedVersion, 'row' | 'code' | 'ward'>,
  dueAt: Instant | null = null,
): Mail {
  return {
    kind,
    toAccount,
    ref: {
      code,
      versionId: row.id,
      wardName: ward?.name ?? '',
      urgency: row.urgency,
      path: LINKS[kind](row.id),
      ...(dueAt !== null && { dueAt: toRfc3339(dueAt) }),
    },
  };
}
