import { type Run, type RunEvent, runEventSchema, runSchema } from '../../../shared/contracts/api';
import { type EventReader, openEvents } from './event-reader';
import type { TestPerson } from './test-people';

/** The stream of run events as somebody's browser reads it. */
export interface RunFollower {
  readonly reader: EventReader;
  /** The next event that fits, waited for; those before it are kept in `seen`. */
  until(fits: (event: RunEvent) => boolean): Promise<RunEvent>;
  readonly seen: readonly RunEvent[];
}

/** @param after the last event seen; by default all events that there ever were are told */
export async function followRuns(person: TestPerson, after = 0): Promise<RunFollower> {
  const reader = await openEvents(`${person.address}/api/events`, {
    cookie: person.cookie ?? '',
    'last-event-id': String(after),
  });
  const seen: RunEvent[] = [];
  return {
    reader,
    seen,
    until: async (fits) => {
      for (;;) {
        const next = await reader.next();
        if (next === undefined) throw new Error(`the stream ended after ${JSON.stringify(seen)}`);
        const event = runEventSchema.parse(next.data);
        seen.push(event);
        if (fits(event)) return event;
      }
    },
  };
}

export async function startRun(by: TestPerson, scenarioId: string, revision = 1): Promise<Run> {
  const answer = await by.post(`/api/scenarios/${scenarioId}/revisions/${revision}/runs`);
  if (answer.status !== 202) throw new Error(`no run was started: ${answer.text}`);
  return answer.read(runSchema);
}

export async function readRun(by: TestPerson, runId: string): Promise<Run> {
  return (await by.get(`/api/runs/${runId}`)).read(runSchema);
}

export const isEnd =
  (runId: string) =>
  ({ runId: of, kind }: RunEvent): boolean =>
    of === runId && ['done', 'failed', 'cancelled'].includes(kind);

/** Starts a run and waits for its end. */
export async function runToEnd(by: TestPerson, scenarioId: string): Promise<Run> {
  const follower = await followRuns(by);
  try {
    const { id } = await startRun(by, scenarioId);
    await follower.until(isEnd(id));
    return await readRun(by, id);
  } finally {
    follower.reader.leave();
  }
}
