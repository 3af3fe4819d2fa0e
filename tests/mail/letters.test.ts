import { describe, expect, it } from 'vitest';
import { MAIL_KINDS, writeLetter } from '../../server/mail/letters';

const ref = {
  code: 'BL-261201-007',
  wardName: 'Heron',
  urgency: 'urgent',
  dueAt: '2026-12-01T10:20:00.000Z',
  path: '/checks/3f0c',
};
const letter = (kind: (typeof MAIL_KINDS)[number]) =>
  writeLetter(kind, ref, 'https://brimline.test', (at) => `[${at}]`);

describe('letters', () => {
  it.each(MAIL_KINDS)('%s says order, ward, urgency, due time and a link, and nothing more', (kind) => {
    const { subject, text } = letter(kind);
    expect(subject).toContain('BL-261201-007');
    expect(subject).toMatch(/^Urgent: /);
    expect(text).toContain('Ward: Heron');
    expect(text).toContain('Due: [2026-12-01T10:20:00.000Z]');
    expect(text).toContain('https://brimline.test/checks/3f0c');
    // no figure of any kind besides the code, the due time and the link
    const rest = text
      .replace('BL-261201-007', '')
      .replace('[2026-12-01T10:20:00.000Z]', '')
      .replace('/checks/3f0c', '');
    expect(rest).not.toMatch(/\d/);
  });

  it('leaves out a due time it was not given, and does not invent an urgency', () => {
    const { subject, text } = writeLetter(
      'order-signed',
      { ...ref, urgency: 'Otis', dueAt: undefined },
      'https://brimline.test',
      String,
    );
    expect(text).not.toContain('Due:');
    expect(text).toContain('Urgency: routine');
    expect(subject).not.toContain('Otis');
  });
});
