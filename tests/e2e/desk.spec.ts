// The whole way of a school's author: a fault, the rehearsal, a revision, and who sees it.
import type { Browser, Page } from '@playwright/test';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { demoPassword } from '../../src/server/demo/passwords.ts';
import { emailOf, PEOPLE } from '../../src/server/demo/people.ts';
import { DATA_FOLDER, SITE } from './site.ts';
import { expect, test } from './test.ts';

async function signedIn(browser: Browser, key: string): Promise<Page> {
  const { secret } = JSON.parse(readFileSync(join(DATA_FOLDER, 'demo.json'), 'utf8')) as { secret: string };
  const person = PEOPLE.find((one) => one.key === key)!;
  const page = await (await browser.newContext({ baseURL: SITE })).newPage();
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(emailOf(person));
  await page.getByLabel('Password').fill(demoPassword(secret, person.shown ? key : 'everyone else'));
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('/lessons');
  return page;
}

const lesson = (kind: string) => `---
title: The rain barrel
number: 41
summary: One barrel, one question.
model: textbook
minutes: 20
---

Water in a barrel reads \`= pH(1 L of aired water)\`.

\`\`\`bench
id: barrel
title: The barrel
vessels:
  - id: rain
    label: Rain
    glass: beaker-100
    probe: true
    stirrer: "on"
    contents: { volume_mL: 50, water: aired }
shelf:
  - id: vinegar
    label: Vinegar
    kind: reagent
    contents: { volume_mL: 100, parts: [{ substance: CH3COOH, concentration_molL: 0.1 }] }
aims:
  - { id: sour, text: Bring the rain to pH 4, kind: ${kind}, vessel: rain, min: 3.9, max: 4.1 }
\`\`\`
`;

test('a school’s author mends a fault, publishes, and only the school finds the lesson', async ({
  browser,
}) => {
  test.setTimeout(180_000);
  const author = await signedIn(browser, 'saoirse');
  const slug = `rain-barrel-${Date.now()}`;
  await author.getByRole('link', { name: 'Desk' }).click();
  // A revision that is there is checked as it stands.
  await author.getByRole('link', { name: 'the-sluice-sample, revision 1' }).click();
  await author.getByRole('button', { name: 'Check' }).click();
  await expect(author.getByText('Nothing is published yet.')).toBeVisible({ timeout: 60_000 });
  await author.getByLabel('Name of the file').fill(`41-${slug}.md`);
  await author.getByRole('textbox', { name: 'Text' }).fill(lesson('ph'));
  await author.getByRole('button', { name: 'Check' }).click();
  await expect(author.getByRole('alert')).toContainText(/Line \d+, column \d+\./, { timeout: 60_000 });
  // Nothing of what was written is lost, and nothing is published.
  await expect(author.getByRole('textbox', { name: 'Text' })).toHaveValue(lesson('ph'));
  expect((await author.request.get(`/lessons/${slug}`)).status()).toBe(404);

  await author.getByRole('textbox', { name: 'Text' }).fill(lesson('pH'));
  await author.getByRole('button', { name: 'Check' }).click();
  await expect(author.getByText('Nothing is published yet.')).toBeVisible({ timeout: 60_000 });
  await expect(author.getByText(/sour: Reached after/)).toBeVisible();
  await author.getByRole('button', { name: 'Publish' }).click();
  await expect(author.getByText(/Published as revision 1/)).toBeVisible({ timeout: 60_000 });

  await author.getByRole('textbox', { name: 'Text' }).fill(lesson('pH').replace('id: sour', 'id: sourer'));
  await author.getByRole('button', { name: 'Publish' }).click();
  await expect(author.getByText(/Published as revision 2/)).toBeVisible({ timeout: 60_000 });
  await expect(author.getByText("The aim 'sour' (Bring the rain to pH 4) is gone; met by 0.")).toBeVisible();

  expect((await author.request.get(`/lessons/${slug}`)).status()).toBe(200);
  for (const key of ['noor', 'edvin']) {
    const other = await signedIn(browser, key);
    expect((await other.request.get(`/lessons/${slug}`)).status(), key).toBe(404);
    expect((await other.request.get(`/desk?lesson=${slug}&revision=1`)).status(), key).toBe(404);
  }
});
