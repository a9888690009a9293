import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Piscina } from 'piscina';
import { StudyFaultError } from '../../shared/contracts';
import type { Log } from '../platform/log';
import { packageRoot } from '../platform/package-root';
import type { AnalysisAnswer, EngineOrder, EngineReply, EngineTask, MapGrid } from './engine-task';
import { RunControl } from './run-control';

export interface EngineCall {
  /** Ends the computation; the promise is rejected with the signal's reason at once. */
  readonly signal?: AbortSignal;
  /** Told the share that is done, several times a second. */
  readonly onProgress?: (share: number) => void;
}

/** The engine, in threads of its own: asking it never keeps the server from answering. */
export interface Engine {
  /** Of the engine that computes here. */
  version(): Promise<string>;
  /**
   * The whole analysis of a study's text.
   *
   * @param map whether the study's map is computed too
   * @throws StudyFaultError
   */
  analyse(study: string, map: boolean, call?: EngineCall): Promise<AnalysisAnswer>;
  /**
   * The map of a study's text alone, as the JSON text of a result's `map`.
   *
   * @throws StudyFaultError
   */
  map(study: string, grid: MapGrid, call?: EngineCall): Promise<string>;
  /** Ends whatever is under way. */
  close(): Promise<void>;
}

export interface EngineOptions {
  /** Most computations at a time. */
  readonly threads: number;
  /** Threads that stay ready without work. */
  readonly ready?: number;
  readonly log: Log;
}

const WATCH_MS = 200;
/** A thread that has been asked to stop and does not within this time is ended from outside. */
const PATIENCE_MS = 5_000;
const IDLE_MS = 60_000;
/** A study that needs more fails alone, and takes nothing with it. */
const LARGEST_HEAP_MB = 1024;

/** From a source it is a source, beside a bundle a bundle; both are found from the project's folder. */
const isSource = import.meta.url.endsWith('.ts');
const threadFile = isSource
  ? join(packageRoot, 'server', 'jobs', 'worker', 'engine-worker.ts')
  : join(packageRoot, 'dist', 'commands', 'engine-worker.mjs');

function createPool({ threads, ready = 0, log }: EngineOptions): Piscina<EngineOrder, EngineReply> {
  const pool = new Piscina<EngineOrder, EngineReply>({
    filename: pathToFileURL(threadFile).href,
    execArgv: isSource ? ['--import', 'tsx'] : [],
    minThreads: ready,
    maxThreads: threads,
    idleTimeout: IDLE_MS,
    recordTiming: false,
    resourceLimits: { maxOldGenerationSizeMb: LARGEST_HEAP_MB },
  });
  pool.on('error', (error) => log.error({ error }, 'a thread of the engine broke'));
  return pool;
}

/** Rejects with the signal's reason when it aborts. */
function abortionOf(signal: AbortSignal, onAbort: () => void): { promise: Promise<never>; forget(): void } {
  let listener = () => {};
  const promise = new Promise<never>((_resolve, reject) => {
    listener = () => {
      onAbort();
      reject(signal.reason instanceof Error ? signal.reason : new Error('the computation was ended'));
    };
    signal.addEventListener('abort', listener);
  });
  return { promise, forget: () => signal.removeEventListener('abort', listener) };
}

export function createEngine(options: EngineOptions): Engine {
  const pool = createPool(options);
  let version: Promise<string> | undefined;

  const run = async (task: EngineTask, { signal, onProgress }: EngineCall): Promise<EngineReply> => {
    signal?.throwIfAborted();
    const control = new RunControl();
    const force = new AbortController();
    let patience: NodeJS.Timeout | undefined;
    const reply = pool
      .run({ task, control: control.buffer }, { signal: force.signal })
      .finally(() => clearTimeout(patience));
    const abortion =
      signal &&
      abortionOf(signal, () => {
        control.askToStop();
        patience = setTimeout(() => force.abort(), PATIENCE_MS);
        // Nobody waits for it any longer.
        reply.catch(() => undefined);
      });
    const watch = onProgress && setInterval(() => onProgress(control.share), WATCH_MS);
    try {
      return await (abortion === undefined ? reply : Promise.race([reply, abortion.promise]));
    } finally {
      clearInterval(watch);
      abortion?.forget();
    }
  };

  const ask = async <Kind extends EngineTask['kind']>(
    task: EngineTask & { kind: Kind },
    call: EngineCall = {},
  ): Promise<Extract<EngineReply, { kind: Kind }>> => {
    const reply = await run(task, call);
    if (reply.kind === 'faults') throw new StudyFaultError(reply.faults);
    if (reply.kind !== task.kind) throw new Error(`the engine answered ${task.kind} by ${reply.kind}`);
    return reply as Extract<EngineReply, { kind: Kind }>;
  };

  return {
    version: () => {
      version ??= ask({ kind: 'version' }).then(
        (reply) => reply.version,
        (error: unknown) => {
          version = undefined;
          throw error;
        },
      );
      return version;
    },
    analyse: async (study, map, call) => (await ask({ kind: 'analysis', study, map }, call)).answer,
    map: async (study, grid, call) => (await ask({ kind: 'map', study, grid }, call)).text,
    close: () => pool.destroy(),
  };
}
