import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CountersignPage } from '@/features/checks/components/countersign-page';
import type { OrderView } from '@shared/routes/orders';
import { bolusForm } from '../../checks/support/edie';
import { mockApi } from './support/mock-api';
import { AUTHOR, bolusContent, child, coveredPage, me, order, VERSION } from './support/pages';
import './support/pace';
import { showAt } from './support/show';

const ACT = `POST /api/versions/${VERSION}/countersign`;
const acts = [{ act: 'countersign' as const, allowed: true, words: '' }];

const given: OrderView = {
  ...{ orderId: VERSION, versionId: VERSION, code: order.code, version: 1 },
  kind: 'bolus',
  state: 'given',
  stateSince: order.signedAt,
  isOverdue: false,
  isEmergency: true,
  child,
  reason: order.reason,
  askedStart: null,
  urgency: 'emergency',
  checkDueAt: null,
  waitingWords: '',
  open: {
    content: { ...bolusContent(), readBack: 'Sodium chloride 0.9%, 164 mL, by syringe.' },
    contentSha256: 'a'.repeat(64),
    author: AUTHOR,
    signatures: [],
    exceptions: [],
    comparison: null,
    checkerName: null,
    nameCorrectedSince: null,
    infusions: [],
  },
  timeline: [],
  otherVersions: [],
  you: { isAuthor: false },
  acts,
};

const page = coveredPage({
  order: { ...order, kind: 'bolus', urgency: 'emergency' },
  state: 'given',
  isShortForm: true,
  draft: { rev: 2, form: bolusForm(), savedAt: null },
  acts,
});

const agreed = {
  state: 'countersigned',
  comparison: { outcome: 'agreed', mayAccept: false, rows: [], effect: '' },
};

function open(answer: unknown) {
  const api = mockApi({
    'GET /api/me': () => me,
    [`GET /api/checks/${VERSION}`]: () => page,
    [`GET /api/versions/${VERSION}`]: () => given,
    [ACT]: () => answer,
  });
  showAt('/orders/:versionId/countersign', `/orders/${VERSION}/countersign`, <CountersignPage />);
  return api;
}

afterEach(() => vi.unstubAllGlobals());

describe('countersigning what was given', () => {
  it('sends own figures, the verdict and the password', async () => {
    const api = open(agreed);
    expect(await screen.findByText('Sodium chloride 0.9%, 164 mL, by syringe.')).toBeInTheDocument();
    const button = screen.getByRole('button', { name: 'Countersign what was given' });
    await userEvent.click(button);
    expect(screen.getByRole('radiogroup', { name: 'By your own figures' })).toBeInvalid();
    expect(api.of(ACT)).toEqual([]);
    await userEvent.click(screen.getByRole('radio', { name: 'It was right' }));
    await userEvent.type(screen.getByLabelText('Your password, again'), 'reed');
    await userEvent.click(button);
    expect(await screen.findByText('It is recorded.')).toBeInTheDocument();
    expect(api.of(ACT)).toEqual([{ agree: true, form: bolusForm(), reason: '', password: 'reed' }]);
  });

  it('records a difference only with what differs', async () => {
    const api = open({ ...agreed, state: 'disputed' });
    await userEvent.click(await screen.findByRole('radio', { name: 'Something differs' }));
    await userEvent.type(screen.getByLabelText('Your password, again'), 'reed');
    const button = screen.getByRole('button', { name: 'Record that it differs' });
    await userEvent.click(button);
    expect(api.of(ACT)).toEqual([]);
    await userEvent.type(screen.getByLabelText('What differs'), 'The bag was another one');
    await userEvent.click(button);
    await waitFor(() =>
      expect(api.of(ACT)).toMatchObject([{ agree: false, reason: 'The bag was another one' }]),
    );
  });
});
