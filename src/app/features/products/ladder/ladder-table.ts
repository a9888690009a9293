import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RunSummary, Variant } from '../../../../../shared/contracts/api';
import { provedText, rangesInWords, reserveFigure, RUN_STATE_WORDS, withUnit } from '../../../core/answers';
import { LadderBar, LadderScale, type PayloadRanges } from '../../../ui/figures';
import { scaleFromZero } from '../../../ui/scale/ticks';
import { SortHeader, type SortOrder } from '../../../ui/table';
import { ladderOf, sortLadder } from './ladder-rows';

/** The variant ladder: for every variant the rated range against the proved range, all on one scale. */
@Component({
  selector: 'app-ladder-table',
  imports: [LadderBar, LadderScale, RouterLink, SortHeader],
  templateUrl: './ladder-table.html',
  styleUrl: './ladder-table.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LadderTable {
  readonly variants = input.required<readonly Variant[]>();
  readonly order = input.required<SortOrder>();
  readonly sortBy = output<SortOrder>();

  protected readonly ladder = computed(() => ladderOf(this.variants()));
  protected readonly rows = computed(() => sortLadder(this.ladder().rows, this.order()));
  protected readonly scale = computed(() => scaleFromZero(this.ladder().most, 5));
  protected readonly unit = computed(() => this.ladder().unit);
  protected readonly hasBars = computed(() => this.rows().some((row) => row.ranges !== undefined));

  protected readonly proved = provedText;

  protected words(ranges: PayloadRanges): string {
    return rangesInWords(ranges, this.unit());
  }

  protected reserve(value: number): string {
    return withUnit(reserveFigure(value), this.unit());
  }

  /** What stands in place of a bar. */
  protected withoutAnswer(run: RunSummary | null): string {
    if (run === null) return 'Not run yet';
    return run.verdict === null ? RUN_STATE_WORDS[run.state] : 'In another unit: open it to see the figures';
  }
}
