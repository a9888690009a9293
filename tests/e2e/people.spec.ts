import { describe, expect, it } from 'vitest';
import { heading, notice, refusal } from './support/page-parts';
import { signIn } from './support/sign-in';
import { useSite } from './support/site';
import { makeTeam } from './support/team';

const site = useSite();

const PASSWORD = 'four pallets of roof tiles';

describe('an administrator', () => {
  it('invites a person, who joins from another browser, and gives them roles', async () => {
    const { productId } = await makeTeam(site(), 'Short column', 'lift-table-plate');
    const administrator = await site().person({ name: 'Ada Admin', organisationRole: 'administrator' });
    const { page } = await site().visitor(administrator);

    await page.goto('/people');
    await page.getByRole('button', { name: 'Invite a person' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('Name').fill('Nils Newcomer');
    await dialog.getByLabel('E-mail address').fill('nils@example.com');
    await dialog.getByRole('button', { name: 'Send invitation' }).click();
    await notice(page, 'The invitation to nils@example.com is on its way').waitFor();
    await page.getByRole('row', { name: /nils@example\.com .*Invited/ }).waitFor();

    await page.getByRole('link', { name: 'Outgoing mail' }).click();
    const mail = page.getByRole('group').filter({ hasText: 'to nils@example.com' });
    await mail.locator('summary').click();
    const link = /\S+\/invitation\/\S+/.exec(await mail.locator('pre').innerText())?.[0];
    if (link === undefined) throw new Error('the letter has no link');
    expect(new URL(link).origin).toBe(site().address);

    const newcomer = await site().visitor();
    await newcomer.page.goto(link);
    await newcomer.page.getByText('nils@example.com').waitFor();
    expect(await newcomer.page.getByLabel('Your name').inputValue()).toBe('Nils Newcomer');
    await newcomer.page.getByLabel('Password').fill('short');
    await newcomer.page.getByRole('button', { name: 'Accept and sign in' }).click();
    await newcomer.page.getByText('Password must have at least 12 characters.').waitFor();
    await newcomer.page.getByLabel('Password').fill(PASSWORD);
    await newcomer.page.getByRole('button', { name: 'Accept and sign in' }).click();
    await heading(newcomer.page, 'Products').waitFor();
    await newcomer.page.getByText('You have no role in any product.').waitFor();

    // The link has been used; the password works instead of it.
    const again = await site().visitor();
    await again.page.goto(link);
    await again.page.getByRole('heading', { level: 2 }).waitFor();
    expect(again.complaints.take()).toEqual([expect.stringMatching(/^410 GET \/api\/invitations\//)]);
    await again.page.goto('/sign-in');
    await signIn(again.page, 'nils@example.com', PASSWORD);
    await heading(again.page, 'Products').waitFor();

    await page.goto(`/products/${productId}`);
    await page
      .getByLabel('Person to add', { exact: true })
      .selectOption({ label: 'Nils Newcomer, nils@example.com' });
    await page.getByRole('button', { name: 'Add to the product' }).click();
    await page.getByLabel('Role of Nils Newcomer').waitFor();
    await newcomer.page.goto(`/products/${productId}`);
    await newcomer.page.getByRole('link', { name: 'Short column' }).waitFor();
    expect(await newcomer.page.getByRole('button', { name: 'New variant' }).count()).toBe(0);

    await page.getByLabel('Role of Nils Newcomer').selectOption('designer');
    await notice(page, 'Nils Newcomer is designer now.').waitFor();
    await newcomer.page.reload();
    await newcomer.page.getByRole('button', { name: 'New variant' }).waitFor();

    await page.goto('/people');
    await page.getByLabel('Role of Nils Newcomer').selectOption('administrator');
    await notice(page, 'Nils Newcomer is administrator now.').waitFor();
    await newcomer.page.goto('/people');
    await heading(newcomer.page, 'People').waitFor();

    await page.getByRole('link', { name: 'Audit log' }).click();
    await page
      .getByRole('row', { name: /Ada Admin/ })
      .first()
      .waitFor();
    await page
      .getByRole('row', { name: /Nils Newcomer/ })
      .first()
      .waitFor();
  });

  it('shuts a person out, who is told to sign in and cannot', async () => {
    const administrator = await site().person({ name: 'Ada Admin', organisationRole: 'administrator' });
    const leaver = await site().person({ name: 'Lars Leaver' });
    const desk = await site().visitor(leaver);
    await desk.page.goto('/account');
    await heading(desk.page, 'Your account').waitFor();

    const { page } = await site().visitor(administrator);
    await page.goto('/people');
    await page.getByRole('button', { name: 'Disable Lars Leaver' }).click();
    await notice(page, 'Lars Leaver is signed out and cannot sign in.').waitFor();
    await desk.page.reload();
    await heading(desk.page, 'Sign in').waitFor();
    await page.getByRole('button', { name: 'Enable Lars Leaver' }).click();
    await notice(page, 'Lars Leaver may sign in again.').waitFor();

    await page.getByRole('button', { name: 'Remove Lars Leaver' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Remove person' }).click();
    await notice(page, 'Lars Leaver is removed.').waitFor();
    await page.getByRole('row', { name: /Lars Leaver/ }).waitFor({ state: 'detached' });
  });

  it('is told where an invitation would be a second one', async () => {
    const administrator = await site().person({ name: 'Ada Admin', organisationRole: 'administrator' });
    const { email } = await site().person({ name: 'Rita Reviewer' });
    const { page, complaints } = await site().visitor(administrator);
    await page.goto('/people');
    await page.getByRole('button', { name: 'Invite a person' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('Name').fill('Rita Reviewer');
    await dialog.getByLabel('E-mail address').fill(email);
    await dialog.getByRole('button', { name: 'Send invitation' }).click();
    await refusal(page, email).waitFor();
    expect(complaints.take()).toEqual(['409 POST /api/people/invitations']);
  });
});
