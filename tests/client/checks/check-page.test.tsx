import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CheckPage } from '@/features/checks/components/check-page';
import type { CheckForm } from '@shared/checks/form';
import { maintenanceForm } from '../../checks/support/edie';
import { mockApi, Refusal } from './support/mock-api';
import './support/pace';
import { AUTHOR, coveredPage, me, signedContent, uncoveredPage, VERSION } from './support/pages';
import { showAt } from './support/show';

const PAGE = `GET /api/checks/${VERSION}`;
const SAVE = `PUT /api/checks/${VERSION}/draft`;
const LOCK_IN = `POST /api/checks/${VERSION}/lock-in`;
const SIGN = `POST /api/checks/${VERSION}/sign`;

const kept = (form: Partial<CheckForm> = {}) =>
  coveredPage({ draft: { rev: 3, form: maintenanceForm(form), savedAt: null } });

async function open(page: unknown, answers: Parameters<typeof mockApi>[0] = {}) {
  const api = mockApi({
    'GET /api/me': () => me,
    [PAGE]: () => page,
    [SAVE]: (body) => ({ rev: (body as { rev: number }).rev + 1, savedAt: '2026-06-10T09:41:00.000Z' }),
    ...answers,
  });
  showAt('/checks/:versionId', `/checks/${VERSION}`, <CheckPage />);
  await screen.findByRole('main');
  return api;
}
const openCovered = async (...args: Parameters<typeof open>) => {
  const api = await open(...args);
  await screen.findByLabelText('Rate on the pump');
  return api;
};
const lockInButton = () => screen.getByRole('button', { name: 'Lock in my figures' });

afterEach(() => vi.unstubAllGlobals());

describe('before lock-in', () => {
  it('draws nothing of the author’s, whatever else a payload carries', async () => {
    const planted = { author: AUTHOR.name, rateMlPerH: '43.7', line: 'central' };
    const page = { ...coveredPage(), ...planted, order: { ...coveredPage().order, ...planted } };
    await openCovered(page);
    expect(document.body.innerHTML).not.toContain('Castellane');
    expect(document.body.innerHTML).not.toContain('43.7');
    expect(document.body.innerHTML).not.toContain('central');
    expect(screen.getByText('Pneumonia: too breathless to drink enough')).toBeInTheDocument();
    expect(screen.getByText('Covered until you lock in your own figures')).toBeInTheDocument();
  });

  it('starts with every entry empty', async () => {
    await openCovered(coveredPage());
    const form = screen.getByRole('form', { name: 'Your own figures' });
    for (const field of within(form).getAllByRole('textbox')) expect(field).toHaveValue('');
    for (const field of within(form).getAllByRole('combobox')) expect(field).toHaveValue('');
    for (const choice of within(form).getAllByRole('radio')) expect(choice).not.toBeChecked();
  });

  it.each(['Rate on the pump', 'Total volume', 'Dosing weight', 'Initials'])(
    'refuses paste into %s',
    async (label) => {
      await openCovered(coveredPage());
      const field = screen.getByLabelText(label);
      await userEvent.click(field);
      await userEvent.paste('44');
      expect(field).toHaveValue('');
      await userEvent.type(field, '44');
      expect(field).toHaveValue('44');
    },
  );

  it('names every missing entry, puts the cursor into the first, and asks nothing', async () => {
    const api = await openCovered(coveredPage());
    await userEvent.click(lockInButton());
    await waitFor(() => expect(screen.getByLabelText('Initials')).toHaveFocus());
    expect(screen.getByLabelText('Rate on the pump')).toBeInvalid();
    expect(screen.queryByText('Lock in these figures?')).not.toBeInTheDocument();
    expect(api.of(LOCK_IN)).toEqual([]);
  });

  it('keeps what is typed, from the revision it had', async () => {
    const api = await openCovered(coveredPage());
    await userEvent.type(screen.getByLabelText('Dosing weight'), '16.4');
    await waitFor(() => expect(api.of(SAVE).at(-1)).toMatchObject({ rev: 0, form: { weightKg: '16.4' } }), {
      timeout: 3000,
    });
  });

  it('fills in no work-out of its own: it is shown when the entries are whole, and taken by hand', async () => {
    await openCovered(kept({ rate: '', volumeMl: '', workedOutBy: 'program', fraction: '' }));
    expect(screen.getByText(/Next: fraction of full maintenance/)).toBeInTheDocument();
    await userEvent.click(screen.getByRole('radio', { name: '80%' }));
    // 16.4 kg: 1320 mL in full, 80 % 1056 mL, 44 mL/h; Holliday & Segar 1957
    expect(screen.getByText('44 mL/h')).toBeInTheDocument();
    expect(screen.getByLabelText('Rate on the pump')).toHaveValue('');
    await userEvent.click(screen.getByRole('button', { name: 'Take these figures' }));
    expect(screen.getByLabelText('Rate on the pump')).toHaveValue('44');
    expect(screen.getByLabelText('Total volume')).toHaveValue('1056');
  });

  it.each([
    ['hang together', {}, /Your own figures hang together/],
    ['do not', { rate: '55' }, /do not hang together/],
  ])('says when the figures %s', async (_what, form, words) => {
    await openCovered(kept(form));
    expect(screen.getByText(words)).toBeInTheDocument();
  });

  it('shows both texts when another tab was first, and goes on with the chosen one', async () => {
    let isMoved = true;
    const theirs = {
      rev: 7,
      form: maintenanceForm({ weightKg: '15.9' }),
      savedAt: '2026-06-10T09:40:00.000Z',
    };
    const api = await openCovered(kept(), {
      [SAVE]: (body) =>
        isMoved
          ? new Refusal('draft-moved', { data: theirs })
          : { rev: (body as { rev: number }).rev + 1, savedAt: '2026-06-10T09:41:00.000Z' },
    });
    await userEvent.type(screen.getByLabelText('Dosing weight'), '1');
    const table = await screen.findByRole('table', { name: 'Entries that differ' }, { timeout: 3000 });
    expect(within(table).getByText('16.41 kg')).toBeInTheDocument();
    expect(within(table).getByText('15.9 kg')).toBeInTheDocument();
    isMoved = false;
    await userEvent.click(screen.getByRole('button', { name: 'Go on with this page' }));
    await waitFor(() => expect(api.of(SAVE).at(-1)).toMatchObject({ rev: 7, form: { weightKg: '16.41' } }));
    expect(screen.queryByRole('table', { name: 'Entries that differ' })).not.toBeInTheDocument();
  });

  it('shuts the lock-in with the reason where the order has moved on', async () => {
    const acts = [{ act: 'lock-in' as const, allowed: false, words: 'Someone else has locked in figures.' }];
    const api = await openCovered({ ...kept(), acts });
    expect(lockInButton()).toHaveAttribute('aria-disabled', 'true');
    expect(lockInButton()).toHaveAccessibleDescription('Someone else has locked in figures.');
    await userEvent.click(lockInButton());
    expect(screen.queryByText('Lock in these figures?')).not.toBeInTheDocument();
    expect(api.of(LOCK_IN)).toEqual([]);
  });
});

describe('locking in', () => {
  it('asks once, sends what stands in the form, then shows both sets', async () => {
    const uncovered = uncoveredPage(signedContent(), maintenanceForm());
    let isLocked = false;
    const api = await openCovered(kept(), {
      [PAGE]: () => (isLocked ? uncovered : kept()),
      [LOCK_IN]: () => {
        isLocked = true;
        return uncovered;
      },
    });
    await userEvent.click(lockInButton());
    expect(screen.getByText('Yours can’t be changed after that.')).toBeInTheDocument();
    expect(api.of(LOCK_IN)).toEqual([]);
    expect(document.body.innerHTML).not.toContain('Castellane');
    await userEvent.click(lockInButton());
    expect(await screen.findByRole('heading', { name: 'Both sets agree' })).toHaveFocus();
    expect(api.of(LOCK_IN)).toEqual([{ form: maintenanceForm() }]);
    expect(screen.getByText(AUTHOR.name, { selector: 'b' })).toBeInTheDocument();
  });

  it('tells a wrong child beside the re-entered entries', async () => {
    const detail = 'The age you entered does not fit this child.';
    await openCovered(kept({ age: '5' }), {
      [LOCK_IN]: () =>
        new Refusal('wrong-child', {
          detail,
          errors: [{ pointer: '/form/age', detail: 'This does not fit this child.' }],
        }),
    });
    await userEvent.click(lockInButton());
    await userEvent.click(lockInButton());
    const child = screen.getByRole('group', { name: /^Child/ });
    expect(await within(child).findByText(detail)).toBeInTheDocument();
    await waitFor(() => expect(screen.getByLabelText('Age')).toHaveFocus());
    expect(screen.getByLabelText('Age')).toBeInvalid();
    expect(screen.queryByText('Lock in these figures?')).not.toBeInTheDocument();
  });
});

describe('after lock-in', () => {
  const password = () => screen.getByLabelText('Your password, again');

  it('signs an agreeing check with the password typed again', async () => {
    const page = uncoveredPage(signedContent(), maintenanceForm());
    const api = await open(page, { [SIGN]: () => ({ state: 'signed' }) });
    expect(await screen.findByText(/Sign by 10:59/)).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: 'Sign this check' }));
    expect(api.of(SIGN)).toEqual([]);
    expect(password()).toHaveAccessibleDescription('Type your password.');
    await userEvent.type(password(), 'salt and marsh');
    await userEvent.click(screen.getByRole('button', { name: 'Sign this check' }));
    expect(await screen.findByRole('heading', { name: /Signed/ })).toHaveFocus();
    expect(api.of(SIGN)).toEqual([
      { contentSha256: 'a'.repeat(64), acceptReason: null, password: 'salt and marsh' },
    ]);
  });

  it('accepts a differing choice only with a reason', async () => {
    const page = uncoveredPage(signedContent({ fraction: 'full' }), maintenanceForm());
    const api = await open(page, { [SIGN]: () => ({ state: 'signed' }) });
    const button = await screen.findByRole('button', { name: 'Accept this choice and sign' });
    await userEvent.type(password(), 'salt and marsh');
    await userEvent.click(button);
    expect(api.of(SIGN)).toEqual([]);
    await userEvent.type(screen.getByLabelText('Your reason, in a sentence'), 'Sodium was rising');
    await userEvent.click(button);
    await waitFor(() => expect(api.of(SIGN)).toHaveLength(1));
    expect(api.of(SIGN)[0]).toMatchObject({ acceptReason: 'Sodium was rising' });
  });

  it('returns a differing choice with the reason and what it is about', async () => {
    const page = uncoveredPage(signedContent({ fraction: 'full' }), maintenanceForm());
    const RETURN = `POST /api/checks/${VERSION}/return`;
    const api = await open(page, { [RETURN]: () => ({ ok: true }) });
    await userEvent.type(await screen.findByLabelText('Your reason, in a sentence'), 'ADH risk is raised');
    await userEvent.click(screen.getByRole('button', { name: /Return to prescriber/ }));
    await waitFor(() => expect(api.of(RETURN)).toEqual([{ what: 'fraction', reason: 'ADH risk is raised' }]));
  });

  it('leaves nothing to sign where facts differ: both values, the distance, and the slip', async () => {
    // 15.9 kg: 1295 mL in full, 80 % 1036 mL, 43.2 mL/h; Holliday & Segar 1957
    const yours = maintenanceForm({ weightKg: '15.9', rate: '43.2', volumeMl: '1037' });
    const SLIP = `POST /api/checks/${VERSION}/slip`;
    const api = await open(uncoveredPage(signedContent(), yours), { [SLIP]: () => ({ ok: true }) });
    expect(await screen.findByRole('heading', { name: 'The weights do not agree' })).toBeInTheDocument();
    const row = screen.getByRole('row', { name: /^Weight/ });
    expect(row).toHaveTextContent(/16\.4.*15\.9.*0\.5 kg apart/);
    expect(screen.queryByRole('button', { name: /Sign/ })).not.toBeInTheDocument();
    expect(screen.getAllByRole('img', { name: /Brim gauge/ })).toHaveLength(2);
    await userEvent.click(screen.getByRole('button', { name: /I made a slip/ }));
    await userEvent.type(screen.getByLabelText('What the slip was'), 'Read the old weight');
    await userEvent.click(screen.getByRole('button', { name: 'Record the slip and pass the check on' }));
    await waitFor(() => expect(api.of(SLIP)).toEqual([{ reason: 'Read the old weight' }]));
  });
});
