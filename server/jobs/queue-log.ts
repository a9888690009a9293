import { Logger } from 'graphile-worker';
import type { Log } from '../platform/log';

/** The queue's own messages in our log. What it calls information is of use for its maintainers only. */
export function queueLog(log: Log): Logger {
  return new Logger(() => (level, message) => {
    if (String(level) === 'error') log.error({ source: 'queue' }, message);
    else if (String(level) === 'warning') log.warn({ source: 'queue' }, message);
    else log.debug({ source: 'queue' }, message);
  });
}
