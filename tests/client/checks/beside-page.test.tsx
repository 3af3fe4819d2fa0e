import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { BesidePage } from '@/features/checks/components/beside-page';
import { maintenanceForm } from '../../checks/support/edie';
import { mockApi, Refusal } from './support/mock-api';
import { coveredPage, signedContent, uncoveredPage } from './support/pages';
import './support/pace';
import { showAt } from './support/show';

const visit = { checkerName: 'Ruth Ansah', until: '2026-06-10T09:52:00.000Z' };
const CLOSE = 'POST /api/beside/close';

function open(page: unknown, answers: Parameters<typeof mockApi>[0] = {}) {
  const api = mockApi({ 'GET /api/beside/check': () => page, ...answers });
  showAt('/beside', '/beside', <BesidePage />);
  return api;
}

afterEach(() => vi.unstubAllGlobals());

describe('beside the author', () => {
  it('says who checks and until when, and asks nothing of the author’s session', async () => {
    const api = open({ ...coveredPage(), visit });
    expect(await screen.findByText('Ruth Ansah')).toBeInTheDocument();
    expect(screen.getByText(/for this order only, until 10:52/)).toBeInTheDocument();
    expect(api.of('GET /api/me')).toEqual([]);
    expect(screen.queryByRole('button', { name: /Hand this check/ })).not.toBeInTheDocument();
  });

  it('warns before it closes without a lock-in', async () => {
    const api = open({ ...coveredPage(), visit }, { [CLOSE]: () => new Refusal('unexpected', {}, 500) });
    await userEvent.click(await screen.findByRole('button', { name: 'Close without locking in' }));
    expect(screen.getByText(/This marks you as having seen the author’s figures/)).toBeInTheDocument();
    expect(api.of(CLOSE)).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Close and give the screen back' }));
    await waitFor(() => expect(api.of(CLOSE)).toHaveLength(1));
    expect(await screen.findByText('The visit was not closed.')).toBeInTheDocument();
  });

  it('locks in and signs by its own routes', async () => {
    const form = maintenanceForm();
    const uncovered = uncoveredPage(signedContent(), form);
    let isLocked = false;
    const page = { ...coveredPage({ draft: { rev: 1, form, savedAt: null } }), visit };
    const api = mockApi({
      'GET /api/beside/check': () => (isLocked ? { ...uncovered, visit } : page),
      'POST /api/beside/lock-in': () => {
        isLocked = true;
        return uncovered;
      },
      'POST /api/beside/sign': () => ({ state: 'signed' }),
    });
    showAt('/beside', '/beside', <BesidePage />);
    await userEvent.click(await screen.findByRole('button', { name: 'Lock in my figures' }));
    await userEvent.click(screen.getByRole('button', { name: 'Lock in my figures' }));
    expect(await screen.findByRole('heading', { name: 'Both sets agree' })).toHaveFocus();
    expect(api.of('POST /api/beside/lock-in')).toEqual([{ form }]);
    await userEvent.type(screen.getByLabelText('Your password, again'), 'reed');
    await userEvent.click(screen.getByRole('button', { name: 'Sign this check' }));
    expect(await screen.findByRole('heading', { name: /Signed/ })).toBeInTheDocument();
    expect(api.of('POST /api/beside/sign')).toMatchObject([{ acceptReason: null, password: 'reed' }]);
  });

  it('says that the visit is over once its time has passed', async () => {
    open(new Refusal('signed-out', { detail: 'This visit is over.' }, 401));
    expect(await screen.findByRole('heading', { name: 'This visit is over' })).toBeInTheDocument();
  });
});
