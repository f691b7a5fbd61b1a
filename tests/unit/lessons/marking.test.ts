import { describe, expect, it } from 'vitest';
import {
  compile,
  forLearner,
  mark,
  type Answer,
  type CompiledLesson,
  type Question,
} from '../../../src/lessons/index.ts';
import { keyOf } from '../../../src/lessons/questions/numeric.ts';
import { valuesFor } from '../../../src/lessons/questions/variants.ts';
import { scopeOf } from '../../../src/lessons/scope.ts';
import { block } from './lesson.ts';

function asked(yaml: string): { lesson: CompiledLesson; question: Question } {
  const result = compile(block('question', yaml), { file: '90-two-beakers.md' });
  if (!result.ok) throw new Error(result.faults.map(({ message }) => message).join('\n'));
  const last = result.lesson.blocks.at(-1)!;
  if (last.kind !== 'question') throw new Error('The last block is the question.');
  return { lesson: result.lesson, question: last.spec };
}
const numeric = (mixture: string, more = '') =>
  asked(`id: q\nkind: numeric\nask: What is the pH?\nmixture: ${mixture}\nsolution: See above.\n${more}`);
const type = (of: ReturnType<typeof asked>, typed: string, attempt = 1) =>
  mark(of.lesson, of.question, { kind: 'numeric', typed }, { seed: 1 }, attempt);

/** Each wrong number, worked out by hand in the comment, and the way that gives it. */
const TRACED: readonly (readonly [mixture: string, typed: string, method: string])[] = [
  ['50 mL of 0.10 mol/L CH3COOH', '1.00', 'strong-for-weak'], // -lg 0.10
  ['50 mL of 0.020 mol/L NH3', '12.30', 'strong-for-weak'], // 14 + lg 0.020
  ['50 mL of 0.10 mol/L CH3COOH', '5.76', 'root-forgotten'], // 4.756 - lg 0.10
  ['25 mL of 0.10 mol/L HCl + 75 mL of water', '1.00', 'volume-forgotten'], // -lg 0.10, not 0.025
  [
    '100 mL of 0.10 mol/L CH3COOH and 0.20 mol/L CH3COONa + 10 mL of 0.10 mol/L HCl',
    '2.04',
    'reaction-forgotten',
  ], // -lg(1.0/110)
  [
    '50 mL of 0.050 mol/L CH3COOH and 0.10 mol/L CH3COONa + 10 mL of 0.10 mol/L HCl',
    '5.06',
    'addition-forgotten',
  ], // 4.756 + lg 2
  ['50 mL of 0.050 mol/L CH3COOH and 0.20 mol/L CH3COONa', '4.15', 'ratio-inverted'], // 4.756 - lg 4
  ['50 mL of 0.010 mol/L NaOH', '2.00', 'pOH-for-pH'], // -lg 0.010
  ['50 mL of 0.010 mol/L HCl', '-2.00', 'sign-lost'],
  ['50 mL of 0.010 mol/L HCl', '4.61', 'natural-logarithm'], // -ln 0.010
  ['50 mL of 0.10 mol/L HCl', '0.10', 'concentration-for-pH'],
];

describe('a wrong number is traced to the way that gives it', () => {
  it.each(TRACED)('%s: %s is %s', (mixture, typed, method) => {
    const marking = type(numeric(mixture), typed);
    expect(marking).toMatchObject({ verdict: 'not-yet', method });
    expect(marking.feedback.length).toBeGreaterThan(40);
    expect(marking.key).toBeUndefined();
  });
  it.each([
    ['volume: 3 L for 3 mL', '3000', 'thousand-times'],
    ['volume: 3 mL typed as litres', '0.003', 'thousandth'],
  ])('%s', (_, typed, method) => {
    const question = asked('id: q\nkind: numeric\nask: How much?\nkey: 0.003\nunit: mL\nsolution: So.');
    expect(type(question, typed)).toMatchObject({ verdict: 'not-yet', method });
  });
  it("an author's own wrong method comes with its feedback and misconception", () => {
    const question = numeric(
      '50 mL of 0.10 mol/L HCl + 50 mL of 0.050 mol/L NaOH',
      'wrong: [{ value: -lg(0.05), feedback: You forgot the base., misconception: M23 }]',
    );
    expect(type(question, '1.30')).toMatchObject({
      method: 'own',
      misconceptions: ['M23'],
      feedback: '<p>You forgot the base.</p>',
    });
  });
});

describe('a number is marked', () => {
  const buffer = numeric(
    '50 mL of 0.10 mol/L CH3COOH and 0.20 mol/L CH3COONa',
    'pour: { indicator: bromocresol-green }',
  );
  it('right within ±0.02, with the key, the way to it and two tubes', () => {
    for (const typed of ['5.06', '5,05', '5.07'])
      expect(type(buffer, typed)).toMatchObject({
        verdict: 'right',
        key: '5.06',
        solution: '<p>See above.</p>',
      });
    expect(type(buffer, '5.03').verdict).toBe('not-yet');
  });
  it('asks back where decimals are missing or nothing is clear, and counts nothing', () => {
    expect(type(buffer, '5.1').verdict).toBe('ask');
    expect(type(buffer, 'about five').verdict).toBe('ask');
  });
  it('pours the answer: the tube has the pH that was typed and its colour', () => {
    const { poured } = type(buffer, '3.20');
    expect(poured?.yours).toMatchObject({ pH: 3.2, words: 'yellow', label: 'Your answer: 3.20' });
    // Its colour is to be compared with; its pH is the key.
    expect(poured?.asked).toMatchObject({ label: 'Asked for', pH: null, words: expect.any(String) });
    const told = type(buffer, '3.20', 3);
    expect(told.poured?.asked.pH).toBe(5.06);
    expect(told.key).toBe('5.06');
  });
  it('does not pour what no liquid can be', () => {
    expect(type(buffer, '44').poured).toBeUndefined();
    expect(type(buffer, '-7').poured).toBeUndefined();
  });
});

describe('choice, order, match and explain', () => {
  const choice = asked(`id: q
kind: choice
ask: Which?
options:
  - { id: a, text: A, right: true, feedback: Both partners are there. }
  - { id: b, text: B, misconception: M13, feedback: One partner is missing. }`);
  const give = (of: typeof choice, answer: Answer, seed = 1, attempt = 1) =>
    mark(of.lesson, of.question, answer, { seed }, attempt);
  it('a wrong option reveals its misconception and says why', () => {
    expect(give(choice, { kind: 'choice', chosen: ['b'] })).toEqual({
      verdict: 'not-yet',
      feedback: '<p>One partner is missing.</p>',
      misconceptions: ['M13'],
    });
    expect(give(choice, { kind: 'choice', chosen: ['a'] }).verdict).toBe('right');
    expect(() => give(choice, { kind: 'choice', chosen: ['z'] })).toThrow("There is no 'z'");
    expect(() => give(choice, { kind: 'numeric', typed: '1' })).toThrow('choice answer');
  });

  const order = asked(`id: q
kind: order
ask: In which order?
items: [{ id: one, text: 1 mol, }, { id: two, text: 2 mol }, { id: three, text: 3 mol }]
feedback: By amount.`);
  it('an order names what is misplaced, is never shown solved, and its ids tell nothing', () => {
    for (let seed = 1; seed <= 100; seed++) {
      const shown = forLearner(order.lesson, { seed }).at(-1)!;
      if (shown.kind !== 'question' || shown.spec.kind !== 'order') throw new Error('An order.');
      const { items } = shown.spec;
      expect(items.map(({ id }) => id)).toEqual(['i1', 'i2', 'i3']);
      expect(items.map(({ text }) => text)).not.toEqual(['<p>1 mol</p>', '<p>2 mol</p>', '<p>3 mol</p>']);
      const right = [1, 2, 3].map((n) => items.find(({ text }) => text.includes(`${n} mol`))!.id);
      expect(give(order, { kind: 'order', order: right }, seed).verdict).toBe('right');
      const [first, second, third] = right as [string, string, string];
      expect(give(order, { kind: 'order', order: [first, third, second] }, seed).misplaced).toEqual([
        third,
        second,
      ]);
    }
    for (const wrong of [
      ['i1', 'i2'],
      ['i1', 'i1', 'i2'],
      ['i1', 'i2', 'one'],
    ])
      expect(() => give(order, { kind: 'order', order: wrong })).toThrow();
  });

  const match = asked(`id: q
kind: match
ask: Which belongs to which?
pairs: [{ id: acid, left: Acid, right: gives }, { id: base, left: Base, right: takes }]
decoys: [{ id: salt, text: does nothing }]
feedback: By what it does.`);
  it('a match is marked in the learner’s own order; its ids tell nothing', () => {
    for (let seed = 1; seed <= 30; seed++) {
      const shown = forLearner(match.lesson, { seed }).at(-1)!;
      if (shown.kind !== 'question' || shown.spec.kind !== 'match') throw new Error('A match.');
      const { lefts, rights } = shown.spec;
      expect(rights.map(({ id }) => id)).toEqual(['r1', 'r2', 'r3']);
      const idOf = (text: string) => rights.find((one) => one.text.includes(text))!.id;
      const right = { acid: idOf('gives'), base: idOf('takes') };
      expect(lefts).toHaveLength(2);
      expect(give(match, { kind: 'match', matched: right }, seed).verdict).toBe('right');
      const swapped = { acid: right.base, base: right.acid };
      expect(give(match, { kind: 'match', matched: swapped }, seed).misplaced).toEqual(['acid', 'base']);
    }
    expect(give(match, { kind: 'match', matched: { acid: 'r1' } }).verdict).toBe('ask');
  });

  const explain = asked('id: q\nkind: explain\nask: Why?\nmodel: Because of both.\npoints: [One., Two.]');
  it('an explanation is compared with the model answer by its writer', () => {
    const text = 'The base takes the hydrogen ions in.';
    expect(give(explain, { kind: 'explain', text: 'no' }).verdict).toBe('ask');
    expect(give(explain, { kind: 'explain', text })).toMatchObject({
      verdict: 'compare',
      solution: '<p>Because of both.</p>',
      points: ['<p>One.</p>', '<p>Two.</p>'],
    });
    expect(give(explain, { kind: 'explain', text, points: [0] }).verdict).toBe('not-yet');
    expect(give(explain, { kind: 'explain', text, points: [0, 1] }).verdict).toBe('right');
  });
});

describe('variants', () => {
  const many = asked(`id: q
kind: numeric
ask: "What is the pH of \`= v in mL\` at \`= c in mol/L\`?"
vary: { c: [0.010, 0.020, 0.030, 0.050, 0.10, 0.15, 0.20, 0.25, 0.30, 0.40], v: [0.010, 0.020, 0.025, 0.040, 0.050] }
mixture: 100 mL of c mol/L CH3COOH
wrong: [strong-for-weak, root-forgotten]
help: example
steps: ["The concentration is \`= c in mol/L\`.", "The pH is \`= pH(mixture)\`."]
solution: "It is \`= pH(mixture)\`."`);
  const spec = many.question;
  if (spec.kind !== 'numeric') throw new Error('A numeric question.');
  it('a thousand learners: one right answer each, with the digits asked for, and every wrong one not right', () => {
    const seen = new Set<string>();
    for (let seed = 1; seed <= 1000; seed++) {
      const scope = scopeOf(many.lesson, valuesFor(spec, seed));
      const key = keyOf(spec, scope);
      seen.add(JSON.stringify(scope.values));
      const give = (typed: string) => mark(many.lesson, spec, { kind: 'numeric', typed }, { seed });
      expect(give(key.toFixed(2)).verdict).toBe('right');
      expect(give((-Math.log10(scope.values.c!)).toFixed(2))).toMatchObject({
        verdict: 'not-yet',
        method: 'strong-for-weak',
      });
    }
    expect(seen.size).toBe(50);
  });
  it('a learner gets the same values every time; the worked example has others', () => {
    const shown = forLearner(many.lesson, { seed: 7 }).at(-1)!;
    expect(forLearner(many.lesson, { seed: 7 }).at(-1)).toEqual(shown);
    if (shown.kind !== 'question' || shown.spec.kind !== 'numeric') throw new Error('A numeric question.');
    expect(shown.spec.example?.ask).not.toBe(shown.spec.ask);
  });
  it('reads in the learner’s conventions', () => {
    const shown = forLearner(many.lesson, {
      seed: 7,
      conventions: { decimal: ',', concentration: 'mol dm⁻³', volume: 'cm³', pH: 'significant figures' },
    });
    expect(JSON.stringify(shown.at(-1))).toMatch(/cm³.*0,\d+\u00a0mol dm⁻³/);
  });
});

describe('what a page may hold', () => {
  it('has no key, feedback, misconception, formula or model answer', () => {
    const secret = numeric('50 mL of 0.10 mol/L CH3COOH', 'wrong: [strong-for-weak]');
    const page = JSON.stringify(forLearner(secret.lesson));
    for (const word of [
      'solution',
      'feedback',
      'mixture',
      'strong-for-weak',
      'right',
      'tolerance',
      'M13',
      'See above',
      'outcome',
    ])
      expect(page, word).not.toContain(`"${word}`);
    expect(page).not.toContain('Chloride takes no hydrogen');
    expect(page).not.toContain('data-formula');
  });
});
