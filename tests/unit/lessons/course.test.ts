import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { judgeRun, rehearse, replay } from '../../../src/bench/index.ts';
import {
  compile,
  forLearner,
  mark,
  rehearseLesson,
  TELLING_ATTEMPT,
  type Answer,
  type CompiledLesson,
  type Question,
} from '../../../src/lessons/index.ts';
import { keyOf } from '../../../src/lessons/questions/numeric.ts';
import { itemsOf, rightsOf, valuesFor } from '../../../src/lessons/questions/variants.ts';
import { scopeOf } from '../../../src/lessons/scope.ts';

const folder = new URL('../../../content/lessons/', import.meta.url);
const files = readdirSync(folder).filter((name) => name.endsWith('.md'));
const slugs = new Set(files.map((name) => name.replace(/^\d+-|\.md$/g, '')));

function read(file: string): { lesson: CompiledLesson; markdown: string } {
  const markdown = readFileSync(new URL(file, folder), 'utf8');
  const result = compile(markdown, { file });
  if (!result.ok)
    throw new Error(result.faults.map(({ line, message }) => `${file}:${line} ${message}`).join('\n'));
  return { lesson: result.lesson, markdown };
}

/** What a learner with this seed has to give. */
function rightAnswer(lesson: CompiledLesson, question: Question, seed: number): Answer {
  switch (question.kind) {
    case 'choice':
      return { kind: 'choice', chosen: question.options.filter(({ right }) => right).map(({ id }) => id) };
    case 'numeric': {
      // The key as the server would tell it, with its unit.
      const told = mark(lesson, question, { kind: 'numeric', typed: '-987654' }, { seed }, TELLING_ATTEMPT);
      return { kind: 'numeric', typed: told.key! };
    }
    case 'order':
      return {
        kind: 'order',
        order: question.items.map(({ id }) => itemsOf(question, seed).find(({ item }) => item === id)!.id),
      };
    case 'match': {
      const rights = rightsOf(question, seed);
      return {
        kind: 'match',
        matched: Object.fromEntries(
          question.pairs.map(({ id }) => [id, rights.find(({ pair }) => pair === id)!.id]),
        ),
      };
    }
    case 'explain':
      return {
        kind: 'explain',
        text: 'One partner takes the hydrogen ions in.',
        points: question.points.map((_, n) => n),
      };
  }
}

describe.each(files)('%s', (file) => {
  const { lesson, markdown } = read(file);
  const questions = lesson.blocks.flatMap((block) => (block.kind === 'question' ? [block.spec] : []));

  it('is ready: nothing to mend', () => {
    const { findings } = rehearseLesson(lesson, markdown, { lessons: slugs });
    expect(findings.filter(({ level }) => level === 'fault')).toEqual([]);
  });

  it('every aim is met by the moves that its rehearsal found, replayed from the start', () => {
    for (const block of lesson.blocks) {
      if (block.kind !== 'bench') continue;
      const run = replay(block.spec, 1, rehearse(block.spec).moves);
      if (!run.ok) throw new Error('The moves of a rehearsal can be done.');
      const met = judgeRun(run.state).map(({ id }) => id);
      expect(met.sort()).toEqual(block.spec.aims.map(({ id }) => id).sort());
    }
  });

  it.each(questions.map((question) => [question.id, question] as const))(
    'question %s has one right answer for each of 200 learners, and wrong ones are answered with a reason',
    (_, question) => {
      for (let seed = 1; seed <= 200; seed++) {
        const answer = rightAnswer(lesson, question, seed);
        expect(mark(lesson, question, answer, { seed }), `seed ${seed}`).toMatchObject({ verdict: 'right' });
        if (question.kind === 'numeric')
          expect(Number.isFinite(keyOf(question, scopeOf(lesson, valuesFor(question, seed))))).toBe(true);
      }
      if (question.kind === 'choice')
        for (const { id, right } of question.options) {
          if (right) continue;
          const marking = mark(lesson, question, { kind: 'choice', chosen: [id] }, { seed: 1 });
          expect(marking.verdict).toBe('not-yet');
          expect(marking.feedback.length).toBeGreaterThan(20);
        }
    },
  );

  it('its page tells no key, feedback or outcome', () => {
    const page = JSON.stringify(forLearner(lesson));
    for (const question of questions) {
      if (question.kind === 'numeric') expect(page).not.toContain(JSON.stringify(question.solution));
      if (question.kind === 'choice')
        for (const { feedback } of question.options) expect(page).not.toContain(JSON.stringify(feedback));
      if (question.kind === 'explain') expect(page).not.toContain(JSON.stringify(question.model));
    }
    for (const block of lesson.blocks)
      if (block.kind === 'prediction') expect(page).not.toContain(block.spec.outcome.sentence);
  });
});
