import { Injectable, computed, effect, inject, linkedSignal, signal, untracked } from '@angular/core';
import type { Result, Study } from '../../../../../shared/contracts';
import {
  listedRevisionSchema,
  runSchema,
  scenarioRevisionSchema,
  scenarioSchema,
  type Run,
  type Scenario,
  type ScenarioRevision,
} from '../../../../../shared/contracts/api';
import { mayDesign } from '../../../core/answers';
import { Api, listOf, loaded } from '../../../core/api';
import { beginHistory, did, redone, undone, type Act, type History } from '../../../core/undo';
import { watchRun } from '../run-watch';
import { draftStudy, isSameStudy } from './draft-study';
import { DraftKeeper } from './draft-keeper';
import { LiveAnswers } from './live-answers';
import { SCENARIO_ADDRESS } from './scenario-address';

/** An answer as the page shows it. */
export interface ShownAnswer {
  readonly study: Study;
  readonly result: Result;
  /** A newer study waits for its answer: this is the old one. */
  readonly renewing: boolean;
  /** The slower parts (light end, band stretch) are still those of an older study. */
  readonly partial: boolean;
  readonly by: 'run' | 'browser' | 'server';
}

/** What a draft began from. */
interface Base {
  readonly number: number;
  readonly study: unknown;
}

/** The open scenario: its saved revisions and runs, and the draft with everything done to it. */
@Injectable()
export class ScenarioStore {
  private readonly api = inject(Api);
  private readonly keeper = inject(DraftKeeper);
  private readonly live = inject(LiveAnswers);
  private readonly address = inject(SCENARIO_ADDRESS);

  readonly path = computed(() => `/api/scenarios/${this.address.scenarioId()}`);
  readonly scenario = loaded(() => this.path(), scenarioSchema, 'this scenario');
  readonly revisions = loaded(
    () => `${this.path()}/revisions`,
    listOf(listedRevisionSchema),
    'the revisions of this scenario',
  );
  readonly older = loaded(
    () =>
      this.address.revision() === null ? undefined : `${this.path()}/revisions/${this.address.revision()}`,
    scenarioRevisionSchema,
    'this revision',
  );

  private opened = '';
  private readonly base = signal<Base | undefined>(undefined);
  private readonly history = signal<History<Study> | undefined>(undefined);

  /** The saved revision that is shown: the one that the address asks for, else the newest. */
  readonly revision = computed(() =>
    this.address.revision() === null ? this.scenario.value()?.head : this.older.value(),
  );
  readonly isOlder = computed(() => this.address.revision() !== null);
  readonly mayDesign = computed(() => mayDesign(this.scenario.value()?.role));
  readonly readOnly = computed(() => !this.mayDesign() || this.isOlder());

  private readonly draft = computed(() => this.history()?.present);
  /** The study on the page: the draft, or what an older revision holds. Undefined where it cannot be shown. */
  readonly study = computed(() => (this.isOlder() ? draftStudy(this.older.value()?.study) : this.draft()));
  readonly baseRevision = computed(() => this.base()?.number ?? 0);
  readonly baseStudy = computed(() => this.base()?.study);
  readonly hasChanges = computed(() => {
    const draft = this.draft();
    return draft !== undefined && !isSameStudy(draft, this.base()?.study);
  });
  /** The newest revision, where the draft began from an older one. */
  readonly overtakenBy = computed(() => {
    const head = this.scenario.value()?.head;
    return head !== undefined && this.hasChanges() && head.number > this.baseRevision() ? head : undefined;
  });
  readonly undoes = computed(() => (this.history()?.past.length ? this.history()?.what : undefined));
  readonly redoes = computed(() => this.history()?.future[0]?.what);
  readonly keeping = this.keeper.keeping;
  readonly faults = computed(() => (this.isOlder() ? [] : this.live.faults()));
  readonly confirmation = this.live.confirmation;

  /** The newest run of the shown revision: the one just asked for, or the one that the revision came with. */
  private readonly runId = linkedSignal(() => this.revision()?.run?.id);
  readonly watch = watchRun(
    () => this.runId(),
    () => this.reload(),
  );
  /** The newest run with an answer: while it is renewed, the old one stays. */
  readonly answered = linkedSignal<{ revision: string; run: Run | undefined }, Run | undefined>({
    source: () => ({ revision: `${this.path()} ${this.revision()?.number}`, run: this.watch.run.value() }),
    computation: ({ revision, run }, previous) => {
      if (run?.result) return run;
      return previous?.source.revision === revision ? previous.value : undefined;
    },
  });

  readonly shown = computed<ShownAnswer | undefined>(() => {
    const study = this.study();
    if (study === undefined) return undefined;
    const fromRun = this.runAnswer(study);
    if (this.isOlder()) return fromRun;
    const live = this.live.answer();
    if (!this.hasChanges()) {
      if (fromRun !== undefined) return fromRun;
      // Just saved: what was shown of this study stays until its run is done.
      const same = live !== undefined && isSameStudy(live.study, study);
      return same ? { ...live, renewing: false, partial: !live.complete } : undefined;
    }
    if (live === undefined) return fromRun && { ...fromRun, renewing: true };
    const renewing = live.study !== study || this.faults().length > 0;
    return { ...live, renewing, partial: !live.complete };
  });

  /** The engine in the browser is still at the answer that is waited for. */
  readonly isAnswering = computed(() => {
    const shown = this.shown();
    return (
      this.hasChanges() &&
      this.faults().length === 0 &&
      (shown === undefined || shown.renewing || shown.partial)
    );
  });

  constructor() {
    effect(() => {
      const scenario = this.scenario.value();
      if (scenario !== undefined) untracked(() => this.take(scenario));
    });
  }

  /** Does something to the study. What changes nothing is no step. */
  edit(change: (study: Study) => Study, act: Omit<Act, 'at'>): void {
    const history = this.history();
    if (history === undefined || this.readOnly()) return;
    const next = change(history.present);
    if (next === history.present) return;
    this.put(did(history, next, { ...act, at: Date.now() }));
  }

  undo(): void {
    const history = this.history();
    if (history !== undefined && !this.readOnly()) this.put(undone(history));
  }

  redo(): void {
    const history = this.history();
    if (history !== undefined && !this.readOnly()) this.put(redone(history));
  }

  /** Puts an older revision, or any other study, in place of the draft; can be undone. */
  restore(value: unknown, what: string): boolean {
    const study = draftStudy(value);
    const history = this.history();
    if (study === undefined || history === undefined || !this.mayDesign()) return false;
    this.put(did(history, study, { what, at: Date.now() }));
    return true;
  }

  /** Back to what the draft began from; can be undone. */
  discard(): void {
    this.restore(this.base()?.study, 'discard the draft');
  }

  async run(): Promise<void> {
    const number = this.revision()?.number;
    if (number === undefined || !this.mayDesign() || this.watch.busy()) return;
    const run = await this.api.send('POST', `${this.path()}/revisions/${number}/runs`, runSchema);
    this.runId.set(run.id);
  }

  async cancelRun(run: Run): Promise<void> {
    await this.api.act('POST', `/api/runs/${run.id}/cancel`);
    this.watch.run.reload();
  }

  /** Everything that is not on the server yet goes there, before something is made of it. */
  flush(): Promise<void> {
    return this.keeper.flush();
  }

  /** The draft was saved as this revision: it is the base of what follows, and is run. */
  async saved(revision: ScenarioRevision): Promise<void> {
    const scenario = this.scenario.value();
    if (scenario === undefined) return;
    this.base.set({ number: revision.number, study: revision.study });
    const study = draftStudy(revision.study);
    const history = this.history();
    // The server drops what a study may not hold; that is no step of anybody's.
    if (study !== undefined && history !== undefined) this.history.set({ ...history, present: study });
    this.scenario.replace({ ...scenario, head: revision, draft: null });
    await this.keeper.drop(revision.number);
    this.revisions.reload();
    await this.run();
  }

  /** Another window's draft, or its saved revision, takes the place of this one's. */
  takeTheirs(): void {
    this.opened = '';
    this.scenario.reload();
  }

  keepMine(): void {
    const draft = this.draft();
    if (draft !== undefined) this.keeper.keepMine(draft);
  }

  reload(): void {
    this.scenario.reload();
    this.revisions.reload();
    if (this.isOlder()) this.older.reload();
  }

  private put(history: History<Study>): void {
    if (history.present === this.draft()) return;
    const before = untracked(this.shown)?.result;
    this.history.set(history);
    if (this.hasChanges()) {
      this.live.follow(history.present, before);
      this.keeper.keep(history.present);
    } else {
      this.live.stop();
      this.keeper.keep(undefined);
    }
  }

  private take(scenario: Scenario): void {
    const { head, id } = scenario;
    if (this.opened !== id) {
      this.opened = id;
      this.open(scenario);
    } else if (head.number > this.baseRevision() && !this.hasChanges()) {
      this.begin(head.study, head);
      this.keeper.open(this.place(head.number, 0));
    }
  }

  private open({ head, draft, role }: Scenario): void {
    this.live.stop();
    if (draft === null || !mayDesign(role)) {
      this.begin(head.study, head);
      this.keeper.open(this.place(head.number, 0));
      return;
    }
    const isOfHead = draft.baseRevision === head.number;
    this.begin(draft.study, isOfHead ? head : { number: draft.baseRevision, study: undefined });
    this.keeper.open(this.place(draft.baseRevision, draft.version), draft.at);
    if (!isOfHead) void this.findBase(draft.baseRevision);
    const study = this.draft();
    if (study === undefined || !this.hasChanges()) return;
    const saved = draftStudy(head.study);
    if (isOfHead && saved !== undefined)
      this.history.set(did(beginHistory(saved), study, { what: 'all changes of the draft', at: Date.now() }));
    this.live.follow(study, undefined);
  }

  private begin(study: unknown, base: Base): void {
    const shown = draftStudy(study);
    this.base.set({ number: base.number, study: base.study });
    this.history.set(shown === undefined ? undefined : beginHistory(shown));
  }

  /** The draft began from a revision that is no longer the newest: changes are told against that one. */
  private async findBase(number: number): Promise<void> {
    const path = `${this.path()}/revisions/${number}`;
    const revision = await this.api.send('GET', path, scenarioRevisionSchema).catch(() => undefined);
    if (revision !== undefined && this.base()?.number === number) this.base.set(revision);
  }

  private place(baseRevision: number, version: number) {
    return { path: `${this.path()}/draft`, baseRevision, version };
  }

  private runAnswer(study: Study): ShownAnswer | undefined {
    const result = this.answered()?.result;
    if (!result) return undefined;
    return { study, result, renewing: this.watch.busy(), partial: false, by: 'run' };
  }
}
