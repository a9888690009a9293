import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import type { ScenarioDraft } from '../../../../../shared/contracts/api';
import { ChangeList } from './change-list';

/** The draft was changed in another window: both versions, and which of them goes on. */
@Component({
  selector: 'app-draft-conflict',
  imports: [ChangeList],
  template: `
    <div class="message" role="alert">
      @if (current(); as current) {
        <p class="strong-text">Another window changed this draft. From its draft to yours:</p>
        <app-change-list [before]="current.study" [after]="own()" />
      } @else {
        <p class="strong-text">Another window saved this draft as a revision, or threw it away.</p>
      }
      <div class="acts">
        <button type="button" class="button" (click)="mine.emit()">Keep mine</button>
        <button type="button" class="button" (click)="theirs.emit()">
          {{ current() ? 'Take the other' : 'Take what is saved' }}
        </button>
      </div>
    </div>
  `,
  styles: `
    .acts {
      margin-top: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DraftConflict {
  readonly current = input.required<ScenarioDraft | null>();
  readonly own = input.required<unknown>();
  readonly mine = output();
  readonly theirs = output();
}
