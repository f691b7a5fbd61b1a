import { describe, expect, it } from 'vitest';
import { compile, rehearseLesson, tellRehearsal, type Finding } from '../../../src/lessons/index.ts';
import { readingOf } from '../../../src/lessons/rehearsal/reading.ts';
import { changed, SOUND } from './lesson.ts';

const CAUTION =
  '\n:::caution\nWear eye protection. Follow your local rules and your school’s licensed practice.\n:::\n';
const SAFE = SOUND + CAUTION;

function rehearsed(markdown: string) {
  const result = compile(markdown, { file: '90-two-beakers.md' });
  if (!result.ok) throw new Error(result.faults.map(({ message }) => message).join('\n'));
  return rehearseLesson(result.lesson, markdown, {
    lessons: new Set(['two-beakers']),
    pictures: new Set(['beaker.png']),
  });
}
const faultsIn = (markdown: string): Finding[] =>
  rehearsed(markdown).findings.filter(({ level }) => level === 'fault');
const sentences = (markdown: string): string =>
  rehearsed(markdown)
    .findings.map(({ sentence }) => sentence)
    .join('\n');

describe('a lesson is rehearsed', () => {
  it('a sound one has nothing to mend; aims, predictions and keys are told with numbers', () => {
    const rehearsal = rehearsed(SAFE);
    expect(faultsIn(SAFE)).toEqual([]);
    const text = tellRehearsal('90-two-beakers.md', 'Two beakers', rehearsal);
    expect(text).toContain('yellow: Reached after 1.40 mL (28 drops) of Hydrochloric acid.');
    expect(text).toContain('Prediction guess: “The water” Water: 1 drop. Buffer: 28 drops.');
    expect(text).toContain('Key of dilute: 3.00 … 1.30 (6 variants)');
  });
  it('an aim that the shelf cannot reach is not found, never impossible', () => {
    const out = changed(
      'kind: colour, vessel: buffer, words: [yellow]',
      'kind: pH, vessel: buffer, min: 9',
      SAFE,
    );
    expect(faultsIn(out)[0]!.sentence).toMatch(
      /^Turn the buffer yellow: Not found with this shelf and glassware/,
    );
    expect(rehearsed(out).ok).toBe(false);
  });
  it('strong acid without a caution that defers to local rules has to be mended', () => {
    expect(faultsIn(SOUND)[0]!.sentence).toBe(
      'Hydrochloric acid stands on this bench, and no caution refers to local rules and licensed practice.',
    );
  });
  it('acid of 1 mol/L wants goggles first', () => {
    const harsh = changed('concentration_molL: 0.1 }', 'concentration_molL: 1 }', SAFE);
    expect(faultsIn(harsh).map(({ fix }) => fix)).toContain('safety: { goggles: first }');
  });
  it('sentences that may tell a prediction’s outcome are listed; questions and later text are not', () => {
    const telling = 'The water turns yellow at once.';
    expect(sentences(changed('Pure water has', `${telling} Pure water has`, SAFE))).toContain(telling);
    expect(sentences(SAFE + telling)).not.toContain(telling);
    expect(
      sentences(changed('Pure water has', 'Which water turns yellow? Pure water has', SAFE)),
    ).not.toContain('Which water');
  });
  it('a buffer that “holds its pH” is named', () => {
    expect(sentences(`${SAFE}\nA buffer holds its pH.\n`)).toContain('A buffer changes little');
  });
  it('links to lessons that are not there and pictures that are missing have to be mended', () => {
    expect(faultsIn(`${SAFE}\n[Next](/lessons/nowhere)\n`)[0]!.sentence).toContain(
      "'/lessons/nowhere' leads to no lesson",
    );
    expect(faultsIn(`${SAFE}\n[This](/lessons/two-beakers)\n`)).toEqual([]);
    expect(faultsIn(`${SAFE}\n![A beaker](jug.png)\n`)[0]!.sentence).toContain("'jug.png'");
    expect(faultsIn(`${SAFE}\n![A beaker](beaker.png)\n`)).toEqual([]);
  });
});

describe('reading level', () => {
  it('is LIX: words a sentence plus the percentage of long words', () => {
    // 6 words in 2 sentences, 2 of them longer than six letters: 3 + 33.
    expect(
      readingOf([
        { line: 1, text: 'Water dissolves salt.' },
        { line: 1, text: 'Indicators change colour.' },
      ]).lix,
    ).toBe(36);
  });
  it('names long sentences', () => {
    const long = `${'word '.repeat(29)}end.`;
    expect(readingOf([{ line: 4, text: long }]).long).toMatchObject([{ line: 4, words: 30 }]);
  });
});
