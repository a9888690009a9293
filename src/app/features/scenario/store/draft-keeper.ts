import { DestroyRef, DOCUMENT, Injectable, inject, signal } from '@angular/core';
import { scenarioDraftSchema, type ScenarioDraft } from '../../../../../shared/contracts/api';
import { Api, Refusal, refusalText } from '../../../core/api';

/** How it stands with the draft. A conflict carries what another window keeps: null where it keeps nothing. */
export type Keeping =
  | { readonly kind: 'none' }
  | { readonly kind: 'saving' }
  | { readonly kind: 'saved'; readonly at: string }
  | { readonly kind: 'conflict'; readonly current: ScenarioDraft | null }
  | { readonly kind: 'failed'; readonly text: string };

export interface DraftPlace {
  readonly path: string;
  readonly baseRevision: number;
  /** 0 where there is no draft yet. */
  readonly version: number;
}

const REST_MILLISECONDS = 600;
const RETRY_MILLISECONDS = 5000;

/**
 * Keeps unsaved work on the server, a moment after the hand rests: compare and set, one request at a time, the newest
 * study last. Another window that changed the same draft is a conflict, which stays until one side is chosen.
 */
@Injectable()
export class DraftKeeper {
  private readonly api = inject(Api);
  private readonly state = signal<Keeping>({ kind: 'none' });
  private place: DraftPlace | undefined;
  /** What is to be kept and is not yet: a study, or that there is none. */
  private wanted: { readonly study: unknown } | undefined;
  private sending: Promise<void> | undefined;
  private timer: ReturnType<typeof setTimeout> | undefined;

  readonly keeping = this.state.asReadonly();

  constructor() {
    const document = inject(DOCUMENT);
    const hidden = (): void => {
      if (document.visibilityState === 'hidden') void this.flush();
    };
    document.addEventListener('visibilitychange', hidden);
    inject(DestroyRef).onDestroy(() => {
      document.removeEventListener('visibilitychange', hidden);
      void this.flush();
    });
  }

  open(place: DraftPlace, at?: string): void {
    clearTimeout(this.timer);
    this.place = place;
    this.wanted = undefined;
    this.state.set(place.version > 0 && at !== undefined ? { kind: 'saved', at } : { kind: 'none' });
  }

  /** @param study undefined where nothing differs from the saved revision any more */
  keep(study: unknown): void {
    this.wanted = { study };
    if (this.state().kind === 'conflict') return;
    this.state.set({ kind: 'saving' });
    this.sendAfter(REST_MILLISECONDS);
  }

  /** Sends now what is not kept yet, and waits until it is. */
  async flush(): Promise<void> {
    clearTimeout(this.timer);
    await this.sending;
    if (this.wanted !== undefined && this.state().kind !== 'conflict') await this.send();
  }

  /** Forgets the draft here and on the server, after it was saved as a revision. */
  async drop(baseRevision: number): Promise<void> {
    clearTimeout(this.timer);
    this.wanted = undefined;
    await this.sending;
    const { place } = this;
    if (place === undefined) return;
    this.open({ ...place, baseRevision, version: 0 });
    if (place.version > 0) await this.api.act('DELETE', `${place.path}?version=${place.version}`);
  }

  /** Ends a conflict: this window's study takes the place of the other's. */
  keepMine(study: unknown): void {
    const state = this.state();
    if (state.kind !== 'conflict' || this.place === undefined) return;
    this.place = { ...this.place, version: state.current?.version ?? 0 };
    this.state.set({ kind: 'saving' });
    this.wanted = { study };
    this.sendAfter(0);
  }

  private sendAfter(milliseconds: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), milliseconds);
  }

  private async send(): Promise<void> {
    this.sending = this.sendWanted();
    await this.sending;
    this.sending = undefined;
  }

  private async sendWanted(): Promise<void> {
    const { place, wanted } = this;
    if (place === undefined || wanted === undefined) return;
    this.wanted = undefined;
    try {
      const version = await this.put(place, wanted.study);
      if (this.place === place) this.place = { ...place, version };
    } catch (error) {
      if (this.place !== place) return;
      const current = otherDraft(error);
      if (current !== undefined) {
        this.state.set({ kind: 'conflict', current });
        return;
      }
      this.wanted ??= wanted;
      this.state.set({ kind: 'failed', text: refusalText(error) });
      this.sendAfter(RETRY_MILLISECONDS);
    }
  }

  /** @returns the version that the draft has now */
  private async put({ path, baseRevision, version }: DraftPlace, study: unknown): Promise<number> {
    if (study === undefined) {
      if (version > 0) await this.api.act('DELETE', `${path}?version=${version}`);
      if (this.wanted === undefined) this.state.set({ kind: 'none' });
      return 0;
    }
    const kept = await this.api.send('PUT', path, scenarioDraftSchema, { baseRevision, version, study });
    if (this.wanted === undefined) this.state.set({ kind: 'saved', at: kept.at });
    return kept.version;
  }
}

/** The draft of another window, null where that threw it away; undefined where the refusal is about something else. */
function otherDraft(error: unknown): ScenarioDraft | null | undefined {
  if (!(error instanceof Refusal) || error.problem?.code !== 'draft-changed') return undefined;
  const read = scenarioDraftSchema.safeParse(error.problem.current);
  return read.success ? read.data : null;
}
