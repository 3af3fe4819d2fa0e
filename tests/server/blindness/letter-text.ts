import { isMailKind, writeLetter, type MailRef } from '../../../server/mail/letters';

/** A mail as it would be sent: subject and text. */
export function letterText(row: { kind: string; ref: Record<string, string> }): string {
  if (!isMailKind(row.kind)) throw new Error(`no letter for ${row.kind}`);
  const letter = writeLetter(row.kind, row.ref as MailRef, 'http://127.0.0.1', (at) => at);
  return `${letter.subject}\n${letter.text}`;
}
