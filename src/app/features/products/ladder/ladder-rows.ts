import type { RunSummary, Variant } from '../../../../../shared/contracts/api';
import { findUnit, fromSi, toSi } from '../../../../../shared/units';
import { measureWords, rangesOfRun, reserveOf } from '../../../core/answers';
import type { PayloadRanges } from '../../../ui/figures';
import { sortRows, type SortOrder } from '../../../ui/table';

/** A rung: one scenario of one variant, or a variant that has none yet. */
export interface LadderRow {
  readonly key: string;
  readonly variantId: string;
  readonly variant: string;
  readonly scenarioId: string | undefined;
  readonly scenario: string;
  readonly run: RunSummary | null;
  /** In the ladder's unit. */
  readonly ranges: PayloadRanges | undefined;
  readonly reserve: number | undefined;
  readonly firstToGo: string;
}

export interface Ladder {
  readonly rows: readonly LadderRow[];
  /** The unit that all figures are in; null where none is known. */
  readonly unit: string | null;
  /** The largest value that the scale should show. */
  readonly most: number;
}

/** A range proved far beyond every rating is cut: the ratings are what people compare. */
const MOST_RATINGS_SHOWN = 2.2;

export function ladderOf(variants: readonly Variant[]): Ladder {
  const runs = variants.flatMap(({ scenarios }) => scenarios.map(({ run }) => run));
  const unit = runs.find((run) => run !== null && run.unit !== null)?.unit ?? null;
  const rows = variants.flatMap((variant): LadderRow[] => {
    const of = { variantId: variant.id, variant: variant.name };
    if (variant.scenarios.length === 0) {
      return [
        {
          ...of,
          key: variant.id,
          scenarioId: undefined,
          scenario: '',
          run: null,
          ranges: undefined,
          reserve: undefined,
          firstToGo: '',
        },
      ];
    }
    return variant.scenarios.map(({ id, name, run }) => {
      const ranges = convertRanges(rangesOfRun(run), run?.unit ?? null, unit);
      return {
        ...of,
        key: id,
        scenarioId: id,
        scenario: name,
        run,
        ranges,
        reserve: ranges && reserveOf(ranges),
        firstToGo: run?.limiting === null || run === null ? '' : measureWords(run.limiting),
      };
    });
  });
  return { rows, unit, most: mostShown(rows) };
}

export function sortLadder(rows: readonly LadderRow[], { column, falling }: SortOrder): LadderRow[] {
  return sortRows(rows, (row) => sortValue(row, column), falling);
}

function sortValue(row: LadderRow, column: string): string | number | undefined {
  switch (column) {
    case 'proved':
      return row.ranges?.proved?.high;
    case 'reserve':
      return row.reserve;
    case 'first':
      return row.firstToGo === '' ? undefined : row.firstToGo;
    default:
      return `${row.variant} ${row.scenario}`;
  }
}

function mostShown(rows: readonly LadderRow[]): number {
  const shown = rows.flatMap(({ ranges }) => (ranges === undefined ? [] : [ranges]));
  const rated = Math.max(0, ...shown.map((ranges) => ranges.rated?.high ?? 0));
  const proved = Math.max(
    0,
    ...shown.map((ranges) => Math.max(ranges.proved?.high ?? 0, ranges.failsAbove ?? 0)),
  );
  return rated > 0
    ? Math.max(rated * 1.1, Math.min(proved * 1.08, rated * MOST_RATINGS_SHOWN))
    : proved * 1.1;
}

/** Undefined where the units do not convert into each other: such bars cannot hang from one scale. */
function convertRanges(
  ranges: PayloadRanges | undefined,
  from: string | null,
  to: string | null,
): PayloadRanges | undefined {
  if (ranges === undefined || from === to) return ranges;
  const source = findUnit(from ?? '');
  const target = findUnit(to ?? '');
  if (source === undefined || target === undefined || source.dimension !== target.dimension) return undefined;
  const convert = (value: number): number => fromSi(toSi(value, source), target);
  const both = (range: { low: number; high: number } | undefined) =>
    range && { low: convert(range.low), high: convert(range.high) };
  const one = (value: number | undefined) => (value === undefined ? undefined : convert(value));
  return {
    ...ranges,
    rated: both(ranges.rated),
    proved: both(ranges.proved),
    failsBelow: one(ranges.failsBelow),
    failsAbove: one(ranges.failsAbove),
  };
}
