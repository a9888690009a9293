import { Observable, Subject, type Subscriber } from 'rxjs';
import { describe, expect, it } from 'vitest';
import type { Result } from '../../../shared/contracts';
import { EngineBrokenError, EngineClient, type LiveAnswer } from './engine-client';
import { followLive } from './follow-live';

/** Answers when the test says so; `cancelled` are studies given up before they were complete. */
class FakeEngine extends EngineClient {
  readonly asked: unknown[] = [];
  readonly cancelled: unknown[] = [];
  private subscriber: Subscriber<LiveAnswer> | undefined;
  private hasEnded = false;

  override live(study: unknown): Observable<LiveAnswer> {
    return new Observable((subscriber) => {
      this.asked.push(study);
      this.subscriber = subscriber;
      this.hasEnded = false;
      return () => {
        if (!this.hasEnded) this.cancelled.push(study);
      };
    });
  }

  override map(): Observable<never> {
    throw new Error('no map is asked for here');
  }

  answer(complete: boolean): void {
    this.subscriber?.next({ result: { nominal: {} as Result['nominal'] }, complete });
  }

  finish(): void {
    this.hasEnded = true;
    this.subscriber?.complete();
  }

  breakDown(): void {
    this.hasEnded = true;
    this.subscriber?.error(new EngineBrokenError('out of order'));
  }
}

function following() {
  const engine = new FakeEngine();
  const studies = new Subject<string>();
  const told: string[] = [];
  const subscription = followLive(engine, studies).subscribe({
    next: ({ study, answer }) => {
      const isComplete = 'result' in answer && answer.complete;
      told.push(`${study} ${isComplete ? 'all' : 'first'}`);
    },
    error: (error: unknown) => told.push(String(error)),
    complete: () => told.push('complete'),
  });
  return { engine, studies, told, subscription };
}

describe('followLive', () => {
  it('gives a study its first answer however fast others follow, then the last of them', () => {
    const { engine, studies, told } = following();
    for (const study of ['a', 'b', 'c']) studies.next(study);
    expect(engine.asked).toEqual(['a']);
    engine.answer(false);
    expect(engine.asked).toEqual(['a', 'c']);
    expect(engine.cancelled).toEqual(['a']);
    engine.answer(false);
    engine.answer(true);
    engine.finish();
    expect(told).toEqual(['a first', 'c first', 'c all']);
    expect(engine.cancelled).toEqual(['a']);
  });

  it('gives up the rest of a study that has had its first answer', () => {
    const { engine, studies } = following();
    studies.next('a');
    engine.answer(false);
    studies.next('b');
    expect(engine.asked).toEqual(['a', 'b']);
    expect(engine.cancelled).toEqual(['a']);
  });

  it('goes on with the study that waits where the engine breaks, and fails where none does', () => {
    const { engine, studies, told } = following();
    studies.next('a');
    studies.next('b');
    engine.breakDown();
    expect(engine.asked).toEqual(['a', 'b']);
    engine.answer(false);
    engine.breakDown();
    expect(told).toEqual(['b first', 'EngineBrokenError: out of order']);
  });

  it('completes after the last answer, and cancels when nobody listens', () => {
    const { engine, studies, told } = following();
    studies.next('a');
    studies.complete();
    engine.answer(true);
    expect(told).toEqual(['a all']);
    engine.finish();
    expect(told).toEqual(['a all', 'complete']);

    const other = following();
    other.studies.next('a');
    other.subscription.unsubscribe();
    expect(other.engine.cancelled).toEqual(['a']);
  });
});
