import { describe, expect, it } from 'vitest';
import { runToEnd } from '../api/support/run-follower';
import { exampleStudy } from '../commands/support/example-studies';
import { heading } from './support/page-parts';
import { useSite } from './support/site';
import { makeTeam } from './support/team';

const site = useSite();

const EXAMPLE = 'lift-table-plate';

/** Sorting the ladder, taking a study away, looking closer at the map and at what is said of a parameter. */
const HARMLESS = /^(Variant|Proved.*|Reserve|First to go|Export study|Zoom (in|out)|More of .*)$/;

describe.each(['viewer', 'reviewer'] as const)('a %s', (role) => {
  it('sees everything, is offered nothing that changes it, and is refused it', async () => {
    const team = await makeTeam(site(), 'Short column', EXAMPLE);
    const { designer, productId, variantId, scenarioId } = team;
    await runToEnd(designer, scenarioId);
    const reader = team[role];
    const { page } = await site().visitor(reader);

    const acts = async () => {
      const names: string[] = [];
      for (const button of await page.getByRole('main').getByRole('button').all()) {
        const name = (await button.getAttribute('aria-label')) ?? (await button.innerText());
        if (!HARMLESS.test(name.replace(/\s+/g, ' ').trim())) names.push(name);
      }
      return names;
    };

    await page.goto('/products');
    await page
      .getByRole('row', { name: new RegExp(role, 'i') })
      .getByRole('link')
      .click();
    await page
      .getByRole('row', { name: /Short column/ })
      .getByText(/\d–\d/)
      .waitFor();
    await page.getByText('Dora Designer').waitFor();
    expect(await acts()).toEqual([]);
    expect(await page.getByRole('main').getByRole('combobox').count()).toBe(0);

    await page.getByRole('link', { name: 'Short column' }).click();
    await page.getByText('Holds, proved').waitFor();
    expect(await acts()).toEqual([]);

    await page.getByRole('link', { name: 'Rated' }).click();
    await page
      .getByText(/^Proved to /)
      .first()
      .waitFor();
    await page.getByRole('group', { name: 'Belt', exact: true }).getByText('180 to 240\u2009kN/m').waitFor();
    await page.getByRole('img', { name: /^Map with / }).waitFor();
    expect(await acts()).toEqual([]);
    expect(await page.getByRole('slider').count()).toBe(0);
    const description = page.getByRole('region', { name: 'Description', exact: true });
    await description.getByText('Belt damping').waitFor();
    expect(await description.getByRole('textbox').count()).toBe(0);
    expect(await description.getByRole('combobox').count()).toBe(0);
    // Nor does the key that runs a scenario for a designer.
    await page.keyboard.press('r');

    await page.getByRole('link', { name: 'Record' }).click();
    await page.getByRole('row', { name: /Belt .* 180 to 240/ }).waitFor();
    expect(await acts()).toEqual([]);

    await page.goto('/people');
    await heading(page, 'This page is for administrators').waitFor();

    const study = exampleStudy(EXAMPLE);
    const refusals = [
      await reader.patch(`/api/products/${productId}`, { name: 'Mine', description: '' }),
      await reader.delete(`/api/products/${productId}`),
      await reader.put(`/api/products/${productId}/members/${reader.id}`, { role: 'designer' }),
      await reader.post(`/api/products/${productId}/variants`, { name: 'Mine', study }),
      await reader.post(`/api/variants/${variantId}/duplicate`, { name: 'Mine' }),
      await reader.delete(`/api/variants/${variantId}`),
      await reader.post(`/api/scenarios/${scenarioId}/revisions`, { baseRevision: 1, study, note: '' }),
      await reader.post(`/api/scenarios/${scenarioId}/revisions/1/runs`),
      await reader.get('/api/people'),
    ];
    expect(refusals.map(({ status }) => status)).toEqual(refusals.map(() => 403));
    const runs = await designer.get(`/api/scenarios/${scenarioId}/runs`);
    expect((runs.body as { items: unknown[] }).items).toHaveLength(1);
  });
});
