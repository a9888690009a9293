import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import type { Parameter, Study } from '../../shared/contracts';
import { scenarioRevisionSchema } from '../../shared/contracts/api';
import { exampleStudy } from '../commands/support/example-studies';
import { notice, refusal } from './support/page-parts';
import { useSite } from './support/site';
import { makeTeam } from './support/team';

const site = useSite();

const EXAMPLE = 'lift-table-plate';

/** The example with another end of a band. */
function withBand(id: string, band: Pick<Parameter, 'low' | 'high'>): Study {
  const study = exampleStudy(EXAMPLE);
  const parameters = study.parameters.map((parameter) =>
    parameter.id === id ? { ...parameter, ...band } : parameter,
  );
  return { ...study, parameters };
}

async function chooseStudy(page: Page, study: Study): Promise<void> {
  await page.getByRole('button', { name: 'Import study' }).click();
  const file = {
    name: 'study.json',
    mimeType: 'application/json',
    buffer: Buffer.from(JSON.stringify(study)),
  };
  await page.getByLabel('Study file (JSON)').setInputFiles(file);
  await page.getByText(/Read: /).waitFor();
}

describe('two people who save the same scenario', () => {
  it('are both told, and nothing of either is lost', async () => {
    const { designer, secondDesigner, scenarioId } = await makeTeam(site(), 'Short column', EXAMPLE);
    const { page, complaints } = await site().visitor(designer);
    const { page: otherPage } = await site().visitor(secondDesigner);
    await page.goto(`/scenarios/${scenarioId}`);
    await otherPage.goto(`/scenarios/${scenarioId}`);

    await chooseStudy(page, withBand('m', { high: 525 }));
    await page.getByLabel('Note').fill('Heavier pallets');

    await chooseStudy(otherPage, withBand('k', { low: 170 }));
    await otherPage.getByRole('button', { name: 'Save as revision 2' }).click();
    await notice(otherPage, 'Saved as revision 2.').waitFor();

    await page.getByRole('button', { name: 'Save as revision 2' }).click();
    const conflict = refusal(page, 'Sven Second saved revision 2 meanwhile');
    await conflict.waitFor();
    expect(complaints.take()).toEqual([`409 POST /api/scenarios/${scenarioId}/revisions`]);
    expect(await conflict.getByRole('listitem').allInnerTexts()).toEqual([
      'parameters.k.low: 180 → 170',
      'parameters.m.high: 500 → 525',
    ]);
    expect(await page.getByLabel('Note').inputValue()).toBe('Heavier pallets');

    await page.getByRole('button', { name: 'Save as revision 3' }).click();
    await notice(page, 'Saved as revision 3.').waitFor();
    await page.getByRole('row', { name: /Revision 3, shown .* Dora Designer Heavier pallets/ }).waitFor();
    await page.getByRole('row', { name: /Revision 2 .* Sven Second/ }).waitFor();

    const saved = async (number: number) => {
      const path = `/api/scenarios/${scenarioId}/revisions/${number}`;
      const { study } = (await designer.get(path)).read(scenarioRevisionSchema);
      return (study as Study).parameters;
    };
    expect(await saved(2)).toMatchObject(withBand('k', { low: 170 }).parameters);
    expect(await saved(3)).toMatchObject(withBand('m', { high: 525 }).parameters);

    await page.getByRole('link', { name: 'Revision 2' }).click();
    await page.getByText('This is an older revision.').waitFor();
    await page.getByRole('row', { name: /Belt .* 170 to 240/ }).waitFor();
    await page.reload();
    await page.getByText('This is an older revision.').waitFor();
    await page.getByRole('row', { name: /Belt .* 170 to 240/ }).waitFor();
  });
});
