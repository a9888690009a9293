import type { Log } from './log';

/** npm passes on a Ctrl-C that the terminal has already sent: two signals within this time are one. */
const SAME_PRESS_MS = 500;

export interface ShutdownOptions {
  readonly log: Log;
  /** Ends the work in order; the process leaves when it is done. */
  readonly stop: () => Promise<void>;
  /** Called instead of waiting, when a second signal comes; what must not outlive the process ends here. */
  readonly force: () => void;
}

/**
 * Stops the process in order on SIGINT and SIGTERM, with status 0, and at once on a second signal, with status
 * 1.
 */
export function stopOnSignals({ log, stop, force }: ShutdownOptions): void {
  let since: number | undefined;
  const onSignal = (signal: NodeJS.Signals) => {
    if (since !== undefined) {
      if (performance.now() - since < SAME_PRESS_MS) return;
      log.warn({ signal }, 'second signal: leaving at once');
      force();
      process.exit(1);
    }
    since = performance.now();
    log.info({ signal }, 'stopping');
    stop().then(
      () => process.exit(0),
      (error: unknown) => {
        log.error({ error }, 'stopping failed');
        force();
        process.exit(1);
      },
    );
  };
  process.on('SIGINT', onSignal);
  process.on('SIGTERM', onSignal);
}
