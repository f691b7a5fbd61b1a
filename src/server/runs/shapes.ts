import { z } from 'zod';
import type { Move } from '../../bench/index.ts';
import type { SentMove } from './save.ts';

/** What the endpoints of runs take. A move's inside is the bench's to check: it refuses what it does not know. */
const uuid = z
  .string()
  .regex(/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/, 'has to be a UUID in small letters');
const slug = z.string().regex(/^[a-z0-9-]{1,80}$/);
const id = z.string().regex(/^[a-z][a-z0-9-]{0,39}$/);
const confidence = z.number().int().min(1).max(4);

const value = z.union([
  z.string().max(200),
  z.number().finite(),
  z.boolean(),
  z.array(z.string().max(60)).max(4),
]);
const move = z
  .object({ kind: z.string().max(30) })
  .catchall(value)
  .refine((object) => Object.keys(object).length <= 8, 'has too many parts')
  .transform((object) => object as unknown as Move);

const sentMove = z
  .object({ opId: uuid, move })
  .strict()
  .transform((sent): SentMove => sent);

export const openShape = z
  .object({
    runId: uuid,
    lesson: slug,
    bench: id,
    seed: z
      .number()
      .int()
      .min(1)
      .max(2 ** 31)
      .optional(),
    branchedFrom: uuid.optional(),
  })
  .strict();
export const movesShape = z
  .object({ after: z.number().int().min(0).max(2000), moves: z.array(sentMove).max(500) })
  .strict();
export const predictShape = z.object({ lesson: slug, prediction: id, answer: id, confidence }).strict();
export const observeShape = z.object({ lesson: slug, prediction: id, observed: id }).strict();
export const takeOverShape = z
  .object({
    lesson: slug,
    runId: uuid,
    bench: id,
    seed: z
      .number()
      .int()
      .min(1)
      .max(2 ** 31),
    moves: z.array(sentMove).max(2000),
    prediction: z.object({ id, answer: id, confidence }).strict().optional(),
  })
  .strict();
export const outcomeShape = z.object({ lesson: slug, prediction: id, observed: id }).strict();
