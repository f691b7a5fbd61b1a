// Every route with every method as every role: what the rules promise is what the running product answers.
import type { APIRequestContext, Page } from '@playwright/test';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { demoPassword } from '../../src/server/demo/passwords.ts';
import { emailOf, PEOPLE } from '../../src/server/demo/people.ts';
import { newPerson, signIn } from './people.ts';
import { DATA_FOLDER, SITE } from './site.ts';
import { expect, test } from './test.ts';

const METHODS = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS'] as const;
const NOBODY = '00000000-0000-4000-8000-000000000000';

type Role =
  | 'visitor'
  | 'unverified'
  | 'ended'
  | 'learner'
  | 'seat'
  | 'teacher'
  | 'admin'
  | 'school author'
  | 'author'
  | 'operator';
/** Who stands for which role; the visitor is nobody, and who has not confirmed an address is somebody new. */
const ROLES: Readonly<Record<Exclude<Role, 'visitor'>, string>> = {
  unverified: 'new',
  ended: 'bram',
  learner: 'noor',
  seat: 'ikaika',
  teacher: 'wren',
  admin: 'philippa',
  'school author': 'saoirse',
  author: 'edvin',
  operator: 'constance',
};
const NEW_NAME = 'Sunniva Garth';
const SIGNED_IN = Object.keys(ROLES) as Exclude<Role, 'visitor'>[];
const MEMBERS = SIGNED_IN.filter((role) => role !== 'ended' && role !== 'unverified');
const HARROWMERE: readonly Role[] = ['seat', 'teacher', 'admin', 'school author'];

interface Row {
  /** An address that the pattern matches. */
  at: string;
  /** What GET (a page) or the endpoint's own method answers, for each role; `others` for the rest. */
  expected: Partial<Record<Role, number>> & { others: number };
  /** An endpoint's methods; a page is got. */
  method?: 'POST' | 'GET';
}

const page = (at: string): Row => ({ at, expected: { others: 200 } });
const account = (at: string, signedIn = 200): Row => ({ at, expected: { visitor: 303, others: signedIn } });
/** An endpoint that reads its body first: nobody's empty body is accepted, and a visitor is told to sign in. */
const endpoint = (at: string, method: 'POST' | 'GET', visitor: number, others: number): Row => ({
  at,
  method,
  expected: { visitor, others },
});
const only = (roles: readonly Role[], status: number, others: number): Row['expected'] => ({
  ...Object.fromEntries(roles.map((role) => [role, status])),
  others,
});

/** By hand, so that a rule that is changed by mistake is seen here. Several addresses where rows decide. */
const TABLE: Readonly<Record<string, readonly Row[]>> = {
  '/': [page('/')],
  '/404': [{ at: '/404', expected: { others: 404 } }],
  '/500': [{ at: '/500', expected: { others: 500 } }],
  '/accessibility': [page('/accessibility')],
  '/account': [account('/account')],
  '/account/export': [account('/account/export')],
  '/closed/[slug]': [{ at: '/closed/what-is-acidic', expected: only(MEMBERS, 303, 200) }],
  '/desk': [
    { at: '/desk', expected: { visitor: 303, 'school author': 200, author: 200, others: 404 } },
    {
      at: '/desk?lesson=the-sluice-sample&revision=1',
      expected: { visitor: 303, 'school author': 200, others: 404 },
    },
  ],
  '/forgot': [page('/forgot')],
  '/how-the-numbers-are-made': [page('/how-the-numbers-are-made')],
  '/lessons': [page('/lessons')],
  '/lessons/[slug]': [
    page('/lessons/meeting-a-buffer'),
    // Without access the same address says what the lesson is and how to get in.
    page('/lessons/what-is-acidic'),
    { at: '/lessons/the-sluice-sample', expected: only(HARROWMERE, 200, 404) },
    { at: '/lessons/nowhere', expected: { others: 404 } },
  ],
  '/notebook': [account('/notebook')],
  '/notebook/[id]': [account(`/notebook/${NOBODY}`, 404)],
  '/privacy': [page('/privacy')],
  '/reset': [page('/reset')],
  '/sign-in': [page('/sign-in')],
  '/sign-out': [account('/sign-out')],
  '/sign-up': [page('/sign-up')],
  '/verify': [page('/verify')],
  '/verify-change': [page('/verify-change')],
  '/api/answers': [endpoint('/api/answers', 'POST', 400, 400)],
  '/api/lessons/[slug]/progress': [
    endpoint('/api/lessons/meeting-a-buffer/progress', 'GET', 401, 200),
    {
      at: '/api/lessons/what-is-acidic/progress',
      method: 'GET',
      expected: { visitor: 401, ended: 403, unverified: 403, others: 200 },
    },
    {
      at: '/api/lessons/the-sluice-sample/progress',
      method: 'GET',
      expected: { visitor: 401, ...only(HARROWMERE, 200, 404) },
    },
  ],
  '/api/observations': [endpoint('/api/observations', 'POST', 401, 400)],
  '/api/outcomes': [endpoint('/api/outcomes', 'POST', 400, 400)],
  '/api/predictions': [endpoint('/api/predictions', 'POST', 401, 400)],
  '/api/runs': [endpoint('/api/runs', 'POST', 401, 400)],
  '/api/runs/[id]/moves': [endpoint(`/api/runs/${NOBODY}/moves`, 'POST', 401, 400)],
  '/api/runs/[id]/notebook.csv': [endpoint(`/api/runs/${NOBODY}/notebook.csv`, 'GET', 401, 404)],
  '/api/takeover': [endpoint('/api/takeover', 'POST', 401, 400)],
};

/** Every route that src/pages makes. */
const routes = readdirSync('src/pages', { recursive: true, encoding: 'utf8' })
  .filter((file) => /\.(astro|ts)$/.test(file))
  .map((file) => `/${file.replace(/\.(astro|ts)$/, '').replace(/(^|\/)index$/, '')}`)
  .sort();

test('every route of src/pages stands in the table', () => {
  expect(Object.keys(TABLE).sort()).toEqual(routes);
});

async function ask(client: APIRequestContext, method: string, at: string): Promise<number> {
  const unsafe = !['GET', 'HEAD', 'OPTIONS'].includes(method);
  const answer = await client.fetch(at, {
    method,
    maxRedirects: 0,
    headers: { Origin: SITE, ...(unsafe ? { 'Content-Type': 'application/json' } : {}) },
    ...(unsafe ? { data: {} } : {}),
  });
  return answer.status();
}

const passwordOf = (key: string): string => {
  const { secret } = JSON.parse(readFileSync(join(DATA_FOLDER, 'demo.json'), 'utf8')) as { secret: string };
  const shown = PEOPLE.find((person) => person.key === key)!.shown !== undefined;
  return demoPassword(secret, shown ? key : 'everyone else');
};

/** Given again as it is: renaming changes nothing. */
const nameOf = (role: Role): string =>
  PEOPLE.find((one) => role !== 'visitor' && one.key === ROLES[role])?.name ?? NEW_NAME;

/** Signs in through the page; the context's requests are that person's from then on. */
async function signedIn(page: Page, role: Exclude<Role, 'visitor'>): Promise<APIRequestContext> {
  let person = { name: '', email: '', password: '' };
  if (role === 'unverified') {
    person = newPerson(NEW_NAME);
    await page.goto('/sign-up');
    await page.getByLabel('Name').fill(person.name);
    await page.getByLabel('E-mail').fill(person.email);
    await page.getByLabel('Password').fill(person.password);
    await page.getByRole('button', { name: 'Sign up' }).click();
    await expect(page.getByText('We have sent you a mail.')).toBeVisible();
  } else {
    const { key, name } = PEOPLE.find((one) => one.key === ROLES[role])!;
    person = { name, email: emailOf(PEOPLE.find((one) => one.key === key)!), password: passwordOf(key) };
  }
  await signIn(page, person);
  return page.context().request;
}

interface ActionRow {
  /** A form that the action takes and that changes nothing. */
  form: Readonly<Record<string, string>>;
  visitor: number;
  /** For whoever is signed in. */
  others: number | readonly number[];
}

const WRONG = 'not the password';
const TOKEN = { form: { token: 'none' }, visitor: 400, others: 400 };

/** The actions of src/actions: what a form that is complete gets from whom. Signing out comes last. */
const ACTIONS: Readonly<Record<string, ActionRow>> = {
  signUp: {
    form: { displayName: 'Nobody', email: 'nobody@learner.example', password: 'short' },
    visitor: 400,
    others: 400,
  },
  signIn: { form: { email: 'no address', password: WRONG }, visitor: 400, others: 400 },
  verify: TOKEN,
  verifyAgain: { form: {}, visitor: 401, others: 200 },
  forgot: { form: { email: 'nobody@learner.example' }, visitor: 200, others: 200 },
  reset: { form: { token: 'none', password: 'samphire at low tide' }, visitor: 400, others: 400 },
  changePassword: { form: { current: WRONG, password: 'samphire at low tide' }, visitor: 401, others: 400 },
  // Asked for at most five times in an hour, whatever came of it.
  changeEmail: {
    form: { current: WRONG, email: 'nobody@learner.example' },
    visitor: 401,
    others: [400, 429],
  },
  confirmEmailChange: TOKEN,
  rename: { form: { displayName: '' }, visitor: 401, others: 200 },
  setConventions: {
    form: { decimal: '.', concentration: 'mol/L', volume: 'mL', pH: 'two decimals' },
    visitor: 401,
    others: 200,
  },
  endSession: { form: { session: NOBODY }, visitor: 401, others: 200 },
  deleteAccount: { form: { current: WRONG, sure: 'yes' }, visitor: 401, others: 400 },
  signOut: { form: {}, visitor: 200, others: 200 },
};

test('every action of src/actions stands in the table', () => {
  const source = readdirSync('src/actions')
    .map((file) => readFileSync(join('src/actions', file), 'utf8'))
    .join('');
  const actions = [...source.matchAll(/^ {2}(\w+): defineAction\(/gm)].map(([, name]) => name!);
  expect(Object.keys(ACTIONS).sort()).toEqual(actions.sort());
  expect(source.match(/defineAction\(/g)).toHaveLength(actions.length);
});

for (const role of ['visitor', ...SIGNED_IN] as const)
  test(`as ${role}: each route and action with each method`, async ({ playwright, browser }) => {
    test.setTimeout(120_000);
    const client =
      role === 'visitor'
        ? await playwright.request.newContext({ baseURL: SITE })
        : await signedIn(await (await browser.newContext({ baseURL: SITE })).newPage(), role);
    const wrong: string[] = [];
    for (const [pattern, addresses] of Object.entries(TABLE))
      for (const { at, method = 'GET', expected } of addresses)
        for (const asked of METHODS) {
          const status = await ask(client, asked, at);
          const usual = expected[role] ?? expected.others;
          const isPage = !pattern.startsWith('/api/');
          const good = () => {
            if (asked === method || (asked === 'HEAD' && method === 'GET')) return status === usual;
            if (asked === 'OPTIONS' || (isPage && asked !== 'POST')) return status === 405;
            // A form may be posted to a page; what an endpoint does not take, it refuses.
            return isPage ? [usual, 404].includes(status) : [401, 404, 405].includes(status);
          };
          if (!good()) wrong.push(`${asked} ${at}: ${status}, not ${usual}`);
        }
    for (const [name, { form, visitor, others }] of Object.entries(ACTIONS)) {
      const at = `/_actions/people.${name}`;
      for (const method of METHODS.filter((one) => one !== 'POST')) {
        const status = (
          await client.fetch(at, { method, maxRedirects: 0, headers: { Origin: SITE } })
        ).status();
        if (![404, 405].includes(status)) wrong.push(`${method} ${name}: ${status}`);
      }
      const foreign = await client.post(at, {
        form,
        maxRedirects: 0,
        headers: { Origin: 'http://elsewhere.example' },
      });
      if (foreign.status() !== 403) wrong.push(`${name} from elsewhere: ${foreign.status()}`);
      const sent = name === 'rename' ? { displayName: nameOf(role) } : form;
      const status = (
        await client.post(at, { form: sent, maxRedirects: 0, headers: { Origin: SITE } })
      ).status();
      const expected = role === 'visitor' ? visitor : others;
      if (![expected].flat().includes(status)) wrong.push(`${name}: ${status}, not ${String(expected)}`);
    }
    expect(wrong).toEqual([]);
    // Signed out by the last action: the browser is nobody's.
    expect((await client.get('/account', { maxRedirects: 0 })).status()).toBe(303);
  });

test('a closed lesson shows nothing of what is in it', async ({ playwright }) => {
  const visitor = await playwright.request.newContext({ baseURL: SITE });
  const closed = await (await visitor.get('/lessons/what-is-acidic')).text();
  const open = await (await visitor.get('/lessons/meeting-a-buffer')).text();
  expect(open).toContain('<astro-island');
  expect(open).toContain('data-lesson=');
  expect(closed).not.toContain('<astro-island');
  expect(closed).not.toContain('data-lesson=');
  await visitor.dispose();
});

test('one learner’s run, notebook and file are not there for anybody else', async ({ browser }) => {
  const open = async (key: string) => {
    const context = await browser.newContext({ baseURL: SITE });
    const page = await context.newPage();
    await page.goto('/sign-in');
    await page.getByLabel('E-mail').fill(emailOf(PEOPLE.find((one) => one.key === key)!));
    await page.getByLabel('Password').fill(passwordOf(key));
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.waitForURL('/lessons');
    return { context, page };
  };
  const owner = await open('ikaika');
  await owner.page.goto('/notebook');
  const href = await owner.page.locator('main tbody a').first().getAttribute('href');
  const runId = href!.split('/').at(-1)!;
  const file = `/api/runs/${runId}/notebook.csv`;
  expect((await owner.context.request.get(href!)).status()).toBe(200);
  expect((await owner.context.request.get(file)).status()).toBe(200);
  for (const key of ['noor', 'wren', 'constance']) {
    const other = await open(key);
    expect((await other.context.request.get(href!)).status(), key).toBe(404);
    expect((await other.context.request.get(file)).status(), key).toBe(404);
    const moves = { after: 0, moves: [] };
    const answer = await other.context.request.post(`/api/runs/${runId}/moves`, {
      data: moves,
      headers: { Origin: SITE },
    });
    expect(answer.status(), key).toBe(404);
    await other.context.close();
  }
  await owner.context.close();
});
