import { lessonFor } from '../../server/access/lesson.ts';
import { giveAnswer, markForVisitor, mayAnswer } from '../../server/answers/index.ts';
import { answerShape } from '../../server/answers/shapes.ts';
import { endpoint, json, readJson } from '../../server/problem.ts';

/** Marks an answer; for people with an account it is stored as well. */
export const POST = endpoint(async ({ request, locals }) => {
  const { person, standing, clientAddress } = locals;
  const { lesson: slug, question, opId, answer, attempt } = await readJson(request, answerShape);
  const lesson = await lessonFor(slug, standing);
  await (person ? mayAnswer('person', person.publicId) : mayAnswer('address', clientAddress));
  return json(
    person
      ? await giveAnswer(person, lesson, question, opId, answer)
      : await markForVisitor(lesson, question, answer, attempt),
  );
});
