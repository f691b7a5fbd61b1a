import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  compile,
  conventionsFrom,
  forLearner,
  htmlIn,
  mark,
  USUAL,
  usualIn,
  wordsIn,
  type Conventions,
} from '../../../src/lessons/index.ts';

const SCHOOL: Conventions = {
  decimal: ',',
  concentration: 'mol dm⁻³',
  volume: 'cm³',
  pH: 'significant figures',
};

describe('words in a reader’s conventions', () => {
  it('turn decimal signs and units, and nothing else', () => {
    expect(wordsIn('5.00 mL of 0.10 mol/L, pH 4.67. Then 2 L at 5 mmol/L.', SCHOOL)).toBe(
      '5,00 cm³ of 0,10 mol dm⁻³, pH 4,67. Then 2 dm³ at 5 mmol dm⁻³.',
    );
    expect(wordsIn('0.10 mol/L', { ...USUAL, concentration: 'M' })).toBe('0.10 M');
    expect(wordsIn('A mLle and L. Lamarck, 3.', SCHOOL)).toBe('A mLle and L. Lamarck, 3.');
    expect(wordsIn('0.10 mol/L', USUAL)).toBe('0.10 mol/L');
  });
  it('are the same when turned twice', () => {
    const once = wordsIn('1.05 mL of 0.5 mol/L', SCHOOL);
    expect(wordsIn(once, SCHOOL)).toBe(once);
  });
  it('leave tags, code and the sources of formulas alone', () => {
    const html =
      '<p data-x="1.5 mL">1.5 mL <code>1.5 mL</code> <annotation encoding="x">0.1</annotation><data value="4.756">4.76</data></p>';
    expect(htmlIn(html, SCHOOL)).toBe(
      '<p data-x="1.5 mL">1,5 cm³ <code>1.5 mL</code> <annotation encoding="x">0.1</annotation><data value="4.756">4,76</data></p>',
    );
    expect(htmlIn(html, USUAL)).toBe(html);
  });
});

describe('conventions as they are stored', () => {
  it('take what is known, and the language’s or the usual one for the rest', () => {
    expect(conventionsFrom(null)).toEqual(USUAL);
    expect(conventionsFrom({ decimal: ',', volume: 'barrel' })).toEqual({ ...USUAL, decimal: ',' });
    expect(conventionsFrom({ volume: 'cm³' }, usualIn('de'))).toEqual({
      ...USUAL,
      decimal: ',',
      volume: 'cm³',
    });
    expect(usualIn('en-GB')).toEqual(USUAL);
  });
});

describe('the open lesson for a reader with other conventions', () => {
  const file = '07-meeting-a-buffer.md';
  const result = compile(readFileSync(new URL(`../../../content/lessons/${file}`, import.meta.url), 'utf8'), {
    file,
  });
  if (!result.ok) throw new Error('The open lesson has faults.');
  const { lesson } = result;
  /** What is read on a page: no tags, no formula sources, no addresses of parts. */
  const read = (conventions: Conventions): string =>
    forLearner(lesson, { seed: 5, conventions })
      .map((block) => {
        if (block.kind === 'prose') return block.html;
        if (block.kind !== 'bench') return JSON.stringify(block.spec);
        const { title, intro, aims, vessels } = block.spec;
        return JSON.stringify([
          title,
          intro,
          aims.map(({ text }) => text),
          vessels.map(({ label }) => label),
        ]);
      })
      .join('\n')
      .replace(/<annotation[\s\S]*?<\/annotation>/g, '')
      .replace(/<[^>]*>/g, ' ');

  it('has no point between digits and no other unit, in prose, questions, predictions and on the bench', () => {
    const text = read(SCHOOL);
    expect(text).not.toMatch(/\d\.\d/);
    expect(text).not.toMatch(/mol\/L|\bmL\b/);
    expect(text).toMatch(/0,10 mol dm⁻³/);
    expect(text).toContain('pH 4,50 ± 0,02');
    expect(read(USUAL)).toContain('pH 4.50 ± 0.02');
  });

  it('tells keys, feedback and the rule for the digits of a pH in them', () => {
    const question = lesson.blocks.flatMap((block) =>
      block.kind === 'question' && block.spec.id === 'acid-in' ? [block.spec] : [],
    )[0]!;
    const give = (typed: string, conventions: Conventions, attempt = 3) =>
      mark(lesson, question, { kind: 'numeric', typed }, { seed: 5, conventions }, attempt);
    const told = give('2,00', SCHOOL);
    expect(told.key).toMatch(/^4,\d\d$/);
    expect(told.solution).not.toMatch(/\d\.\d<|mol\/L/);
    expect(told.poured!.yours.label).toBe('Your answer: 2,00');
    const short = told.key!.slice(0, 3);
    const asked = give(String(Math.round(Number(told.key!.replace(',', '.')) * 10) / 10), SCHOOL, 1);
    expect(short).toMatch(/^4,\d$/);
    expect(asked.verdict).toBe('ask');
    expect(asked.feedback).toContain('significant figures');
    const exact = give(`${told.key}01`, SCHOOL);
    expect(exact).toMatchObject({ verdict: 'right' });
    expect(exact.feedback).toContain('You gave 4 decimals; 2 are known');
    expect(give(`${told.key}01`, USUAL).feedback).not.toContain('decimals');
  });
});
