import { DOCUMENT, ChangeDetectionStrategy, Component, computed, inject, linkedSignal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { ActivatedRoute, Router } from '@angular/router';
import { firstValueFrom, map } from 'rxjs';
import { studySchema } from '../../../../shared/contracts';
import {
  listedRevisionSchema,
  runSchema,
  scenarioRevisionSchema,
  scenarioSchema,
  type Run,
  type Scenario,
  type ScenarioRevision,
} from '../../../../shared/contracts/api';
import { Cautions, mayDesign, RUN_STATE_WORDS } from '../../core/answers';
import { Api, listOf, loaded } from '../../core/api';
import { Notices } from '../../core/notices';
import { pageHead } from '../../core/page';
import { pageShortcuts } from '../../core/shortcuts';
import { MomentView } from '../../core/words';
import { confirm } from '../../ui/dialog';
import { Empty, WhenLoaded } from '../../ui/states';
import { answersOf } from './answers/answers-of';
import { AnswersPanel } from './answers/answers-panel';
import { download, fileName } from './keeping/download';
import { ImportStudy, type ImportStudyData } from './keeping/import-study';
import { RevisionList } from './keeping/revision-list';
import { watchRun } from './run-watch';
import { StudyView } from './study/study-view';

@Component({
  selector: 'app-scenario',
  imports: [AnswersPanel, Cautions, Empty, MomentView, RevisionList, StudyView, WhenLoaded],
  templateUrl: './scenario-page.html',
  styleUrl: './scenario-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScenarioPage {
  private readonly api = inject(Api);
  private readonly dialogs = inject(MatDialog);
  private readonly document = inject(DOCUMENT);
  private readonly notices = inject(Notices);
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);

  private readonly scenarioId = toSignal(
    this.route.paramMap.pipe(map((params) => params.get('scenarioId') ?? '')),
    { requireSync: true },
  );
  /** The revision that the address asks for; the newest where it asks for none. */
  private readonly asked = toSignal(this.route.queryParamMap.pipe(map((query) => query.get('revision'))), {
    requireSync: true,
  });
  private readonly path = computed(() => `/api/scenarios/${this.scenarioId()}`);

  protected readonly scenario = loaded(() => this.path(), scenarioSchema, 'this scenario');
  protected readonly revisions = loaded(
    () => `${this.path()}/revisions`,
    listOf(listedRevisionSchema),
    'the revisions of this scenario',
  );
  protected readonly older = loaded(
    () => (this.asked() === null ? undefined : `${this.path()}/revisions/${this.asked()}`),
    scenarioRevisionSchema,
    'this revision',
  );
  protected readonly revision = computed(() =>
    this.asked() === null ? this.scenario.value()?.head : this.older.value(),
  );
  protected readonly study = computed(() => {
    const read = studySchema.safeParse(this.revision()?.study);
    return read.success ? read.data : undefined;
  });

  /** The newest run of the shown revision: the one just asked for, or the one that the revision came with. */
  private readonly runId = linkedSignal(() => this.revision()?.run?.id);
  protected readonly watch = watchRun(
    () => this.runId(),
    () => this.reload(),
  );
  /** The newest run with an answer: while it is renewed, the old one stays. */
  protected readonly answered = linkedSignal<{ revision: string; run: Run | undefined }, Run | undefined>({
    source: () => ({
      revision: `${this.scenarioId()} ${this.revision()?.number}`,
      run: this.watch.run.value(),
    }),
    computation: ({ revision, run }, previous) => {
      if (run?.result) return run;
      return previous?.source.revision === revision ? previous.value : undefined;
    },
  });
  protected readonly answers = computed(() => {
    const result = this.answered()?.result;
    const study = this.study();
    return result && study ? answersOf(result, study, this.revision()?.run ?? undefined) : undefined;
  });

  protected readonly mayDesign = computed(() => mayDesign(this.scenario.value()?.role));
  protected readonly progressText = computed(() => {
    const state = this.watch.run.value()?.state;
    if (state !== 'running') return state === undefined ? '' : RUN_STATE_WORDS[state];
    return `Running, ${Math.floor(this.watch.progress() * 100)}\u2009%`;
  });

  constructor() {
    pageHead(() => {
      const scenario = this.scenario.value();
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
    pageShortcuts([{ keys: 'r', what: 'Run this scenario', act: () => void this.run() }]);
  }

  protected async run(): Promise<void> {
    const revision = this.revision();
    if (revision === undefined || !this.mayDesign() || this.watch.busy()) return;
    await this.notices.during(async () => {
      const run = await this.api.send('POST', `${this.path()}/revisions/${revision.number}/runs`, runSchema);
      this.runId.set(run.id);
    });
  }

  protected async cancel(run: Run): Promise<void> {
    await this.notices.during(() => this.api.act('POST', `/api/runs/${run.id}/cancel`));
    this.watch.run.reload();
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
    this.reload();
    await this.router.navigate([], { relativeTo: this.route, queryParams: {} });
  }

  protected exportStudy(scenario: Scenario, revision: ScenarioRevision): void {
    const name = fileName(`${scenario.variantName} ${scenario.name} ${revision.number}`, 'json');
    const text = `${JSON.stringify(revision.study, null, 2)}\n`;
    download(this.document, name, 'application/json', text);
  }

  protected async remove(scenario: Scenario): Promise<void> {
    const sure = await confirm(this.dialogs, {
      title: `Delete ${scenario.name}?`,
      text: 'Its revisions and runs go with it and cannot be brought back.',
      act: 'Delete scenario',
    });
    if (!sure) return;
    const done = await this.notices.during(
      () => this.api.act('DELETE', this.path()),
      `${scenario.name} is deleted.`,
    );
    if (done) await this.router.navigate(['/variants', scenario.variantId]);
  }

  private reload(): void {
    this.scenario.reload();
    this.revisions.reload();
    if (this.asked() !== null) this.older.reload();
  }
}
