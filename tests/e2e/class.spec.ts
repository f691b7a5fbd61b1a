// A class arrives: thirty-five learners behind one address sign in within the same minute, and ten of them mistype first.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { demoPassword } from '../../src/server/demo/passwords.ts';
import { emailOf, PEOPLE } from '../../src/server/demo/people.ts';
import { DATA_FOLDER, SITE } from './site.ts';
import { expect, test } from './test.ts';

test('35 learners behind one address sign in at once, ten of them after a typo', async ({ playwright }) => {
  test.setTimeout(90_000);
  const { secret } = JSON.parse(readFileSync(join(DATA_FOLDER, 'demo.json'), 'utf8')) as { secret: string };
  const password = demoPassword(secret, 'everyone else');
  const learners = PEOPLE.filter((one) => !one.shown && one.works && one.groups).slice(0, 35);
  expect(learners).toHaveLength(35);

  const signIn = async (email: string, tries: readonly string[]): Promise<number> => {
    const client = await playwright.request.newContext({ baseURL: SITE });
    const form = await (await client.get('/sign-in')).text();
    const action = /<form[^>]*action="([^"]+)"/.exec(form)![1]!.replaceAll('&amp;', '&');
    let status = 0;
    for (const typed of tries) {
      const answer = await client.post(`/sign-in?${action.split('?')[1]}`, {
        form: { email, password: typed },
        headers: { Origin: SITE },
        maxRedirects: 0,
      });
      status = answer.status();
    }
    const account = (await client.get('/account', { maxRedirects: 0 })).status();
    await client.dispose();
    expect(account, `${email}: ${status}`).toBe(200);
    return status;
  };
  const began = Date.now();
  const answers = await Promise.all(
    learners.map((one, i) => signIn(emailOf(one), i < 10 ? ['misstyped', password] : [password])),
  );
  expect(answers).toEqual(learners.map(() => 303));
  // A lesson's first minute: nobody waits for it to be over.
  expect(Date.now() - began).toBeLessThan(60_000);
});
