// An account's whole life through the pages: lost password, changed password and address, other browsers, data, end.
import type { Page } from '@playwright/test';
import { awake, linkIn, newPerson, signIn, signUp } from './people.ts';
import { expect, test } from './test.ts';

/** Moves that the browser's own storage holds and the server does not, as far as the browser knows. */
const unsentIn = (page: Page): Promise<number> =>
  page.evaluate(
    () =>
      new Promise<number>((resolve, reject) => {
        const opening = indexedDB.open('dropwise');
        opening.onerror = () => reject(new Error('no storage'));
        opening.onsuccess = () => {
          const all = opening.result.transaction('work').objectStore('work').getAll();
          all.onsuccess = () =>
            resolve(
              (all.result as { ops: unknown[]; confirmed: number }[])
                .map(({ ops, confirmed }) => ops.length - confirmed)
                .reduce((sum, more) => sum + more, 0),
            );
        };
      }),
  );

test('a lost password is replaced by a link that works once and signs every browser out', async ({
  page,
  browser,
  mailTo,
}) => {
  const person = newPerson();
  await signUp(page, mailTo, person);
  const elsewhere = await browser.newContext();
  const other = await elsewhere.newPage();
  await signIn(other, person);

  await page.goto('/forgot');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByRole('button', { name: 'Send the link' }).click();
  await expect(page.getByText('If this address has an account')).toBeVisible();
  const link = linkIn(await mailTo(person.email, 'Choose a new password'));
  await page.goto(link);
  await page.getByLabel('New password').fill('sea lavender by the sluice');
  await page.getByRole('button', { name: 'Change it' }).click();
  await expect(page.getByText('Your password is changed')).toBeVisible();

  await other.goto('/account');
  await expect(other).toHaveURL(/\/sign-in/);
  await signIn(other, { ...person, password: 'sea lavender by the sluice' });
  await elsewhere.close();

  await page.goto(link);
  await page.getByLabel('New password').fill('another one by the sluice');
  await page.getByRole('button', { name: 'Change it' }).click();
  await expect(page.getByRole('alert')).toBeVisible();
});

test('what a wrong password or an unknown address gets is one and the same sentence', async ({
  page,
  mailTo,
}) => {
  const person = newPerson();
  await signUp(page, mailTo, person);
  const said: string[] = [];
  for (const email of [person.email, `nobody.${person.email}`]) {
    await page.goto('/sign-in');
    await page.getByLabel('E-mail').fill(email);
    await page.getByLabel('Password').fill('not the password at all');
    await page.getByRole('button', { name: 'Sign in' }).click();
    said.push(await page.getByRole('alert').first().innerText());
    await expect(page.getByLabel('E-mail')).toHaveValue(email);
  }
  expect(said[0]).toBe(said[1]);
  // Signing up again with the address says nothing on the page either; the mail does.
  await page.goto('/sign-up');
  await page.getByLabel('Name').fill('Somebody Else');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill('a password of somebody else');
  await page.getByRole('button', { name: 'Sign up' }).click();
  await expect(page.getByText('We have sent you a mail.')).toBeVisible();
  await mailTo(person.email, 'You already have an account');
});

test('password and address change with the current password; other browsers are listed and ended', async ({
  page,
  browser,
  mailTo,
}) => {
  test.setTimeout(90_000);
  const person = newPerson();
  await signUp(page, mailTo, person);
  await signIn(page, person, '/account');
  const elsewhere = await browser.newContext();
  const other = await elsewhere.newPage();
  await signIn(other, person);

  const browsers = page.locator('section').filter({ hasText: 'Signed-in browsers' });
  await page.reload();
  await expect(browsers.getByRole('listitem')).toHaveCount(2);
  await browsers
    .getByRole('listitem')
    .filter({ hasNotText: '(this one)' })
    .getByRole('button', { name: /^Sign out/ })
    .click();
  await expect(page.getByText('Signed out there.')).toBeVisible();
  await expect(browsers.getByRole('listitem')).toHaveCount(1);
  await other.goto('/notebook');
  await expect(other).toHaveURL(/\/sign-in/);
  await elsewhere.close();

  await page.getByLabel('Current password').fill('wrong');
  await page.getByLabel('New password').fill('glasswort after the spring tide');
  await page.getByRole('button', { name: 'Change the password' }).click();
  await expect(page.locator('.fault').first()).toBeVisible();
  await page.getByLabel('Current password').fill(person.password);
  await page.getByLabel('New password').fill('glasswort after the spring tide');
  await page.getByRole('button', { name: 'Change the password' }).click();
  await expect(page.getByText('Your password is changed')).toBeVisible();
  person.password = 'glasswort after the spring tide';
  await mailTo(person.email, 'Your password was changed');

  const moved = `moved.${person.email}`;
  await page.getByLabel('New e-mail').fill(moved);
  await page.getByLabel('Your password').first().fill(person.password);
  await page.getByRole('button', { name: 'Change the address' }).click();
  await expect(page.getByText('If that address is free')).toBeVisible();
  await page.goto(linkIn(await mailTo(moved, 'Confirm your new e-mail address')));
  await page.getByRole('button', { name: 'Use this address' }).click();
  await expect(page.getByText('You sign in with this address from now on.')).toBeVisible();
  await mailTo(person.email, 'Your e-mail address was changed');
});

test('a person takes their data along, and is gone after deletion', async ({ page, mailTo }) => {
  const person = newPerson();
  await signUp(page, mailTo, person);
  await signIn(page, person, '/account');
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Download my data' }).click();
  const stream = await (await download).createReadStream();
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(part as Buffer);
  expect(JSON.parse(Buffer.concat(parts).toString('utf8'))).toMatchObject({
    person: { email: person.email },
  });

  await page.getByLabel('Your password').last().fill(person.password);
  await page.getByLabel('I am sure').check();
  await page.getByRole('button', { name: 'Delete my account' }).click();
  await page.waitForURL('/');
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill(person.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('alert').first()).toBeVisible();
});

test('signing out with unsent moves says so first, and clears what the browser kept', async ({
  page,
  context,
  mailTo,
}) => {
  test.setTimeout(90_000);
  const person = newPerson();
  await signUp(page, mailTo, person);
  await signIn(page, person, '/lessons/meeting-a-buffer');
  await awake(page, '.prediction');
  await page.locator('.prediction').getByText('Both need the same number of drops.').click();
  await page.locator('.prediction').getByText('a guess').click();
  await page.getByRole('button', { name: 'Lock in my prediction' }).click();
  await expect(page.locator('.prediction')).toContainText('Locked in.');
  await awake(page, '.bench');
  await page.getByRole('button', { name: 'One drop' }).click();
  await expect(page.locator('.bench').getByText('Saved', { exact: true })).toBeVisible();

  // The server is out of reach for moves alone: they stay here.
  await context.route('**/api/runs/**', (route) => route.abort('connectionfailed'));
  await page.getByRole('button', { name: 'One drop' }).click();
  await expect(page.locator('.bench')).toContainText('Your moves are kept here and sent later.');
  await page.goto('/sign-out');
  await expect(page.locator('#unsent')).toContainText('1 move was not sent yet and would be lost.');
  await context.unroute('**/api/runs/**');

  await page.goto('/lessons/meeting-a-buffer');
  await awake(page, '.bench');
  await expect(page.locator('.bench .notebook .line-number:not(:empty)')).toHaveCount(2);
  await expect.poll(() => unsentIn(page)).toBe(0);
  await page.goto('/sign-out');
  await expect(page.locator('#unsent')).toBeEmpty();
  await page.getByRole('main').getByRole('button', { name: 'Sign out' }).click();
  await page.waitForURL('/');
  await page.goto('/lessons/meeting-a-buffer');
  await awake(page, '.prediction');
  await expect(page.getByRole('button', { name: 'Lock in my prediction' })).toBeEnabled();
});
// Chromium itself says in the console that a request failed: that is what this test is about.
test.use({ expectedConsole: [/net::ERR_CONNECTION_FAILED|401|400|404/] });
