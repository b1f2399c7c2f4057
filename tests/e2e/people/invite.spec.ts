import { randomUUID } from 'node:crypto';
import { expect, test } from '@/tests/support/e2e/journey';
import { linkIn, mailTo } from '@/tests/support/e2e/mail';

const PASSWORD = 'nine bobbins on the sill';

test('a lead invites a person, who chooses a password from the mail; roles and disabling count at once', async ({
  signedIn,
  browser,
  baseURL,
}) => {
  const email = `nova-${randomUUID()}@people.example`;
  const lead = await signedIn('lead');

  await lead.goto('/site/people');
  await lead.getByRole('link', { name: 'Invite a person' }).click();
  await lead.getByRole('button', { name: 'Send invitation' }).click();
  await expect(lead.getByText('Type a name.')).toBeVisible();
  await expect(lead.getByText('Choose at least one role.')).toBeVisible();
  await lead.getByLabel('Name', { exact: true }).fill('Nova Ply');
  await lead.getByLabel('E-mail address').fill(email);
  await lead.getByLabel('Educator').check();
  await lead.getByRole('button', { name: 'Send invitation' }).click();
  const row = lead.getByRole('row').filter({ hasText: email });
  await expect(row).toContainText('Invited');

  const mail = await mailTo(email);
  expect(mail.deliveries).toBe(1);
  const link = linkIn(mail);
  expect(new URL(link).origin).toBe(baseURL);

  const theirs = await browser.newContext();
  const nova = await theirs.newPage();
  // The secret is in the fragment: no request of the browser may carry it.
  const secret = new URL(link).hash.slice(1);
  const leaks: string[] = [];
  nova.on('request', (request) => {
    const sent = `${request.url()} ${request.headers()['referer'] ?? ''}`;
    if (sent.includes(secret)) leaks.push(sent);
  });
  await nova.goto(link);
  await expect(nova.getByText('For the account of Nova Ply.')).toBeVisible();
  await expect(nova.getByLabel('E-mail address')).toHaveValue(email);
  await nova.getByLabel('New password').fill('too short');
  await nova.getByLabel('The same again').fill('too short');
  await nova.getByRole('button', { name: 'Set password and sign in' }).click();
  await expect(nova.getByText('9 characters given; at least 12 are needed.')).toBeVisible();
  await expect(nova.getByLabel('New password')).toHaveValue('too short');
  await nova.getByLabel('New password').fill(PASSWORD);
  await nova.getByLabel('The same again').fill(PASSWORD);
  await nova.getByRole('button', { name: 'Set password and sign in' }).click();
  await expect(nova.getByRole('button', { name: /Nova Ply/ })).toBeVisible();
  expect(nova.url()).not.toContain('#');
  expect(leaks).toEqual([]);

  // The link is used up, for whoever finds it in the mail.
  const finder = await (await browser.newContext()).newPage();
  await finder.goto(link);
  await expect(finder.getByText('This link has been used or has expired.')).toBeVisible();
  await finder.context().close();

  await nova.goto('/site/audit');
  await expect(nova.getByRole('heading', { name: 'Audit log' })).toHaveCount(0);
  await lead.reload();
  await expect(row).toContainText('Active');
  await row.getByRole('link', { name: 'Nova Ply' }).click();
  await lead.getByLabel('Lead').check();
  await lead.getByRole('button', { name: 'Save name and roles' }).click();
  await expect(lead.getByText('Saved. Nova Ply’s roles count from the next click on.')).toBeVisible();
  await nova.goto('/site/audit');
  await expect(nova.getByRole('heading', { name: 'Audit log' })).toBeVisible();

  await lead.getByRole('button', { name: 'Disable the account' }).click();
  await lead.getByRole('button', { name: 'Keep the account' }).click();
  await lead.getByRole('button', { name: 'Disable the account' }).click();
  await lead.getByRole('button', { name: 'Disable the account' }).click();
  await expect(lead.getByText('Nova Ply’s account is disabled.')).toBeVisible();
  await nova.goto('/site/audit');
  await expect(nova).toHaveURL(/\/sign-in\?callbackUrl=%2Fsite%2Faudit$/);
  await theirs.close();
});
