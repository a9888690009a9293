import { describe, expect, it } from 'vitest';
import { productSchema, variantSchema } from '../../shared/contracts/api';
import { z } from '../../shared/contracts/zod';
import { formatProved } from '../../shared/units';
import { endlessStudy } from '../api/support/long-studies';
import { followRuns, isEnd, startRun } from '../api/support/run-follower';
import { makeTeam } from './support/team';
import { examplePath, exampleText } from '../commands/support/example-studies';
import { analyseText } from '../commands/support/run-in-process';
import { heading, notice } from './support/page-parts';
import { useSite } from './support/site';

const site = useSite();

const EXAMPLE = 'lift-table-plate';

/** The figures of the example as the engine answers them, rounded into what was proved. */
function expectedFigures() {
  const { largestPayload, smallestPayload, rating } = analyseText(exampleText(EXAMPLE));
  const { provedTo, failsAt } = largestPayload ?? {};
  const from = smallestPayload?.provedTo;
  const plate = rating?.plate;
  if (typeof provedTo !== 'number' || typeof failsAt !== 'number')
    throw new Error('the example has no limit');
  if (typeof from !== 'number' || typeof plate !== 'number') throw new Error('the example has no plate');
  return {
    from: formatProved(from, { side: 'up', significant: 4 }),
    provedTo: formatProved(provedTo, { side: 'down', significant: 4 }),
    failsAt: formatProved(failsAt, { side: 'up' }),
    plate: formatProved(plate, { side: 'down', significant: 4 }),
  };
}

describe('a designer', () => {
  it('makes a product of a study, and sees its answer come', async () => {
    const designer = await site().person({ name: 'Dora Designer', mayCreateProducts: true });
    const { page } = await site().visitor(designer);

    await page.goto('/products');
    await page.getByRole('heading', { name: 'No product yet' }).waitFor();
    await page.getByRole('button', { name: 'New product' }).first().click();
    await page.getByLabel('Name').fill('Column tables');
    await page.getByLabel('Description').fill('Tables that lift pallets to a packing line.');
    await page.getByRole('button', { name: 'Create product' }).click();
    await heading(page, 'Column tables').waitFor();
    const productId = new URL(page.url()).pathname.split('/')[2];

    // One person's runs wait for one another: while this one is under way, the next is seen to wait.
    const path = `/api/products/${productId}/variants`;
    const long = await designer.post(path, { name: 'Full of corners', study: endlessStudy() });
    const endless = long.read(variantSchema).scenarios[0].id;
    const { id: endlessRun } = await startRun(designer, endless);

    await page.getByRole('button', { name: 'New variant' }).first().click();
    await page.getByLabel('Name of the variant').fill('Short column');
    await page.getByLabel('Study file (JSON)').setInputFiles(examplePath(EXAMPLE));
    await page.getByText('Read: Quernholm Lyft short-column lift table, rated, 7 parameters.').waitFor();
    await page.getByRole('button', { name: 'Create variant' }).click();
    await heading(page, 'Short column').waitFor();
    await page.getByRole('cell', { name: 'Not run yet' }).waitFor();

    await page.getByRole('link', { name: 'Rated' }).click();
    await page.getByRole('button', { name: 'Run', exact: true }).click();
    await page.getByText('Waiting to run', { exact: true }).waitFor();

    const other = await page.context().newPage();
    await other.goto(`/scenarios/${endless}`);
    await other.getByText(/^Running, /).waitFor();
    await other.getByRole('button', { name: 'Cancel run' }).click();
    await other.getByText('The run was cancelled. Run again for an answer.').waitFor();
    await other.close();
    expect((await designer.get(`/api/runs/${endlessRun}`)).body).toMatchObject({ state: 'cancelled' });

    const { from, provedTo, failsAt, plate } = expectedFigures();
    const answers = page.getByRole('complementary', { name: 'Answers' });
    await page.getByText(new RegExp(`^Proved to ${provedTo}\\s?kg; fails at ${failsAt}\\s?kg\\.$`)).waitFor();
    await answers.getByText('Holds, proved').waitFor();
    const shown = (await answers.innerText()).replace(/\s+/g, ' ');
    expect(shown).toMatch(new RegExp(`Proved to ${provedTo} ?kg`, 'i'));
    expect(shown).toMatch(new RegExp(`Fails at ${failsAt} ?kg`, 'i'));
    expect(shown).toContain(`${plate} kg`);

    await page.getByRole('link', { name: 'Column tables' }).click();
    const rung = page.getByRole('row', { name: /Short column/ });
    await rung.getByText(`${from}–${provedTo}`).waitFor();
    const [product] = (await designer.get('/api/products')).read(
      z.object({ items: z.array(productSchema) }),
    ).items;
    expect(product).toMatchObject({ id: productId, variants: 2, role: 'designer' });
  });

  it('sees on the ladder what another window runs', async () => {
    const { designer, productId, scenarioId } = await makeTeam(site(), 'Belt drive', EXAMPLE);
    const { page } = await site().visitor(designer);
    await page.goto(`/products/${productId}`);
    const rung = page.getByRole('row', { name: /Belt drive/ });
    await rung.getByText('Not run yet').waitFor();

    const follower = await followRuns(designer);
    const { id } = await startRun(designer, scenarioId);
    await follower.until(isEnd(id));
    follower.reader.leave();

    const { from, provedTo } = expectedFigures();
    await rung.getByText(`${from}–${provedTo}`).waitFor();
    await rung.getByRole('img', { name: new RegExp(`Proved ${from} to ${provedTo}`) }).waitFor();
  });

  it('duplicates a variant with its scenarios, and changes the copy alone', async () => {
    const { designer, productId, variantId } = await makeTeam(site(), 'Standard', EXAMPLE);
    const { page, complaints } = await site().visitor(designer);
    await page.goto(`/variants/${variantId}`);
    await page.getByRole('button', { name: 'Duplicate variant' }).click();
    const dialog = page.getByRole('dialog');
    expect(await dialog.getByLabel('Name').inputValue()).toBe('Standard, copy');
    await dialog.getByLabel('Name').fill('Long column');
    await dialog.getByRole('button', { name: 'Duplicate' }).click();
    await heading(page, 'Long column').waitFor();
    expect(page.url()).not.toContain(variantId);
    const copy = `/api${new URL(page.url()).pathname}`;
    await page.getByRole('link', { name: 'Rated' }).waitFor();

    await page.getByRole('button', { name: 'Rename' }).click();
    await page.getByRole('dialog').getByLabel('Name').fill('Standard');
    await page.getByRole('button', { name: 'Rename', exact: true }).last().click();
    await page.getByText('The product has a variant "Standard" already.').waitFor();
    expect(complaints.take()).toEqual([`409 PATCH ${copy}`]);
    await page.getByRole('dialog').getByLabel('Name').fill('Tall column');
    await page.getByRole('button', { name: 'Rename', exact: true }).last().click();
    await heading(page, 'Tall column').waitFor();

    await page.goto(`/products/${productId}`);
    for (const name of ['Standard', 'Tall column']) await page.getByRole('link', { name }).waitFor();
    await page.goto(`/variants/${variantId}`);
    await page.getByRole('button', { name: 'Delete variant' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Delete variant' }).click();
    await notice(page, 'Standard is deleted.').waitFor();
    await page.getByRole('link', { name: 'Tall column' }).waitFor();
    expect(await page.getByRole('link', { name: 'Standard' }).count()).toBe(0);
  });

  it('is told what is wrong with a study before it is sent', async () => {
    const { designer, productId } = await makeTeam(site(), 'Standard', EXAMPLE);
    const { page } = await site().visitor(designer);
    await page.goto(`/products/${productId}`);
    await page.getByRole('button', { name: 'New variant' }).click();
    const buffer = Buffer.from('{ "format": "tareline-study", "version": 1, "parameters": 5 }');
    const file = { name: 'wrong.json', mimeType: 'application/json', buffer };
    await page.getByLabel('Study file (JSON)').setInputFiles(file);
    await page.getByText('This file is not a usable study:').waitFor();
    await page.getByLabel('Name of the variant').fill('Wrong');
    await page.getByRole('button', { name: 'Create variant' }).click();
    await page.getByText('Choose a study file that can be read.').waitFor();
  });

  it('takes a study away as a file that says the same', async () => {
    const { designer, scenarioId } = await makeTeam(site(), 'Standard', EXAMPLE);
    const { page } = await site().visitor(designer);
    await page.goto(`/scenarios/${scenarioId}`);
    const downloading = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Export study' }).click();
    const download = await downloading;
    expect(download.suggestedFilename()).toBe('standard-rated-1.json');
    const chunks: Buffer[] = [];
    for await (const chunk of await download.createReadStream()) chunks.push(chunk as Buffer);
    const { largestPayload } = analyseText(Buffer.concat(chunks).toString());
    expect(largestPayload).toEqual(analyseText(exampleText(EXAMPLE)).largestPayload);
  });
});
