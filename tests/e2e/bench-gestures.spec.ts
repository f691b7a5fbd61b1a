import { expect, test, type CDPSession, type Locator, type Page } from '@playwright/test';
import { serveBench } from '../view/harness/serve';

let bench: Awaited<ReturnType<typeof serveBench>>;

test.beforeAll(async () => {
  bench = await serveBench();
});
test.afterAll(async () => {
  await bench.close();
});

const bottle = (page: Page, id: string): Locator => page.locator(`[data-bottle="${id}"]`);
const vessel = (page: Page, id: string): Locator => page.locator(`[data-vessel="${id}"]`);
/** Lines of the notebook for moves, without the set-up. */
const lines = (page: Page): Locator =>
  page.locator('.notebook tbody tr').filter({ has: page.locator('.line-number:not(:empty)') });
const pH = (page: Page, nth: number): Locator => page.locator('.tag-value').nth(nth);

async function middle(target: Locator): Promise<{ x: number; y: number }> {
  const box = await target.boundingBox();
  if (!box) throw new Error('not on the page');
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}

async function open(page: Page, query = ''): Promise<void> {
  await page.goto(bench.url + query);
  await expect(page.getByRole('heading', { name: 'Water or buffer?' })).toBeVisible();
  await expect(pH(page, 1)).toHaveText('4.76');
}

test.describe('by mouse', () => {
  test('a bottle dragged over a vessel tips, and pours while it is held there', async ({ page }) => {
    await open(page);
    const from = await middle(bottle(page, 'acid'));
    const to = await middle(vessel(page, 'buffer'));
    await page.mouse.move(from.x, from.y);
    await page.mouse.down();
    await page.mouse.move(from.x + 80, from.y - 20, { steps: 6 });
    await expect(page.locator('.carried')).toBeVisible();
    await expect(page.locator('.vessel[data-takes]')).toHaveCount(2);
    await page.mouse.move(to.x, to.y, { steps: 8 });
    await expect(vessel(page, 'buffer')).toHaveAttribute('data-over', 'true');
    await expect(page.locator('.tipped[data-pouring]')).toBeVisible();
    await expect(pH(page, 1)).not.toHaveText('4.76');
    await page.mouse.up();
    await expect(page.locator('.tipped')).toHaveCount(0);
    await expect(lines(page)).toHaveCount(1);
    await expect(page.getByRole('status').last()).toContainText(/mL added\. pH \d\.\d\d/);
  });

  test('a bottle let go over a vessel stays tipped: a tap is one drop, a hold pours, Escape puts it back', async ({
    page,
  }) => {
    // Who rests over the vessel pours, and on a busy machine a hand may seem to rest: then it is done again.
    await expect(async () => {
      await open(page);
      await bottle(page, 'acid').dragTo(vessel(page, 'water'), { steps: 3 });
      await expect(page.locator('.tipped')).toBeVisible({ timeout: 1500 });
      await expect(lines(page)).toHaveCount(0);
      await expect(pH(page, 0)).toHaveText('7.16', { timeout: 1500 });
    }).toPass({ timeout: 30_000 });
    const at = await middle(vessel(page, 'water'));
    await page.mouse.click(at.x, at.y);
    await expect(lines(page)).toHaveCount(1);
    await expect(lines(page).first()).toContainText('1 drop');
    const before = await pH(page, 0).innerText();
    await page.mouse.move(at.x, at.y);
    await page.mouse.down();
    await expect(pH(page, 0)).not.toHaveText(before);
    await page.mouse.up();
    await expect(lines(page)).toHaveCount(2);
    await page.keyboard.press('Escape');
    await expect(page.locator('.tipped')).toHaveCount(0);
    await expect(lines(page)).toHaveCount(2);
  });

  test('a bottle let go beside the vessels goes home and nothing is poured', async ({ page }) => {
    await open(page);
    const from = await middle(bottle(page, 'acid'));
    await page.mouse.move(from.x, from.y);
    await page.mouse.down();
    await page.mouse.move(from.x + 30, from.y - 20, { steps: 6 });
    await page.mouse.up();
    await expect(page.locator('.shelf-bottle[data-away]')).toHaveCount(0);
    await expect(page.locator('.carried')).toBeHidden();
    await expect(lines(page)).toHaveCount(0);
  });

  test('everything is done by single clicks, without a drag', async ({ page }) => {
    await open(page);
    await bottle(page, 'base').click();
    await vessel(page, 'buffer').click();
    await expect(page.locator('.tipped')).toBeVisible();
    await page.getByRole('button', { name: 'One drop' }).click();
    await expect(lines(page)).toHaveCount(1);
    await page.getByLabel('Volume in mL').fill('1.25');
    await page.getByRole('button', { name: 'Add', exact: true }).click();
    await expect(lines(page).last()).toContainText('1.25');
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(page.locator('.toast')).toContainText('Took back 1.25 mL from the ethanoate buffer.');
    await expect(lines(page).last()).toHaveAttribute('data-struck', 'true');
    await page.getByRole('button', { name: 'Put it back' }).click();
    await expect(lines(page).last()).not.toHaveAttribute('data-struck', 'true');
    await page.getByRole('button', { name: 'Start again' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Start again' }).click();
    await expect(pH(page, 1)).toHaveText('4.76');
  });

  test('a press that leaves a button before it is let go does nothing', async ({ page }) => {
    await open(page);
    const at = await middle(page.getByRole('button', { name: 'One drop' }));
    await page.mouse.move(at.x, at.y);
    await page.mouse.down();
    await page.mouse.move(at.x, at.y + 200, { steps: 4 });
    await page.mouse.up();
    await expect(lines(page)).toHaveCount(0);
  });

  test('a held pour stops at the brim and says so', async ({ page }) => {
    await open(page);
    await page.getByLabel('Volume in mL').fill('49.40');
    await page.getByRole('button', { name: 'Add', exact: true }).click();
    const hold = await middle(page.getByRole('button', { name: 'Hold to pour' }));
    await page.mouse.move(hold.x, hold.y);
    await page.mouse.down();
    await expect(page.locator('.full')).toHaveText('Full at 100.0 mL');
    await page.mouse.up();
    await expect(lines(page).last()).toContainText('0.10');
    await page.getByLabel('Volume in mL').fill('5');
    await expect(page.locator('.under-wrong')).toContainText('Water is full.');
  });

  test('a lost window ends the pour and keeps what flowed', async ({ page }) => {
    await open(page);
    const hold = await middle(page.getByRole('button', { name: 'Hold to pour' }));
    await page.mouse.move(hold.x, hold.y);
    await page.mouse.down();
    await page.waitForTimeout(400);
    await page.evaluate(() => window.dispatchEvent(new Event('blur')));
    await expect(lines(page)).toHaveCount(1);
    await page.waitForTimeout(300);
    await page.mouse.up();
    await expect(lines(page)).toHaveCount(1);
  });
});

test.describe('by keys alone', () => {
  test('Enter picks up, arrows carry, Space drips and pours, Enter leaves it tipped, Escape puts it back', async ({
    page,
  }) => {
    await open(page);
    await bottle(page, 'acid').focus();
    await page.keyboard.press('Enter');
    await expect(bottle(page, 'acid')).toHaveAttribute('data-away', 'true');
    await page.keyboard.press('ArrowRight');
    await expect(vessel(page, 'water')).toHaveAttribute('data-over', 'true');
    await page.keyboard.press('ArrowRight');
    await expect(vessel(page, 'buffer')).toHaveAttribute('data-over', 'true');
    await page.keyboard.press('Space');
    await expect(lines(page)).toHaveCount(1);
    await page.keyboard.down('Space');
    await page.waitForTimeout(700);
    await page.keyboard.up('Space');
    await expect(lines(page)).toHaveCount(2);
    await page.keyboard.press('Escape');
    await expect(page.locator('.shelf-bottle[data-away]')).toHaveCount(0);
    await expect(bottle(page, 'acid')).toBeFocused();
  });

  test('Enter on a bottle, Tab to a vessel, Enter on it, hold Space', async ({ page }) => {
    await open(page);
    await bottle(page, 'acid').focus();
    await page.keyboard.press('Enter');
    await vessel(page, 'water').focus();
    await expect(vessel(page, 'water')).toHaveAttribute('data-over', 'true');
    await page.keyboard.press('Enter');
    await expect(page.locator('.tipped')).toBeVisible();
    await expect(vessel(page, 'water')).toBeFocused();
    await page.keyboard.down('Space');
    await page.waitForTimeout(700);
    await page.keyboard.up('Space');
    await expect(lines(page)).toHaveCount(1);
    await page.keyboard.press('Escape');
    await expect(page.locator('.tipped')).toHaveCount(0);
    await expect(bottle(page, 'acid')).toBeFocused();
  });

  test('the sentence pours by Space, by Enter and by a typed volume', async ({ page }) => {
    await open(page);
    await page.getByLabel('What to pour').selectOption('base');
    await page.getByLabel('Into which vessel').selectOption('buffer');
    await page.getByRole('button', { name: 'Hold to pour' }).focus();
    await page.keyboard.down('Space');
    await expect(pH(page, 1)).not.toHaveText('4.76');
    await page.keyboard.up('Space');
    await expect(lines(page)).toHaveCount(1);
    await page.getByLabel('Volume in mL').focus();
    await page.keyboard.press('ArrowUp');
    await expect(page.getByLabel('Volume in mL')).toHaveValue('1.05');
    await page.keyboard.press('Enter');
    await expect(lines(page)).toHaveCount(2);
    await page.getByLabel('Volume in mL').fill('900');
    await expect(page.locator('.under-wrong')).toContainText(/Only 48\.\d+ mL fits\./);
  });
});

test.describe('by touch', () => {
  test.use({ viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true });

  const touch = (
    session: CDPSession,
    type: 'touchStart' | 'touchMove' | 'touchEnd',
    at?: { x: number; y: number },
  ) => session.send('Input.dispatchTouchEvent', { type, touchPoints: at ? [at] : [] });

  test('a bottle is dragged over a vessel and pours while the finger rests', async ({ page }) => {
    await open(page);
    const session = await page.context().newCDPSession(page);
    const from = await middle(bottle(page, 'acid'));
    const to = await middle(vessel(page, 'buffer'));
    await touch(session, 'touchStart', from);
    for (let i = 1; i <= 10; i += 1) {
      await touch(session, 'touchMove', {
        x: from.x + ((to.x - from.x) * i) / 10,
        y: from.y + ((to.y - from.y) * i) / 10,
      });
    }
    await expect(page.locator('.tipped[data-pouring]')).toBeVisible();
    await page.waitForTimeout(500);
    await touch(session, 'touchEnd');
    await expect(page.locator('.tipped')).toHaveCount(0);
    await expect(page.locator('.notebook tbody tr')).toHaveCount(3);
  });

  test('bottle, vessel and drop are taps', async ({ page }) => {
    await open(page);
    await bottle(page, 'acid').tap();
    await vessel(page, 'water').tap();
    await expect(page.locator('.tipped')).toBeVisible();
    await page.getByRole('button', { name: 'One drop' }).tap();
    await expect(page.locator('.notebook tbody tr')).toHaveCount(3);
  });
});

test.describe('everywhere', () => {
  test('vessels, tags and the whole sentence fit a school laptop', async ({ page }) => {
    await page.setViewportSize({ width: 1366, height: 620 });
    await open(page);
    const apron = await page.locator('.apron').boundingBox();
    expect(apron!.y + apron!.height).toBeLessThanOrEqual(620);
    for (const tag of await page.locator('.tag').all()) {
      const box = await tag.boundingBox();
      expect(box!.x).toBeGreaterThanOrEqual(112);
      expect(box!.x + box!.width).toBeLessThanOrEqual(1366);
    }
  });

  for (const width of [360, 390, 683, 1024, 1280]) {
    test(`nothing runs over the side at ${width} px, and targets are large enough`, async ({ page }) => {
      await page.setViewportSize({ width, height: 800 });
      await open(page);
      expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
      for (const target of await page.locator('.bench :is(button, select):visible').all()) {
        const box = await target.boundingBox();
        expect(box!.height, (await target.textContent()) ?? '').toBeGreaterThanOrEqual(44);
        expect(box!.width).toBeGreaterThanOrEqual(44);
      }
      for (const id of ['water', 'buffer']) {
        const box = await vessel(page, id).boundingBox();
        expect(box!.x).toBeGreaterThanOrEqual(0);
        expect(box!.x + box!.width).toBeLessThanOrEqual(width);
      }
    });
  }

  test('reduced motion leaves nothing moving, and words say it', async ({ page }) => {
    await page.emulateMedia({ reducedMotion: 'reduce' });
    await open(page);
    await page.getByRole('button', { name: 'One drop' }).click();
    await expect(lines(page)).toHaveCount(1);
    const moving = await page.evaluate(
      () => document.getAnimations().filter((animation) => animation.playState === 'running').length,
    );
    expect(moving).toBe(0);
    await expect(page.locator('.tag').first()).toContainText('stirring');
  });

  test('the live region speaks at most once a second', async ({ page }) => {
    await open(page);
    await page.evaluate(() => {
      const region = [...document.querySelectorAll('[role=status]')].at(-1)!;
      const spoken: number[] = [];
      Object.assign(window, { spoken });
      new MutationObserver(() => spoken.push(performance.now())).observe(region, {
        childList: true,
        characterData: true,
        subtree: true,
      });
    });
    for (let i = 0; i < 12; i += 1) {
      await page.getByRole('button', { name: 'One drop' }).click();
      await page.waitForTimeout(80);
    }
    await page.waitForTimeout(1500);
    const spoken = await page.evaluate(() => (window as unknown as { spoken: number[] }).spoken);
    expect(spoken.length).toBeGreaterThan(0);
    for (let i = 1; i < spoken.length; i += 1) expect(spoken[i]! - spoken[i - 1]!).toBeGreaterThan(900);
  });
});
