import { act, configure, screen, waitFor, within } from '@testing-library/react';
import { userEvent } from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { DraftSaver } from '@/features/orders/api/draft-saver';
import { maintenanceForm, makeDraft, IDS, NOW } from './make-draft';
import { problem, savesIn, serve, serveDraft } from './fake-server';
import { renderDraft } from './render-draft';

const DRAFT = `/api/drafts/${IDS.version}`;
const mine = maintenanceForm({ drugsMl: '70' });
const theirs = maintenanceForm({ drugsMl: '120', feedsNote: 'Two bottles' });

// the pages are large and the machine may be busy
vi.setConfig({ testTimeout: 20_000 });
// asking for hidden elements too spares a style computation for every element of a large page
configure({ defaultHidden: true, asyncUtilTimeout: 10_000 });
const user = userEvent.setup({ delay: null });

beforeEach(() => {
  Element.prototype.scrollIntoView = vi.fn();
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

describe('one draft in two places', () => {
  const moved = () => {
    let reads = 0;
    let saves = 0;
    return serveDraft(makeDraft(mine), {
      [`GET ${DRAFT}`]: () => {
        reads += 1;
        return { body: reads === 1 ? makeDraft(mine) : makeDraft(theirs, { rev: 9 }) };
      },
      [`PUT ${DRAFT}`]: (body) => {
        saves += 1;
        const { rev } = body as { rev: number };
        return saves === 1
          ? problem('draft-moved', 409)
          : { body: { rev: rev + 1, savedAt: NOW, exceptionsVoided: false } };
      },
    });
  };

  it('shows both texts entry by entry and sends nothing before a choice', async () => {
    const sent = moved();
    await renderDraft();
    await user.type(screen.getByLabelText('Drug volumes, mL in 24 hours'), '5');
    const table = await screen.findByRole('table', { name: 'Entries that differ' }, { timeout: 3000 });
    expect(within(table).getByRole('radio', { name: '705' })).not.toBeChecked();
    expect(within(table).getByRole('radio', { name: '120' })).not.toBeChecked();
    expect(within(table).getByRole('radio', { name: 'Two bottles' })).toBeInTheDocument();
    expect(screen.getByLabelText('Drug volumes, mL in 24 hours')).toHaveValue('705');
    expect(savesIn(sent)).toHaveLength(1);
    expect(screen.getByRole('button', { name: 'Go on with what I chose' })).toHaveAttribute(
      'aria-disabled',
      'true',
    );

    await user.click(within(table).getByRole('radio', { name: '120' }));
    await user.click(within(table).getByRole('radio', { name: 'Sips only, not counted' }));
    await user.click(screen.getByRole('button', { name: 'Go on with what I chose' }));
    expect(screen.getByLabelText('Drug volumes, mL in 24 hours')).toHaveValue('120');
    await waitFor(() => expect(savesIn(sent)).toHaveLength(2));
    // made from their revision, with one entry of each
    expect(savesIn(sent)[1]?.body).toMatchObject({
      rev: 9,
      form: { drugsMl: '120', feedsNote: 'Sips only, not counted' },
    });
  });

  it('takes all of the other place without a save of its own', async () => {
    const sent = moved();
    await renderDraft();
    await user.type(screen.getByLabelText('Drug volumes, mL in 24 hours'), '5');
    await user.click(
      await screen.findByRole('button', { name: 'Take all of the other place' }, { timeout: 3000 }),
    );
    expect(screen.getByLabelText('Drug volumes, mL in 24 hours')).toHaveValue('120');
    expect(screen.queryByRole('table', { name: 'Entries that differ' })).not.toBeInTheDocument();
    expect(savesIn(sent)).toHaveLength(1);
  });
});

describe('keeping a draft', () => {
  const start = { versionId: IDS.version, rev: 3, savedAt: NOW, form: mine };
  const saved = (body: unknown) => ({
    body: { rev: (body as { rev: number }).rev + 1, savedAt: NOW, exceptionsVoided: false },
  });

  it('waits for a pause of 600 ms after the last key', async () => {
    vi.useFakeTimers();
    const sent = serve({ [`PUT ${DRAFT}`]: saved });
    const saver = new DraftSaver(start);
    saver.change({ ...mine, drugsMl: '7' });
    await vi.advanceTimersByTimeAsync(599);
    saver.change({ ...mine, drugsMl: '75' });
    await vi.advanceTimersByTimeAsync(599);
    expect(sent).toHaveLength(0);
    expect(saver.isKept).toBe(false);
    await vi.advanceTimersByTimeAsync(1);
    expect(sent).toHaveLength(1);
    expect(saver.isKept).toBe(true);
    expect(saver.snapshot().phase).toBe('kept');
  });

  it('repeats a lost save as it was, with its key, before newer text goes out', async () => {
    vi.useFakeTimers();
    let turn = 0;
    const sent = serve({
      [`PUT ${DRAFT}`]: (body) => {
        turn += 1;
        if (turn === 1) throw new TypeError('the line is down');
        return saved(body);
      },
    });
    const saver = new DraftSaver(start);
    saver.change({ ...mine, drugsMl: '75' });
    await vi.advanceTimersByTimeAsync(600);
    expect(saver.snapshot()).toMatchObject({ phase: 'unsent' });
    expect(saver.snapshot().words).toContain('does not answer');
    saver.change({ ...mine, drugsMl: '76' });
    await vi.advanceTimersByTimeAsync(10_000);
    expect(sent.map(({ body }) => (body as { form: typeof mine }).form.drugsMl)).toEqual(['75', '75', '76']);
    expect(sent[1]?.key).toBe(sent[0]?.key);
    expect(sent[2]?.key).not.toBe(sent[0]?.key);
    expect(saver.rev).toBe(5);
    expect(saver.snapshot().words).toBe('');
  });

  it('takes over in silence where both places hold the same text', async () => {
    vi.useFakeTimers();
    const typed = { ...mine, drugsMl: '75' };
    serve({
      [`PUT ${DRAFT}`]: () => problem('draft-moved', 409),
      [`GET ${DRAFT}`]: () => ({ body: makeDraft(typed, { rev: 8 }) }),
    });
    const saver = new DraftSaver(start);
    saver.change(typed);
    await act(() => vi.advanceTimersByTimeAsync(600));
    expect(saver.snapshot()).toMatchObject({ phase: 'kept', theirs: null });
    expect(saver.rev).toBe(8);
  });

  it('stops and says so when the draft is one no longer', async () => {
    vi.useFakeTimers();
    const sent = serve({ [`PUT ${DRAFT}`]: () => problem('order-state', 409) });
    const saver = new DraftSaver(start);
    saver.change({ ...mine, drugsMl: '75' });
    await vi.advanceTimersByTimeAsync(60_000);
    expect(sent).toHaveLength(1);
    expect(saver.snapshot()).toMatchObject({ phase: 'refused', words: 'refused: order-state' });
  });
});
