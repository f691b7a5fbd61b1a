import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { rules } from '../../../src/server/access/rules.ts';

const pages = join(import.meta.dirname, '../../../src/pages');

/** The pattern under which Astro routes a file of src/pages. */
const patternOf = (file: string): string =>
  `/${file}`
    .replace(/\.(astro|ts)$/, '')
    .replace(/\/index$/, '')
    .replace(/^$/, '/');

const patterns = readdirSync(pages, { recursive: true, withFileTypes: true })
  .filter((entry) => entry.isFile())
  .map((entry) => patternOf(join(entry.parentPath, entry.name).slice(pages.length + 1)));

test('every route states who may reach it', () => {
  expect(patterns.length).toBeGreaterThan(10);
  expect(patterns.filter((pattern) => !Object.hasOwn(rules, pattern))).toEqual([]);
});

test('no rule stands for a route that there is not', () => {
  const own = Object.keys(rules).filter((pattern) => pattern !== '/_actions/[...path]');
  expect(own.filter((pattern) => !patterns.includes(pattern))).toEqual([]);
});
