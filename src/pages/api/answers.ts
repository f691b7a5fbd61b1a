import { lessonFor } from '../../server/access/lesson.ts';
import { giveAnswer, markForVisitor, mayAnswer } from '../../server/answers/index.ts';
import { answerShape } from '../../server/answers/shapes.ts';
import { endpoint, json, ProblemError, readJson } from '../../server/problem.ts';

/** Marks an answer; for people with an account it is stored as well. */
export const POST = endpoint(async ({ request, locals }) => {
  const { person, standing, clientAddress } = locals;
  const sent = await readJson(request, answerShape);
  const { lesson: slug, question, opId, answer, attempt } = sent;
  // A page that outlived its session would get another learner's numbers marked, and store nothing.
  if (sent.person !== (person?.publicId ?? null))
    throw new ProblemError({
      status: 401,
      code: 'signed-in-otherwise',
      title: sent.person
        ? 'You are signed out here. Sign in again: your answer is kept in this browser.'
        : 'You are signed in by now. Load the page again to answer as yourself.',
    });
  const lesson = await lessonFor(slug, standing);
  await (person ? mayAnswer('person', person.publicId) : mayAnswer('address', clientAddress));
  return json(
    person
      ? await giveAnswer(person, lesson, question, opId, answer)
      : await markForVisitor(lesson, question, answer, attempt),
  );
});
