import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { outgoingMailSchema } from '../../shared/contracts/api';
import { z } from '../../shared/contracts/zod';
import { inspect } from './support/inspection';
import { heading } from './support/page-parts';
import { useSite } from './support/site';
import { makeTeam } from './support/team';

const site = useSite();

describe('pages for nobody in particular', () => {
  it('the sign-in page', async () => {
    const { page } = await site().visitor();
    await page.goto('/sign-in?expired=1');
    await page.getByText('Your session ended.').waitFor();
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page
      .getByText(/^Password /)
      .last()
      .waitFor();
    expect(await inspect(page)).toEqual([]);
  });

  it('an invitation, and one that nobody knows', async () => {
    const administrator = await site().person({ organisationRole: 'administrator' });
    const email = `${randomUUID()}@example.com`;
    const invite = { name: 'Nils Newcomer', email, role: 'member', mayCreateProducts: false };
    expect((await administrator.post('/api/people/invitations', invite)).status).toBe(201);
    const mails = (await administrator.get('/api/mail')).read(
      z.object({ items: z.array(outgoingMailSchema) }),
    );
    const letter = mails.items.find(({ to }) => to === email)?.text ?? '';

    const { page, complaints } = await site().visitor();
    await page.goto(/\S+\/invitation\/\S+/.exec(letter)?.[0] ?? 'the letter has no link');
    await page.getByText(email).waitFor();
    expect(await inspect(page)).toEqual([]);

    await page.goto('/invitation/nobody-knows-this-one');
    await page.getByRole('alert').getByRole('heading').waitFor();
    expect(complaints.take()).toEqual([expect.stringMatching(/^4\d\d GET \/api\/invitations\/nobody/)]);
    expect(await inspect(page)).toEqual([]);
  });

  it('an address that leads nowhere', async () => {
    const { page } = await site().visitor();
    await page.goto('/warehouse/7');
    await page.getByRole('heading', { name: 'There is no such page' }).waitFor();
    expect(await inspect(page)).toEqual([]);
    await page.getByRole('link', { name: 'Go to products' }).click();
    await heading(page, 'Sign in').waitFor();
  });
});

describe('pages without what they are for', () => {
  it('no products yet, for somebody who may make one and somebody who may not', async () => {
    const maker = await site().visitor(await site().person({ mayCreateProducts: true }));
    await maker.page.goto('/products');
    await maker.page.getByRole('heading', { name: 'No product yet' }).waitFor();
    expect(await inspect(maker.page)).toEqual([]);
    const guest = await site().visitor(await site().person());
    await guest.page.goto('/products');
    await guest.page.getByText('You have no role in any product.').waitFor();
    expect(await inspect(guest.page)).toEqual([]);
  });

  it('a product without a variant', async () => {
    const designer = await site().person();
    const productId = await site().product(designer, [[designer, 'designer']]);
    const { page } = await site().visitor(designer);
    await page.goto(`/products/${productId}`);
    await page.getByRole('heading', { name: 'No variant yet' }).waitFor();
    expect(await inspect(page)).toEqual([]);
  });

  it('a scenario that was not run', async () => {
    const { designer, scenarioId } = await makeTeam(site(), 'Short column', 'lift-table-plate');
    const { page } = await site().visitor(designer);
    await page.goto(`/scenarios/${scenarioId}`);
    await page.getByRole('heading', { name: 'No answer yet' }).waitFor();
    expect(await inspect(page)).toEqual([]);
  });

  it('a page for administrators, to everybody else', async () => {
    const { page } = await site().visitor(await site().person());
    for (const path of ['/people', '/people/audit', '/people/mail']) {
      await page.goto(path);
      await heading(page, 'This page is for administrators').waitFor();
    }
    expect(await inspect(page)).toEqual([]);
  });

  it.each(['products', 'variants', 'scenarios'])(
    '%s that are not there, or not for this person',
    async (kind) => {
      const team = await makeTeam(site(), 'Short column', 'lift-table-plate');
      const ofOthers = { products: team.productId, variants: team.variantId, scenarios: team.scenarioId };
      const { page, complaints } = await site().visitor(await site().person());
      const refused: string[] = [];
      for (const id of [randomUUID(), ofOthers[kind as keyof typeof ofOthers]]) {
        await page.goto(`/${kind}/${id}`);
        await page.getByRole('alert').getByRole('heading', { level: 1 }).waitFor();
        refused.push(...complaints.take());
        expect(refused).toContain(`404 GET /api/${kind}/${id}`);
      }
      expect(await inspect(page)).toEqual([]);
      // What belongs to the missing thing is missing as well.
      refused.push(...complaints.take());
      expect(refused.filter((complaint) => !complaint.startsWith('404 GET /api/'))).toEqual([]);
    },
  );
});

describe('what opens over a page', () => {
  it('the menu of the person, with a theme that stays', async () => {
    const { page } = await site().visitor(await site().person({ name: 'Dora Designer' }));
    await page.goto('/products');
    const menu = page.getByRole('button', { name: 'Dora Designer' });
    await menu.click();
    await page.getByRole('menuitemradio', { name: 'As the system' }).waitFor();
    // Of the menu alone: while it is open it stands beside the page's landmarks, as menus do.
    expect(await inspect(page, '[role="menu"]')).toEqual([]);
    await page.getByRole('menuitemradio', { name: 'Dark' }).click();
    await expect.poll(() => page.evaluate('document.documentElement.dataset.theme')).toBe('dark');
    await page.reload();
    await menu.waitFor();
    expect(await page.evaluate('document.documentElement.dataset.theme')).toBe('dark');
  });

  it('the keyboard shortcuts, by a shortcut', async () => {
    const { page } = await site().visitor(await site().person());
    await page.goto('/account');
    await heading(page, 'Your account').waitFor();
    await page.keyboard.press('?');
    await page.getByRole('dialog', { name: 'Keyboard shortcuts' }).waitFor();
    expect(await inspect(page)).toEqual([]);
    await page.keyboard.press('Escape');
    await page.keyboard.press('g');
    await page.keyboard.press('p');
    await heading(page, 'Products').waitFor();
  });

  it('dialogs that ask for something', async () => {
    const { designer, productId, variantId, scenarioId } = await makeTeam(
      site(),
      'Short',
      'lift-table-plate',
    );
    const { page } = await site().visitor(designer);
    const dialogs: [path: string, opener: string][] = [
      [`/products/${productId}`, 'New variant'],
      [`/products/${productId}`, 'Change product'],
      [`/products/${productId}`, 'Delete product'],
      [`/variants/${variantId}`, 'New scenario'],
      [`/scenarios/${scenarioId}`, 'Import study'],
    ];
    for (const [path, opener] of dialogs) {
      await page.goto(path);
      const button = page.getByRole('button', { name: opener });
      await button.click();
      await page.getByRole('dialog').waitFor();
      expect(await inspect(page), opener).toEqual([]);
      await page.keyboard.press('Escape');
      await page.getByRole('dialog').waitFor({ state: 'detached' });
      await button.and(page.locator(':focus')).waitFor();
    }
  });

  it('a notice of what was done', async () => {
    const administrator = await site().person({ organisationRole: 'administrator' });
    await site().person({ name: 'Lars Leaver' });
    const { page } = await site().visitor(administrator);
    await page.goto('/people');
    await page.getByRole('button', { name: 'Disable Lars Leaver' }).click();
    await page.getByRole('button', { name: 'Enable Lars Leaver' }).waitFor();
    expect(await inspect(page)).toEqual([]);
  });
});

describe('the watch over the browser', () => {
  it('hears what the content security policy refuses, and requests that leave the server', async () => {
    const { page, complaints } = await site().visitor();
    await page.goto('/sign-in');
    await heading(page, 'Sign in').waitFor();
    await page.evaluate(`document.body.setAttribute('style', 'color: red')`);
    await page.evaluate(
      `void (document.body.appendChild(new Image()).src = 'http://127.0.0.1:9/elsewhere.png')`,
    );
    await page.evaluate(`console.warn('watched')`);
    const heard: string[] = [];
    await expect
      .poll(() => {
        heard.push(...complaints.take());
        return heard.filter((complaint) => /style-src|img-src|watched/.test(complaint)).length;
      })
      .toBe(3);
    // Reported without being sent: the policy was there first.
    expect(heard.filter((complaint) => complaint.startsWith('console'))).toHaveLength(3);
  });
});
