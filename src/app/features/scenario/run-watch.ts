import { DestroyRef, computed, effect, inject, linkedSignal, signal, type Signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { runSchema, type Run } from '../../../../shared/contracts/api';
import { loaded } from '../../core/api';
import { RunEvents } from '../../core/events';
import type { Loaded } from '../../ui/states';

const ASK_MILLISECONDS = 2000;

export interface RunWatch {
  readonly run: Loaded<Run>;
  readonly busy: Signal<boolean>;
  /** 0 to 1, as far as it was heard. */
  readonly progress: Signal<number>;
}

/**
 * A run, followed while it is under way: by the event stream, or by asking from time to time where nothing is heard.
 * Must be called where `inject` may be.
 */
export function watchRun(runId: () => string | undefined, ended: () => void): RunWatch {
  const events = inject(RunEvents);
  const run = loaded(() => runId() && `/api/runs/${runId()}`, runSchema, 'this run');
  const busy = computed(() => ['queued', 'running'].includes(run.value()?.state ?? ''));
  const heard = signal<{ runId: string; progress: number } | undefined>(undefined);
  const progress = linkedSignal(() => {
    const event = heard();
    return event !== undefined && event.runId === runId() ? event.progress : (run.value()?.progress ?? 0);
  });

  events.events.pipe(takeUntilDestroyed()).subscribe((event) => {
    if (event.runId !== runId()) return;
    heard.set({ runId: event.runId, progress: event.progress });
    if (event.kind === 'progress') return;
    run.reload();
    if (event.kind !== 'queued' && event.kind !== 'started') ended();
  });

  let asking: ReturnType<typeof setInterval> | undefined;
  const stopAsking = (): void => clearInterval(asking);
  inject(DestroyRef).onDestroy(stopAsking);
  effect(() => {
    stopAsking();
    if (busy() && !events.live()) asking = setInterval(() => run.reload(), ASK_MILLISECONDS);
  });
  return { run, busy, progress: progress.asReadonly() };
}
