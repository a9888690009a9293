import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router } from '@angular/router';
import { scenarioRevisionSchema, type ListedRevision } from '../../../../../shared/contracts/api';
import {
  failsAbove,
  provedText,
  rangesOfRun,
  verdictOf,
  verdictWords,
  withUnit,
} from '../../../core/answers';
import { loaded } from '../../../core/api';
import { WhenLoaded } from '../../../ui/states';
import { studyChanges } from '../keeping/study-changes';
import { ScenarioStore } from '../store/scenario-store';

/** Two revisions, or a revision and the draft: where they differ, and what each answered. The address holds which. */
@Component({
  selector: 'app-compare-revisions',
  imports: [WhenLoaded],
  template: `
    @if (listed().length > 1 || store.hasChanges()) {
      <div class="section-head">
        <h2>Compare</h2>
        <p class="pair">
          <label
            >From
            <select class="choice" #from (change)="tell({ from: from.value })">
              @for (revision of listed(); track revision.number) {
                <option [value]="revision.number" [selected]="revision.number === fromNumber()">
                  Revision {{ revision.number }}
                </option>
              }
            </select>
          </label>
          <label
            >to
            <select class="choice" #to (change)="tell({ to: to.value })">
              @if (store.hasChanges()) {
                <option value="draft" [selected]="toDraft()">your draft</option>
              }
              @for (revision of listed(); track revision.number) {
                <option [value]="revision.number" [selected]="!toDraft() && revision.number === toNumber()">
                  Revision {{ revision.number }}
                </option>
              }
            </select>
          </label>
        </p>
      </div>
      <div class="sheet">
        <ng-container *appWhenLoaded="before; let before">
          @if (after() !== undefined) {
            <table class="table padded stacks">
              <thead>
                <tr>
                  <th scope="col">What</th>
                  <th scope="col">Revision {{ before.number }}</th>
                  <th scope="col">{{ toDraft() ? 'Your draft' : 'Revision ' + toNumber() }}</th>
                </tr>
              </thead>
              <tbody>
                @for (line of answers(); track line.label) {
                  <tr>
                    <th scope="row">{{ line.label }}</th>
                    <td data-label="From">{{ line.before }}</td>
                    <td data-label="To">{{ line.after }}</td>
                  </tr>
                }
                @for (change of changes(); track change.path) {
                  <tr>
                    <th scope="row">{{ change.path }}</th>
                    <td data-label="From">{{ change.before ?? 'nothing' }}</td>
                    <td data-label="To">{{ change.after ?? 'nothing' }}</td>
                  </tr>
                } @empty {
                  <tr>
                    <th scope="row">Study</th>
                    <td colspan="2">no difference</td>
                  </tr>
                }
              </tbody>
            </table>
          } @else {
            <ng-container *appWhenLoaded="afterSaved" />
          }
        </ng-container>
      </div>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .pair {
      display: flex;
      flex-wrap: wrap;
      gap: 0.25rem 0.5rem;
    }
    td {
      overflow-wrap: anywhere;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CompareRevisions {
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);

  protected readonly store = inject(ScenarioStore);

  private readonly query = toSignal(this.route.queryParamMap, { requireSync: true });
  protected readonly listed = computed(() => this.store.revisions.value() ?? []);
  private readonly newest = computed(() => this.listed()[0]?.number ?? 1);
  protected readonly toDraft = computed(() => {
    const to = this.query().get('to');
    return this.store.hasChanges() && (to === null || to === 'draft');
  });
  protected readonly toNumber = computed(() => this.known(this.query().get('to')) ?? this.newest());
  protected readonly fromNumber = computed(
    () =>
      this.known(this.query().get('from')) ??
      (this.toDraft() ? this.store.baseRevision() : Math.max(1, this.toNumber() - 1)),
  );

  protected readonly before = loaded(
    () => `${this.store.path()}/revisions/${this.fromNumber()}`,
    scenarioRevisionSchema,
    'this revision',
  );
  protected readonly afterSaved = loaded(
    () => (this.toDraft() ? undefined : `${this.store.path()}/revisions/${this.toNumber()}`),
    scenarioRevisionSchema,
    'this revision',
  );
  protected readonly after = computed(() =>
    this.toDraft() ? this.store.study() : this.afterSaved.value()?.study,
  );
  protected readonly changes = computed(() => studyChanges(this.before.value()?.study, this.after()));
  protected readonly answers = computed(() => {
    if (this.toDraft()) return [];
    const [before, after] = [this.fromNumber(), this.toNumber()].map((number) =>
      this.listed().find((revision) => revision.number === number),
    );
    return ANSWERS.map(({ label, text }) => ({ label, before: text(before), after: text(after) }));
  });

  protected tell(queryParams: Record<string, string>): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  private known(text: string | null): number | undefined {
    return this.listed().find(({ number }) => String(number) === text)?.number;
  }
}

const NO_ANSWER = 'not run';

/** What is compared of two answers. */
const ANSWERS: readonly { label: string; text: (revision: ListedRevision | undefined) => string }[] = [
  {
    label: 'Answer',
    text: (revision) => {
      const verdict = verdictOf(revision?.run ?? null);
      return verdict === undefined ? NO_ANSWER : verdictWords(verdict);
    },
  },
  {
    label: 'Proved range',
    text: (revision) => {
      const ranges = rangesOfRun(revision?.run ?? null);
      return ranges === undefined ? NO_ANSWER : withUnit(provedText(ranges), revision?.run?.unit);
    },
  },
  {
    label: 'Fails at',
    text: (revision) => {
      const ranges = rangesOfRun(revision?.run ?? null);
      if (ranges === undefined) return NO_ANSWER;
      return ranges.failsAbove === undefined
        ? 'nothing found'
        : withUnit(failsAbove(ranges.failsAbove), revision?.run?.unit);
    },
  },
];
