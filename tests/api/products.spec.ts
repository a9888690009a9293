import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { memberSchema, problemSchema, productSchema } from '../../shared/contracts/api';
import { audit, products } from '../../server/db/schema';
import { disable, makeRun, makeScenario, makeTeam, makeVariant } from './support/team';
import { useApi } from './support/test-api';

const productListSchema = z.object({ items: z.array(productSchema) });
const memberListSchema = z.object({ items: z.array(memberSchema) });

describe('products', () => {
  const api = useApi();

  const auditOf = (id: string) => api().database.db.select().from(audit).where(eq(audit.objectId, id));

  it('makes its creator the designer, and writes that down', async () => {
    const creator = await api().person({ mayCreateProducts: true });
    const made = await creator.post('/api/products', { name: ' Lift table ', description: 'Up to 500 kg' });
    expect(made.status).toBe(201);
    const product = made.read(productSchema);
    expect(product).toMatchObject({
      name: 'Lift table',
      description: 'Up to 500 kg',
      role: 'designer',
      variants: 0,
    });
    expect((await creator.get(`/api/products/${product.id}`)).read(productSchema)).toEqual(product);
    expect(await auditOf(product.id)).toMatchObject([
      {
        action: 'membership.set',
        personId: creator.id,
        data: { member: creator.id, role: { from: null, to: 'designer' } },
      },
    ]);
  });

  it('lists to everybody the products of theirs, to an administrator all', async () => {
    const [own, other] = [await makeTeam(api()), await makeTeam(api())];
    const listOf = async (reader: typeof own.viewer) =>
      (await reader.get('/api/products')).read(productListSchema).items;
    expect(await listOf(own.viewer)).toMatchObject([{ id: own.productId, role: 'viewer' }]);
    expect(await listOf(await api().person())).toEqual([]);
    const all = new Map((await listOf(own.administrator)).map(({ id, role }) => [id, role]));
    expect(all.get(own.productId)).toBeNull();
    expect(all.get(other.productId)).toBeNull();
  });

  it('counts variants, and tells when something in it was saved', async () => {
    const team = await makeTeam(api());
    const path = `/api/products/${team.productId}`;
    const empty = (await team.viewer.get(path)).read(productSchema);
    await makeVariant(team, 'Short');
    const gone = await makeVariant(team, 'Long');
    await team.designer.delete(`/api/variants/${gone.id}`);
    const filled = (await team.viewer.get(path)).read(productSchema);
    expect(filled.variants).toBe(1);
    expect(Date.parse(filled.changedAt)).toBeGreaterThanOrEqual(Date.parse(empty.changedAt));
  });

  it('changes what is stated and leaves the rest', async () => {
    const { productId, designer } = await makeTeam(api());
    const path = `/api/products/${productId}`;
    const before = (await designer.get(path)).read(productSchema);
    const described = (await designer.patch(path, { description: 'For workshops' })).read(productSchema);
    expect(described).toEqual({ ...before, description: 'For workshops' });
    const renamed = (await designer.patch(path, { name: 'Bench lift' })).read(productSchema);
    expect(renamed).toEqual({ ...described, name: 'Bench lift' });
    expect((await designer.patch(path, {})).read(productSchema)).toEqual(renamed);
  });

  it('refuses a name that another product has, whatever its case, until that product is deleted', async () => {
    const creator = await api().person({ mayCreateProducts: true });
    const draft = { name: 'Transfer cart', description: '' };
    const first = (await creator.post('/api/products', draft)).read(productSchema);
    const second = await creator.post('/api/products', { ...draft, name: 'TRANSFER CART' });
    expect(second.status).toBe(409);
    expect(second.read(problemSchema).code).toBe('product-name-taken');
    await creator.delete(`/api/products/${first.id}`);
    expect((await creator.post('/api/products', draft)).status).toBe(201);
  });

  it('refuses names that are empty, of several lines or hold what no text column can', async () => {
    const creator = await api().person({ mayCreateProducts: true });
    for (const name of ['  ', 'two\nlines', 'nul\0', 'x'.repeat(121)]) {
      expect((await creator.post('/api/products', { name, description: '' })).status).toBe(400);
    }
    const { status } = await creator.post('/api/products', { name: 'Cabin', description: 'nul\0' });
    expect(status).toBe(400);
  });

  it('deletes a product with what was never run, keeps the rows and writes it down', async () => {
    const team = await makeTeam(api());
    const variant = await makeVariant(team, 'Short');
    const path = `/api/products/${team.productId}`;
    expect((await team.designer.delete(path)).status).toBe(204);
    expect((await team.designer.get(path)).status).toBe(404);
    expect((await team.designer.get(`${path}/members`)).status).toBe(404);
    expect((await team.designer.get(`/api/variants/${variant.id}`)).status).toBe(404);
    expect((await team.designer.get(`/api/scenarios/${variant.scenarios[0].id}`)).status).toBe(404);
    expect((await team.designer.get('/api/products')).read(productListSchema).items).toEqual([]);
    const kept = await api().database.db.select().from(products).where(eq(products.id, team.productId));
    expect(kept).toHaveLength(1);
    expect(await auditOf(team.productId)).toMatchObject([
      {
        action: 'product.deleted',
        personId: team.designer.id,
        data: { variants: ['Short'], scenarios: ['Rated'] },
      },
    ]);
  });

  it('keeps a product in which something was run, and says what to delete first', async () => {
    const team = await makeTeam(api());
    const scenario = await makeScenario(team, 'Short');
    await makeRun(api(), scenario, team.designer);
    const path = `/api/products/${team.productId}`;
    const refused = await team.designer.delete(path);
    expect(refused.status).toBe(409);
    const problem = refused.read(problemSchema);
    expect(problem.code).toBe('product-in-use');
    expect(problem.detail).toContain('"Rated" of "Short"');
    expect((await team.designer.get(path)).status).toBe(200);
    expect(await auditOf(team.productId)).toEqual([]);

    await team.designer.delete(`/api/scenarios/${scenario.id}`);
    expect((await team.designer.delete(path)).status).toBe(204);
  });

  it('gives, changes and takes roles, and writes each down', async () => {
    const { productId, designer, viewer, administrator } = await makeTeam(api());
    const newcomer = await api().person({ name: 'Nora Newcomer' });
    const members = `/api/products/${productId}/members`;
    const given = await administrator.put(`${members}/${newcomer.id}`, { role: 'viewer' });
    expect(given.read(memberSchema)).toEqual({
      personId: newcomer.id,
      name: 'Nora Newcomer',
      email: newcomer.email,
      role: 'viewer',
    });
    expect((await newcomer.get(`/api/products/${productId}`)).status).toBe(200);
    await administrator.put(`${members}/${newcomer.id}`, { role: 'reviewer' });
    const listed = (await viewer.get(members)).read(memberListSchema).items;
    expect(listed.find(({ personId }) => personId === newcomer.id)?.role).toBe('reviewer');
    expect(listed).toHaveLength(5);
    expect((await administrator.delete(`${members}/${newcomer.id}`)).status).toBe(204);
    expect((await newcomer.get(`/api/products/${productId}`)).status).toBe(404);
    expect((await administrator.delete(`${members}/${newcomer.id}`)).status).toBe(404);
    expect(await auditOf(productId)).toMatchObject([
      { action: 'membership.set', personId: administrator.id, data: { role: { from: null, to: 'viewer' } } },
      { action: 'membership.set', data: { member: newcomer.id, role: { from: 'viewer', to: 'reviewer' } } },
      { action: 'membership.removed', data: { member: newcomer.id, role: { from: 'reviewer', to: null } } },
    ]);
    expect((await designer.put(`${members}/${newcomer.id}`, { role: 'viewer' })).status).toBe(403);
  });

  it('gives no role to somebody unknown, or removed from the organisation', async () => {
    const { productId, administrator } = await makeTeam(api());
    const members = `/api/products/${productId}/members`;
    const unknown = await administrator.put(`${members}/${randomUUID()}`, { role: 'viewer' });
    expect(unknown.status).toBe(404);
    const leaver = await api().person();
    await disable(api(), leaver);
    const refused = await administrator.put(`${members}/${leaver.id}`, { role: 'viewer' });
    expect(refused.read(problemSchema)).toMatchObject({ status: 409, code: 'person-disabled' });
  });

  it('lets the last designer neither go nor lose the role, even where two are removed at once', async () => {
    const { productId, designer, secondDesigner, administrator } = await makeTeam(api());
    const members = `/api/products/${productId}/members`;
    for (let round = 0; round < 15; round++) {
      const answers = await Promise.all([
        administrator.delete(`${members}/${designer.id}`),
        administrator.put(`${members}/${secondDesigner.id}`, { role: 'viewer' }),
      ]);
      const refused = answers.filter(({ status }) => status === 409);
      expect(refused).toHaveLength(1);
      expect(refused[0].read(problemSchema).code).toBe('last-designer');
      const listed = (await administrator.get(members)).read(memberListSchema).items;
      expect(listed.filter(({ role }) => role === 'designer')).toHaveLength(1);
      for (const { id } of [designer, secondDesigner]) {
        await administrator.put(`${members}/${id}`, { role: 'designer' });
      }
    }
  });

  it('does not count a designer who can no longer sign in', async () => {
    const { productId, designer, secondDesigner, administrator } = await makeTeam(api());
    await disable(api(), secondDesigner);
    const { status } = await administrator.delete(`/api/products/${productId}/members/${designer.id}`);
    expect(status).toBe(409);
  });
});
