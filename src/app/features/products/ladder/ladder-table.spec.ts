import { provideRouter } from '@angular/router';
import { render, screen, within } from '@testing-library/angular';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import type { RunSummary, Variant } from '../../../../../shared/contracts/api';
import type { SortOrder } from '../../../ui/table';
import { LadderTable } from './ladder-table';

function id(number: number): string {
  return `5f2b3a1e-7f7f-4a53-9d1b-0c5a2f4e9a${String(number).padStart(2, '0')}`;
}

function run(change: Partial<RunSummary>): RunSummary {
  return {
    id: id(1),
    state: 'done',
    at: '2025-11-30T12:04:00.000Z',
    unit: 'kg',
    verdict: 'holds',
    proof: 'proved',
    approximated: false,
    ratedLow: 40,
    ratedHigh: 480,
    provedLow: 0,
    provedHigh: 571.26,
    failsAt: 572.31,
    failsBelow: null,
    plate: null,
    limiting: 'dampingRatio',
    ...change,
  };
}

function variant(number: number, name: string, summary: RunSummary | null): Variant {
  return {
    id: id(number),
    productId: id(90),
    name,
    revision: 1,
    scenarios: [{ id: id(number + 50), name: 'Standard', revision: 1, run: summary }],
    changedAt: '2025-11-30T12:04:00.000Z',
  };
}

const variants = [
  variant(10, 'Long column', run({})),
  variant(
    11,
    'Low frame',
    run({ verdict: 'fails', ratedLow: 70, ratedHigh: 700, provedHigh: 655.1, failsAt: 656 }),
  ),
  variant(12, 'Clean-room', null),
];

async function table(order: SortOrder = { column: 'variant', falling: false }) {
  const sortBy = vi.fn();
  await render(LadderTable, {
    inputs: { variants, order },
    on: { sortBy },
    providers: [provideRouter([])],
  });
  return { sortBy, rows: () => screen.getAllByRole('row').slice(1) };
}

describe('LadderTable', () => {
  it('shows figures rounded into the proved range, and the bar in words', async () => {
    await table();
    const row = screen.getByRole('row', { name: /Long column/ });
    expect(within(row).getByText('0\u2013571.2')).toBeTruthy();
    expect(within(row).getByText('+91.2 kg')).toBeTruthy();
    expect(within(row).getByText('damping ratio')).toBeTruthy();
    expect(within(row).getByRole('img', { name: /Proved 0 to 571\.2/ })).toBeTruthy();
  });

  it('shows a missing reserve as negative', async () => {
    await table();
    expect(within(screen.getByRole('row', { name: /Low frame/ })).getByText('\u221244.9 kg')).toBeTruthy();
  });

  it('says of a scenario that was never run that it was not', async () => {
    await table();
    expect(within(screen.getByRole('row', { name: /Clean-room/ })).getByText('Not run yet')).toBeTruthy();
  });

  it('sorts by the order it is given, rows without an answer last', async () => {
    const { rows } = await table({ column: 'reserve', falling: false });
    expect(rows().map((row) => within(row).getByRole('rowheader').textContent)).toEqual([
      expect.stringContaining('Low frame'),
      expect.stringContaining('Long column'),
      expect.stringContaining('Clean-room'),
    ]);
    expect(screen.getByRole('columnheader', { name: 'Reserve' }).getAttribute('aria-sort')).toBe('ascending');
  });

  it('asks for another order at a press on a column head', async () => {
    const { sortBy } = await table();
    await userEvent.click(screen.getByRole('button', { name: /Proved/ }));
    expect(sortBy).toHaveBeenCalledWith({ column: 'proved', falling: true });
  });

  it('leads to variant and scenario', async () => {
    await table();
    expect(screen.getByRole('link', { name: 'Long column' }).getAttribute('href')).toBe(
      `/variants/${id(10)}`,
    );
    expect(screen.getAllByRole('link', { name: 'Standard' })[0].getAttribute('href')).toMatch(
      /^\/scenarios\//,
    );
  });
});
