import { configure, screen, waitFor, within } from '@testing-library/react';
import { userEvent } from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { bolusForm, heavyContext, IDS, maintenanceForm, makeContext, makeDraft } from './make-draft';
import { problem, savesIn, serveDraft } from './fake-server';
import { renderDraft, results } from './render-draft';

const SIGN = 'Sign and ask for a check';
const field = (name: string) => screen.getByLabelText(name);
const type = async (name: string, text: string) => {
  await user.clear(field(name));
  await user.type(field(name), text);
};

// the pages are large and the machine may be busy
vi.setConfig({ testTimeout: 20_000 });
// asking for hidden elements too spares a style computation for every element of a large page
configure({ defaultHidden: true, asyncUtilTimeout: 10_000 });
const user = userEvent.setup({ delay: null });

beforeEach(() => {
  Element.prototype.scrollIntoView = vi.fn();
});
afterEach(() => vi.unstubAllGlobals());

describe('the order form as it is typed', () => {
  it('works the figures out at every key', async () => {
    serveDraft(makeDraft(maintenanceForm({ fraction: 'full', fractionReason: 'Seen with a consultant.' })));
    await renderDraft();
    // 16.4 kg: 1000 + 320 mL, less 70 mL, over 24 h: 52.08; Holliday & Segar 1957
    expect(within(results()).getByText('Set the pump to')).toBeInTheDocument();
    expect(results()).toHaveTextContent('52.1mL/h');
    await type('Drug volumes, mL in 24 hours', '264');
    // 1056 ÷ 24
    expect(results()).toHaveTextContent('44mL/h');
    expect(results()).not.toHaveTextContent('44.0');
  });

  it('shows what each fraction comes to, whatever else is missing', async () => {
    serveDraft(makeDraft(maintenanceForm({ feedsMl: '', drugsMl: '', productId: '', reason: '' })));
    await renderDraft();
    const strip = screen.getByRole('radiogroup', { name: 'Fraction of full maintenance' });
    // two thirds of 1320 is 880, never 66 % of it
    for (const text of ['1320', '1056', '880', '660']) expect(strip).toHaveTextContent(`${text} mL`);
  });

  it('leaves the figures blank while an entry is missing, and names it', async () => {
    serveDraft(makeDraft(maintenanceForm({ feedsMl: '' })));
    await renderDraft();
    expect(results()).toHaveTextContent('Nothing is worked out yet');
    expect(results()).not.toHaveTextContent('mL/h');
    await user.click(within(results()).getByRole('button', { name: 'Feeds and drinks' }));
    expect(field('Feeds and drinks, mL in 24 hours')).toHaveFocus();
    await user.keyboard('0');
    expect(results()).toHaveTextContent('Set the pump to');
  });

  it('refuses a comma with its reason when the field is left, and repairs nothing', async () => {
    serveDraft(makeDraft(maintenanceForm()));
    await renderDraft();
    await type('Drug volumes, mL in 24 hours', '7,5');
    expect(screen.queryByRole('alert')).not.toBeInTheDocument();
    await user.tab();
    expect(await screen.findByRole('alert')).toHaveTextContent('Use a point, not a comma: 7.5');
    expect(field('Drug volumes, mL in 24 hours')).toHaveValue('7,5');
    expect(results()).toHaveTextContent('Nothing is worked out yet');
  });

  it('takes the dose by the box typed last and shows what the other comes to', async () => {
    const context = makeContext();
    serveDraft(makeDraft(bolusForm(), { context: { ...context, child: { ...context.child, flags: [] } } }));
    await renderDraft();
    expect(results()).toHaveTextContent('164mL');
    expect(field('Volume')).toHaveAttribute('placeholder', '164');
    await type('Volume', '82');
    expect(field('Dose by weight')).toHaveValue('');
    expect(field('Dose by weight')).toHaveAttribute('placeholder', '5');
    expect(results()).toHaveTextContent('82mL');
  });

  it('chooses no potassium by itself when the new base has several bags', async () => {
    serveDraft(makeDraft(maintenanceForm({ productId: '' })));
    await renderDraft();
    await user.selectOptions(field('Base fluid'), 'Sodium chloride 0.9% + glucose 5%');
    expect(results()).toHaveTextContent('Nothing is worked out yet');
    await user.click(screen.getByRole('radio', { name: '40' }));
    expect(results()).toHaveTextContent('potassium chloride 40 mmol/L');
  });
});

describe('over the brim', () => {
  it('takes the sign button away, says why and offers what is allowed', async () => {
    serveDraft(makeDraft(bolusForm(), { context: heavyContext() }));
    await renderDraft();
    // 62 kg × 10 mL/kg = 620, one bolus holds 500 mL: common practice
    expect(screen.queryByRole('button', { name: SIGN })).not.toBeInTheDocument();
    expect(screen.getByText(/This order cannot be signed/)).toHaveTextContent(
      '620 mL is 120 mL over the brim.',
    );
    expect(results()).toHaveTextContent('620mL asked for');
    expect(field('Dose by weight')).toHaveValue('10');
    const [offer] = screen.getAllByRole('button', { name: 'Set to 500 mL (8.1 mL/kg)' });
    await user.click(offer!);
    expect(field('Volume')).toHaveValue('500');
    expect(screen.getByRole('button', { name: SIGN })).toBeInTheDocument();
  });
});

describe('a reason owed', () => {
  it('shuts the sign button until it is given', async () => {
    serveDraft(makeDraft(maintenanceForm({ fraction: 'full' })));
    await renderDraft();
    const sign = screen.getByRole('button', { name: SIGN });
    expect(sign).toHaveAttribute('aria-disabled', 'true');
    expect(sign).toHaveAccessibleDescription(/A reason is owed/);
    await user.click(sign);
    expect(screen.queryByRole('heading', { name: 'Sign, and ask for a check' })).not.toBeInTheDocument();
    expect(field('Why 100% for this child')).toHaveFocus();
    await user.keyboard('Seen with a consultant');
    expect(screen.getByRole('button', { name: SIGN })).not.toHaveAttribute('aria-disabled');
  });

  it('asks for a senior instead of signing where a limit needs one', async () => {
    // 60 mL/h where the method gives 52.08: above a pump step, under 1.5 times; ours
    serveDraft(
      makeDraft(maintenanceForm({ fraction: 'full', fractionReason: 'Drain losses', typedRate: '60' })),
    );
    await renderDraft();
    expect(screen.queryByRole('button', { name: SIGN })).not.toBeInTheDocument();
    await user.click(screen.getByRole('button', { name: 'Ask a senior to agree' }));
    expect(screen.getByRole('heading', { name: 'A senior has to agree' })).toHaveFocus();
  });
});

describe('signing', () => {
  const signPath = `POST /api/versions/${IDS.version}/sign`;
  const openPanel = () => user.click(screen.getByRole('button', { name: SIGN }));
  const password = () => screen.getByLabelText('Your password, again');

  it('sends what was seen, after everything typed is kept, and goes to the order', async () => {
    const sent = serveDraft(makeDraft(maintenanceForm()), {
      [signPath]: () => ({ body: { state: 'awaiting-check', checkDueAt: '2026-06-10T10:42:00.000Z' } }),
    });
    const router = await renderDraft();
    await type('Drug volumes, mL in 24 hours', '0');
    await openPanel();
    expect(screen.getByText(/Maintenance for a weight of 16.4 kilograms/)).toHaveTextContent('(forty-four)');
    await user.type(password(), 'a password{Enter}');
    expect(sent.some(({ path }) => path.endsWith('/sign'))).toBe(false);
    await user.click(screen.getByRole('button', { name: SIGN }));
    await waitFor(() => expect(router.state.location.pathname).toBe(`/orders/${IDS.version}`));
    const saves = savesIn(sent);
    const sign = sent.find(({ path }) => path.endsWith('/sign'));
    expect(sign?.body).toEqual({
      rev: 3 + saves.length,
      seen: { rateMlPerH: '44.0', volumeMl: '1056.0', rulebook: 1 },
      password: 'a password',
    });
    expect(sent.indexOf(saves.at(-1)!)).toBeLessThan(sent.indexOf(sign!));
  });

  it('keeps everything when the password is wrong', async () => {
    serveDraft(makeDraft(maintenanceForm()), { [signPath]: () => problem('password-wrong', 403) });
    await renderDraft();
    await openPanel();
    await user.type(password(), 'not it');
    await user.click(screen.getByRole('button', { name: SIGN }));
    await waitFor(() => expect(password()).toHaveFocus());
    expect(password()).toBeInvalid();
    expect(results()).toHaveTextContent('41.1mL/h');
  });

  it('repeats a lost request with its key, and makes a new one after an answer', async () => {
    let turn = 0;
    const sent = serveDraft(makeDraft(maintenanceForm()), {
      [signPath]: () => {
        turn += 1;
        if (turn === 1) throw new TypeError('the line is down');
        return problem('checker-unfit', 422);
      },
    });
    await renderDraft();
    await openPanel();
    await user.type(password(), 'a password');
    for (const words of [/not known whether this was recorded/, /checker-unfit/, /checker-unfit/]) {
      await user.click(screen.getByRole('button', { name: SIGN }));
      expect(await screen.findByText(words)).toBeInTheDocument();
      await waitFor(() =>
        expect(screen.getByRole('button', { name: SIGN })).not.toHaveAttribute('aria-busy'),
      );
    }
    await waitFor(() => expect(turn).toBe(3));
    const keys = sent.filter(({ path }) => path.endsWith('/sign')).map(({ key }) => key);
    expect(keys[0]).toBe(keys[1]);
    expect(keys[2]).not.toBe(keys[1]);
  });
});
