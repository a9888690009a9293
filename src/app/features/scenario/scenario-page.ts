import { DOCUMENT, ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import {
  Router,
  RouterLink,
  RouterLinkActive,
  RouterOutlet,
  type IsActiveMatchOptions,
} from '@angular/router';
import { firstValueFrom } from 'rxjs';
import type { Study } from '../../../../shared/contracts';
import type { Run, Scenario, ScenarioRevision } from '../../../../shared/contracts/api';
import { Cautions, RUN_STATE_WORDS } from '../../core/answers';
import { Notices } from '../../core/notices';
import { pageHead } from '../../core/page';
import { pageShortcuts } from '../../core/shortcuts';
import { momentText, MomentView } from '../../core/words';
import { StudyDescription } from '../../forms/study-description';
import { Empty, WhenLoaded } from '../../ui/states';
import { answersOf } from './answers/answers-of';
import { AnswersPanel } from './answers/answers-panel';
import { download, fileName } from './keeping/download';
import { DraftConflict } from './keeping/draft-conflict';
import { ImportStudy, type ImportStudyData } from './keeping/import-study';
import { SaveRevision, type SaveRevisionData } from './keeping/save-revision';
import { studyChanges } from './keeping/study-changes';
import { DraftKeeper } from './store/draft-keeper';
import { LiveAnswers } from './store/live-answers';
import { SCENARIO_ADDRESS, scenarioAddress } from './store/scenario-address';
import { ScenarioStore } from './store/scenario-store';
import { shownRanges } from './store/shown-ranges';

/** The working page: description, map and tolerances, answers; around them what is done with the scenario. */
@Component({
  selector: 'app-scenario',
  imports: [
    AnswersPanel,
    Cautions,
    DraftConflict,
    Empty,
    MomentView,
    RouterLink,
    RouterLinkActive,
    RouterOutlet,
    StudyDescription,
    WhenLoaded,
  ],
  providers: [
    { provide: SCENARIO_ADDRESS, useFactory: scenarioAddress },
    DraftKeeper,
    LiveAnswers,
    ScenarioStore,
  ],
  templateUrl: './scenario-page.html',
  styleUrl: './scenario-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScenarioPage {
  private readonly dialogs = inject(MatDialog);
  private readonly document = inject(DOCUMENT);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);

  protected readonly store = inject(ScenarioStore);
  protected readonly exactPath: IsActiveMatchOptions = {
    ...{ paths: 'exact', queryParams: 'ignored', fragment: 'ignored', matrixParams: 'ignored' },
  };

  protected readonly answers = computed(() => {
    const shown = this.store.shown();
    if (shown === undefined) return undefined;
    const { result, study, by } = shown;
    if (by === 'run') return answersOf(result, study, this.store.revision()?.run ?? undefined);
    const rated = shownRanges(shown)?.rated;
    return answersOf(result, study, rated && { ratedLow: rated.low, ratedHigh: rated.high });
  });
  protected readonly hasOwnDraft = computed(() => this.store.mayDesign() && this.store.hasChanges());
  /** A draft is run by saving it. */
  protected readonly mayRun = computed(
    () => this.store.mayDesign() && (this.store.isOlder() || !this.store.hasChanges()),
  );
  protected readonly conflict = computed(() => {
    const keeping = this.store.keeping();
    return keeping.kind === 'conflict' ? keeping : undefined;
  });
  /** Nothing about the answer is under way: it may be read out. */
  protected readonly isSettled = computed(() => {
    const shown = this.store.shown();
    return shown !== undefined && !shown.renewing && !shown.partial && shown.by !== 'browser';
  });
  protected readonly keepingText = computed(() => {
    const keeping = this.store.keeping();
    switch (keeping.kind) {
      case 'none':
        return '';
      case 'saving':
        return 'saving the draft …';
      case 'saved':
        return 'draft saved';
      case 'conflict':
        return 'draft not saved';
      case 'failed':
        return `draft not saved: ${keeping.text}`;
    }
  });
  protected readonly sourceText = computed(() => {
    const shown = this.store.shown();
    if (shown?.by === 'run') return runText(this.store.answered());
    if (shown?.by === 'server') return 'Of your draft, confirmed by the server. Not saved yet.';
    const confirmation = this.store.confirmation();
    return confirmation.kind === 'failed'
      ? `Of your draft, computed in this browser, not confirmed: ${confirmation.text}`
      : 'Of your draft, computed in this browser; the server confirms it when your hand rests.';
  });
  protected readonly progressText = computed(() => {
    const state = this.store.watch.run.value()?.state;
    if (state !== 'running') return state === undefined ? '' : RUN_STATE_WORDS[state];
    return `Running, ${Math.floor(this.store.watch.progress() * 100)}\u2009%`;
  });

  constructor() {
    pageHead(() => {
      const scenario = this.store.scenario.value();
      return {
        title: scenario === undefined ? '' : `${scenario.name}, ${scenario.variantName}`,
        trail:
          scenario === undefined
            ? [{ label: 'Products', path: '/products' }, { label: '' }]
            : [
                { label: scenario.productName, path: `/products/${scenario.productId}` },
                { label: scenario.variantName, path: `/variants/${scenario.variantId}` },
                { label: scenario.name },
              ],
      };
    });
    pageShortcuts([
      { keys: 'r', what: 'Run this scenario', act: () => void this.run() },
      { keys: 'Ctrl+Z', what: 'Undo', act: () => this.store.undo() },
      { keys: 'Ctrl+Shift+Z', what: 'Redo', act: () => this.store.redo() },
      { keys: 'Ctrl+S', what: 'Save and run', act: () => void this.save(), whileTyping: true },
    ]);
  }

  protected describe(study: Study): void {
    this.store.edit(
      (present) => (present === study ? present : study),
      describedAct(this.store.study(), study),
    );
  }

  protected async run(): Promise<void> {
    if (this.mayRun()) await this.notices.during(() => this.store.run());
  }

  protected async cancel(run: Run): Promise<void> {
    await this.notices.during(() => this.store.cancelRun(run));
  }

  protected async save(): Promise<void> {
    const study = this.store.study();
    if (study === undefined || !this.hasOwnDraft() || this.store.isOlder()) return;
    if (this.dialogs.openDialogs.length > 0) return;
    await this.store.flush();
    const data: SaveRevisionData = {
      path: this.store.path(),
      base: { number: this.store.baseRevision(), study: this.store.baseStudy() },
      study,
    };
    const dialog = this.dialogs.open<SaveRevision, SaveRevisionData, ScenarioRevision>(SaveRevision, {
      data,
      width: '34rem',
    });
    const saved = await firstValueFrom(dialog.afterClosed());
    if (saved === undefined) return;
    this.notices.say(`Saved as revision ${saved.number}.`);
    await this.notices.during(() => this.store.saved(saved));
  }

  protected async importStudy(scenario: Scenario): Promise<void> {
    const data: ImportStudyData = { scenarioId: scenario.id, base: scenario.head };
    const dialog = this.dialogs.open<ImportStudy, ImportStudyData, ScenarioRevision>(ImportStudy, {
      data,
      width: '34rem',
    });
    const saved = await firstValueFrom(dialog.afterClosed());
    if (saved === undefined) return;
    this.notices.say(`Saved as revision ${saved.number}.`);
    this.store.reload();
    await this.router.navigate(['/scenarios', scenario.id, 'record']);
  }

  /** What is on the page: the draft where there is one, else the revision that is shown. */
  protected exportStudy(scenario: Scenario, revision: ScenarioRevision): void {
    const isDraft = this.hasOwnDraft() && !this.store.isOlder();
    const study: unknown = isDraft ? this.store.study() : revision.study;
    const state = isDraft ? `${revision.number} draft` : String(revision.number);
    const name = fileName(`${scenario.variantName} ${scenario.name} ${state}`, 'json');
    download(this.document, name, 'application/json', `${JSON.stringify(study, null, 2)}\n`);
  }
}

/** The same places changed again at once are one step: a number that is scrubbed, a word that is typed. */
function describedAct(before: unknown, after: unknown): { what: string; gesture: string } {
  const paths = studyChanges(before, after).map(({ path }) => path);
  const [first = 'the description', ...more] = paths;
  const what = more.length === 0 ? `change ${first}` : `change ${first} and ${more.length} more`;
  return { what, gesture: `describe ${paths.join(' ')}` };
}

function runText(run: Run | undefined): string {
  if (run === undefined) return '';
  const seconds = run.milliseconds === null ? '' : `, ${(run.milliseconds / 1000).toFixed(2)}\u2009s`;
  return `Run ${momentText(run.requestedAt)} by ${run.requestedBy}, engine ${run.engine}${seconds}`;
}
