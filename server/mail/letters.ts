import { URGENCIES } from '@shared/orders/form';

/** Every kind of mail. None of them names a child, a fluid, a figure or an author. */
export const MAIL_KINDS = [
  'check-asked',
  'check-reminder',
  'check-second',
  'check-senior',
  'check-author',
  'order-returned',
  'order-disputed',
  'order-signed',
  'order-lapsing',
  'order-lapsed',
  'exception-asked',
  'exception-decided',
  'exception-countersign',
  'countersign-asked',
] as const;
export type MailKind = (typeof MAIL_KINDS)[number];

/** What a letter may hold: the order's code, the ward, how urgent, by when, and where to read it. */
export type MailRef = { code: string; wardName: string; urgency: string; dueAt?: string; path: string };

export type Letter = { subject: string; text: string };

const OPENING: Readonly<Record<MailKind, { subject: string; line: string }>> = {
  'check-asked': {
    subject: 'An order waits for your check',
    line: 'An order waits for your independent check.',
  },
  'check-reminder': {
    subject: 'Reminder: an order waits for your check',
    line: 'An order still waits for your independent check.',
  },
  'check-second': {
    subject: 'Can you check an order?',
    line: 'An order has waited half its time for a check. You may take it.',
  },
  'check-senior': {
    subject: 'An order is close to missing its check',
    line: 'An order is close to its due time and nobody has checked it.',
  },
  'check-author': {
    subject: 'Nobody has checked your order: telephone',
    line: 'The due time of your order has come and nobody has checked it. Please telephone a checker.',
  },
  'order-returned': {
    subject: 'An order came back to you',
    line: 'An order came back to you. It is not in force.',
  },
  'order-disputed': { subject: 'An order is disputed', line: 'An order is disputed. It is not in force.' },
  'order-signed': { subject: 'An order is signed', line: 'An order of yours has been checked and signed.' },
  'order-lapsing': { subject: 'An order lapses soon', line: 'An order lapses soon. It needs a decision.' },
  'order-lapsed': { subject: 'An order lapsed', line: 'An order lapsed before it was used.' },
  'exception-asked': {
    subject: 'A senior decision is asked of you',
    line: 'A prescriber asks for a senior decision before an order can be signed.',
  },
  'exception-decided': {
    subject: 'A senior decision was made',
    line: 'The senior decision that you asked for was made.',
  },
  'exception-countersign': {
    subject: 'Please countersign a decision by telephone',
    line: 'A decision that you gave by telephone waits for your countersignature.',
  },
  'countersign-asked': {
    subject: 'Please countersign what was given',
    line: 'Something given in an emergency waits for a countersignature.',
  },
};

export const isMailKind = (kind: string): kind is MailKind =>
  (MAIL_KINDS as readonly string[]).includes(kind);

/** The letter in words. `formatDue` shows an RFC 3339 instant in the hospital's zone. */
export function writeLetter(
  kind: MailKind,
  ref: MailRef,
  publicUrl: string,
  formatDue: (at: string) => string,
): Letter {
  const { subject, line } = OPENING[kind];
  const urgency = (URGENCIES as readonly string[]).includes(ref.urgency) ? ref.urgency : 'routine';
  const lines = [
    line,
    '',
    `Order: ${ref.code}`,
    `Ward: ${ref.wardName}`,
    `Urgency: ${urgency}`,
    ...(ref.dueAt ? [`Due: ${formatDue(ref.dueAt)}`] : []),
    '',
    'Open it here (you will be asked to sign in; opening the link does nothing by itself):',
    new URL(ref.path, publicUrl).href,
    '',
    'If this has been done by someone else in the meantime, the page says so.',
    'Brimline supports, and does not replace, clinical judgement. Do not answer this mail.',
  ];
  return {
    subject: `${urgency === 'routine' ? '' : `${urgency === 'urgent' ? 'Urgent' : 'Emergency'}: `}${subject} (${ref.code})`,
    text: lines.join('\n'),
  };
}
