import { describe, expect, it } from 'vitest';
import type { QueueRow } from '@/features/checks/api/use-queue';
import { hrefOf, inOrder } from '@/features/checks/forms/queue-words';
import { child, order } from './support/pages';

const row = (code: string, rest: Partial<QueueRow> = {}): QueueRow => ({
  ...order,
  code,
  child,
  wardName: 'Heron',
  askedOfYou: false,
  act: 'check',
  waitedMinutes: 10,
  isLate: false,
  yourState: 'none',
  barred: null,
  ...rest,
});

describe('the queue', () => {
  it('has what is asked of you first, then urgency, risk and time; what you cannot take last', () => {
    const rows = [
      row('late', { dueAt: '2026-06-10T08:00:00.000Z' }),
      row('barred', { barred: 'Your own order.', urgency: 'emergency', askedOfYou: true }),
      row('later', { dueAt: '2026-06-10T11:00:00.000Z' }),
      row('risky', { isHighRisk: true }),
      row('emergency', { urgency: 'emergency' }),
      row('named', { askedOfYou: true }),
    ];
    expect(inOrder(rows).map(({ code }) => code)).toEqual([
      'named',
      'emergency',
      'risky',
      'late',
      'later',
      'barred',
    ]);
  });

  it('leads to the check, or to the countersignature of what was given', () => {
    expect(hrefOf(row('a'))).toBe(`/checks/${order.versionId}`);
    expect(hrefOf(row('b', { act: 'countersign' }))).toBe(`/orders/${order.versionId}/countersign`);
  });
});
