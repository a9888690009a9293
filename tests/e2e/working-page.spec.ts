import type { Locator, Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import type { Result } from '../../shared/contracts';
import { formatProved } from '../../shared/units';
import { runToEnd } from '../api/support/run-follower';
import { analyseText } from '../commands/support/run-in-process';
import { inspect } from './support/inspection';
import { heading, notice, refusal } from './support/page-parts';
import { type Visitor, useSite } from './support/site';
import { makeTeam, type SiteTeam } from './support/team';

const site = useSite();

const EXAMPLE = 'lift-table-plate';

const CONFIRMED = 'Of your draft, confirmed by the server. Not saved yet.';

async function openWorkingPage(): Promise<{ team: SiteTeam } & Visitor> {
  const team = await makeTeam(site(), 'Short column', EXAMPLE);
  await runToEnd(team.designer, team.scenarioId);
  const visitor = await site().visitor(team.designer);
  await visitor.page.goto(`/scenarios/${team.scenarioId}`);
  await handle(visitor.page, 'Belt', 'low').waitFor();
  await answersOf(visitor.page)
    .getByText(/^Run .* by Dora Designer/)
    .waitFor();
  return { team, ...visitor };
}

/** The handle at one end of a lane. */
function handle(page: Page, parameter: string, end: 'low' | 'high'): Locator {
  return page
    .getByRole('group', { name: parameter, exact: true })
    .getByRole('slider', { name: `${parameter}, ${end} end`, exact: true });
}

function answersOf(page: Page): Locator {
  return page.getByRole('complementary', { name: 'Answers' });
}

async function valueOf(slider: Locator): Promise<number> {
  return Number(await slider.getAttribute('aria-valuenow'));
}

/** Takes a handle by the mouse, and lets go of it this many pixels away. */
async function drag(page: Page, slider: Locator, across: number, down = 0): Promise<void> {
  await slider.scrollIntoViewIfNeeded();
  const box = await slider.boundingBox();
  if (box === null) throw new Error('the handle is not to be seen');
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + across, y + down, { steps: 8 });
  await page.mouse.up();
}

/** The study file that the page gives out. */
async function exported(page: Page): Promise<string> {
  const downloading = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Export study' }).click();
  const chunks: Buffer[] = [];
  for await (const chunk of await (await downloading).createReadStream()) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString();
}

/** The sentence over the page, as the engine's answer to the exported file has it. */
function sentenceOf({ largestPayload, smallestPayload }: Result): RegExp {
  const [to, at] = [largestPayload?.provedTo, largestPayload?.failsAt];
  const [from, below] = [smallestPayload?.provedTo, smallestPayload?.failsAt];
  if (typeof to !== 'number' || typeof at !== 'number') throw new Error('the study has no limit');
  const start = from ? `from ${formatProved(from, { side: 'up' })} ` : '';
  const light = typeof below === 'number' ? `${formatProved(below, { side: 'down' })} and at ` : '';
  const heavy = formatProved(at, { side: 'up' });
  const figure = formatProved(to, { side: 'down' });
  return new RegExp(`^Proved ${start}to ${figure}\\s?kg; fails at ${light}${heavy}\\s?kg\\.$`);
}

/** The page shows what the engine answers to the file that it gives out; returns that answer. */
async function agreesWithExport(page: Page): Promise<Result> {
  await answersOf(page).getByText(CONFIRMED).waitFor();
  const result = analyseText(await exported(page));
  await page.getByText(sentenceOf(result)).waitFor();
  const figure = formatProved(result.largestPayload?.provedTo ?? NaN, { side: 'down' });
  const shown = (await answersOf(page).innerText()).replace(/\s+/g, ' ');
  expect(shown).toMatch(new RegExp(`Proved to ${figure} ?kg`, 'i'));
  return result;
}

describe('a designer at the working page', () => {
  it('drags the stiffness edge, and what is proved is what the exported file says', async () => {
    const { page } = await openWorkingPage();
    const low = handle(page, 'Belt', 'low');
    const before = analyseText(await exported(page)).largestPayload?.provedTo ?? NaN;
    await page.getByText(sentenceOf(analyseText(await exported(page)))).waitFor();

    await drag(page, low, -20);
    const dragged = await valueOf(low);
    expect(dragged).toBeLessThan(180);
    const byMouse = (await agreesWithExport(page)).largestPayload?.provedTo ?? NaN;
    expect(byMouse).toBeLessThan(before);

    await low.focus();
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowRight');
    await expect.poll(() => valueOf(low)).toBeGreaterThan(dragged);
    const stepped = await valueOf(low);
    await expect
      .poll(async () => JSON.parse(await exported(page)) as unknown)
      .toMatchObject({
        parameters: expect.arrayContaining([expect.objectContaining({ id: 'k', low: stepped })]) as unknown,
      });
    const byKeys = (await agreesWithExport(page)).largestPayload?.provedTo ?? NaN;
    expect(byKeys).toBeGreaterThan(byMouse);

    const onMap = page.getByRole('slider', { name: 'Belt k, low end', exact: true });
    await drag(page, onMap, 0, 15);
    await expect.poll(() => valueOf(low)).toBeLessThan(stepped);
    expect((await agreesWithExport(page)).largestPayload?.provedTo).toBeLessThan(byKeys);
  });

  it('drags the payload edge past the limit: verdict and reserve change; saved, it is found again', async () => {
    const { page } = await openWorkingPage();
    const answers = answersOf(page);
    const high = handle(page, 'Payload', 'high');
    const reserve = answers.getByRole('definition').and(page.locator('dt:text-is("Reserve") + dd'));
    await answers.getByText('Holds, proved').waitFor();
    const reserveBefore = await reserve.innerText();
    await high.focus();
    await page.keyboard.press('End');
    await answers.getByText('Fails inside the bands', { exact: true }).waitFor();
    const end = await valueOf(high);
    expect(end).toBeGreaterThan(500);
    await agreesWithExport(page);
    expect(await reserve.innerText()).not.toBe(reserveBefore);
    await drag(page, high, -30);
    await expect.poll(() => valueOf(high)).toBeLessThan(end);
    const chosen = await valueOf(high);
    await agreesWithExport(page);
    await page.getByText('draft saved').waitFor();

    await page.getByRole('button', { name: 'Save and run' }).click();
    await page.getByLabel('Note').fill('Heavier pallets');
    await page.getByRole('button', { name: 'Save as revision 2' }).click();
    await notice(page, 'Saved as revision 2.').waitFor();
    await page.reload();
    await heading(page, 'Rated').waitFor();
    await page.getByText(/revision 2, saved/).waitFor();
    await expect.poll(() => valueOf(high)).toBe(chosen);
    expect(await page.getByRole('button', { name: 'Save and run' }).count()).toBe(0);
  });

  it('is told what is wrong with an expression, at its field', async () => {
    const { page } = await openWorkingPage();
    const field = page.getByRole('region', { name: 'Control' }).getByLabel('Proportional');
    await field.fill('14000*(1+');
    const description = page.getByRole('region', { name: 'Description', exact: true });
    await description.getByText(/\(character \d+\)\.$/).waitFor();
    expect(await field.getAttribute('aria-invalid')).toBe('true');
    await page.getByText('The draft cannot be computed:').waitFor();
    await field.fill('14000*1.1');
    await expect.poll(() => field.getAttribute('aria-invalid')).toBeNull();
    await agreesWithExport(page);
  });

  it('sees both versions where a second person saved meanwhile', async () => {
    const { page, team, complaints } = await openWorkingPage();
    const high = handle(page, 'Payload', 'high');
    await high.focus();
    await page.keyboard.press('ArrowRight');
    const chosen = await valueOf(high);
    await answersOf(page).getByText(CONFIRMED).waitFor();
    const { page: otherPage } = await site().visitor(team.secondDesigner);
    await otherPage.goto(`/scenarios/${team.scenarioId}`);
    await handle(otherPage, 'Belt damping', 'high').focus();
    await otherPage.keyboard.press('ArrowRight');
    await otherPage.getByRole('button', { name: 'Save and run' }).click();
    await page.getByRole('button', { name: 'Save and run' }).click();
    await otherPage.getByRole('button', { name: 'Save as revision 2' }).click();
    await notice(otherPage, 'Saved as revision 2.').waitFor();

    await page.getByRole('button', { name: 'Save as revision 2' }).click();
    const conflict = refusal(page, 'Sven Second saved revision 2 meanwhile');
    await conflict.waitFor();
    expect(complaints.take()).toEqual([`409 POST /api/scenarios/${team.scenarioId}/revisions`]);
    expect(await conflict.getByRole('listitem').allInnerTexts()).toEqual([
      expect.stringMatching(/^parameters\.c\.high: 1000 → \d+$/),
      `parameters.m.high: 500 → ${chosen}`,
    ]);
    await page.getByRole('button', { name: 'Save as revision 3' }).click();
    await notice(page, 'Saved as revision 3.').waitFor();
  });

  it('has no barrier on the page, in any look, with a draft under way', async () => {
    const { page } = await openWorkingPage();
    await handle(page, 'Belt', 'low').focus();
    await page.keyboard.press('ArrowRight');
    await answersOf(page).getByText(CONFIRMED).waitFor();
    expect(await inspect(page)).toEqual([]);
  });
});

describe('a viewer at the working page', () => {
  it('sees bands and answers, and no handle, field or act that changes them', async () => {
    const { team } = await openWorkingPage();
    const { page } = await site().visitor(team.viewer);
    await page.goto(`/scenarios/${team.scenarioId}`);
    await answersOf(page).getByText('Holds, proved').waitFor();
    await page.getByRole('group', { name: 'Payload', exact: true }).getByText('20 to 500\u2009kg').waitFor();
    expect(await page.getByRole('slider').count()).toBe(0);
    for (const name of ['Save and run', 'Undo', 'Import study', 'Run again'])
      expect(await page.getByRole('button', { name }).count()).toBe(0);
    const body = { baseRevision: 1, version: 0, study: {} };
    expect((await team.viewer.put(`/api/scenarios/${team.scenarioId}/draft`, body)).status).toBe(403);
  });
});
