import { type SQL, sql } from 'drizzle-orm';
import type { RunEvent } from '../../../shared/contracts/api';
import type { EventFeed } from '../../db';
import { runEvents } from '../../db/schema';
import type { Caller, StreamEvent } from '../../platform/routing';
import { tooManyStreams } from './runs.errors';

/** More windows than a browser opens connections for. */
const MOST_STREAMS = 8;

/**
 * Events of runs in the products that somebody may view, as long as their session lives: both are looked up
 * again for every event, so that a role or a session which is taken away ends it at once.
 */
function visibleTo({ personId, sessionId, organisationRole }: Caller): SQL {
  const isSignedIn = sql`exists (
    select from sessions where sessions.id = ${sessionId} and sessions.expires_at > now())`;
  if (organisationRole === 'administrator') return isSignedIn;
  return sql`${isSignedIn} and exists (
    select from runs
      join scenario_revisions on scenario_revisions.id = runs.scenario_revision_id
      join scenarios on scenarios.id = scenario_revisions.scenario_id
      join variants on variants.id = scenarios.variant_id
      join memberships on memberships.product_id = variants.product_id
    where runs.id = ${runEvents.runId} and memberships.person_id = ${personId})`;
}

function asRunEvent({ id, kind, data }: StreamEvent): StreamEvent {
  const { runId, scenarioId, progress } = data as Pick<RunEvent, 'runId' | 'scenarioId' | 'progress'>;
  return { id, kind, data: { id: String(id), runId, scenarioId, kind, progress } };
}

async function* mapped(events: AsyncIterable<StreamEvent>, onEnd: () => void): AsyncGenerator<StreamEvent> {
  try {
    for await (const event of events) yield asRunEvent(event);
  } finally {
    onEnd();
  }
}

export interface FollowRuns {
  readonly caller: Caller;
  readonly after: number | undefined;
  readonly signal: AbortSignal;
}

/**
 * Streams of run events, one for each window.
 *
 * @returns opens one; it throws the problem too-many-at-once
 */
export function createRunStreams(feed: EventFeed): (options: FollowRuns) => AsyncIterable<StreamEvent> {
  const open = new Map<string, number>();
  return ({ caller, after, signal }) => {
    const { sessionId } = caller;
    const count = open.get(sessionId) ?? 0;
    if (count >= MOST_STREAMS) throw tooManyStreams(MOST_STREAMS);
    open.set(sessionId, count + 1);
    const close = () => {
      const left = (open.get(sessionId) ?? 1) - 1;
      if (left > 0) open.set(sessionId, left);
      else open.delete(sessionId);
    };
    return mapped(feed.follow({ after, where: visibleTo(caller), signal }), close);
  };
}
