import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { rangesInWords, verdictWords } from '../../../core/answers';
import { LoadGauge, VerdictMark } from '../../../ui/figures';
import type { Answers } from './answers-of';

/** The answers of a run: the gauge, the two figures, what they mean for the rating, and where it fails. */
@Component({
  selector: 'app-answers-panel',
  imports: [LoadGauge, VerdictMark],
  templateUrl: './answers-panel.html',
  styleUrl: './answers-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AnswersPanel {
  readonly answers = input.required<Answers>();
  /** A newer answer is on its way: this one stays, greyed. */
  readonly renewing = input(false);
  /** Only what takes longer (light end, band stretch) is on its way. */
  readonly partial = input(false);

  protected readonly gaugeWords = computed(() => {
    const { ranges, unit } = this.answers();
    return ranges === undefined ? '' : rangesInWords(ranges, unit ?? null);
  });
  protected readonly verdictText = computed(() => verdictWords(this.answers().verdict));
}
