import { act, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { BedsidePage } from '@/features/bedside/components/bedside-page';
import { queryClient } from '@/lib/query-client';
import { noteReachable } from '@/lib/use-online';
import { compareStep } from '@shared/bedside/compare';
import { fluidOf } from '@shared/orders/chart-facts';
import type { BedsideEntries, BedsidePage as Page, BedsideStep } from '@shared/routes/bedside';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { at } from '../../checks/support/edie';
import { mockApi, SILENCE } from '../checks/support/mock-api';
import { put } from '../checks/support/pace';
import { bedsidePage, bolusContent, me } from '../checks/support/pages';
import { showAt } from '../checks/support/show';

let visit = 0;
/** A version of its own for each test: what was typed at the bedside is kept by version. */
const nextVersion = () => `00000000-0000-4000-8000-${String((visit += 1)).padStart(12, '0')}`;

async function open(rest: Partial<Page> = {}, answers: Parameters<typeof mockApi>[0] = {}) {
  const versionId = nextVersion();
  const page = bedsidePage({ versionId, ...rest });
  const context = {
    at: at(page.now),
    zone: page.zone,
    rulebook: DEFAULT_RULEBOOK,
    products: page.products.map(fluidOf),
    infusedMl: 0,
  };
  const base = `/api/versions/${versionId}`;
  const api = mockApi({
    'GET /api/me': () => me,
    [`GET ${base}/bedside`]: () => page,
    [`POST ${base}/bedside/compare`]: (body) => {
      const { step, entries } = body as { step: BedsideStep; entries: BedsideEntries };
      return compareStep(step, page.content, entries, context);
    },
    ...Object.fromEntries(
      Object.entries(answers).map(([key, answer]) => [key.replace('BASE', base), answer]),
    ),
  });
  // the strip waits for who is signed in
  await queryClient.prefetchQuery({ queryKey: ['me'], queryFn: () => me });
  showAt('/orders/:versionId/bedside', `/orders/${versionId}/bedside`, <BedsidePage />);
  await screen.findByLabelText('The signed order');
  return { ...api, base, page };
}

const step = (name: string) => screen.getByRole('listitem', { name: new RegExp(`^${name}`) });
const compare = () => userEvent.click(screen.getByRole('button', { name: 'Compare with the order' }));
const start = () => screen.getByRole('button', { name: 'Record start' });
const agreed = (name: string) =>
  waitFor(() => expect(within(step(name)).getByText('Agrees')).toBeInTheDocument());

async function readChild(number = 'SM 418 207') {
  put('Hospital no. on the band', number);
  put('Date of birth on the band', '2022-03-14');
  await compare();
}
async function readBag(page: Page) {
  await screen.findByLabelText('What is printed on the bag');
  put('What is printed on the bag', page.content.fluid.id);
  put('Bag size', '500');
  put('Expires on', '2027-11-30');
  await compare();
}
async function readPump(rate: string, volume = '176') {
  await screen.findByLabelText('Pump number');
  put('Pump number', '0417');
  put('Rate the pump shows', rate);
  put('Volume the pump shows', volume);
  await compare();
}
async function readLine() {
  await screen.findByLabelText('Kind of line');
  put('Kind of line', 'peripheral');
  put(/^Where/, 'left hand');
  for (const name of [/^Traced/, /^Clamp/, /^Site/])
    await userEvent.click(screen.getByRole('checkbox', { name }));
  await compare();
}

afterEach(() => {
  vi.unstubAllGlobals();
  act(() => noteReachable(true));
});

describe('the bedside', () => {
  it('prefills nothing and takes the steps in their order', async () => {
    await open();
    for (const field of screen.getAllByRole('textbox')) expect(field).toHaveValue('');
    expect(screen.queryByLabelText('Rate the pump shows')).not.toBeInTheDocument();
    await readChild();
    await agreed('Child');
    expect(await screen.findByLabelText('What is printed on the bag')).toHaveValue('');
  });

  it('keeps the start shut, with the reason, until all four agree', async () => {
    const { page, of, base } = await open(
      {},
      { 'POST BASE/start': () => ({ infusionId: me.account.id, startedAt: bedsidePage().now }) },
    );
    const isShut = () => expect(start()).toHaveAttribute('aria-disabled', 'true');
    isShut();
    expect(start()).toHaveAccessibleDescription(/None of four steps agree/);
    await readChild();
    await agreed('Child');
    isShut();
    await readBag(page);
    await agreed('Bag');
    isShut();
    await readPump('44');
    await agreed('Pump');
    isShut();
    await userEvent.click(start());
    expect(of(`POST ${base}/start`)).toEqual([]);
    await readLine();
    await agreed('Line');
    expect(start()).not.toHaveAttribute('aria-disabled');
    expect(screen.getByText('All four agree with the signed order')).toBeInTheDocument();
    await userEvent.click(start());
    await waitFor(() => expect(of(`POST ${base}/start`)).toHaveLength(1));
    expect(of(`POST ${base}/start`)[0]).toMatchObject({
      witness: null,
      replacesVersionId: null,
      entries: { pump: { device: '0417', rate: '44', volume: '176' } },
    });
  });

  it('refuses a pump at ten times the order, says both figures, and opens again when it is corrected', async () => {
    const { page } = await open();
    await readChild();
    await readBag(page);
    await readPump('440');
    const pump = step('Pump');
    expect(await within(pump).findByText('Refused')).toBeInTheDocument();
    expect(within(pump).getByText(/Ten times the order/)).toBeInTheDocument();
    const rate = screen.getByLabelText('Rate the pump shows');
    await waitFor(() => expect(rate).toHaveFocus());
    expect(rate).toBeInvalid();
    expect(rate).toHaveAccessibleDescription(/Ten times the order/);
    expect(screen.getByText('Not yet: the pump shows 440 mL/h, the order says 44')).toBeInTheDocument();
    expect(screen.queryByLabelText('Kind of line')).not.toBeInTheDocument();
    await userEvent.clear(rate);
    await userEvent.type(rate, '44');
    await compare();
    await agreed('Pump');
  });

  it('refuses another child and stays at the first step', async () => {
    await open();
    await readChild('SM 418 208');
    expect(await within(step('Child')).findByText('Refused')).toBeInTheDocument();
    expect(screen.getByText('Not yet: this is not the child of the order')).toBeInTheDocument();
    expect(screen.queryByLabelText('Bag size')).not.toBeInTheDocument();
  });

  it('compares on leaving the last field, and never for a half-filled step', async () => {
    const { of, base } = await open();
    await userEvent.click(screen.getByLabelText('Who said name and date of birth'));
    await userEvent.tab();
    expect(of(`POST ${base}/bedside/compare`)).toEqual([]);
    await userEvent.type(screen.getByLabelText('Hospital no. on the band'), 'SM 418 207');
    await userEvent.type(screen.getByLabelText('Date of birth on the band'), '2022-03-14');
    await userEvent.tab();
    await userEvent.click(screen.getByLabelText('Who said name and date of birth'));
    await userEvent.tab();
    await agreed('Child');
    await waitFor(() => expect(screen.getByLabelText('What is printed on the bag')).toHaveFocus());
  });

  it('takes back what was said of the pump when the bag is read again', async () => {
    const { page } = await open();
    await readChild();
    await readBag(page);
    await readPump('44');
    await agreed('Pump');
    await userEvent.click(screen.getByRole('button', { name: 'Read again: Bag' }));
    const size = await screen.findByLabelText('Bag size');
    await userEvent.clear(size);
    await userEvent.type(size, '1000');
    await compare();
    await agreed('Bag');
    expect(within(step('Pump')).queryByText('Agrees')).not.toBeInTheDocument();
  });

  it('refuses paste into the pump’s fields', async () => {
    const { page } = await open();
    await readChild();
    await readBag(page);
    const rate = await screen.findByLabelText('Rate the pump shows');
    await userEvent.click(rate);
    await userEvent.paste('44');
    expect(rate).toHaveValue('');
  });

  it('keeps what was typed when the page is read again', async () => {
    await open();
    await userEvent.type(screen.getByLabelText('Hospital no. on the band'), 'SM 418');
    await act(() => queryClient.refetchQueries());
    expect(screen.getByLabelText('Hospital no. on the band')).toHaveValue('SM 418');
  });

  it('asks a volume and a time of a bolus by hand, and no pump', async () => {
    const content = bolusContent();
    const shelf = bedsidePage().products.find(({ name }) => name === content.fluid.name)!;
    const { page } = await open({ content: { ...content, fluid: { ...content.fluid, id: shelf.id } } });
    await readChild();
    await readBag(page);
    expect(await screen.findByLabelText('Volume to be given')).toHaveValue('');
    expect(screen.getByLabelText('Given over')).toBeInTheDocument();
    expect(screen.queryByLabelText('Pump number')).not.toBeInTheDocument();
  });

  it('asks for a witness, and for what the order replaces, before it opens', async () => {
    const older = {
      versionId: '00000000-0000-4000-8000-000000009999',
      code: 'BL-260609-012',
      version: 1,
      state: 'running' as const,
      fluid: 'Sodium chloride 0.9%',
      rateMlPerH: '52.1',
    };
    const { page, of, base } = await open(
      { witnessNeeded: true, connected: [older] },
      { 'POST BASE/start': () => ({ infusionId: me.account.id, startedAt: bedsidePage().now }) },
    );
    await readChild();
    await readBag(page);
    await readPump('44');
    await readLine();
    await agreed('Line');
    expect(start()).toHaveAccessibleDescription(/BL-260609-012 is still connected/);
    await userEvent.click(screen.getByRole('checkbox', { name: /This order replaces it/ }));
    expect(start()).toHaveAccessibleDescription(/The witness signs in first/);
    await userEvent.type(screen.getByLabelText('Witness: e-mail'), 'w@saltmarsh.example');
    await userEvent.type(screen.getByLabelText('Witness: password'), 'reed');
    await userEvent.click(start());
    await waitFor(() =>
      expect(of(`POST ${base}/start`)[0]).toMatchObject({
        witness: { email: 'w@saltmarsh.example', password: 'reed' },
        replacesVersionId: older.versionId,
      }),
    );
  });

  it.each(['lapsed', 'withdrawn', 'revised', 'awaiting-pharmacist'] as const)(
    'starts nothing on an order that is %s',
    async (state) => {
      await open({ state, acts: [{ act: 'start', allowed: false, words: 'No.' }] });
      expect(screen.getByRole('heading', { name: 'This order cannot be started here' })).toBeInTheDocument();
      expect(screen.queryByRole('button', { name: 'Record start' })).not.toBeInTheDocument();
    },
  );
});

describe('running', () => {
  const running = { state: 'running' as const, acts: [{ act: 'hold' as const, allowed: true, words: '' }] };
  const touchStop = () => userEvent.click(screen.getByRole('button', { name: 'Stop the infusion' }));

  it('sends a stop at one touch, and asks for the reason afterwards', async () => {
    const { of, base } = await open(running, {
      'POST BASE/stop': () => ({
        stoppedAt: '2026-06-10T11:40:00.000Z',
        stoppedBy: 'Ruth Ansah',
        reasonOwed: true,
      }),
      'POST BASE/stop-reason': () => ({ ok: true }),
    });
    await touchStop();
    expect(of(`POST ${base}/stop`)).toEqual([{ reason: '', volumeInfusedMl: null }]);
    expect(await screen.findByRole('heading', { name: /^Stopped at/ })).toHaveTextContent(
      'Stopped at 12:40, recorded by Ruth Ansah',
    );
    await userEvent.type(screen.getByLabelText('Reason'), 'Swollen hand');
    await userEvent.type(screen.getByLabelText(/^Volume infused/), '31.5');
    await userEvent.click(screen.getByRole('button', { name: 'Record the reason' }));
    await waitFor(() =>
      expect(of(`POST ${base}/stop-reason`)).toEqual([{ reason: 'Swollen hand', volumeInfusedMl: '31.5' }]),
    );
  });

  it('says to stop by hand when nobody answers, with the time, and tries again with the same key', async () => {
    let isDown = true;
    const { keysOf, base } = await open(running, {
      'POST BASE/stop': () =>
        isDown
          ? SILENCE
          : { stoppedAt: '2026-06-10T11:41:00.000Z', stoppedBy: 'Ruth Ansah', reasonOwed: false },
    });
    await touchStop();
    const alert = await screen.findByText('Stop the pump by hand; not recorded.');
    expect(alert.parentElement).toHaveTextContent(/You touched Stop at \d\d:\d\d/);
    isDown = false;
    await userEvent.click(screen.getByRole('button', { name: 'Record the stop again' }));
    expect(await screen.findByText(/Stopped at 12:41/)).toBeInTheDocument();
    const [first, second] = keysOf(`POST ${base}/stop`);
    expect(first).toBeTruthy();
    expect(second).toBe(first);
  });
});
