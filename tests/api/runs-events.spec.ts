import { and, eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { memberships, sessions } from '../../server/db/schema';
import type { RunEvent } from '../../shared/contracts/api';
import { openEvents } from './support/event-reader';
import { followRuns, type RunFollower, startRun } from './support/run-follower';
import { makeScenario, makeTeam } from './support/team';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

describe('the stream of run events', () => {
  // Nobody works on the queue: every run leaves one event when it is started, and one when it is cancelled.
  const api = useApi();

  const startAndCancel = async (designer: TestPerson, scenarioId: string): Promise<string> => {
    const { id } = await startRun(designer, scenarioId);
    await designer.post(`/api/runs/${id}/cancel`);
    return id;
  };
  const isCancelled =
    (id: string) =>
    ({ runId, kind }: RunEvent) =>
      runId === id && kind === 'cancelled';
  const leave = (followers: readonly RunFollower[]) => followers.forEach(({ reader }) => reader.leave());

  it('tells ids that rise, from the database, and goes on after the last one seen', async () => {
    const team = await makeTeam(api());
    const { id: scenarioId } = await makeScenario(team, 'Standard');
    const first = await startAndCancel(team.designer, scenarioId);
    const follower = await followRuns(team.viewer);
    const last = await follower.until(isCancelled(first));
    follower.reader.leave();
    expect(follower.seen).toMatchObject([
      { runId: first, scenarioId, kind: 'queued', progress: 0 },
      { runId: first, scenarioId, kind: 'cancelled', progress: 0 },
    ]);

    const missed = await startAndCancel(team.designer, scenarioId);
    const again = await followRuns(team.viewer, Number(last.id));
    await again.until(isCancelled(missed));
    const next = await startAndCancel(team.designer, scenarioId);
    await again.until(isCancelled(next));
    again.reader.leave();
    expect(again.seen.map(({ runId }) => runId)).toEqual([missed, missed, next, next]);
    const ids = [...follower.seen, ...again.seen].map(({ id }) => Number(id));
    expect(ids).toEqual([...new Set(ids)].sort((a, b) => a - b));
  });

  it('begins with what happens from now on where nothing was seen before', async () => {
    const team = await makeTeam(api());
    const { id: scenarioId } = await makeScenario(team, 'Standard');
    const before = await startAndCancel(team.designer, scenarioId);
    const reader = await openEvents(`${api().address}/api/events`, { cookie: team.viewer.cookie ?? '' });
    // The stream is open when its headers are here, and looks where it begins right after.
    let run = await startRun(team.designer, scenarioId);
    const arrived = reader.next();
    const isThere = { yet: false };
    void arrived.then(() => {
      isThere.yet = true;
    });
    while (!isThere.yet) run = await startRun(team.designer, scenarioId);
    expect(run.id).not.toBe(before);
    expect((await arrived)?.data).not.toMatchObject({ runId: before });
    reader.leave();
  });

  it('tells of the products that the reader may view, and of no others', async () => {
    const ours = await makeTeam(api());
    const theirs = await makeTeam(api());
    const ourScenario = await makeScenario(ours, 'Standard');
    const theirScenario = await makeScenario(theirs, 'Standard');
    const follower = await followRuns(ours.viewer);
    const administrator = await followRuns(ours.administrator);
    const hidden = await startAndCancel(theirs.designer, theirScenario.id);
    const shown = await startAndCancel(ours.designer, ourScenario.id);
    await follower.until(isCancelled(shown));
    await administrator.until(isCancelled(shown));
    leave([follower, administrator]);
    expect(follower.seen.map(({ runId }) => runId)).toEqual([shown, shown]);
    expect(administrator.seen.some(({ runId }) => runId === hidden)).toBe(true);
  });

  it('falls silent when the session or the role is taken away', async () => {
    const team = await makeTeam(api());
    const { db } = api().database;
    const { designer, viewer, secondDesigner } = team;
    const { id: scenarioId } = await makeScenario(team, 'Standard');
    const productId = await api().product(designer, [
      [designer, 'designer'],
      [viewer, 'viewer'],
    ]);
    const { id: otherId } = await makeScenario({ designer, productId }, 'Other');
    const setExpiry = (expiresAt: Date) =>
      db.update(sessions).set({ expiresAt }).where(eq(sessions.personId, viewer.id));
    const [follower, witness] = await Promise.all([followRuns(viewer), followRuns(secondDesigner)]);
    const first = await startAndCancel(designer, scenarioId);
    await follower.until(isCancelled(first));

    await setExpiry(new Date(0));
    const unseen = await startAndCancel(designer, scenarioId);
    await witness.until(isCancelled(unseen));
    await db
      .delete(memberships)
      .where(and(eq(memberships.productId, team.productId), eq(memberships.personId, viewer.id)));
    await setExpiry(new Date(Date.now() + 3600_000));
    const hidden = await startAndCancel(designer, scenarioId);
    await witness.until(isCancelled(hidden));
    const other = await startAndCancel(designer, otherId);
    await follower.until(isCancelled(other));
    follower.reader.leave();
    witness.reader.leave();
    expect(follower.seen.map(({ runId }) => runId)).toEqual([first, first, other, other]);
  });

  it('is for people who have signed in, in so many windows', async () => {
    const { viewer } = await makeTeam(api());
    const url = `${api().address}/api/events`;
    expect((await api().anybody.get('/api/events')).status).toBe(401);
    const windows = await Promise.all(Array.from({ length: 8 }, () => followRuns(viewer)));
    expect(windows.map(({ reader }) => reader.status)).toEqual(Array(8).fill(200));
    const tooMany = await viewer.get('/api/events');
    expect(tooMany.status).toBe(429);
    expect(tooMany.body).toMatchObject({ code: 'too-many-at-once' });
    windows[0].reader.leave();
    await expect
      .poll(async () => {
        const reader = await openEvents(url, { cookie: viewer.cookie ?? '' });
        windows.push({ ...windows[0], reader });
        return reader.status;
      })
      .toBe(200);
    leave(windows);
  });
});
