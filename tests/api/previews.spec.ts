import { describe, expect, it } from 'vitest';
import { canonicalText, type Result } from '../../shared/contracts';
import {
  previewAnswerSchema,
  previewMapAnswerSchema,
  problemSchema,
  type Run,
  variantSchema,
} from '../../shared/contracts/api';
import { previewCache, runs } from '../../server/db/schema';
import { analyseText } from '../commands/support/run-in-process';
import { liftTableStudy } from './support/lift-table-study';
import { endlessStudy, mapStudy } from './support/long-studies';
import { useApi } from './support/test-api';
import { makeTeam } from './support/team';
import type { TestPerson } from './support/test-people';

/** Of a result, what is the same wherever and whenever it was computed. */
function lasting(result: Result) {
  return { ...result, studyHash: undefined, work: result.work.boxes };
}

describe('previews', () => {
  const api = useApi();
  const kept = () => api().database.db.select().from(previewCache);

  it('compute a draft digit by digit as the engine does, and make no run', async () => {
    const person = await api().person();
    const study = liftTableStudy({ heaviest: 481 });
    const answer = await person.post('/api/preview', { study });
    expect(answer.status).toBe(200);
    expect(lasting(answer.read(previewAnswerSchema))).toEqual(lasting(analyseText(canonicalText(study))));
    expect(await api().database.db.select().from(runs)).toEqual([]);
  });

  it('give a kept answer again to a draft that differs in what no answer depends on', async () => {
    const person = await api().person();
    const study = liftTableStudy({ heaviest: 482, name: 'One name' });
    const first = (await person.post('/api/preview', { study })).read(previewAnswerSchema);
    const before = await kept();
    // What is kept is marked, so that it shows where an answer comes from.
    await api()
      .database.db.update(previewCache)
      .set({ result: JSON.stringify({ ...first, engine: 'kept' }) });
    const renamed = { ...study, name: 'Another name', map: mapStudy(5).map };
    const second = (await person.post('/api/preview', { study: renamed })).read(previewAnswerSchema);
    expect(lasting(second)).toEqual({ ...lasting(first), engine: 'kept' });
    expect(second.studyHash).not.toBe(first.studyHash);
    expect((await kept()).length).toBe(before.length);
    const changed = liftTableStudy({ heaviest: 483 });
    const third = (await person.post('/api/preview', { study: changed })).read(previewAnswerSchema);
    expect(third.engine).toBe(first.engine);
  });

  it('warn of what the engine does not know', async () => {
    const person = await api().person();
    const study = { ...liftTableStudy({ heaviest: 484 }), colour: 'red' };
    const { warnings = [] } = (await person.post('/api/preview', { study })).read(previewAnswerSchema);
    expect(warnings.filter(({ path }) => path === 'colour')).toHaveLength(1);
    const again = (await person.post('/api/preview', { study })).read(previewAnswerSchema);
    expect(again.warnings).toEqual(warnings);
  });

  it('tell every fault of a study with its place, whoever finds it', async () => {
    const person = await api().person();
    const shapeless = await person.post('/api/preview', { study: { ...liftTableStudy(), requirements: [] } });
    expect(shapeless.status).toBe(422);
    expect(shapeless.read(problemSchema)).toMatchObject({
      code: 'study-unusable',
      faults: [{ path: 'requirements' }],
    });
    const study = { ...liftTableStudy(), definitions: { stiff: 'k*unknown' } };
    const unknown = await person.post('/api/preview', { study });
    expect(unknown.status).toBe(422);
    expect(unknown.read(problemSchema)).toMatchObject({ faults: [{ path: 'definitions.stiff' }] });
    expect((await person.post('/api/preview', {})).status).toBe(400);
    expect((await person.post('/api/preview', { study: null })).status).toBe(422);
    expect((await api().anybody.post('/api/preview', { study })).status).toBe(401);
  });

  /** Two endless previews under one name; whichever the server reads first, the other takes its place. */
  const dragTwice = ({ address, cookie = '' }: TestPerson) => {
    const body = { study: endlessStudy(), columns: 201, rows: 201, supersedes: 'map of the page' };
    return [1, 2].map((number) => {
      const leaving = new AbortController();
      const sent = fetch(`${address}/api/preview/map`, {
        method: 'POST',
        body: JSON.stringify(body),
        headers: { 'content-type': 'application/json', origin: address, cookie },
        signal: leaving.signal,
      });
      return { leaving, sent, first: sent.then(({ status }) => ({ number, status })) };
    });
  };

  it('are cancelled by a newer one of the same person under the same name', async () => {
    const person = await api().person();
    const both = dragTwice(person);
    expect(await Promise.race(both.map(({ first }) => first))).toMatchObject({ status: 409 });
    const coarse = { study: mapStudy(5), columns: 5, rows: 4, supersedes: 'map of the page' };
    // There is one thread only: it answers this one when it has left the other.
    expect((await person.post('/api/preview/map', coarse)).status).toBe(200);
    for (const { sent } of both) {
      const answer = await sent;
      expect(answer.status).toBe(409);
      expect(problemSchema.parse(await answer.json()).code).toBe('preview-superseded');
    }
  });

  it('end when nobody waits for them any longer', async () => {
    const person = await api().person();
    const both = dragTwice(person);
    const { number } = await Promise.race(both.map(({ first }) => first));
    const { leaving, sent } = both[2 - number];
    leaving.abort();
    await expect(sent).rejects.toThrow();
    const coarse = { study: mapStudy(5), columns: 6, rows: 4 };
    expect((await person.post('/api/preview/map', coarse)).status).toBe(200);
  });
});

describe('previews of maps', () => {
  const api = useApi({ works: true });

  it('have the digits of the map that a run computes', async () => {
    const { designer, productId } = await makeTeam(api());
    const study = mapStudy(9, 7);
    const answer = await designer.post('/api/preview/map', { study, columns: 9, rows: 7 });
    const map = answer.read(previewMapAnswerSchema);
    expect(map).toEqual(analyseText(canonicalText(study), true).map);
    const variant = await designer.post(`/api/products/${productId}/variants`, { name: 'Standard', study });
    const [{ id }] = variant.read(variantSchema).scenarios;
    const run = (await designer.post(`/api/scenarios/${id}/revisions/1/runs`)).body as Run;
    await expect
      .poll(async () => (await designer.get(`/api/runs/${run.id}/map`)).body, { timeout: 10_000 })
      .toEqual(map);
  });

  it('are as fine as asked for, and kept; without a map in the study they are refused', async () => {
    const person = await api().person();
    const body = { study: mapStudy(9), columns: 13, rows: 8 };
    const map = (await person.post('/api/preview/map', body)).read(previewMapAnswerSchema);
    expect([map.x.length, map.y.length]).toEqual([13, 8]);
    expect((await person.post('/api/preview/map', body)).body).toEqual(map);
    const without = await person.post('/api/preview/map', { ...body, study: liftTableStudy() });
    expect(without.status).toBe(422);
    expect(without.read(problemSchema)).toMatchObject({ faults: [{ path: 'map' }] });
    expect((await person.post('/api/preview/map', { ...body, columns: 202 })).status).toBe(400);
  });

  it('are coarser where time is short, with nodes of the full range', async () => {
    const person = await api().person();
    const study = endlessStudy();
    const body = { study, columns: 201, rows: 201, within: 150 };
    const coarse = (await person.post('/api/preview/map', body)).read(previewMapAnswerSchema);
    expect(coarse.x.length).toBeGreaterThanOrEqual(5);
    expect(coarse.x.length).toBeLessThan(201);
    expect(coarse.values).toHaveLength(coarse.y.length);
    const { x, y } = coarse;
    const exact = { study, columns: x.length, rows: y.length };
    expect((await person.post('/api/preview/map', exact)).body).toEqual(coarse);
  });
});
