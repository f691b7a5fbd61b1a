import { QueryTypes, type Transaction } from 'sequelize';
import { ENGINE_VERSION } from '../../chemistry/index.ts';
import {
  AnswerError,
  mark,
  type Answer,
  type Learner,
  type Marking,
  type Question,
} from '../../lessons/index.ts';
import { sequelize, withTransaction } from '../database/index.ts';
import type { StoredLesson } from '../lessons/index.ts';
import { ProblemError } from '../problem.ts';
import { learnerOf, type Answerer } from './learner.ts';
import { parsed } from './stored.ts';

export interface Marked {
  /** Which counted answer to this question this was; of one that was asked back, the one that it would have been. */
  readonly attempt: number;
  readonly marking: Marking;
  readonly done: boolean;
}

/** Nobody learns anything by a hundredth try, and the list only grows. */
const MOST_ATTEMPTS = 200;

/** The question of a lesson, or a 404 problem. */
export function questionOf(lesson: StoredLesson, id: string): Question {
  for (const block of lesson.lesson.blocks)
    if (block.kind === 'question' && block.spec.id === id) return block.spec;
  throw new ProblemError({ status: 404, code: 'not-found', title: 'This lesson has no such question.' });
}

function marked(
  lesson: StoredLesson,
  question: Question,
  answer: Answer,
  learner: Learner,
  attempt: number,
): Marking {
  try {
    return mark(lesson.lesson, question, answer, learner, attempt);
  } catch (error) {
    if (!(error instanceof AnswerError)) throw error;
    throw new ProblemError({
      status: 422,
      code: 'no-such-answer',
      title: 'This question has changed. Load the page again; your text is kept.',
      detail: error.message,
    });
  }
}

/** Marks the answer of somebody without an account. Nothing is stored: their browser counts their attempts. */
export async function markForVisitor(
  lesson: StoredLesson,
  id: string,
  answer: Answer,
  attempt: number,
): Promise<Marked> {
  const question = questionOf(lesson, id);
  const marking = marked(lesson, question, answer, await learnerOf(null, lesson, [question]), attempt);
  return { attempt, marking, done: marking.verdict === 'right' };
}

/**
 * Marks an answer and stores both. The same `opId` again has no further effect and gets what was answered then.
 * An answer that is asked back is not counted and not stored.
 * @throws ProblemError 404, 409 (`op-id-used`), 422 (`no-such-answer`, `enough`)
 */
export async function giveAnswer(
  person: Answerer,
  lesson: StoredLesson,
  id: string,
  opId: string,
  answer: Answer,
): Promise<Marked> {
  const question = questionOf(lesson, id);
  const learner = await learnerOf(person, lesson, [question]);
  return withTransaction((transaction) =>
    store(person.id, lesson, question, opId, answer, learner, transaction),
  );
}

async function store(
  personId: number,
  lesson: StoredLesson,
  question: Question,
  opId: string,
  given: Answer,
  learner: Learner,
  transaction: Transaction,
): Promise<Marked> {
  // One answer of a person at a time: attempts are counted, and two sent at once count as two.
  await sequelize.query('SELECT id FROM people WHERE id = ? FOR UPDATE', {
    replacements: [personId],
    type: QueryTypes.SELECT,
    transaction,
  });
  const [known] = await sequelize.query<{
    lessonId: number;
    question: string;
    attempt: number;
    marking: string | Marking;
  }>(
    'SELECT lesson_id AS lessonId, question, attempt, marking FROM answers WHERE person_id = ? AND op_id = ?',
    { replacements: [personId, opId], type: QueryTypes.SELECT, transaction },
  );
  const { done, attempts } = await standingIn(personId, lesson, question.id, transaction);
  if (known) {
    if (known.lessonId !== lesson.id || known.question !== question.id)
      throw new ProblemError({
        status: 409,
        code: 'op-id-used',
        title: 'This answer was sent for another question before.',
      });
    return { attempt: known.attempt, marking: parsed(known.marking), done };
  }
  if (attempts >= MOST_ATTEMPTS)
    throw new ProblemError({
      status: 422,
      code: 'enough',
      title: `You answered this question ${MOST_ATTEMPTS} times. Read its solution and go on.`,
    });
  const attempt = attempts + 1;
  // Points are ticked with the model answer in sight: whoever did not see it yet gets it first.
  const answer: Answer =
    given.kind === 'explain' && attempts === 0 ? { kind: 'explain', text: given.text } : given;
  const marking = marked(lesson, question, answer, learner, attempt);
  if (marking.verdict === 'ask') return { attempt, marking, done };
  await sequelize.query(
    `INSERT INTO answers (person_id, lesson_id, revision, question, attempt, op_id, answer, verdict, marking, engine_version, at)
     VALUES (:personId, :lessonId, :revision, :question, :attempt, :opId, :answer, :verdict, :marking, :engine, NOW(3))`,
    {
      replacements: {
        personId,
        lessonId: lesson.id,
        revision: lesson.revision,
        question: question.id,
        attempt,
        opId,
        answer: JSON.stringify(answer),
        verdict: marking.verdict,
        marking: JSON.stringify(marking),
        engine: ENGINE_VERSION,
      },
      type: QueryTypes.INSERT,
      transaction,
    },
  );
  return { attempt, marking, done: done || marking.verdict === 'right' };
}

/** Attempts in this revision, since another one may ask for something else; done in any, since finished stays finished. */
async function standingIn(
  personId: number,
  lesson: StoredLesson,
  question: string,
  transaction: Transaction,
): Promise<{ attempts: number; done: boolean }> {
  const [row] = await sequelize.query<{ attempts: number | null; done: number | null }>(
    `SELECT MAX(IF(revision = :revision, attempt, 0)) AS attempts, MAX(verdict = 'right') AS done
       FROM answers WHERE person_id = :personId AND lesson_id = :lessonId AND question = :question`,
    {
      replacements: { personId, lessonId: lesson.id, revision: lesson.revision, question },
      type: QueryTypes.SELECT,
      transaction,
    },
  );
  return { attempts: Number(row?.attempts ?? 0), done: Boolean(Number(row?.done ?? 0)) };
}
