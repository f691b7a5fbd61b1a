// People of the end-to-end tests: made through the pages, as anybody would.
import type { Page } from '@playwright/test';
import { expect, type Mail } from './test.ts';

export interface TestPerson {
  name: string;
  email: string;
  password: string;
}

let made = 0;

/** A person whom nobody else has. */
export function newPerson(name = 'Mira Tallow'): TestPerson {
  made += 1;
  const mark = `${process.pid}-${Date.now()}-${made}`;
  return { name, email: `mira.${mark}@learner.example`, password: `samphire ${mark} at low tide` };
}

/** The link in a mail, as a path of this site. */
export function linkIn(mail: Mail): string {
  const link = /https?:\/\/\S+/.exec(mail.text)?.[0];
  expect(link, mail.text).toBeDefined();
  const { pathname, search } = new URL(link!);
  return pathname + search;
}

/** Signs up, opens the mail's link and confirms. The person is not signed in yet. */
export async function signUp(
  page: Page,
  mailTo: (address: string) => Promise<Mail>,
  person: TestPerson,
): Promise<void> {
  await page.goto('/sign-up');
  await page.getByLabel('Name').fill(person.name);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill(person.password);
  await page.getByRole('button', { name: 'Sign up' }).click();
  await expect(page.getByText('We have sent you a mail.')).toBeVisible();
  await page.goto(linkIn(await mailTo(person.email)));
  await page.getByRole('button', { name: 'Confirm my address' }).click();
  await expect(page.getByText('Your address is confirmed.')).toBeVisible();
}

export async function signIn(page: Page, person: TestPerson, next = '/lessons'): Promise<void> {
  await page.goto(`/sign-in?next=${next}`);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill(person.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => url.pathname === next);
}

/** Scrolls to it and waits until its island has come alive: a press before that is nobody's. */
export async function awake(page: Page, selector: string): Promise<void> {
  await page.locator(selector).scrollIntoViewIfNeeded();
  await expect(page.locator(`astro-island[ssr]:has(${selector})`)).toHaveCount(0);
}
