import { createHash } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { answerText, canonicalText } from '../../shared/contracts';
import {
  listedRevisionSchema,
  problemSchema,
  scenarioRevisionSchema,
  scenarioSchema,
} from '../../shared/contracts/api';
import { audit, reviews, scenarioRevisions } from '../../server/db/schema';
import { liftTableStudy } from './support/lift-table-study';
import { makeRun, makeScenario, makeTeam, readScenario, type Team } from './support/team';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

const revisionListSchema = z.object({ items: z.array(listedRevisionSchema) });
const conflictSchema = problemSchema.extend({
  current: scenarioRevisionSchema,
  sent: z.object({ baseRevision: z.int(), study: z.unknown(), note: z.string() }),
});

/** The same value with the keys of every object in the opposite order. */
function reversed(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(reversed);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([key, entry]) => [key, reversed(entry)]),
  );
}

const sha256 = (text: string) => `sha256:${createHash('sha256').update(text).digest('hex')}`;

describe('scenarios', () => {
  const api = useApi();

  const save = (by: TestPerson, scenarioId: string, baseRevision: number, study: unknown, note = '') =>
    by.post(`/api/scenarios/${scenarioId}/revisions`, { baseRevision, study, note });

  const rowsOf = (scenarioId: string) =>
    api()
      .database.db.select()
      .from(scenarioRevisions)
      .where(eq(scenarioRevisions.scenarioId, scenarioId))
      .orderBy(scenarioRevisions.number);

  it('tells everything around it', async () => {
    const team = await makeTeam(api());
    const scenario = await makeScenario(team, 'Short');
    expect(scenario).toMatchObject({
      name: 'Rated',
      variantName: 'Short',
      productId: team.productId,
      role: 'designer',
      draft: null,
      head: { number: 1, variantRevision: 1, note: '', author: 'Dora Designer', run: null },
    });
    expect(await readScenario(team.reviewer, scenario.id)).toEqual({ ...scenario, role: 'reviewer' });
    expect(await readScenario(team.administrator, scenario.id)).toEqual({ ...scenario, role: null });
  });

  it('saves numbered revisions that never change, with note and author', async () => {
    const team = await makeTeam(api());
    const { id, head } = await makeScenario(team, 'Short');
    const heavier = liftTableStudy({ heaviest: 500 });
    const saved = await save(team.secondDesigner, id, 1, heavier, 'Heavier loads');
    expect(saved.status).toBe(201);
    const second = saved.read(scenarioRevisionSchema);
    expect(second).toMatchObject({ number: 2, note: 'Heavier loads', author: 'Sven Second', study: heavier });
    expect((await readScenario(team.viewer, id)).head).toEqual(second);

    const path = `/api/scenarios/${id}/revisions`;
    expect((await team.viewer.get(`${path}/1`)).read(scenarioRevisionSchema)).toEqual(head);
    const { items } = (await team.viewer.get(path)).read(revisionListSchema);
    expect(items.map(({ number }) => number)).toEqual([2, 1]);
    expect(items[1]).toEqual(listedRevisionSchema.parse(head));
    for (const missing of ['3', '0', '-1', '1.5', 'x', '99999999999']) {
      expect((await team.viewer.get(`${path}/${missing}`)).status).toBe(404);
    }
  });

  it('stores one text and one hash of a study, whatever the order of its keys', async () => {
    const team = await makeTeam(api());
    const study = liftTableStudy();
    const { id, head } = await makeScenario(team, 'Short');
    expect(head.studyHash).toBe(sha256(canonicalText(study)));
    const again = (await save(team.designer, id, 1, reversed(study))).read(scenarioRevisionSchema);
    expect(again.studyHash).toBe(head.studyHash);
    const renamed = liftTableStudy({ name: 'Another name' });
    const third = (await save(team.designer, id, 2, renamed)).read(scenarioRevisionSchema);
    expect(third.studyHash).not.toBe(head.studyHash);
    const rows = await rowsOf(id);
    expect(rows.map((row) => row.study)).toEqual([
      canonicalText(study),
      canonicalText(study),
      canonicalText(renamed),
    ]);
    expect(rows.map((row) => row.answerHash)).toEqual(Array(3).fill(sha256(answerText(study))));
  });

  it('refuses a study with faults by their paths, also one that is nested without end', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const { control, ...rest } = liftTableStudy();
    const faulty = { ...rest, control: { ...control, kp: null }, requirements: [] };
    const refused = await save(team.designer, id, 1, faulty);
    expect(refused.status).toBe(422);
    expect(refused.read(problemSchema).faults?.map(({ path }) => path)).toEqual([
      'control.kp',
      'requirements',
    ]);

    const deep = `${'['.repeat(200_000)}${']'.repeat(200_000)}`;
    const { status } = await team.designer.send('POST', `/api/scenarios/${id}/revisions`, {
      text: `{"baseRevision":1,"note":"","study":{"format":"tareline-study","version":1,"machine":${deep}}}`,
    });
    expect(status).toBe(422);
    expect(await rowsOf(id)).toHaveLength(1);
  });

  it('answers a save on an old revision with both versions', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    const [first, second] = [liftTableStudy({ heaviest: 500 }), liftTableStudy({ heaviest: 520 })];
    const newer = (await save(team.designer, id, 1, first)).read(scenarioRevisionSchema);
    const refused = await save(team.secondDesigner, id, 1, second, 'mine');
    expect(refused.status).toBe(409);
    const problem = refused.read(conflictSchema);
    expect(problem.code).toBe('scenario-changed');
    expect(problem.current).toEqual(newer);
    expect(problem.sent).toEqual({ baseRevision: 1, study: second, note: 'mine' });
    expect((await save(team.designer, id, 7, second)).status).toBe(409);
    expect(await rowsOf(id)).toHaveLength(2);
  });

  it('loses nothing where two people save at once a hundred times', async () => {
    const team = await makeTeam(api());
    const { id } = await makeScenario(team, 'Short');
    let base = 1;
    for (let round = 0; round < 100; round++) {
      const attempts = [team.designer, team.secondDesigner].map((by, i) => ({
        by,
        study: liftTableStudy({ heaviest: 1000 + 2 * round + i }),
      }));
      const answers = await Promise.all(attempts.map(({ by, study }) => save(by, id, base, study)));
      expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
      const winner = answers.findIndex(({ status }) => status === 201);
      const loser = 1 - winner;
      const { current, sent } = answers[loser].read(conflictSchema);
      expect(current.number).toBe(base + 1);
      expect(current.study).toEqual(attempts[winner].study);
      expect(sent.study).toEqual(attempts[loser].study);

      const again = await save(attempts[loser].by, id, current.number, sent.study);
      expect(again.status).toBe(201);
      base = again.read(scenarioRevisionSchema).number;
    }
    const rows = await rowsOf(id);
    expect(rows.map(({ number }) => number)).toEqual(Array.from({ length: 201 }, (_, i) => i + 1));
    const kept = rows.slice(1).map(({ study }) => {
      const { parameters } = z
        .object({ parameters: z.array(z.object({ high: z.number().optional() })) })
        .parse(JSON.parse(study));
      return parameters[0].high ?? 0;
    });
    expect(kept.sort((a, b) => a - b)).toEqual(Array.from({ length: 200 }, (_, i) => 1000 + i));
  }, 60_000);

  it('are named uniquely within their variant', async () => {
    const team = await makeTeam(api());
    const rated = await makeScenario(team, 'Short');
    const path = `/api/variants/${rated.variantId}/scenarios`;
    const body = { name: 'Worn belt', study: liftTableStudy() };
    const made = await team.designer.post(path, body);
    expect(made.status).toBe(201);
    const worn = made.read(scenarioSchema);
    expect(worn).toMatchObject({ name: 'Worn belt', variantName: 'Short', role: 'designer' });
    const answers = [
      await team.designer.post(path, { ...body, name: 'worn BELT' }),
      await team.designer.patch(`/api/scenarios/${rated.id}`, { name: 'worn belt' }),
    ];
    for (const answer of answers) {
      expect(answer.read(problemSchema)).toMatchObject({ status: 409, code: 'scenario-name-taken' });
    }
    const renamed = await team.designer.patch(`/api/scenarios/${worn.id}`, { name: 'Worn' });
    expect(renamed.read(scenarioSchema)).toEqual({ ...worn, name: 'Worn' });
  });

  describe('deleting', () => {
    const withReview = async (team: Team, state: 'asked' | 'returned') => {
      const scenario = await makeScenario(team, `Reviewed ${state}`);
      const runId = await makeRun(api(), scenario, team.designer);
      const [revision] = await rowsOf(scenario.id);
      await api()
        .database.db.insert(reviews)
        .values({
          ...{ scenarioRevisionId: revision.id, runId, state, askedBy: team.designer.id },
          ...(state === 'returned' ? { decidedBy: team.reviewer.id, decidedAt: new Date() } : {}),
        });
      return scenario;
    };

    it('takes it out of its variant, keeps its revisions and writes it down', async () => {
      const team = await makeTeam(api());
      const scenario = await makeScenario(team, 'Short');
      const path = `/api/scenarios/${scenario.id}`;
      expect((await team.designer.delete(path)).status).toBe(204);
      const after = [
        await team.designer.get(path),
        await team.designer.get(`${path}/revisions`),
        await team.designer.get(`${path}/revisions/1`),
        await save(team.designer, scenario.id, 1, liftTableStudy()),
        await team.designer.patch(path, { name: 'Back' }),
        await team.designer.delete(path),
        await team.designer.put(`${path}/draft`, { baseRevision: 1, version: 0, study: {} }),
      ];
      expect(after.map(({ status }) => status)).toEqual(Array(7).fill(404));
      expect(await rowsOf(scenario.id)).toHaveLength(1);
      const entries = await api().database.db.select().from(audit).where(eq(audit.objectId, scenario.id));
      expect(entries).toMatchObject([
        { action: 'scenario.deleted', personId: team.designer.id, data: { name: 'Rated' } },
      ]);
    });

    it('is refused while a review stands on it, and possible after it was returned', async () => {
      const team = await makeTeam(api());
      const [asked, returned] = [await withReview(team, 'asked'), await withReview(team, 'returned')];
      const refused = await team.designer.delete(`/api/scenarios/${asked.id}`);
      expect(refused.read(problemSchema)).toMatchObject({ status: 409, code: 'scenario-under-review' });
      expect((await team.designer.delete(`/api/scenarios/${returned.id}`)).status).toBe(204);
    });
  });
});
