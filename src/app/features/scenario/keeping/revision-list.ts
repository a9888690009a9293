import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { ListedRevision } from '../../../../../shared/contracts/api';
import { RUN_STATE_WORDS, verdictOf, verdictWords } from '../../../core/answers';
import { MomentView } from '../../../core/words';

/** Every saved revision, newest first, with the answer of its newest run. */
@Component({
  selector: 'app-revision-list',
  imports: [MomentView, RouterLink],
  template: `
    <table class="table padded stacks">
      <thead>
        <tr>
          <th scope="col">Revision</th>
          <th scope="col">Saved</th>
          <th scope="col">By</th>
          <th scope="col">Note</th>
          <th scope="col">Answer</th>
        </tr>
      </thead>
      <tbody>
        @for (revision of revisions(); track revision.number) {
          <tr>
            <th scope="row">
              @if (revision.number === shown()) {
                <span aria-current="true">Revision {{ revision.number }}, shown</span>
              } @else {
                <a
                  [routerLink]="[]"
                  [queryParams]="{ revision: revision.number === head() ? null : revision.number }"
                  queryParamsHandling="merge"
                  >Revision {{ revision.number }}</a
                >
              }
            </th>
            <td data-label="Saved"><app-moment [at]="revision.at" /></td>
            <td data-label="By">{{ revision.author }}</td>
            <td class="second note" [attr.data-label]="revision.note ? 'Note' : null">{{ revision.note }}</td>
            <td data-label="Answer">{{ answer(revision) }}</td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    .note {
      overflow-wrap: anywhere;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RevisionList {
  readonly revisions = input.required<readonly ListedRevision[]>();
  readonly shown = input.required<number>();
  readonly head = input.required<number>();

  protected answer({ run }: ListedRevision): string {
    const verdict = verdictOf(run);
    if (verdict !== undefined) return verdictWords(verdict);
    return run === null ? 'Not run yet' : RUN_STATE_WORDS[run.state];
  }
}
