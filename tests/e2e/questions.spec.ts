// Questions of the open lesson: what a page may hold, how each kind is answered, and that nothing typed is lost.
import type { Locator, Page } from '@playwright/test';
import { readFileSync } from 'node:fs';
import { compile, mark, TELLING_ATTEMPT, type Question } from '../../src/lessons/index.ts';
import { newPerson, signIn, signUp } from './people.ts';
import { SITE } from './site.ts';
import { expect, test } from './test.ts';

const SLUG = 'meeting-a-buffer';
const LESSON = `/lessons/${SLUG}`;
const markdown = readFileSync(
  new URL('../../content/lessons/07-meeting-a-buffer.md', import.meta.url),
  'utf8',
);
const compiled = compile(markdown, { file: '07-meeting-a-buffer.md' });
if (!compiled.ok) throw new Error('The open lesson has faults.');
const { lesson } = compiled;
const questions = lesson.blocks.flatMap((block) => (block.kind === 'question' ? [block.spec] : []));
const questionOf = (id: string): Question => questions.find((one) => one.id === id)!;
/** What visitors' questions are filled with. */
const VISITOR = { seed: 1 };
/** The key of a numeric question, as it is told to a visitor in the end. */
const keyOf = (id: string): string =>
  mark(lesson, questionOf(id), { kind: 'numeric', typed: '-987654' }, VISITOR, TELLING_ATTEMPT).key!;

// A busy machine takes its time: what is waited for are conditions.
test.describe.configure({ timeout: 150_000 });

const question = (page: Page, id: string): Locator => page.locator(`#${id}`);
const field = (page: Page, id: string): Locator => question(page, id).getByRole('textbox');
const feedback = (page: Page, id: string): Locator => question(page, id).locator('.question-feedback');
const isDone = (page: Page, id: string): Locator => page.locator(`[data-checkpoint="${id}"][data-done]`);

/** Opens the lesson at a question and waits until it answers to the hand. */
async function at(page: Page, id: string): Promise<void> {
  if (new URL(page.url(), SITE).pathname !== LESSON) await page.goto(LESSON);
  await question(page, id).scrollIntoViewIfNeeded();
  await expect(page.locator('astro-island:not([ssr])').filter({ has: question(page, id) })).toHaveCount(1);
}
async function check(page: Page, id: string, button: string | RegExp = /^Check/): Promise<void> {
  await question(page, id).getByRole('button', { name: button }).click();
}
const order = (page: Page, id: string): Promise<string[]> =>
  question(page, id).locator('.question-item-text > span:first-child').allInnerTexts();
const itemTexts = (id: string): string[] => {
  const asked = questionOf(id);
  return asked.kind === 'order' ? asked.items.map(({ text }) => text.replace(/<\/?p>/g, '')) : [];
};

/** The words of a text, as a search through a page's source would find them. */
const words = (html: string): string =>
  html
    .replace(/<[^>]*>/g, ' ')
    .replace(/&(amp;)?(quot|#34);|\\"/g, '"')
    .replace(/&(amp;)?lt;/g, '<')
    .replace(/&(amp;)?gt;/g, '>')
    .replace(/&amp;/g, '&')
    .replace(/\s+/g, ' ')
    .trim();
/** The longest stretch of plain words in a text: formulas and numbers in between are spelt in many ways. */
const longest = (html: string): string =>
  html
    .replace(
      /<data[\s\S]*?<\/data>|<span class="katex">[\s\S]*?<\/math>[\s\S]*?(?=[A-Za-z ]*<\/p>|$)/g,
      '\u0000',
    )
    .replace(/<[^>]*>/g, '\u0000')
    .split('\u0000')
    .map((part) => part.trim())
    .sort((a, b) => b.length - a.length)[0]!;

/** What is told only after an answer, by question. */
function secretsOf(asked: Question): string[] {
  switch (asked.kind) {
    case 'choice':
      return asked.options.map(({ feedback: said }) => longest(said));
    case 'numeric':
      return [
        longest(asked.solution),
        ...asked.wrong.flatMap((one) => (one.feedback ? [longest(one.feedback)] : [])),
      ];
    case 'order':
    case 'match':
      return [longest(asked.feedback)];
    case 'explain':
      return [longest(asked.model), ...asked.points.map(longest)];
  }
}

test('no key, feedback, model answer or solution stands in the page, nor in answers before they are due', async ({
  request,
}) => {
  const page = words(await (await request.get(LESSON)).text());
  for (const asked of questions) {
    for (const secret of secretsOf(asked)) {
      expect(secret.length, asked.id).toBeGreaterThan(12);
      expect(page, asked.id).not.toContain(words(secret));
    }
    if (asked.kind === 'order') {
      const texts = asked.items.map(({ text }) => page.indexOf(words(text)));
      expect(texts, asked.id).not.toEqual([...texts].sort((a, b) => a - b));
    }
    if (asked.kind === 'choice') expect(page).not.toMatch(/"right":|&quot;right&quot;:/);
  }
  // What is asked for is in the page: the search above would have found the rest.
  expect(page).toContain(words(longest(questionOf('tell-ilse').ask)));

  for (const asked of questions) {
    if (asked.kind !== 'numeric') continue;
    const key = keyOf(asked.id);
    for (let attempt = 1; attempt <= TELLING_ATTEMPT; attempt++) {
      const answer = await request.post('/api/answers', {
        headers: { Origin: SITE },
        data: {
          lesson: SLUG,
          question: asked.id,
          person: null,
          opId: '00000000-0000-4000-8000-00000000000a',
          attempt,
          answer: { kind: 'numeric', typed: '13.37' },
        },
      });
      const { marking } = await answer.json();
      expect(marking.verdict).toBe('not-yet');
      expect('key' in marking, `${asked.id}, attempt ${attempt}`).toBe(attempt >= TELLING_ATTEMPT);
      expect(JSON.stringify(marking).includes(`"${key}"`), asked.id).toBe(attempt >= TELLING_ATTEMPT);
    }
  }
});

test('a number: asked back, poured beside the asked-for tube, told at the third try, right with a comma', async ({
  page,
  expectAccessible,
}) => {
  await at(page, 'acid-in');
  await field(page, 'acid-in').fill('4.7');
  await check(page, 'acid-in');
  await expect(question(page, 'acid-in')).toContainText(/Give 2 decimals|Not yet/);
  await field(page, 'acid-in').fill('about four');
  await field(page, 'acid-in').press('Enter');
  await expect(question(page, 'acid-in')).toContainText('‘about four’'.replace(/[‘’]/g, "'"));
  await expect(field(page, 'acid-in')).toHaveAttribute('aria-invalid', 'true');

  await field(page, 'acid-in').fill('4,76');
  await check(page, 'acid-in');
  await expect(feedback(page, 'acid-in')).toContainText('Not yet. We poured your answer.');
  await expect(feedback(page, 'acid-in')).toContainText('This is the pH before anything was added.');
  const tubes = feedback(page, 'acid-in').locator('.poured-tube');
  await expect(tubes).toHaveCount(2);
  await expect(tubes.nth(0)).toContainText('pH 4.76');
  await expect(tubes.nth(1)).toContainText('Asked for');
  await expect(tubes.nth(1)).not.toContainText('pH');
  await expect(feedback(page, 'acid-in').locator('xpath=ancestor::*[@role="status"]')).toHaveCount(1);
  await expect(isDone(page, 'acid-in')).toHaveCount(0);
  await expectAccessible();

  const key = keyOf('acid-in');
  for (const typed of ['2.00', '2.01', '2.02']) {
    await field(page, 'acid-in').fill(typed);
    await check(page, 'acid-in');
    await expect(tubes.nth(0)).toContainText(`pH ${typed}`);
  }
  await expect(feedback(page, 'acid-in')).toContainText('The answer');
  await expect(tubes.nth(1)).toContainText(`pH ${key}`);
  await field(page, 'acid-in').fill(key.replace('.', ','));
  await check(page, 'acid-in');
  await expect(feedback(page, 'acid-in')).toContainText('Right.');
  await expect(feedback(page, 'acid-in').locator('.question-verdict')).toBeFocused();
  await expect(isDone(page, 'acid-in')).toHaveCount(1);
  await expect(page.locator('[data-done-words]')).toHaveText(/^1 of \d+ done$/);
});

test('a choice by keys alone: a wrong one is answered with its reason, the right one is done', async ({
  page,
}) => {
  await at(page, 'what-the-meter-says');
  const options = question(page, 'what-the-meter-says').getByRole('radio');
  await check(page, 'what-the-meter-says');
  await expect(question(page, 'what-the-meter-says').getByRole('alert')).toContainText('Choose an answer.');
  await options.first().focus();
  await page.keyboard.press('Space');
  await page.keyboard.press('Enter');
  await expect(feedback(page, 'what-the-meter-says')).toContainText(
    'Look at the notebook of your own bench.',
  );
  await options.first().focus();
  await page.keyboard.press('ArrowDown');
  await expect(options.nth(1)).toBeChecked();
  await page.keyboard.press('Enter');
  await expect(feedback(page, 'what-the-meter-says')).toContainText('Right.');
  await expect(isDone(page, 'what-the-meter-says')).toHaveCount(1);
});

test('an order by buttons keeps the focus and says the place; dragging an item does the same', async ({
  page,
}) => {
  await at(page, 'drop-by-drop');
  const right = itemTexts('drop-by-drop');
  const before = await order(page, 'drop-by-drop');
  expect([...before].sort()).toEqual([...right].sort());
  const item = (text: string) =>
    question(page, 'drop-by-drop').locator('.question-item').filter({ hasText: text });
  await check(page, 'drop-by-drop');
  await expect(feedback(page, 'drop-by-drop')).toContainText('Not yet.');
  await expect(question(page, 'drop-by-drop').getByText('not its place').first()).toBeVisible();

  // The last of the shown ones to the top, by keys.
  const last = before.at(-1)!;
  const up = item(last).getByRole('button', { name: 'Move up' });
  await up.focus();
  for (let place = before.length - 2; place >= 0; place--) {
    await page.keyboard.press('Enter');
    await expect(item(last).locator('.question-place')).toHaveText(String(place + 1));
    await expect(up).toBeFocused();
  }
  await expect(question(page, 'drop-by-drop').getByText(`Now 1 of ${before.length}.`)).toBeAttached();

  // Each to its place, by dragging at the grip.
  for (const [place, text] of right.entries()) {
    const now = await order(page, 'drop-by-drop');
    if (now[place] === text) continue;
    const from = (await item(text).locator('.question-grip').boundingBox())!;
    const to = (await item(now[place]!).boundingBox())!;
    await page.mouse.move(from.x + from.width / 2, from.y + from.height / 2);
    await page.mouse.down();
    await page.mouse.move(from.x + from.width / 2, from.y + from.height / 2 - 12, { steps: 3 });
    await page.mouse.move(from.x + from.width / 2, to.y + to.height / 2, { steps: 8 });
    await expect(item(now[place]!)).toHaveAttribute('data-over', 'above');
    await page.mouse.up();
    await expect.poll(async () => (await order(page, 'drop-by-drop'))[place]).toBe(text);
  }
  await check(page, 'drop-by-drop');
  await expect(feedback(page, 'drop-by-drop')).toContainText('Right.');
});

test('words of one’s own come before the model answer; a draft and what was said survive a reload', async ({
  page,
}) => {
  await at(page, 'tell-ilse');
  await field(page, 'tell-ilse').fill('No.');
  await check(page, 'tell-ilse', /^Show/);
  await expect(question(page, 'tell-ilse')).toContainText('Write a sentence or two of your own first.');
  const mine = 'One partner takes the acid in and becomes the other one.';
  await field(page, 'tell-ilse').fill(mine);
  await check(page, 'tell-ilse', /^Show/);
  await expect(question(page, 'tell-ilse')).toContainText('One good answer');
  await question(page, 'tell-ilse').getByRole('checkbox').first().check();
  await check(page, 'tell-ilse', 'This is what mine says');
  await expect(feedback(page, 'tell-ilse')).toContainText('You found 1 of 3 points in your answer.');
  await field(page, 'tell-ilse').fill(`${mine} It ends when one is used up.`);
  await page.reload();
  await at(page, 'tell-ilse');
  await expect(field(page, 'tell-ilse')).toHaveValue(`${mine} It ends when one is used up.`);
  await expect(question(page, 'tell-ilse')).toContainText('One good answer');
  for (const box of await question(page, 'tell-ilse').getByRole('checkbox').all()) await box.check();
  await check(page, 'tell-ilse', 'This is what mine says');
  await expect(feedback(page, 'tell-ilse')).toContainText('Complete.');
  await page.reload();
  await at(page, 'tell-ilse');
  await expect(isDone(page, 'tell-ilse')).toHaveCount(1);
});

test.describe('without a connection', () => {
  test.use({ expectedConsole: [/Failed to load resource: net::ERR_INTERNET_DISCONNECTED/] });
  test('an answer is kept and goes by itself when the connection is back', async ({ page, context }) => {
    await at(page, 'who-takes-it');
    await context.setOffline(true);
    await question(page, 'who-takes-it').getByText('Sodium ions').click();
    await check(page, 'who-takes-it');
    await expect(question(page, 'who-takes-it')).toContainText('Not connected. Your answer is kept here');
    await question(page, 'who-takes-it').getByRole('button', { name: 'Change it' }).click();
    await question(page, 'who-takes-it').getByText('Ethanoate ions').click();
    await check(page, 'who-takes-it');
    await expect(question(page, 'who-takes-it')).toContainText('Not connected.');
    await context.setOffline(false);
    await expect(feedback(page, 'who-takes-it')).toContainText('Right.');
  });
});

test('what was chosen before the page came alive counts', async ({ page }) => {
  let letGo = () => {};
  const held = new Promise<void>((resolve) => (letGo = resolve));
  await page.route(/\/_astro\/Question\..*\.js$/, async (route) => {
    await held;
    await route.continue();
  });
  await page.goto(LESSON);
  await question(page, 'who-takes-it').getByText('Ethanoate ions').click();
  await field(page, 'two-to-one').fill('7 mL');
  letGo();
  await at(page, 'who-takes-it');
  await expect(question(page, 'who-takes-it').getByRole('radio').first()).toBeChecked();
  await check(page, 'who-takes-it');
  await expect(feedback(page, 'who-takes-it')).toContainText('Right.');
  await at(page, 'two-to-one');
  await expect(field(page, 'two-to-one')).toHaveValue('7 mL');
});

test('with an account: the server keeps answers, another browser shows them, the rack counts them', async ({
  page,
  browser,
  mailTo,
}) => {
  const person = newPerson('Idris Vale');
  await signUp(page, mailTo, person);
  await signIn(page, person, LESSON);
  await at(page, 'who-takes-it');
  await question(page, 'who-takes-it').getByText('The indicator').click();
  await check(page, 'who-takes-it');
  await expect(feedback(page, 'who-takes-it')).toContainText('far too little of it');
  await question(page, 'who-takes-it').getByText('Ethanoate ions').click();
  await check(page, 'who-takes-it');
  await expect(feedback(page, 'who-takes-it')).toContainText('Right.');
  await at(page, 'two-to-one');
  await field(page, 'two-to-one').fill('99');
  await check(page, 'two-to-one');
  await expect(feedback(page, 'two-to-one')).toContainText('Not yet.');

  const elsewhere = await browser.newPage();
  await signIn(elsewhere, person, LESSON);
  await expect(isDone(elsewhere, 'who-takes-it')).toHaveCount(1);
  await at(elsewhere, 'who-takes-it');
  await expect(feedback(elsewhere, 'who-takes-it')).toContainText('Right.');
  await at(elsewhere, 'two-to-one');
  await expect(field(elsewhere, 'two-to-one')).toHaveValue('99');
  await expect(feedback(elsewhere, 'two-to-one')).toContainText('Not yet.');
  await elsewhere.goto('/lessons');
  await expect(elsewhere.locator('.rack-state').filter({ hasText: /1 of \d+/ })).toBeVisible();
  await elsewhere.close();
});

test('what was written before signing in is offered, not assumed', async ({ page, mailTo }) => {
  await at(page, 'tell-ilse');
  await field(page, 'tell-ilse').fill('It ends when one partner is used up.');
  const person = newPerson('Pia Skerry');
  await signUp(page, mailTo, person);
  await signIn(page, person, LESSON);
  await at(page, 'tell-ilse');
  await expect(question(page, 'tell-ilse')).toContainText('before you signed in. Is it yours?');
  await expect(field(page, 'tell-ilse')).toHaveValue('');
  await question(page, 'tell-ilse').getByRole('button', { name: 'It is mine' }).click();
  await expect(field(page, 'tell-ilse')).toHaveValue('It ends when one partner is used up.');
  await check(page, 'tell-ilse', /^Show/);
  await expect(question(page, 'tell-ilse')).toContainText('One good answer');
});

test('numbers and units are written as the reader chose: in prose, questions, feedback and on the bench', async ({
  page,
  mailTo,
  expectAccessible,
}) => {
  const person = newPerson('Jonas Weidner');
  await signUp(page, mailTo, person);
  await signIn(page, person, '/account');
  const form = page.locator('form').filter({ hasText: 'Decimal sign' });
  await form.getByLabel('4,76, with a comma').check();
  await form.getByLabel('0.10 mol dm⁻³').check();
  await form.getByLabel('25 cm³ and 1 dm³').check();
  await form.getByRole('button', { name: 'Write them like this' }).click();
  await expect(page.getByText('write numbers and units like this now')).toBeVisible();
  await expect(form.getByLabel('4,76, with a comma')).toBeChecked();
  await expectAccessible();

  await page.goto(LESSON);
  await expect(page.getByText('hydrochloric acid, 0,10 mol dm⁻³, into each beaker')).toBeVisible();
  await page.locator('.bench').scrollIntoViewIfNeeded();
  await expect(page.locator('.tag-value').nth(1)).toHaveText('4,76');
  await expect(page.locator('[data-bottle="acid"]')).toContainText('0,10 mol dm⁻³');
  await expect(page.locator('[data-aim="buffer-450"]')).toContainText('pH 4,50 ± 0,02');
  await page.locator('.prediction').getByText('The water, after a drop or two.').click();
  await page.locator('.prediction').getByText('certain').click();
  await page.getByRole('button', { name: 'Lock in my prediction' }).click();
  await expect(page.locator('.prediction')).toContainText('Locked in.');
  await page.locator('[data-bottle="acid"]').click();
  await page.locator('[data-vessel="buffer"]').click();
  await page.locator('.bench').getByRole('button', { name: 'Add', exact: true }).click();
  await expect(page.locator('.tag-value').nth(1)).toHaveText('4,40');
  await expect(page.locator('.bench .notebook')).toContainText('1,00');
  // What is etched into the glass stays as it was made.
  const bench = (await page.locator('.bench').innerText()).replaceAll('100 mL', '');
  expect(bench).not.toMatch(/\d\.\d|\bmL\b|mol\/L/);

  await at(page, 'acid-in');
  await field(page, 'acid-in').fill('4.76');
  await check(page, 'acid-in');
  await expect(feedback(page, 'acid-in').locator('.poured-tube').first()).toContainText('pH 4,76');
});

test.describe('with a session that has ended', () => {
  test.use({ expectedConsole: [/status of 401/] });
  test('a page that outlived its session keeps the answer and says what to do', async ({
    page,
    mailTo,
    context,
  }) => {
    const person = newPerson('Runa Holt');
    await signUp(page, mailTo, person);
    await signIn(page, person, LESSON);
    await at(page, 'who-takes-it');
    const cookies = await context.cookies();
    await context.clearCookies();
    await question(page, 'who-takes-it').getByText('Ethanoate ions').click();
    await check(page, 'who-takes-it');
    await expect(question(page, 'who-takes-it').getByRole('alert')).toContainText('You are signed out here.');
    await context.addCookies(cookies);
    await page.reload();
    await at(page, 'who-takes-it');
    await expect(feedback(page, 'who-takes-it')).toContainText('Right.');
  });
});

test.describe('on a phone', () => {
  test.use({ viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true });
  test('questions fit, are answered by touch, and are accessible', async ({ page, expectAccessible }) => {
    await at(page, 'drop-by-drop');
    const first = (await order(page, 'drop-by-drop'))[0]!;
    await question(page, 'drop-by-drop').getByRole('button', { name: 'Move down' }).first().tap();
    await expect.poll(async () => (await order(page, 'drop-by-drop'))[1]).toBe(first);
    // By a finger on the grip: the third to the top.
    const third = (await order(page, 'drop-by-drop'))[2]!;
    const items = question(page, 'drop-by-drop').locator('.question-item');
    await items.nth(1).evaluate((item) => item.scrollIntoView({ block: 'center' }));
    const grip = (await items.nth(2).locator('.question-grip').boundingBox())!;
    const top = (await items.nth(0).boundingBox())!;
    const finger = await page.context().newCDPSession(page);
    const touch = (type: 'touchStart' | 'touchMove', y: number) =>
      finger.send('Input.dispatchTouchEvent', { type, touchPoints: [{ x: grip.x + grip.width / 2, y }] });
    const [from, to] = [grip.y + grip.height / 2, top.y + top.height / 2];
    await touch('touchStart', from);
    for (let step = 1; step <= 8; step++) await touch('touchMove', from + ((to - from) * step) / 8);
    await expect(items.nth(2)).toHaveAttribute('data-carried');
    await finger.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] });
    await expect.poll(async () => (await order(page, 'drop-by-drop'))[0]).toBe(third);
    await check(page, 'drop-by-drop');
    await expect(feedback(page, 'drop-by-drop')).toBeVisible();
    await at(page, 'acid-in');
    await field(page, 'acid-in').fill('4.76');
    // A finger that a busy machine lets rest too long has pressed and not tapped: it taps again.
    const tubes = feedback(page, 'acid-in').locator('.poured-tube');
    await expect(async () => {
      if ((await tubes.count()) === 0)
        await question(page, 'acid-in').getByRole('button', { name: 'Check' }).tap();
      await expect(tubes).toHaveCount(2, { timeout: 4000 });
    }).toPass({ timeout: 25_000 });
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
    await expectAccessible();
  });
});

test('a lesson that needs access says what it is and how to get in, signed in or not', async ({
  page,
  mailTo,
  expectAccessible,
}) => {
  const closed = '/lessons/what-is-acidic';
  await page.goto('/lessons');
  await page.getByRole('link', { name: 'What is acidic?' }).click();
  await expect(page).toHaveURL(closed);
  await expect(page.getByRole('heading', { name: 'This lesson needs access' })).toBeVisible();
  await expect(page.getByText('2 benches, 2 predictions, 8 questions')).toBeVisible();
  await expect(page.locator('astro-island')).toHaveCount(0);
  await expectAccessible();
  const answer = await page.request.post('/api/answers', {
    headers: { Origin: SITE },
    data: {
      lesson: 'what-is-acidic',
      question: 'stings',
      person: null,
      opId: '00000000-0000-4000-8000-00000000000b',
      answer: { kind: 'choice', chosen: ['ph-tells'] },
    },
  });
  expect(answer.status()).toBe(403);
  const person = newPerson('Sunniva Brae');
  await signUp(page, mailTo, person);
  await signIn(page, person, closed);
  await expect(page.getByText('You are signed in as Sunniva Brae.')).toBeVisible();
  await page.getByRole('link', { name: /Lesson 7: Meeting a buffer/ }).click();
  await expect(page).toHaveURL(LESSON);
});
