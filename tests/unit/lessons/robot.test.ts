import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compile, type CompiledLesson } from '../../../src/lessons/index.ts';
import { answerQuestion, solveLesson } from '../../course/robot.ts';
import { block, changed } from './lesson.ts';

const folder = new URL('../../../content/lessons/', import.meta.url);
const files = readdirSync(folder).filter((name) => name.endsWith('.md'));

function compiled(markdown: string, file = '90-two-beakers.md'): CompiledLesson {
  const result = compile(markdown, { file });
  if (!result.ok) throw new Error(result.faults.map(({ message }) => message).join('\n'));
  return result.lesson;
}

describe('the robot', () => {
  it.each(files)('solves %s by what a learner has, whoever the learner is', (file) => {
    const lesson = compiled(readFileSync(new URL(file, folder), 'utf8'), file);
    for (const seed of [1, 2, 3, 4, 5]) expect(solveLesson(lesson, seed).open).toEqual([]);
  });

  it('says which aim no move meets', () => {
    const lesson = compiled(
      changed(
        'kind: colour, vessel: buffer, words: [yellow]',
        'kind: pH, vessel: buffer, min: 12.5, max: 13',
      ),
    );
    const { open, steps } = solveLesson(lesson, 1);
    expect(open).toEqual(['yellow']);
    expect(steps.find(({ id }) => id === 'yellow')).toMatchObject({ done: false });
  });

  it('finds an order and a match with decoys from what is said of each try', () => {
    const lesson = compiled(
      block(
        'question',
        `id: pairs
kind: match
ask: Match.
pairs:
  - { id: a, left: HCl, right: strong acid }
  - { id: b, left: NaOH, right: strong base }
  - { id: c, left: CH3COOH, right: weak acid }
decoys: [{ id: d, text: a salt }, { id: e, text: a metal }]
feedback: Which of them gives hydrogen ions away, and how many of them?
\`\`\`

\`\`\`question
id: rising
kind: order
ask: By pH.
items: [{ id: one, text: HCl }, { id: two, text: CH3COOH }, { id: three, text: NaCl }, { id: four, text: NaOH }]
feedback: Think of the hydrogen ions.`,
      ),
    );
    for (const seed of [1, 2, 3, 4]) expect(solveLesson(lesson, seed).open).toEqual([]);
  });

  it('does not call solved what is never accepted', () => {
    const never = answerQuestion(
      { id: 'q', kind: 'choice', ask: '', several: false, options: [{ id: 'a', text: 'a' }] },
      () => ({ verdict: 'not-yet', feedback: 'Look again.', misconceptions: [] }),
    );
    expect(never).toMatchObject({ done: false, sentence: 'no choice was right (1 attempt, not-yet)' });
  });
});
