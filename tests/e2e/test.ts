// What every end-to-end test stands on: a page whose console stays silent, the demo's mail, and axe.
import AxeBuilder from '@axe-core/playwright';
import { expect, test as base } from '@playwright/test';
import { readFile } from 'node:fs/promises';
import { DATA_FOLDER } from './site.ts';

export interface Mail {
  subject: string;
  text: string;
  to: { address: string }[];
}

interface Fixtures {
  /** Console messages that this test expects; any other fails it. */
  expectedConsole: RegExp[];
  silence: void;
  /** Waits for the newest mail to this address, of this subject where one is given. */
  mailTo: (address: string, subject?: string) => Promise<Mail>;
  /** Fails where axe finds anything against WCAG 2.2 AA. */
  expectAccessible: () => Promise<void>;
}

export const test = base.extend<Fixtures>({
  expectedConsole: [[], { option: true }],
  silence: [
    async ({ page, expectedConsole }, use) => {
      const said: string[] = [];
      page.on('console', (message) => {
        if (['error', 'warning'].includes(message.type())) said.push(message.text());
      });
      page.on('pageerror', (error) => said.push(String(error)));
      await use();
      expect(said.filter((text) => !expectedConsole.some((expected) => expected.test(text)))).toEqual([]);
    },
    { auto: true },
  ],
  mailTo: async ({ request }, use) => {
    const { mailPagePort } = JSON.parse(await readFile(`${DATA_FOLDER}/demo.json`, 'utf8'));
    await use(async (address, subject) => {
      let newest: Mail | undefined;
      await expect
        .poll(
          async () => {
            const answer = await request.get(`http://127.0.0.1:${mailPagePort}/mails.json`, {
              params: { to: address },
            });
            newest = ((await answer.json()) as Mail[]).find((mail) => !subject || mail.subject === subject);
            return newest;
          },
          { timeout: 15_000, message: `a mail to ${address}` },
        )
        .toBeDefined();
      return newest!;
    });
  },
  expectAccessible: async ({ page }, use) => {
    await use(async () => {
      const { violations } = await new AxeBuilder({ page })
        .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
        .analyze();
      expect(
        violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target).join(' ')}`),
      ).toEqual([]);
    });
  },
});

export { expect };
