import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { rules } from '../../../src/bench/rules.ts';

const here = new URL('.', import.meta.url);
const titles = readdirSync(here)
  .filter((name) => name.endsWith('.test.ts') && name !== 'rules.test.ts')
  .flatMap((name) =>
    [...readFileSync(new URL(name, here), 'utf8').matchAll(/['"`]((?:R\d\d )+)/g)].flatMap(
      (m) => m[1]?.trim().split(' ') ?? [],
    ),
  );

test.each(Object.keys(rules))('the rule %s is proved by a test that names it', (number) => {
  expect(titles).toContain(number);
});

test('no test names a rule that there is not', () => {
  expect(titles.filter((number) => !Object.hasOwn(rules, number))).toEqual([]);
});
