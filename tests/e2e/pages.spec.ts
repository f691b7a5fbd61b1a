// Every page as it stands: axe, nothing over the side, targets that a finger hits, one heading to begin with.
import type { Page } from '@playwright/test';
import { awake, newPerson, signIn, signUp, type TestPerson } from './people.ts';
import { expect, test } from './test.ts';

const VISITORS = [
  '/',
  '/lessons',
  '/lessons/meeting-a-buffer',
  '/sign-up',
  '/sign-in',
  '/forgot',
  '/reset?token=none',
  '/verify?token=none',
  '/verify-change?token=none',
  '/accessibility',
  '/privacy',
  '/how-the-numbers-are-made',
];
const SIGNED_IN = ['/', '/lessons', '/lessons/meeting-a-buffer', '/notebook', '/account', '/sign-out'];
const WIDTHS = [1280, 390];

/** Scrolls through, so that every island wakes, and back. */
async function wake(page: Page): Promise<void> {
  for (const island of await page.locator('astro-island').all()) await island.scrollIntoViewIfNeeded();
  await expect(page.locator('astro-island[ssr]')).toHaveCount(0);
  await page.evaluate(() => scrollTo(0, 0));
}

async function expectSound(page: Page, width: number): Promise<void> {
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
  await expect(page.locator('h1')).toHaveCount(1);
  await expect(page.locator('html')).toHaveAttribute('lang', /^en/);
  await expect(page).toHaveTitle(/\S/);
  // WCAG 2.5.8: 24 px; links within a sentence are exempt.
  const small = await page.evaluate(() =>
    [...document.querySelectorAll<HTMLElement>('a, button, input:not([type=hidden]), select, summary')]
      .filter((target) => !target.closest('p, li, td, .prose, .visually-hidden, .sr-only'))
      .filter((target) => !target.matches('.sr-only, .visually-hidden, :disabled'))
      .map((target) => ({ box: target.getBoundingClientRect(), name: target.outerHTML.slice(0, 90) }))
      .filter(({ box }) => box.width > 0 && box.height > 0 && (box.width < 24 || box.height < 24))
      .filter(({ box }) => box.right > 0 && box.bottom > 0)
      .map(({ name }) => name),
  );
  const labelled = small.filter((html) => !/type="(radio|checkbox)"/.test(html));
  expect(labelled).toEqual([]);
}

for (const width of WIDTHS)
  test(`a visitor's pages at ${width} px`, async ({ page, expectAccessible }) => {
    test.setTimeout(120_000);
    await page.setViewportSize({ width, height: 800 });
    for (const path of VISITORS)
      await test.step(path, async () => {
        await page.goto(path);
        await wake(page);
        await expectSound(page, width);
        await expectAccessible();
      });
  });

test.describe('with an account', () => {
  let person: TestPerson;

  for (const width of WIDTHS)
    test(`the pages of a learner with work, at ${width} px`, async ({ page, mailTo, expectAccessible }) => {
      test.setTimeout(120_000);
      await page.setViewportSize({ width, height: 800 });
      person = newPerson();
      await signUp(page, mailTo, person);
      await signIn(page, person, '/notebook');
      await expect(page.getByText('No moves yet')).toBeVisible();
      await expectAccessible();
      await page.goto('/lessons/meeting-a-buffer');
      await awake(page, '.prediction');
      await page.locator('.prediction').getByText('The water, after a drop or two.').click();
      await page.locator('.prediction').getByText('certain', { exact: true }).click();
      await page.getByRole('button', { name: 'Lock in my prediction' }).click();
      await expect(page.locator('.prediction')).toContainText('Locked in.');
      await awake(page, '.bench');
      await page.getByRole('button', { name: 'One drop' }).click();
      await expect(page.locator('.bench').getByText('Saved', { exact: true })).toBeVisible();
      for (const path of SIGNED_IN)
        await test.step(path, async () => {
          await page.goto(path);
          await wake(page);
          await expectSound(page, width);
          await expectAccessible();
        });
      await page.goto('/notebook');
      await page.getByRole('link', { name: 'Meeting a buffer' }).first().click();
      await page.waitForURL(/\/notebook\/.+/);
      await expectSound(page, width);
      await expectAccessible();
    });
});

test.describe('errors', () => {
  test.use({ expectedConsole: [/404/] });
  test('what does not exist is said in the product’s look', async ({ page, expectAccessible }) => {
    await page.goto('/nowhere');
    await expectSound(page, page.viewportSize()!.width);
    await expectAccessible();
    await expect(page.getByRole('main').getByRole('link').first()).toBeVisible();
  });
});
