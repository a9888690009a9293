import { DestroyRef, Injectable, effect, inject, signal } from '@angular/core';
import { Subject } from 'rxjs';
import { runEventSchema, type RunEvent } from '../../../../shared/contracts/api';
import { Session } from '../session';

const NAME = 'tareline-run-events';
const PATH = '/api/events';
const RETRY_MILLISECONDS = 4000;

type Message = { readonly event: unknown } | { readonly live: boolean };

/**
 * What happens to runs, as it happens. One tab of the browser holds the connection, by a lock that passes to the next
 * tab when it closes, and tells the others. The stream is a view, not the truth: after a gap `live` turns true again
 * and readers ask for the run itself.
 */
@Injectable({ providedIn: 'root' })
export class RunEvents {
  private readonly session = inject(Session);
  private readonly received = new Subject<RunEvent>();
  private readonly connected = signal(false);

  readonly events = this.received.asObservable();
  /** False while nothing may be heard; a reader then asks from time to time. */
  readonly live = this.connected.asReadonly();

  private readonly channel = new BroadcastChannel(NAME);
  private ending: AbortController | undefined;

  constructor() {
    this.channel.onmessage = ({ data }: MessageEvent<Message>) => this.take(data);
    effect(() => {
      if (this.session.person() === null) this.stop();
      else this.start();
    });
    inject(DestroyRef).onDestroy(() => {
      this.stop();
      this.channel.close();
    });
  }

  private start(): void {
    if (this.ending !== undefined) return;
    const ending = new AbortController();
    this.ending = ending;
    void navigator.locks
      .request(NAME, { signal: ending.signal }, () => this.hold(ending.signal))
      .catch((error: unknown) => {
        if (!ending.signal.aborted) throw error;
      });
  }

  private stop(): void {
    this.ending?.abort();
    this.ending = undefined;
    this.connected.set(false);
  }

  /** Keeps the connection until this tab is done with it. */
  private hold(end: AbortSignal): Promise<void> {
    return new Promise((resolve) => {
      let source: EventSource | undefined;
      let retry: ReturnType<typeof setTimeout> | undefined;
      const open = (): void => {
        source = new EventSource(PATH);
        source.onopen = () => this.tell({ live: true });
        // Each kind of event comes under its own name.
        for (const kind of runEventSchema.shape.kind.options) {
          source.addEventListener(kind, ({ data }: MessageEvent<string>) =>
            this.tell({ event: JSON.parse(data) }),
          );
        }
        source.onerror = () => {
          this.tell({ live: false });
          // Otherwise the browser connects again by itself and says which event it saw last.
          if (source?.readyState === EventSource.CLOSED) retry = setTimeout(open, RETRY_MILLISECONDS);
        };
      };
      end.addEventListener('abort', () => {
        clearTimeout(retry);
        source?.close();
        this.tell({ live: false });
        resolve();
      });
      open();
    });
  }

  private tell(message: Message): void {
    this.channel.postMessage(message);
    this.take(message);
  }

  private take(message: Message): void {
    if ('live' in message) {
      this.connected.set(message.live);
      return;
    }
    const event = runEventSchema.safeParse(message.event);
    if (!event.success) return;
    // A tab that came later than the connection learns here that there is one.
    this.connected.set(true);
    this.received.next(event.data);
  }
}
