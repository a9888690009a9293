import { asc, eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { problemSchema, scenarioSchema, variantSchema } from '../../shared/contracts/api';
import { audit, scenarioRevisions, scenarios, variantRevisions, variants } from '../../server/db/schema';
import { liftTableStudy } from './support/lift-table-study';
import { makeRun, makeScenario, makeTeam, makeVariant, readScenario, type Team } from './support/team';
import { useApi } from './support/test-api';

const listSchema = z.object({ items: z.array(variantSchema) });

describe('variants', () => {
  const api = useApi();

  const descriptionsOf = async (variantId: string) => {
    const rows = await api()
      .database.db.select()
      .from(variantRevisions)
      .where(eq(variantRevisions.variantId, variantId))
      .orderBy(asc(variantRevisions.number));
    return rows.map(({ number, description }) => ({
      number,
      description: JSON.parse(description) as unknown,
    }));
  };

  const save = async (team: Team, scenarioId: string, baseRevision: number, study: unknown) =>
    team.designer.post(`/api/scenarios/${scenarioId}/revisions`, { baseRevision, study, note: '' });

  it('makes a variant with its first revision and a scenario "Rated" of one study', async () => {
    const team = await makeTeam(api());
    const variant = await makeVariant(team, 'Short column');
    expect(variant).toMatchObject({ productId: team.productId, name: 'Short column', revision: 1 });
    expect(variant.scenarios).toMatchObject([{ name: 'Rated', revision: 1, run: null }]);
    expect((await team.viewer.get(`/api/variants/${variant.id}`)).read(variantSchema)).toEqual(variant);
    const { head } = await readScenario(team.viewer, variant.scenarios[0].id);
    expect(head).toMatchObject({
      number: 1,
      variantRevision: 1,
      author: 'Dora Designer',
      study: liftTableStudy(),
    });
  });

  it('keeps apart what the variant gives and what the scenario adds', async () => {
    const team = await makeTeam(api());
    const study = {
      ...liftTableStudy(),
      searchUpTo: 2400,
      definitions: { J: '2*m' },
      sampling: { period: 0.005 },
    };
    const body = { name: 'Split', study };
    const made = await team.designer.post(`/api/products/${team.productId}/variants`, body);
    const variant = made.read(variantSchema);
    const { machine, control, definitions, sampling, requirements, payload, searchUpTo, name } = study;
    expect(await descriptionsOf(variant.id)).toEqual([
      {
        number: 1,
        description: {
          ...{ machine, control, definitions, sampling },
          parameters: study.parameters.map(({ id, label, unit, nominal, minimum }) => ({
            ...{ id, nominal },
            ...(label === undefined ? {} : { label }),
            ...(unit === undefined ? {} : { unit }),
            ...(minimum === undefined ? {} : { minimum }),
          })),
        },
      },
    ]);
    const [revision] = await api()
      .database.db.select()
      .from(scenarioRevisions)
      .where(eq(scenarioRevisions.scenarioId, variant.scenarios[0].id));
    expect(JSON.parse(revision.toleranceSet)).toEqual({
      ...{ name, payload, searchUpTo, requirements },
      bands: [
        { id: 'm', low: 40, high: 480, kind: 'use' },
        { id: 'k', low: 120_000, high: 185_000 },
        { id: 'c', low: 470, high: 800 },
      ],
    });
  });

  it('refuses a study with faults, each with its path, and makes nothing', async () => {
    const team = await makeTeam(api());
    const path = `/api/products/${team.productId}/variants`;
    const study = { ...liftTableStudy(), payload: 'x', requirements: [] };
    const refused = await team.designer.post(path, { name: 'Faulty', study });
    expect(refused.status).toBe(422);
    const problem = refused.read(problemSchema);
    expect(problem.code).toBe('study-unusable');
    expect(problem.faults?.map((fault) => fault.path)).toContain('requirements');
    expect((await team.designer.post(path, { name: 'Faulty', study: null })).status).toBe(422);
    expect((await team.viewer.get(path)).read(listSchema).items).toEqual([]);
  });

  it('shows the newest run of the newest revision of each scenario', async () => {
    const team = await makeTeam(api());
    const scenario = await makeScenario(team, 'Short');
    await makeRun(api(), scenario, team.designer);
    const id = await makeRun(api(), scenario, team.designer);
    const runOf = async () => {
      const answer = await team.viewer.get(`/api/variants/${scenario.variantId}`);
      return answer.read(variantSchema).scenarios[0].run;
    };
    expect(await runOf()).toMatchObject({ id, state: 'queued', verdict: null });
    expect((await readScenario(team.viewer, scenario.id)).head.run).toEqual(await runOf());
    await save(team, scenario.id, 1, liftTableStudy({ heaviest: 500 }));
    expect(await runOf()).toBeNull();
  });

  it('lists variants in the order in which they were made', async () => {
    const team = await makeTeam(api());
    for (const name of ['Zero', 'Alpha', 'Middle']) await makeVariant(team, name);
    const { items } = (await team.viewer.get(`/api/products/${team.productId}/variants`)).read(listSchema);
    expect(items.map(({ name }) => name)).toEqual(['Zero', 'Alpha', 'Middle']);
  });

  it('gives every variant a place of its own where many are made at once', async () => {
    const team = await makeTeam(api());
    const names = Array.from({ length: 9 }, (_, i) => `Variant ${i}`);
    await Promise.all(names.map((name) => makeVariant(team, name)));
    const rows = await api()
      .database.db.select({ position: variants.position })
      .from(variants)
      .where(eq(variants.productId, team.productId))
      .orderBy(asc(variants.position));
    expect(rows.map(({ position }) => position)).toEqual(names.map((_, i) => i + 1));
  });

  it('refuses a name that another variant of the product has', async () => {
    const team = await makeTeam(api());
    const [first, second] = [await makeVariant(team, 'Short'), await makeVariant(team, 'Long')];
    const path = `/api/products/${team.productId}/variants`;
    const answers = [
      await team.designer.post(path, { name: 'SHORT', study: liftTableStudy() }),
      await team.designer.patch(`/api/variants/${second.id}`, { name: 'short' }),
      await team.designer.post(`/api/variants/${first.id}/duplicate`, { name: 'Long' }),
    ];
    for (const answer of answers) {
      expect(answer.read(problemSchema)).toMatchObject({ status: 409, code: 'variant-name-taken' });
    }
    const elsewhere = await makeTeam(api());
    expect((await makeVariant(elsewhere, 'Short')).name).toBe('Short');
    const renamed = await team.designer.patch(`/api/variants/${second.id}`, { name: 'Very long' });
    expect(renamed.read(variantSchema)).toEqual({ ...second, name: 'Very long' });
  });

  describe('revisions', () => {
    it('come only where machine, control, hardware or nominals change', async () => {
      const team = await makeTeam(api());
      const scenario = await makeScenario(team, 'Short');
      const numbers: number[] = [];
      const studies = [
        liftTableStudy({ heaviest: 500 }),
        liftTableStudy({ heaviest: 500, belt: 160_000 }),
        { ...liftTableStudy({ heaviest: 520, belt: 160_000 }), actuator: { lag: 0.008 } },
        { ...liftTableStudy({ heaviest: 540, belt: 160_000 }), actuator: { lag: 0.008 } },
      ];
      for (const [i, study] of studies.entries()) {
        const saved = await save(team, scenario.id, i + 1, study);
        numbers.push(saved.read(z.object({ variantRevision: z.int() })).variantRevision);
      }
      expect(numbers).toEqual([1, 2, 3, 3]);
      const variant = await team.viewer.get(`/api/variants/${scenario.variantId}`);
      expect(variant.read(variantSchema).revision).toBe(3);
    });

    it('leave a scenario that moves its bands where it is, whatever another has made of the variant', async () => {
      const team = await makeTeam(api());
      const rated = await makeScenario(team, 'Short');
      const body = { name: 'Stiffer belt', study: liftTableStudy({ belt: 160_000 }) };
      const made = await team.designer.post(`/api/variants/${rated.variantId}/scenarios`, body);
      expect(made.read(scenarioSchema).head.variantRevision).toBe(2);
      await save(team, rated.id, 1, liftTableStudy({ heaviest: 500 }));
      expect((await readScenario(team.viewer, rated.id)).head).toMatchObject({
        number: 2,
        variantRevision: 1,
      });
    });

    it('are found again when an old study is restored', async () => {
      const team = await makeTeam(api());
      const scenario = await makeScenario(team, 'Short');
      await save(team, scenario.id, 1, liftTableStudy({ belt: 160_000 }));
      await save(team, scenario.id, 2, scenario.head.study);
      expect((await readScenario(team.viewer, scenario.id)).head).toMatchObject({
        number: 3,
        variantRevision: 1,
        studyHash: scenario.head.studyHash,
      });
      expect(await descriptionsOf(scenario.variantId)).toHaveLength(2);
    });

    it('are numbered without a gap where two scenarios change the variant at once', async () => {
      const team = await makeTeam(api());
      const rated = await makeScenario(team, 'Short');
      const scenarioIds = [rated.id];
      for (const name of ['Light', 'Heavy', 'Worn']) {
        const body = { name, study: liftTableStudy() };
        const made = await team.designer.post(`/api/variants/${rated.variantId}/scenarios`, body);
        scenarioIds.push(made.read(scenarioSchema).id);
      }
      const answers = await Promise.all(
        scenarioIds.map((id, i) => save(team, id, 1, liftTableStudy({ belt: 151_000 + i }))),
      );
      expect(answers.map(({ status }) => status)).toEqual([201, 201, 201, 201]);
      const numbers = (await descriptionsOf(rated.variantId)).map(({ number }) => number);
      expect(numbers).toEqual([1, 2, 3, 4, 5]);
    });
  });

  describe('duplicating', () => {
    it('copies the newest revision of each scenario, on the variant revisions that they stand on', async () => {
      const team = await makeTeam(api());
      const rated = await makeScenario(team, 'Standard');
      await save(team, rated.id, 1, liftTableStudy({ belt: 155_000 }));
      const body = { name: 'Stiffer belt', study: liftTableStudy({ belt: 160_000 }) };
      const stiffer = (await team.designer.post(`/api/variants/${rated.variantId}/scenarios`, body)).read(
        scenarioSchema,
      );
      await save(team, rated.id, 2, liftTableStudy({ heaviest: 500, belt: 155_000 }));
      const dropped = (
        await team.designer.post(`/api/variants/${rated.variantId}/scenarios`, { ...body, name: 'Dropped' })
      ).read(scenarioSchema);
      await team.designer.delete(`/api/scenarios/${dropped.id}`);

      const answer = await team.secondDesigner.post(`/api/variants/${rated.variantId}/duplicate`, {
        name: 'Long column',
      });
      expect(answer.status).toBe(201);
      const copy = answer.read(variantSchema);
      expect(copy).toMatchObject({ name: 'Long column', productId: team.productId, revision: 2 });
      expect(copy.scenarios.map(({ name }) => name).sort()).toEqual(['Rated', 'Stiffer belt']);

      // Revision 1 of the original is used by no newest revision: the copy begins with its revision 2.
      const originals = await descriptionsOf(rated.variantId);
      expect((await descriptionsOf(copy.id)).map(({ description }) => description)).toEqual(
        originals.slice(1).map(({ description }) => description),
      );
      for (const { id, name } of copy.scenarios) {
        const original = await readScenario(team.viewer, name === 'Rated' ? rated.id : stiffer.id);
        const { head } = await readScenario(team.viewer, id);
        expect(head).toMatchObject({
          number: 1,
          variantRevision: name === 'Rated' ? 1 : 2,
          study: original.head.study,
          studyHash: original.head.studyHash,
          author: 'Sven Second',
          note: 'Copied from Standard',
        });
      }
    });

    it('leaves both to go their own ways', async () => {
      const team = await makeTeam(api());
      const rated = await makeScenario(team, 'Standard');
      const copy = (
        await team.designer.post(`/api/variants/${rated.variantId}/duplicate`, { name: 'Long' })
      ).read(variantSchema);
      await save(team, copy.scenarios[0].id, 1, liftTableStudy({ belt: 160_000 }));
      expect(await readScenario(team.designer, rated.id)).toEqual(rated);
    });
  });

  describe('deleting', () => {
    it('takes scenarios along that were never run, keeps the rows and writes it down', async () => {
      const team = await makeTeam(api());
      const variant = await makeVariant(team, 'Short');
      expect((await team.designer.delete(`/api/variants/${variant.id}`)).status).toBe(204);
      expect((await team.designer.get(`/api/variants/${variant.id}`)).status).toBe(404);
      expect((await team.designer.delete(`/api/variants/${variant.id}`)).status).toBe(404);
      expect((await team.designer.get(`/api/scenarios/${variant.scenarios[0].id}`)).status).toBe(404);
      const { db } = api().database;
      expect(await db.select().from(scenarios).where(eq(scenarios.variantId, variant.id))).toHaveLength(1);
      expect(await db.select().from(audit).where(eq(audit.objectId, variant.id))).toMatchObject([
        {
          action: 'variant.deleted',
          personId: team.designer.id,
          data: { name: 'Short', scenarios: ['Rated'] },
        },
      ]);
      expect((await makeVariant(team, 'Short')).name).toBe('Short');
    });

    it('is refused where a scenario was run, and says which', async () => {
      const team = await makeTeam(api());
      const scenario = await makeScenario(team, 'Short');
      await makeRun(api(), scenario, team.designer);
      const path = `/api/variants/${scenario.variantId}`;
      const problem = (await team.designer.delete(path)).read(problemSchema);
      expect(problem).toMatchObject({ status: 409, code: 'variant-in-use' });
      expect(problem.detail).toContain('"Rated"');
      expect((await team.viewer.get(path)).status).toBe(200);
      await team.designer.delete(`/api/scenarios/${scenario.id}`);
      expect((await team.designer.delete(path)).status).toBe(204);
    });

    it('loses no save that comes at the same moment', async () => {
      const team = await makeTeam(api());
      for (let round = 0; round < 10; round++) {
        const scenario = await makeScenario(team, `Short ${round}`);
        const [deleted, saved] = await Promise.all([
          team.designer.delete(`/api/variants/${scenario.variantId}`),
          team.secondDesigner.post(`/api/scenarios/${scenario.id}/revisions`, {
            ...{ baseRevision: 1, note: '' },
            study: liftTableStudy({ heaviest: 500 }),
          }),
        ]);
        expect(deleted.status).toBe(204);
        const rows = await api()
          .database.db.select()
          .from(scenarioRevisions)
          .where(eq(scenarioRevisions.scenarioId, scenario.id));
        expect([saved.status, rows.length]).toEqual(saved.status === 201 ? [201, 2] : [404, 1]);
      }
    });
  });
});
