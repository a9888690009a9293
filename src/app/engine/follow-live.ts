import { Observable, Subscription } from 'rxjs';
import type { EngineClient, LiveAnswer } from './engine-client';

/** A live answer with the study that it answers. */
export interface FollowedAnswer<Study> {
  readonly study: Study;
  readonly answer: LiveAnswer;
}

/**
 * Live answers to studies that change faster than they are answered. A study is given up for a newer one only after
 * its first answer: were it given up before, nothing would be shown as long as the hand moves. Of the studies that
 * come meanwhile the last one counts.
 */
export function followLive<Study>(
  client: EngineClient,
  studies: Observable<Study>,
): Observable<FollowedAnswer<Study>> {
  return new Observable((subscriber) => {
    let current: Subscription | undefined;
    /** Whether the study under way has had no answer yet. */
    let isAwaited = false;
    let next: { readonly study: Study } | undefined;
    let haveStudiesEnded = false;

    const begin = (study: Study): void => {
      current?.unsubscribe();
      next = undefined;
      isAwaited = true;
      const own = new Subscription();
      current = own;
      own.add(
        client.live(study).subscribe({
          next: (answer) => {
            isAwaited = false;
            subscriber.next({ study, answer });
            if (next !== undefined) begin(next.study);
          },
          error: (broken: unknown) => {
            // The next study may do better: what broke over this one is news only where nothing else is waiting.
            if (next === undefined) subscriber.error(broken);
            else end();
          },
          complete: () => end(),
        }),
      );
    };
    const end = (): void => {
      isAwaited = false;
      current = undefined;
      if (next !== undefined) begin(next.study);
      else if (haveStudiesEnded) subscriber.complete();
    };

    const source = studies.subscribe({
      next: (study) => {
        if (isAwaited) next = { study };
        else begin(study);
      },
      error: (error) => subscriber.error(error),
      complete: () => {
        haveStudiesEnded = true;
        if (current === undefined) subscriber.complete();
      },
    });
    return () => {
      source.unsubscribe();
      current?.unsubscribe();
    };
  });
}
