import { render, screen, within } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { countStates, filterRows } from '@/features/wards/components/ward-filter';
import { WardTable } from '@/features/wards/components/ward-table';
import type { OrderLine, WardRow } from '@shared/routes/children';

const order = (change: Partial<OrderLine> = {}): OrderLine => ({
  orderId: '0b0e7c3c-0000-4000-8000-000000000001',
  versionId: '0b0e7c3c-0000-4000-8000-000000000002',
  code: 'BL-260610-003',
  version: 1,
  kind: 'maintenance',
  state: 'running',
  stateSince: '2026-06-10T10:00:00.000Z',
  isOverdue: false,
  isYours: false,
  open: {
    title: 'Maintenance, four fifths',
    fluid: 'Sodium chloride 0.9% + glucose 5%',
    rateMlPerH: '44.0',
    volumeMl: '1056',
    gauge: { orderMl: '1056', brimMl: '2000', notches: ['1000'] },
    author: 'Dr A',
    overBrimText: null,
  },
  nextDue: { text: 'Lapses 12:00', at: null, isLate: false, note: '' },
  ...change,
});

const row = (surname: string, orders: OrderLine[], bed = '1'): WardRow => ({
  child: {
    id: `0b0e7c3c-0000-4000-8000-0000000000${bed.padStart(2, '0')}`,
    number: `SM 4${bed}8 207`,
    surname,
    given: 'Edie',
    ageText: '4 y',
    flags: [],
    bed,
  },
  weight: { kg: '16.400', method: 'scales', at: '2026-06-10T07:50:00.000Z', usable: true, stale: '' },
  orders,
});

const show = (rows: WardRow[]) =>
  render(
    <MemoryRouter>
      <WardTable rows={rows} zone="Europe/London" caption="Children" />
    </MemoryRouter>,
  );

describe('the ward table', () => {
  it('shows a running order with its rate, no trailing zero, against the brim in words', () => {
    show([row('Hartnoll', [order()])]);
    expect(screen.getByRole('img', { name: '1056 of 2000 mL' })).toBeDefined();
    expect(document.querySelector('.fig')?.textContent).toBe('44');
    expect(screen.getByText('Running')).toBeDefined();
  });

  it('says covered, and nothing else, of what the reader may not see', () => {
    show([row('Ekström', [order({ state: 'awaiting-check', open: null })])]);
    const line = screen.getByRole('row', { name: /Ekström/ });
    expect(within(line).getByText('Covered')).toBeDefined();
    expect(line.textContent).not.toMatch(/mL|44|1056/);
    expect(within(line).getByRole('link', { name: 'Maintenance' }).getAttribute('href')).toMatch(
      /^\/orders\//,
    );
  });

  it('leads to the form of an own draft that cannot be worked out yet, and does not call it covered', () => {
    show([row('Bellwether', [order({ state: 'draft', open: null, isYours: true })])]);
    const line = screen.getByRole('row', { name: /Bellwether/ });
    expect(within(line).queryByText('Covered')).toBeNull();
    expect(within(line).getByText('Not worked out yet')).toBeDefined();
    expect(within(line).getByRole('link', { name: 'Maintenance' }).getAttribute('href')).toMatch(
      /^\/drafts\//,
    );
  });

  it('gives a second order of the same child a row of its own', () => {
    show([
      row('Hartnoll', [
        order(),
        order({ versionId: '0b0e7c3c-0000-4000-8000-000000000009', state: 'signed' }),
      ]),
    ]);
    expect(screen.getAllByRole('row')).toHaveLength(3);
    expect(screen.getByText('also')).toBeDefined();
  });
});

describe('finding on the ward', () => {
  const rows = [
    row('Hartnoll', [order()], '2'),
    row('Ekström', [order({ state: 'awaiting-check', open: null })], '3'),
    row('Moyo', [], '14'),
  ];

  it.each([
    ['hart', ['Hartnoll']],
    ['HARTNOLL edie', ['Hartnoll']],
    ['SM 438', ['Ekström']],
    ['14', ['Moyo']],
    ['nobody', []],
    ['', ['Hartnoll', 'Ekström', 'Moyo']],
  ])('%s finds %j', (text, names) => {
    expect(filterRows(rows, text, null).map(({ child }) => child.surname)).toEqual(names);
  });

  it('shows by state, and offers only states that are there', () => {
    expect(filterRows(rows, '', 'running').map(({ child }) => child.surname)).toEqual(['Hartnoll']);
    expect(countStates(rows).map(({ state, count }) => [state, count])).toEqual([
      ['awaiting-check', 1],
      ['running', 1],
    ]);
  });
});
