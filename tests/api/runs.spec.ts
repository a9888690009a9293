import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { canonicalText, type Result, type Study } from '../../shared/contracts';
import { problemSchema, runListSchema, runMapSchema, variantSchema } from '../../shared/contracts/api';
import { audit, runs } from '../../server/db/schema';
import { analyseText } from '../commands/support/run-in-process';
import { liftTableStudy } from './support/lift-table-study';
import { mapStudy } from './support/long-studies';
import { followRuns, isEnd, readRun, runToEnd, startRun } from './support/run-follower';
import { makeTeam, readScenario, type Team } from './support/team';
import { useApi } from './support/test-api';

/** Of a result, what is the same wherever and whenever it was computed. */
function lasting(result: Result) {
  return { ...result, studyHash: undefined, work: result.work.boxes };
}

describe('runs', () => {
  const api = useApi({ works: true });

  const makeScenario = async ({ designer, productId }: Team, study: object) => {
    const answer = await designer.post(`/api/products/${productId}/variants`, { name: 'Standard', study });
    return answer.read(variantSchema).scenarios[0].id;
  };
  const listRuns = async ({ designer }: Team, scenarioId: string) =>
    (await designer.get(`/api/scenarios/${scenarioId}/runs`)).read(runListSchema).items;

  it('compute what the engine computes for the saved study, digit by digit', async () => {
    const team = await makeTeam(api());
    const study = liftTableStudy();
    const scenarioId = await makeScenario(team, study);
    const follower = await followRuns(team.designer);
    const begun = await startRun(team.designer, scenarioId);
    expect(begun).toMatchObject({ scenarioId, revision: 1, requestedBy: 'Dora Designer', result: null });
    await follower.until(isEnd(begun.id));
    follower.reader.leave();
    const kinds = follower.seen.filter(({ runId }) => runId === begun.id).map(({ kind }) => kind);
    expect(kinds.filter((kind) => kind !== 'progress')).toEqual(['queued', 'started', 'done']);

    const run = await readRun(team.viewer, begun.id);
    const expected = analyseText(canonicalText(study));
    expect(run).toMatchObject({ state: 'done', progress: 1, error: null, engine: expected.engine });
    expect(run.milliseconds).toBeGreaterThanOrEqual(0);
    expect(run.result?.studyHash).toBe(run.studyHash);
    expect(run.result && lasting(run.result)).toEqual(lasting(expected));
  });

  it('hand out the text of the result as it was stored', async () => {
    const team = await makeTeam(api());
    const { id } = await runToEnd(team.designer, await makeScenario(team, liftTableStudy()));
    const [{ result }] = await api().database.db.select().from(runs).where(eq(runs.id, id));
    const { text } = await team.viewer.get(`/api/runs/${id}`);
    expect(text.endsWith(`,"result":${result}}`)).toBe(true);
  });

  it('show in lists what they found, in the unit of the payload', async () => {
    const team = await makeTeam(api());
    const study = {
      ...liftTableStudy(),
      rating: { payload: 480, step: 25, tests: [{ name: 'static', factor: 1.25 }] },
    };
    const scenarioId = await makeScenario(team, study);
    const run = await runToEnd(team.designer, scenarioId);
    const figures = {
      unit: 'kg',
      verdict: run.result?.bands.verdict,
      proof: 'proved',
      approximated: false,
      ratedLow: 40,
      ratedHigh: 480,
      provedLow: run.result?.smallestPayload?.provedTo,
      provedHigh: run.result?.largestPayload?.provedTo,
      failsAt: run.result?.largestPayload?.failsAt,
      failsBelow: null,
      plate: run.result?.rating?.plate,
      limiting: 'dampingRatio',
    };
    expect(await listRuns(team, scenarioId)).toMatchObject([{ id: run.id, state: 'done', figures }]);
    const { head } = await readScenario(team.viewer, scenarioId);
    expect(head.run).toEqual({ id: run.id, state: 'done', at: run.finishedAt, ...figures });
  });

  it('state the rated range of an expression, and none without a payload', async () => {
    const team = await makeTeam(api());
    const { parameters, ...study } = liftTableStudy();
    const [payload, ...others] = parameters;
    const inPounds = { ...payload, unit: 'lb', nominal: 600, low: '5*m0', high: 1000 };
    const scenarioId = await makeScenario(team, { ...study, parameters: [inPounds, ...others] });
    await runToEnd(team.designer, scenarioId);
    const [pounds] = await listRuns(team, scenarioId);
    expect(pounds.figures).toMatchObject({ unit: 'lb', ratedLow: 600, ratedHigh: 1000 });

    const other = await makeTeam(api());
    const bare = await makeScenario(other, { ...liftTableStudy(), payload: undefined });
    await runToEnd(other.designer, bare);
    const [run] = await listRuns(other, bare);
    expect(run.figures).toMatchObject({ unit: null, ratedLow: null, ratedHigh: null, provedHigh: null });
  });

  it('compute the map of the study beside the result', async () => {
    const team = await makeTeam(api());
    for (const others of ['nominal', 'anywhere'] as const) {
      const study: Study = { ...mapStudy(9, 7), map: { ...mapStudy(9, 7).map, x: 'm', y: 'k', others } };
      const scenarioId = await makeScenario(
        { ...team, productId: await api().product(team.designer, [[team.designer, 'designer']]) },
        study,
      );
      const run = await runToEnd(team.designer, scenarioId);
      expect(run.result?.map).toBeUndefined();
      const map = (await team.designer.get(`/api/runs/${run.id}/map`)).read(runMapSchema);
      expect(map).toEqual(analyseText(canonicalText(study), true).map);
    }
  });

  it('have no map where the study has none', async () => {
    const team = await makeTeam(api());
    const { id } = await runToEnd(team.designer, await makeScenario(team, liftTableStudy()));
    expect((await team.viewer.get(`/api/runs/${id}/map`)).status).toBe(404);
  });

  it('are computed again when asked again, and stand beside each other', async () => {
    const team = await makeTeam(api());
    const scenarioId = await makeScenario(team, liftTableStudy());
    const first = await runToEnd(team.designer, scenarioId);
    const second = await runToEnd(team.designer, scenarioId);
    expect((await listRuns(team, scenarioId)).map(({ id }) => id)).toEqual([second.id, first.id]);
    expect(second.result && lasting(second.result)).toEqual(first.result && lasting(first.result));
  });

  it('fail with the faults of the study', async () => {
    const team = await makeTeam(api());
    const study = { ...liftTableStudy(), definitions: { stiff: 'k*unknown' } };
    const run = await runToEnd(team.designer, await makeScenario(team, study));
    expect(run).toMatchObject({ state: 'failed', result: null });
    expect(run.error).toMatch(/^definitions\.stiff: .*unknown/);
  });

  it('are started and cancelled by designers, read by whoever may view, and hidden from others', async () => {
    const team = await makeTeam(api());
    const scenarioId = await makeScenario(team, liftTableStudy());
    const { id } = await runToEnd(team.designer, scenarioId);
    const stranger = await api().person();
    const start = `/api/scenarios/${scenarioId}/revisions/1/runs`;
    for (const reader of [team.reviewer, team.viewer, team.administrator]) {
      expect((await reader.post(start)).status).toBe(403);
      expect((await reader.post(`/api/runs/${id}/cancel`)).status).toBe(403);
      expect((await reader.get(`/api/runs/${id}`)).status).toBe(200);
      expect((await reader.get(`/api/scenarios/${scenarioId}/runs`)).status).toBe(200);
    }
    expect((await stranger.post(start)).status).toBe(404);
    for (const path of [`/api/runs/${id}`, `/api/runs/${id}/map`, `/api/scenarios/${scenarioId}/runs`]) {
      expect((await stranger.get(path)).status).toBe(404);
      expect((await api().anybody.get(path)).status).toBe(401);
    }
  });

  it('need a revision that is there', async () => {
    const team = await makeTeam(api());
    const scenarioId = await makeScenario(team, liftTableStudy());
    for (const number of ['2', '0', '-1', '1.5', 'x', '99999999999']) {
      const answer = await team.designer.post(`/api/scenarios/${scenarioId}/revisions/${number}/runs`);
      expect(answer.status).toBe(404);
    }
    expect(await listRuns(team, scenarioId)).toEqual([]);
  });

  it('cannot be cancelled when they are over', async () => {
    const team = await makeTeam(api());
    const { id } = await runToEnd(team.designer, await makeScenario(team, liftTableStudy()));
    const answer = await team.designer.post(`/api/runs/${id}/cancel`);
    expect(answer.status).toBe(409);
    expect(answer.read(problemSchema)).toMatchObject({ code: 'run-over' });
    expect(await readRun(team.designer, id)).toMatchObject({ state: 'done' });
  });

  it('are written down in the audit', async () => {
    const team = await makeTeam(api());
    const { id } = await runToEnd(team.designer, await makeScenario(team, liftTableStudy()));
    const entries = await api().database.db.select().from(audit).where(eq(audit.objectId, id));
    expect(entries).toMatchObject([{ action: 'run.start', personId: team.designer.id, objectKind: 'run' }]);
  });
});
