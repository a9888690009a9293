import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { problemSchema, scenarioDraftSchema } from '../../shared/contracts/api';
import { liftTableStudy } from './support/lift-table-study';
import { makeScenario, makeTeam, readScenario } from './support/team';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

const conflictSchema = problemSchema.extend({
  current: scenarioDraftSchema.nullable(),
  sent: z.object({ version: z.int(), baseRevision: z.int().optional(), study: z.unknown().optional() }),
});

describe('drafts', () => {
  const api = useApi();

  const keep = (by: TestPerson, scenarioId: string, version: number, study: unknown, baseRevision = 1) =>
    by.put(`/api/scenarios/${scenarioId}/draft`, { baseRevision, version, study });
  const draftOf = async (by: TestPerson, scenarioId: string) => (await readScenario(by, scenarioId)).draft;

  it('are kept for each person apart, and rise in version', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const study = liftTableStudy({ heaviest: 500 });
    const first = (await keep(team.designer, id, 0, study)).read(scenarioDraftSchema);
    expect(first).toMatchObject({ baseRevision: 1, study });
    expect(await draftOf(team.designer, id)).toEqual(first);
    expect(await draftOf(team.secondDesigner, id)).toBeNull();
    expect((await keep(team.secondDesigner, id, 0, liftTableStudy())).status).toBe(200);
    const second = (await keep(team.designer, id, first.version, liftTableStudy())).read(scenarioDraftSchema);
    expect(second.version).toBe(first.version + 1);
    expect(await draftOf(team.designer, id)).toEqual(second);
  });

  it('keep what is not usable yet, but not what is no study at all', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const unfinished = { ...liftTableStudy(), control: { law: 'pid', kp: '' }, requirements: [] };
    const kept = (await keep(team.designer, id, 0, unfinished)).read(scenarioDraftSchema);
    expect(kept.study).toEqual(unfinished);
    expect((await keep(team.designer, id, kept.version, 'text')).status).toBe(422);
    const deep = `${'['.repeat(100_000)}${']'.repeat(100_000)}`;
    const path = `/api/scenarios/${id}/draft`;
    const text = `{"baseRevision":1,"version":${kept.version},"study":{"machine":${deep}}}`;
    expect((await team.designer.send('PUT', path, { text })).status).toBe(422);
    const elsewhere = await keep(team.designer, id, kept.version, unfinished, 9);
    expect(elsewhere.read(problemSchema)).toMatchObject({ status: 422, code: 'base-revision-unknown' });
    expect(await draftOf(team.designer, id)).toEqual(kept);
  });

  it('answer a window that was overtaken with both versions', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const { designer } = team;
    const studies = [500, 510, 520].map((heaviest) => liftTableStudy({ heaviest }));
    const { version } = (await keep(designer, id, 0, studies[0])).read(scenarioDraftSchema);
    const newer = (await keep(designer, id, version, studies[1])).read(scenarioDraftSchema);
    for (const stale of [version, 0]) {
      const refused = await keep(designer, id, stale, studies[2]);
      expect(refused.status).toBe(409);
      const problem = refused.read(conflictSchema);
      expect(problem.code).toBe('draft-changed');
      expect(problem.current).toEqual(newer);
      expect(problem.sent).toEqual({ baseRevision: 1, version: stale, study: studies[2] });
    }
    expect(await draftOf(designer, id)).toEqual(newer);
  });

  it('let exactly one of many windows win that save at once', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    let version = 0;
    for (let round = 0; round < 20; round++) {
      const attempts = await Promise.all(
        [0, 1, 2, 3].map((i) => keep(team.designer, id, version, liftTableStudy({ heaviest: 600 + i }))),
      );
      expect(attempts.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
      const won = attempts.find(({ status }) => status === 200)?.read(scenarioDraftSchema);
      const draft = await draftOf(team.designer, id);
      expect(draft).toEqual(won);
      version = draft?.version ?? 0;
    }
  });

  it('are thrown away only in the version that was seen, and never taken for a later one', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const path = `/api/scenarios/${id}/draft`;
    const { designer } = team;
    const first = (await keep(designer, id, 0, liftTableStudy())).read(scenarioDraftSchema);
    const second = (await keep(designer, id, first.version, liftTableStudy())).read(scenarioDraftSchema);
    const refused = await designer.delete(`${path}?version=${first.version}`);
    expect(refused.read(conflictSchema)).toMatchObject({ status: 409, current: second });
    expect((await designer.delete(`${path}?version=${second.version}`)).status).toBe(204);
    expect((await designer.delete(path)).status).toBe(204);
    expect(await draftOf(designer, id)).toBeNull();

    const gone = (await keep(designer, id, second.version, liftTableStudy())).read(conflictSchema);
    expect(gone.current).toBeNull();
    await keep(designer, id, 0, liftTableStudy({ heaviest: 700 }));
    expect((await keep(designer, id, first.version, liftTableStudy())).status).toBe(409);
  });

  it('go when they are saved as a revision, and stay where another window went on', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const { designer, secondDesigner } = team;
    const study = liftTableStudy({ heaviest: 500 });
    const save = (baseRevision: number) =>
      designer.post(`/api/scenarios/${id}/revisions`, { baseRevision, study, note: '' });
    await keep(designer, id, 0, study);
    await keep(secondDesigner, id, 0, study);
    expect((await save(1)).status).toBe(201);
    expect(await draftOf(designer, id)).toBeNull();
    expect((await draftOf(secondDesigner, id))?.baseRevision).toBe(1);

    const ahead = (await keep(designer, id, 0, liftTableStudy({ heaviest: 600 }), 2)).read(
      scenarioDraftSchema,
    );
    expect((await save(2)).status).toBe(201);
    expect(await draftOf(designer, id)).toEqual(ahead);
  });
});
