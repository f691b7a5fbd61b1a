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
  type Learner,
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

/** What is read of a text, whatever marks it up. */
const plain = (text: string): string =>
  text
    .replace(/<annotation[\s\S]*?<\/annotation>/g, ' ')
    .replace(/<[^>]*>/g, ' ')
    .replace(/\\n|\\"/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();

/** All that is said only after an answer, as this learner would read it. */
function secretsOf(lesson: CompiledLesson, question: Question, learner: Learner): string[] {
  const said = (answer: Answer, attempt = TELLING_ATTEMPT) =>
    mark(lesson, question, answer, learner, attempt);
  switch (question.kind) {
    case 'choice':
      return question.options.map(({ id }) => plain(said({ kind: 'choice', chosen: [id] }).feedback));
    case 'numeric': {
      const told = said({ kind: 'numeric', typed: '-987654' });
      return [plain(told.solution!)];
    }
    case 'explain': {
      const told = said({ kind: 'explain', text: 'One partner takes the hydrogen ions in.' });
      return [told.solution!, ...told.points!].map(plain);
    }
    case 'order':
    case 'match':
      return [plain(said(rightAnswer(lesson, question, learner.seed)).feedback)];
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

  it('its page tells no key, feedback, solution, model answer or outcome, whoever opens it', () => {
    for (let seed = 1; seed <= 20; seed++) {
      const learner = { seed };
      const page = plain(JSON.stringify(forLearner(lesson, learner)));
      for (const question of questions) {
        const own = forLearner(lesson, learner).find(
          (block) => block.kind === 'question' && block.spec.id === question.id,
        );
        for (const secret of secretsOf(lesson, question, learner)) {
          expect(secret.length, `${question.id}: ${secret}`).toBeGreaterThan(10);
          expect(page, question.id).not.toContain(secret);
        }
        // A key may stand elsewhere by chance, as a number; in its own question it does not.
        if (question.kind === 'numeric' && question.help !== 'example') {
          const key = mark(lesson, question, { kind: 'numeric', typed: '-987654' }, learner, 3).key!;
          expect(` ${plain(JSON.stringify(own))} `, question.id).not.toMatch(
            new RegExp(`[^\\d.]${key.replace(/[.+*?^$()]/g, '\\$&')}[^\\d.]`),
          );
        }
      }
    }
    const page = plain(JSON.stringify(forLearner(lesson)));
    for (const block of lesson.blocks)
      if (block.kind === 'prediction') expect(page).not.toContain(plain(block.spec.outcome.sentence));
  });
});
