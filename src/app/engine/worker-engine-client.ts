import { Observable, type Subscriber } from 'rxjs';
import { StudyFaultError, type MapAnswer } from '../../../shared/contracts';
import { EngineBrokenError, EngineClient, type LiveAnswer, type LiveGrid } from './engine-client';
import type { EngineReply, EngineRequest } from './engine-messages';

/** As much of a Worker as is used here. */
export interface EngineWorker {
  postMessage(request: EngineRequest): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<EngineReply>) => void) | null;
  onmessageerror: ((event: MessageEvent) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

/** A request somebody waits for. */
interface Waiting {
  take(reply: EngineReply): void;
  fail(error: Error): void;
}

/** The engine in one web worker, started by the first request and again by the first one after it broke. */
export class WorkerEngineClient extends EngineClient {
  private worker: EngineWorker | undefined;
  private readonly waiting = new Map<number, Waiting>();
  private lastId = 0;

  constructor(private readonly start: () => EngineWorker) {
    super();
  }

  override live(study: unknown): Observable<LiveAnswer> {
    return this.ask<LiveAnswer>(
      (id) => ({ kind: 'live', id, study }),
      (reply) => (reply.kind === 'live' ? reply.answer : undefined),
    );
  }

  override map(study: unknown, grid: LiveGrid): Observable<MapAnswer> {
    return this.ask<MapAnswer>(
      (id) => ({ kind: 'map', id, study, grid }),
      (reply) => (reply.kind === 'map' ? reply.map : undefined),
    );
  }

  /** Ends the worker; nobody who waits is told. */
  close(): void {
    this.worker?.terminate();
    this.worker = undefined;
    this.waiting.clear();
  }

  private ask<Answer>(
    request: (id: number) => EngineRequest,
    answerOf: (reply: EngineReply) => Answer | undefined,
  ): Observable<Answer> {
    return new Observable<Answer>((subscriber) => {
      const id = ++this.lastId;
      const worker = this.runningWorker();
      worker.postMessage(request(id));
      this.waiting.set(id, {
        take: (reply) => this.pass(reply, subscriber, answerOf),
        fail: (error) => subscriber.error(error),
      });
      return () => {
        if (this.waiting.delete(id)) worker.postMessage({ kind: 'cancel', id });
      };
    });
  }

  private pass<Answer>(
    reply: EngineReply,
    subscriber: Subscriber<Answer>,
    answerOf: (reply: EngineReply) => Answer | undefined,
  ): void {
    const answer = answerOf(reply);
    if (answer !== undefined) {
      subscriber.next(answer);
      return;
    }
    // It has ended over there: there is nothing to cancel.
    this.waiting.delete(reply.id);
    if (reply.kind === 'done') subscriber.complete();
    else if (reply.kind === 'faults') subscriber.error(new StudyFaultError(reply.faults));
    else
      subscriber.error(new EngineBrokenError(reply.kind === 'broken' ? reply.message : 'mixed-up answers'));
  }

  private runningWorker(): EngineWorker {
    if (this.worker !== undefined) return this.worker;
    const worker = this.start();
    worker.onmessage = ({ data }) => this.waiting.get(data.id)?.take(data);
    worker.onerror = ({ message }) => this.giveUp(worker, message);
    worker.onmessageerror = () => this.giveUp(worker, 'a message could not be read');
    this.worker = worker;
    return worker;
  }

  /** Its requests fail rather than start over: one of them may be what broke it. */
  private giveUp(worker: EngineWorker, message: string): void {
    if (this.worker !== worker) return;
    worker.terminate();
    this.worker = undefined;
    const lost = [...this.waiting.values()];
    this.waiting.clear();
    for (const request of lost) request.fail(new EngineBrokenError(message || 'the worker broke'));
  }
}
