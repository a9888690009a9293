import { describe, expect, it } from 'vitest';
import { givePassword, PASSWORD } from '../api/support/sign-in';
import { heading, notice, refusal } from './support/page-parts';
import { signIn } from './support/sign-in';
import { useSite } from './support/site';

const site = useSite();

async function somebody() {
  const person = await site().person({ name: 'Dora Designer' });
  await givePassword(site().db, person);
  return person;
}

describe('signing in', () => {
  it('fails with a wrong password and succeeds with the right one', async () => {
    const { email } = await somebody();
    const { page, context, complaints } = await site().visitor();
    await page.goto('/');
    await heading(page, 'Sign in').waitFor();

    await signIn(page, email, 'a load of eight bricks');
    await refusal(page, 'E-mail address or password is wrong.').waitFor();
    expect(complaints.take()).toEqual(['401 POST /api/session']);
    expect(await page.getByLabel('E-mail address').inputValue()).toBe(email);

    await signIn(page, email, PASSWORD);
    await heading(page, 'Products').waitFor();
    await page.getByRole('button', { name: 'Dora Designer' }).waitFor();
    const cookies = await context.cookies();
    expect(cookies).toMatchObject([{ httpOnly: true, sameSite: 'Lax', path: '/' }]);
    expect(await page.evaluate('document.cookie')).toBe('');
  });

  it('leads to the page that was asked for, and out again', async () => {
    const { email } = await somebody();
    const { page } = await site().visitor();
    await page.goto('/account');
    await heading(page, 'Sign in').waitFor();
    await signIn(page, email, PASSWORD);
    await heading(page, 'Your account').waitFor();
    expect(new URL(page.url()).pathname).toBe('/account');

    await page.getByRole('button', { name: 'Dora Designer' }).click();
    await page.getByRole('menuitem', { name: 'Sign out' }).click();
    await heading(page, 'Sign in').waitFor();
    await page.goto('/account');
    await heading(page, 'Sign in').waitFor();
  });

  it('ends everywhere at once', async () => {
    const person = await somebody();
    const office = await site().visitor();
    const workshop = await site().visitor();
    for (const { page } of [office, workshop]) {
      await page.goto('/account');
      await signIn(page, person.email, PASSWORD);
      await heading(page, 'Your account').waitFor();
    }
    await workshop.page.goto('/products');
    await heading(workshop.page, 'Products').waitFor();

    await office.page.reload();
    const sessions = office.page.getByRole('row', { name: /Chrome on Linux/ });
    // The session that the person was made with is of no browser.
    await expect.poll(() => sessions.count()).toBe(2);
    await office.page.getByRole('button', { name: 'Sign out everywhere' }).click();
    await office.page.getByRole('dialog').getByRole('button', { name: 'Sign out everywhere' }).click();
    await heading(office.page, 'Sign in').waitFor();

    await workshop.page.getByRole('button', { name: 'Dora Designer' }).click();
    await workshop.page.getByRole('menuitem', { name: 'Your account' }).click();
    await workshop.page.getByText('Your session ended.').waitFor();
    expect(new Set(workshop.complaints.take())).toEqual(new Set(['401 GET /api/session/all']));
    expect((await person.get('/api/session')).status).toBe(401);
  });

  it('stays with a changed password, and ends in every other browser', async () => {
    const person = await somebody();
    const { page, complaints } = await site().visitor();
    await page.goto('/account');
    await signIn(page, person.email, PASSWORD);
    await heading(page, 'Your account').waitFor();

    const change = async (now: string) => {
      await page.getByLabel('Password now').fill(now);
      await page.getByLabel('New password').fill('a load of nine bricks');
      await page.getByRole('button', { name: 'Change password' }).click();
    };
    await change('a load of eight bricks');
    await page.getByText('Password now is not right.').waitFor();
    expect(complaints.take()).toEqual(['401 POST /api/session/password']);
    await change(PASSWORD);
    await notice(page, 'Password changed.').waitFor();

    await page.reload();
    await heading(page, 'Your account').waitFor();
    expect((await person.get('/api/session')).status).toBe(401);
  });
});
