import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { ActivatedRoute, Router } from '@angular/router';
import { Notices } from '../../../core/notices';
import { Api } from '../../../core/api';
import { Cautions } from '../../../core/answers';
import { confirm } from '../../../ui/dialog';
import { WhenLoaded } from '../../../ui/states';
import { RevisionList } from '../keeping/revision-list';
import { draftStudy } from '../store/draft-study';
import { ScenarioStore } from '../store/scenario-store';
import { StudyView } from '../study/study-view';
import { CompareRevisions } from './compare-revisions';

/** What is kept of a scenario: its revisions, what changed between any two, and what the shown one says. */
@Component({
  selector: 'app-record-panel',
  imports: [Cautions, CompareRevisions, RevisionList, StudyView, WhenLoaded],
  template: `
    <section aria-labelledby="revisions-title">
      <div class="section-head">
        <h2 id="revisions-title">Revisions</h2>
        @if (mayRestore()) {
          <button type="button" class="button" (click)="restore()">
            Restore revision {{ store.revision()?.number }}
          </button>
        }
      </div>
      <div class="sheet" *appWhenLoaded="store.revisions; let revisions">
        <app-revision-list
          [revisions]="revisions"
          [shown]="store.revision()?.number ?? 0"
          [head]="store.scenario.value()?.head?.number ?? 0"
        />
      </div>
    </section>
    <app-compare-revisions class="section" />
    <section class="section" aria-label="Description of revision {{ store.revision()?.number }}">
      @if (saved(); as study) {
        <app-study-view [study]="study" />
      } @else if (store.revision()) {
        <p class="message">This revision holds a study that this page cannot read. Export it to see it.</p>
      } @else {
        <ng-container *appWhenLoaded="store.older" />
      }
    </section>
    <app-cautions class="section" [approximated]="approximated()" />
    @if (store.mayDesign()) {
      <p class="section">
        <button type="button" class="button quiet" (click)="remove()">Delete scenario</button>
      </p>
    }
  `,
  styles: `
    :host {
      display: block;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecordPanel {
  private readonly api = inject(Api);
  private readonly dialogs = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);

  protected readonly store = inject(ScenarioStore);
  protected readonly saved = computed(() => draftStudy(this.store.revision()?.study));
  protected readonly approximated = computed(() => this.store.shown()?.result.delay !== undefined);
  protected readonly mayRestore = computed(
    () => this.store.isOlder() && this.store.mayDesign() && this.saved() !== undefined,
  );

  /** The older revision becomes the draft; nothing is saved by that, and it can be undone. */
  protected async restore(): Promise<void> {
    const revision = this.store.revision();
    if (revision === undefined || !this.store.restore(revision.study, `restore revision ${revision.number}`))
      return;
    await this.router.navigate([], {
      relativeTo: this.route,
      queryParams: { revision: null },
      queryParamsHandling: 'merge',
    });
    this.notices.say(`Revision ${revision.number} is your draft now. Save it to make it the newest.`);
  }

  protected async remove(): Promise<void> {
    const scenario = this.store.scenario.value();
    if (scenario === undefined) return;
    const sure = await confirm(this.dialogs, {
      title: `Delete ${scenario.name}?`,
      text: 'Its revisions and runs go with it and cannot be brought back.',
      act: 'Delete scenario',
    });
    if (!sure) return;
    const done = await this.notices.during(
      () => this.api.act('DELETE', this.store.path()),
      `${scenario.name} is deleted.`,
    );
    if (done) await this.router.navigate(['/variants', scenario.variantId]);
  }
}
