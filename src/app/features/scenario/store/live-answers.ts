import { DestroyRef, Injectable, inject, signal } from '@angular/core';
import { Subject, retry, type Subscription } from 'rxjs';
import type { Fault, Result, Study } from '../../../../../shared/contracts';
import { previewAnswerSchema } from '../../../../../shared/contracts/api';
import { Api, Refusal, refusalText } from '../../../core/api';
import { EngineClient, followLive, type LiveAnswer } from '../../../engine';
import { joinedResult } from './joined-result';

/** The answer to a study: computed in the browser, or confirmed by the server. */
export interface Answered {
  readonly study: Study;
  readonly result: Result;
  /** The light end and the band stretch are this study's as well, not yet those of the one before. */
  readonly complete: boolean;
  readonly by: 'browser' | 'server';
}

export type Confirmation =
  { readonly kind: 'none' | 'waiting' | 'confirmed' } | { readonly kind: 'failed'; readonly text: string };

/** How long the hand rests before the server is asked. */
export const REST_MILLISECONDS = 250;

/** Answers to a study while it is edited: at once by the engine in the browser, at rest confirmed by the server. */
@Injectable()
export class LiveAnswers {
  private readonly api = inject(Api);
  private readonly engine = inject(EngineClient);
  private readonly studies = new Subject<Study>();
  private readonly newest = signal<Answered | undefined>(undefined);
  private readonly wrong = signal<readonly Fault[]>([]);
  private readonly confirming = signal<Confirmation>({ kind: 'none' });
  private readonly following: Subscription;
  /** One stream of previews for this window: a newer one takes the place of an older one. */
  private readonly stream = `window-${crypto.randomUUID()}`;
  private wanted: Study | undefined;
  private before: Result | undefined;
  /** The study that the faults are about. */
  private unusable: Study | undefined;
  private resting: ReturnType<typeof setTimeout> | undefined;
  private asking: AbortController | undefined;

  readonly answer = this.newest.asReadonly();
  readonly faults = this.wrong.asReadonly();
  readonly confirmation = this.confirming.asReadonly();

  constructor() {
    // An engine that broke starts anew with the next study.
    this.following = followLive(this.engine, this.studies)
      .pipe(retry())
      .subscribe(({ study, answer }) => this.take(study, answer));
    inject(DestroyRef).onDestroy(() => {
      this.stop();
      this.following.unsubscribe();
    });
  }

  /** @param before the answer that was shown so far, whose slower parts stay until theirs come */
  follow(study: Study, before: Result | undefined): void {
    if (this.wanted === undefined) {
      this.newest.set(undefined);
      this.before = before;
    }
    this.stopAsking();
    this.wanted = study;
    this.confirming.set({ kind: 'waiting' });
    this.studies.next(study);
    this.resting = setTimeout(() => void this.confirm(study), REST_MILLISECONDS);
  }

  /** What is under way no longer matters; the last answer stays. */
  stop(): void {
    this.stopAsking();
    this.wanted = undefined;
    this.wrong.set([]);
    this.confirming.set({ kind: 'none' });
  }

  private stopAsking(): void {
    clearTimeout(this.resting);
    this.asking?.abort();
    this.asking = undefined;
  }

  private take(study: Study, answer: LiveAnswer): void {
    if (this.wanted === undefined || this.isAnsweredByServer()) return;
    if ('faults' in answer) {
      if (study !== this.wanted) return;
      this.unusable = study;
      this.wrong.set(answer.faults);
      return;
    }
    const result = joinedResult(answer.result, this.newest()?.result ?? this.before, answer.complete);
    if (result === undefined) return;
    this.wrong.set([]);
    this.newest.set({ study, result, complete: answer.complete, by: 'browser' });
  }

  private isAnsweredByServer(): boolean {
    const newest = this.newest();
    return newest?.by === 'server' && newest.study === this.wanted;
  }

  private async confirm(study: Study): Promise<void> {
    // What the engine here cannot compute, the same engine over there cannot either.
    if (study === this.unusable) {
      this.confirming.set({ kind: 'none' });
      return;
    }
    const asking = new AbortController();
    this.asking = asking;
    const body = { study, supersedes: this.stream };
    try {
      const result = await this.api.send('POST', '/api/preview', previewAnswerSchema, body, asking.signal);
      if (asking.signal.aborted) return;
      this.wrong.set([]);
      this.newest.set({ study, result, complete: true, by: 'server' });
      this.confirming.set({ kind: 'confirmed' });
    } catch (error) {
      if (asking.signal.aborted) return;
      const faults = error instanceof Refusal ? error.problem?.faults : undefined;
      if (faults !== undefined) this.wrong.set(faults);
      this.confirming.set(
        faults === undefined ? { kind: 'failed', text: refusalText(error) } : { kind: 'none' },
      );
    }
  }
}
