import { describe, expect, it } from 'vitest';
import { variantSchema } from '../../shared/contracts/api';
import { liftTableStudy } from './support/lift-table-study';
import { endlessStudy } from './support/long-studies';
import { followRuns, isEnd, readRun, startRun } from './support/run-follower';
import { makeTeam, type Team } from './support/team';
import { useApi } from './support/test-api';

describe('runs under way', () => {
  const api = useApi({ works: true });

  const makeScenario = async ({ designer, productId }: Team, name: string, study: object) => {
    const answer = await designer.post(`/api/products/${productId}/variants`, { name, study });
    return answer.read(variantSchema).scenarios[0].id;
  };

  it('do not keep the server from answering, and end within a step when they are cancelled', async () => {
    const team = await makeTeam(api());
    const { designer } = team;
    const endless = await makeScenario(team, 'Endless', endlessStudy());
    const quick = await makeScenario(team, 'Quick', liftTableStudy());
    const follower = await followRuns(designer);
    const long = await startRun(designer, endless);
    // One person's runs wait for one another, so this one tells when the thread is free.
    const next = await startRun(designer, quick);
    await follower.until(
      ({ runId, kind, progress }) => runId === long.id && kind === 'progress' && progress > 0,
    );

    for (let i = 0; i < 30; i++) {
      expect((await api().anybody.get('/api/health')).status).toBe(200);
      expect((await api().anybody.get('/api/health/ready')).status).toBe(200);
    }
    expect(await readRun(designer, long.id)).toMatchObject({ state: 'running', result: null });
    expect(await readRun(designer, next.id)).toMatchObject({ state: 'queued' });

    const cancelled = await designer.post(`/api/runs/${long.id}/cancel`);
    expect(cancelled.status).toBe(200);
    expect(cancelled.body).toMatchObject({ id: long.id, state: 'cancelled' });
    await follower.until(isEnd(next.id));
    follower.reader.leave();
    expect(await readRun(designer, next.id)).toMatchObject({ state: 'done' });
    expect(await readRun(designer, long.id)).toMatchObject({ state: 'cancelled', result: null });
    const kinds = follower.seen.filter(({ runId }) => runId === long.id).map(({ kind }) => kind);
    expect(kinds.filter((kind) => kind !== 'progress')).toEqual(['queued', 'started', 'cancelled']);
  });

  it('that still wait are cancelled at once', async () => {
    const team = await makeTeam(api());
    const { designer } = team;
    const endless = await makeScenario(team, 'Endless', endlessStudy());
    const quick = await makeScenario(team, 'Quick', liftTableStudy());
    const follower = await followRuns(designer);
    const long = await startRun(designer, endless);
    const waiting = await startRun(designer, quick);
    const last = await startRun(designer, quick);
    await follower.until(({ runId, kind }) => runId === long.id && kind === 'started');
    await designer.post(`/api/runs/${waiting.id}/cancel`);
    expect(await readRun(designer, waiting.id)).toMatchObject({ state: 'cancelled', milliseconds: null });
    await designer.post(`/api/runs/${long.id}/cancel`);
    await follower.until(isEnd(last.id));
    follower.reader.leave();
    const kinds = follower.seen.filter(({ runId }) => runId === waiting.id).map(({ kind }) => kind);
    expect(kinds).toEqual(['queued', 'cancelled']);
  });
});
