import { z } from 'zod';
import type { Answer } from '../../lessons/index.ts';

/** What the endpoint of answers takes. Whether a question has these ids is for marking to say. */
const uuid = z
  .string()
  .regex(/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/, 'has to be a UUID in small letters');
const id = z.string().regex(/^[a-z][a-z0-9-]{0,39}$/);
const ids = (most: number) => z.array(id).max(most);

export const LONGEST_TEXT = 4000;

const answer = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('choice'), chosen: ids(8) }).strict(),
  z.object({ kind: z.literal('numeric'), typed: z.string().max(200) }).strict(),
  z.object({ kind: z.literal('order'), order: ids(8) }).strict(),
  z
    .object({
      kind: z.literal('match'),
      matched: z.record(id, id).refine((pairs) => Object.keys(pairs).length <= 8, 'has too many pairs'),
    })
    .strict(),
  z
    .object({
      kind: z.literal('explain'),
      text: z.string().max(LONGEST_TEXT, `is longer than ${LONGEST_TEXT} characters`),
      points: z.array(z.number().int().min(0).max(20)).max(20).optional(),
    })
    .strict(),
]);

export const answerShape = z
  .object({
    lesson: z.string().regex(/^[a-z0-9-]{1,80}$/),
    question: id,
    /** Made by the sender for each answer: the same answer sent again counts once. */
    opId: uuid,
    /** Whom the sender takes itself to be signed in as. */
    person: uuid.nullable(),
    answer: answer.transform((given) => given as Answer),
    /** For people without an account, whose attempts are counted in their browser. */
    attempt: z.number().int().min(1).max(1000).default(1),
  })
  .strict();
