import { createLog, type Log } from '../../../server/platform/log';

/** A log whose lines stay in memory. */
export interface MemoryLog {
  readonly log: Log;
  readonly lines: readonly string[];
}

export function memoryLog(): MemoryLog {
  const lines: string[] = [];
  return { log: createLog('debug', { write: (line) => void lines.push(line) }), lines };
}
