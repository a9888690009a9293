import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Variant } from '../../../../shared/contracts/api';
import {
  measureWords,
  provedText,
  provedTo,
  rangesOfRun,
  reserveFigure,
  reserveOf,
  RUN_STATE_WORDS,
  verdictOf,
  verdictWords,
  withUnit,
} from '../../core/answers';
import { MomentView } from '../../core/words';
import { VerdictMark } from '../../ui/figures';

export type ListedScenario = Variant['scenarios'][number];

/** The scenarios of a variant, each with the answer of its newest run. */
@Component({
  selector: 'app-scenario-table',
  imports: [MomentView, RouterLink, VerdictMark],
  templateUrl: './scenario-table.html',
  styles: `
    .verdict {
      display: inline-flex;
      align-items: center;
      gap: 0.4375rem;
    }
    .figure {
      font-size: 1.0625rem;
      font-stretch: 75%;
      font-weight: 680;
    }
    .short {
      color: var(--limit);
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScenarioTable {
  readonly scenarios = input.required<readonly ListedScenario[]>();
  readonly mayRun = input(false);
  readonly run = output<ListedScenario>();

  protected readonly verdictOf = verdictOf;
  protected readonly verdictWords = verdictWords;
  protected readonly stateWords = RUN_STATE_WORDS;
  protected readonly measureWords = measureWords;

  protected isBusy({ run }: ListedScenario): boolean {
    return run?.state === 'queued' || run?.state === 'running';
  }

  protected proved({ run }: ListedScenario): string {
    const ranges = rangesOfRun(run);
    return ranges === undefined ? '' : withUnit(provedText(ranges), run?.unit);
  }

  protected reserve({ run }: ListedScenario): { text: string; short: boolean } | undefined {
    const ranges = rangesOfRun(run);
    const reserve = ranges && reserveOf(ranges);
    return reserve === undefined
      ? undefined
      : { text: withUnit(reserveFigure(reserve), run?.unit), short: reserve < 0 };
  }

  protected plate({ run }: ListedScenario): string {
    return run === null || run.plate === null ? '' : withUnit(provedTo(run.plate), run.unit);
  }
}
