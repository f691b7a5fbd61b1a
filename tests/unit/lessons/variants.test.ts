/** Every numeric question of the course, for a thousand learners: one right answer, reachable, and apart from every wrong way. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compile, formatQuantity, mark, USUAL, type Conventions } from '../../../src/lessons/index.ts';
import { UNITS } from '../../../src/lessons/format.ts';
import { readNumber } from '../../../src/lessons/numberInput.ts';
import { keyOf, toleranceOf, within, wrongValue } from '../../../src/lessons/questions/numeric.ts';
import type { Numeric } from '../../../src/lessons/questions/types.ts';
import { valuesFor } from '../../../src/lessons/questions/variants.ts';
import { scopeOf } from '../../../src/lessons/scope.ts';

const LEARNERS = 1000;
const COMMA: Conventions = {
  decimal: ',',
  concentration: 'mol dm⁻³',
  volume: 'cm³',
  pH: 'significant figures',
};

const folder = new URL('../../../content/lessons/', import.meta.url);
const lessons = readdirSync(folder)
  .filter((name) => name.endsWith('.md'))
  .map((file) => {
    const result = compile(readFileSync(new URL(file, folder), 'utf8'), { file });
    if (!result.ok) throw new Error(`${file} has faults.`);
    return result.lesson;
  });
const numeric = lessons.flatMap((lesson) =>
  lesson.blocks.flatMap((block) =>
    block.kind === 'question' && block.spec.kind === 'numeric'
      ? [[`${lesson.slug}: ${block.spec.id}`, lesson, block.spec] as const]
      : [],
  ),
);
const styleOf = ({ unit, digits, by }: Numeric) => ({ unit, digits, by });

describe.each(numeric)('%s', (_, lesson, question) => {
  // Learners with the same values have the same question: it is looked at once, and all of them are counted.
  const learners = new Map<string, number>();
  for (let seed = 1; seed <= LEARNERS; seed++) {
    const row = JSON.stringify(valuesFor(question, seed));
    if (!learners.has(row)) learners.set(row, seed);
  }
  const seeds = [...learners.values()];

  it('a thousand learners get every variant', () => {
    expect(learners.size).toBe(Math.max(1, question.variants.length));
  });

  it('the key can be typed with the digits that are asked for, and is then right, with point or comma', () => {
    for (const seed of seeds) {
      const key = keyOf(question, scopeOf(lesson, valuesFor(question, seed)));
      for (const conventions of [USUAL, COMMA]) {
        const typed = formatQuantity(key, styleOf(question), conventions);
        const read = readNumber(typed, question.unit);
        expect(read.ok && within(read.base, key, toleranceOf(question, key)), typed).toBe(true);
        expect(
          mark(lesson, question, { kind: 'numeric', typed }, { seed, conventions }),
          typed,
        ).toMatchObject({ verdict: 'right' });
      }
    }
  });

  it('what lies just outside the tolerance is not right', () => {
    for (const seed of seeds) {
      const key = keyOf(question, scopeOf(lesson, valuesFor(question, seed)));
      for (const side of [-1, 1]) {
        const value = (key + side * 1.02 * toleranceOf(question, key)) / UNITS[question.unit]!;
        const typed = value.toExponential(9);
        expect(mark(lesson, question, { kind: 'numeric', typed }, { seed }).verdict, typed).toBe('not-yet');
      }
    }
  });

  it('no wrong way comes near the key, and each is traced to itself or to one with the same number', () => {
    for (const seed of seeds) {
      const scope = scopeOf(lesson, valuesFor(question, seed));
      const key = keyOf(question, scope);
      const values = question.wrong.map((wrong) => ({
        wrong,
        value: wrongValue(wrong, question, scope, key),
      }));
      for (const { wrong, value } of values) {
        if (value === null) continue;
        expect(within(value, key, 2 * toleranceOf(question, key)), `${wrong.method} ${value}`).toBe(false);
        const typed = (value / UNITS[question.unit]!).toExponential(9);
        const marking = mark(lesson, question, { kind: 'numeric', typed }, { seed });
        const same = values.filter(
          (one) => one.value !== null && Math.abs(one.value - value) <= 1e-9 * Math.abs(value),
        );
        expect(marking.verdict).toBe('not-yet');
        expect(same.map((one) => one.wrong.method)).toContain(marking.method);
        expect(marking.feedback.length).toBeGreaterThan(40);
      }
    }
  });
});

it('there are numeric questions in every lesson', () => {
  for (const lesson of lessons)
    expect(numeric.filter(([, of]) => of === lesson).length, lesson.slug).toBeGreaterThanOrEqual(2);
});
