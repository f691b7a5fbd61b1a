// The main job on the open lesson: predict, drip acid into water and into a buffer, say what was seen, find it again.
import type { CDPSession, Locator, Page } from '@playwright/test';
import { awake, newPerson, signIn, signUp } from './people.ts';
import { expect, test } from './test.ts';

const LESSON = '/lessons/meeting-a-buffer';
const bottle = (page: Page, id: string): Locator => page.locator(`[data-bottle="${id}"]`);
const vessel = (page: Page, id: string): Locator => page.locator(`[data-vessel="${id}"]`);
const aim = (page: Page, id: string): Locator => page.locator(`[data-aim="${id}"]`);
const pH = (page: Page, nth: number): Locator => page.locator('.tag-value').nth(nth);
const lines = (page: Page): Locator =>
  page.locator('.bench .notebook tbody tr').filter({ has: page.locator('.line-number:not(:empty)') });
/** Drops in a row are one line or several, by when they were sent. */
const dropsIn = async (page: Page): Promise<number> =>
  (await lines(page).allInnerTexts())
    .map((text) => Number(/(\d+) drops?/.exec(text)?.[1] ?? 0))
    .reduce((sum, drops) => sum + drops, 0);
const saved = (page: Page): Locator => page.locator('.bench').getByText('Saved', { exact: true });

async function middle(target: Locator): Promise<{ x: number; y: number }> {
  const box = await target.boundingBox();
  if (!box) throw new Error('not on the page');
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}

/** Waits until the islands of the lesson answer. */
async function openLesson(page: Page): Promise<void> {
  await page.goto(LESSON);
  await awake(page, '.prediction');
  await awake(page, '.bench');
  await expect(pH(page, 1)).toHaveText('4.76');
}

async function expectComparison(page: Page): Promise<void> {
  const prediction = page.locator('.prediction');
  await expect(prediction).toContainText('You predicted');
  await expect(prediction).toContainText('You saw');
  await expect(prediction).toContainText('Computed');
  await expect(prediction).toContainText('Your prediction and the solutions agree.');
}

/** A second browser, signed in by the same person, shows the same bench. */
async function expectSameElsewhere(page: Page, other: Page, person: ReturnType<typeof newPerson>) {
  const here = [await pH(page, 0).innerText(), await pH(page, 1).innerText()];
  const count = await lines(page).count();
  await signIn(other, person, LESSON);
  await awake(other, '.prediction');
  await expectComparison(other);
  await awake(other, '.bench');
  await expect(pH(other, 0)).toHaveText(here[0]!);
  await expect(pH(other, 1)).toHaveText(here[1]!);
  await expect(lines(other)).toHaveCount(count);
  await expect(aim(other, 'water-yellow')).toHaveAttribute('data-state', 'met');
}

test('by mouse: sign up, predict, drag and pour, step back, and find the run on a second browser', async ({
  page,
  browser,
  mailTo,
}) => {
  test.setTimeout(90_000);
  const person = newPerson();
  await signUp(page, mailTo, person);
  await signIn(page, person, LESSON);
  await openLesson(page);

  await page.locator('.prediction').getByText('The water, after a drop or two.').click();
  await page.locator('.prediction').getByText('fairly sure').click();
  await page.getByRole('button', { name: 'Lock in my prediction' }).click();
  await expect(page.locator('.prediction')).toContainText('Locked in.');

  await page.locator('.bench .scene').evaluate((scene) => scene.scrollIntoView({ block: 'center' }));
  const from = await middle(bottle(page, 'acid'));
  const to = await middle(vessel(page, 'water'));
  await page.mouse.move(from.x, from.y);
  await page.mouse.down();
  await page.mouse.move(from.x + 20, from.y + 10, { steps: 4 });
  await page.mouse.move(to.x, to.y, { steps: 10 });
  await expect(page.locator('.tipped[data-pouring]')).toBeVisible();
  // Not at yellow-green, which comes before.
  await expect(page.locator('.tag').nth(0)).toContainText(/yellow(?!-)/);
  await page.mouse.up();
  await expect(lines(page)).toHaveCount(1);
  await expect(aim(page, 'water-yellow')).toHaveAttribute('data-state', 'met');
  await expect(page.locator('[data-done-words]')).not.toContainText('0 of');

  await page.getByLabel('Into which vessel').selectOption('buffer');
  await page.getByLabel('Volume in mL').fill('0.75');
  await page.getByRole('button', { name: 'Add', exact: true }).click();
  await expect(lines(page)).toHaveCount(2);
  const after = await pH(page, 1).innerText();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(pH(page, 1)).toHaveText('4.76');
  await page.getByRole('button', { name: 'Put it back' }).click();
  await expect(pH(page, 1)).toHaveText(after);
  await expect(saved(page)).toBeVisible();

  await page.locator('.prediction').getByText('The water, after a drop or two.').last().click();
  await page.getByRole('button', { name: 'This is what I saw' }).click();
  await expectComparison(page);

  const elsewhere = await browser.newContext();
  await expectSameElsewhere(page, await elsewhere.newPage(), person);
  await elsewhere.close();

  await page.goto('/notebook');
  await page.getByRole('link', { name: 'Meeting a buffer' }).first().click();
  await expect(page.locator('main tbody tr')).not.toHaveCount(0);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Download as CSV' }).click();
  expect((await download).suggestedFilename()).toMatch(/\.csv$/);
});

test('by keys alone: from the prediction to the comparison', async ({ page, browser, mailTo }) => {
  test.setTimeout(120_000);
  const person = newPerson();
  await signUp(page, mailTo, person);
  await signIn(page, person, LESSON);
  await openLesson(page);
  await page.evaluate(() => {
    (document.activeElement as HTMLElement | null)?.blur();
    scrollTo(0, 0);
  });

  /** Tab, as a person does, until it is reached. */
  const tabTo = async (target: Locator) => {
    for (let presses = 0; presses < 120; presses += 1) {
      if (await target.evaluate((node) => node === document.activeElement)) return;
      await page.keyboard.press('Tab');
    }
    throw new Error('Tab never reaches it');
  };
  const radio = (text: string) =>
    page.locator('.prediction-option').filter({ hasText: text }).getByRole('radio');

  await tabTo(radio('The water, after a drop or two.'));
  await page.keyboard.press('Space');
  await tabTo(radio('a guess'));
  await page.keyboard.press('Space');
  await page.keyboard.press('Enter');
  await expect(page.locator('.prediction')).toContainText('Locked in.');

  await tabTo(bottle(page, 'acid'));
  await page.keyboard.press('Enter');
  await expect(bottle(page, 'acid')).toHaveAttribute('data-away', 'true');
  await page.keyboard.press('ArrowRight');
  await expect(vessel(page, 'water')).toHaveAttribute('data-over', 'true');
  for (let drops = 1; drops <= 3; drops += 1) {
    await page.keyboard.press('Space');
    await expect.poll(() => dropsIn(page)).toBe(drops);
  }
  await expect(aim(page, 'water-yellow')).toHaveAttribute('data-state', 'met');
  await page.keyboard.press('Escape');
  await expect(bottle(page, 'acid')).toBeFocused();
  await expect(saved(page)).toBeVisible();

  await page.evaluate(() => (document.activeElement as HTMLElement | null)?.blur());
  await page.locator('h1').click();
  await tabTo(radio('The water, after a drop or two.').last());
  await page.keyboard.press('Space');
  await page.keyboard.press('Enter');
  await expectComparison(page);

  const elsewhere = await browser.newContext();
  await expectSameElsewhere(page, await elsewhere.newPage(), person);
  await elsewhere.close();
});

test.describe('by touch', () => {
  test.use({ viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true });

  test('without an account first, taken over after the question, then found again', async ({
    page,
    mailTo,
  }) => {
    test.setTimeout(120_000);
    await openLesson(page);
    await page.locator('.prediction').getByText('The water, after a drop or two.').tap();
    await page.locator('.prediction').getByText('certain', { exact: true }).tap();
    await page.getByRole('button', { name: 'Lock in my prediction' }).tap();
    await expect(page.locator('.prediction')).toContainText('Locked in.');

    await bottle(page, 'acid').tap();
    await vessel(page, 'water').tap();
    await expect(page.locator('.tipped')).toBeVisible();
    for (let drops = 1; drops <= 3; drops += 1) {
      await page.getByRole('button', { name: 'One drop' }).tap();
      await expect.poll(() => dropsIn(page)).toBe(drops);
    }
    const session: CDPSession = await page.context().newCDPSession(page);
    const linesBefore = await lines(page).count();
    const button = page.getByRole('button', { name: 'Hold to pour' });
    await button.scrollIntoViewIfNeeded();
    const hold = await middle(button);
    const before = await pH(page, 0).innerText();
    await session.send('Input.dispatchTouchEvent', { type: 'touchStart', touchPoints: [hold] });
    await expect(pH(page, 0)).not.toHaveText(before);
    await session.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] });
    await expect(lines(page)).toHaveCount(linesBefore + 1);
    await expect(page.locator('.bench')).toContainText('Kept in this browser');
    const left = await pH(page, 0).innerText();

    // The browser alone keeps it over a reload.
    await openLesson(page);
    await expect(pH(page, 0)).toHaveText(left);

    const person = newPerson('Jonas Reedmace');
    await signUp(page, mailTo, person);
    await signIn(page, person, LESSON);
    await awake(page, '.prediction');
    await awake(page, '.bench');
    await page.getByRole('button', { name: 'Yes, take it over' }).tap();
    await expect(pH(page, 0)).toHaveText(left);
    await expect(aim(page, 'water-yellow')).toHaveAttribute('data-state', 'met');
    await expect(saved(page)).toBeVisible();
    await page.locator('.prediction').getByText('The water, after a drop or two.').last().tap();
    await page.getByRole('button', { name: 'This is what I saw' }).tap();
    await expectComparison(page);
    await page.goto('/lessons');
    await expect(page.locator('main')).toContainText('Meeting a buffer');
  });
});
