import type { MapGrid } from '../engine-task';

/** Each grid has about four times the nodes of the one before. */
const REFINEMENT = 2;
const FEWEST_NODES = 5;
/** What else runs on the machine may slow a grid down against the one before. */
const CAUTION = 1.5;

function coarser(count: number, times: number): number {
  return Math.min(count, Math.max(FEWEST_NODES, Math.ceil((count - 1) / REFINEMENT ** times) + 1));
}

/** Grids up to the wanted one, coarsest first. */
export function gridLadder({ columns, rows }: MapGrid): { columns: number; rows: number }[] {
  const ladder = [{ columns, rows }];
  for (let times = 1; ; times++) {
    const next = { columns: coarser(columns, times), rows: coarser(rows, times) };
    const last = ladder[0];
    if (next.columns === last.columns && next.rows === last.rows) return ladder;
    ladder.unshift(next);
  }
}

/**
 * The finest grid that is done in time. Grids are computed from the coarsest on, so that there is an answer
 * whatever happens; a finer one is begun where the last one tells that it will be done in time.
 *
 * @param until the moment on the clock, both in milliseconds
 */
export function finestUntil<T>(
  grid: MapGrid,
  until: number,
  clock: () => number,
  compute: (grid: { columns: number; rows: number }) => T,
): T {
  const [coarsest, ...finer] = gridLadder(grid);
  let begun = clock();
  let answer = compute(coarsest);
  let nodes = coarsest.columns * coarsest.rows;
  for (const next of finer) {
    const now = clock();
    const count = next.columns * next.rows;
    if (now + CAUTION * ((now - begun) / nodes) * count > until) break;
    begun = now;
    nodes = count;
    answer = compute(next);
  }
  return answer;
}
