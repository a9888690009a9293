import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { scenarioRevisionSchema, type ScenarioRevision } from '../../../../../shared/contracts/api';
import { Refusal } from '../../../core/api';
import { MomentView } from '../../../core/words';
import { ChangeList } from './change-list';

/** Somebody saved first: what they changed, what one changed oneself, and that neither is lost. */
@Component({
  selector: 'app-saved-meanwhile',
  imports: [ChangeList, MomentView],
  template: `
    @let newer = this.newer();
    <div class="form-fault" role="alert">
      <p>
        {{ newer.author }} saved revision {{ newer.number }} meanwhile (<app-moment [at]="newer.at" />). It
        changed:
      </p>
      <app-change-list [before]="started()" [after]="newer.study" />
      @if (own() !== undefined) {
        <p>Yours changes:</p>
        <app-change-list [before]="started()" [after]="own()" />
      }
      <p>Both stay: yours becomes revision {{ newer.number + 1 }} if you save again.</p>
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SavedMeanwhile {
  readonly newer = input.required<ScenarioRevision>();
  /** What both sides began from. */
  readonly started = input.required<unknown>();
  readonly own = input<unknown>();
}

/** What somebody else saved, where that is why a save was refused. */
export function newerRevision(error: unknown): ScenarioRevision | undefined {
  if (!(error instanceof Refusal) || error.status !== 409) return undefined;
  const read = scenarioRevisionSchema.safeParse(error.problem?.current);
  return read.success ? read.data : undefined;
}
