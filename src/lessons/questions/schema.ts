import { z } from 'zod';
import { indicatorData } from '../../chemistry/indicatorData.ts';
import { UNITS } from '../format.ts';
import { misconceptions } from '../misconceptions.ts';
import { wrongMethods, type MethodId } from './wrongMethods.ts';

/** The YAML of a `question` block, one schema for each kind. content/README.md explains each field to authors. */
const id = z
  .string()
  .regex(
    /^[a-z][a-z0-9-]{0,39}$/,
    'an id is small letters, digits and hyphens, starts with a letter and has at most 40 characters',
  );
const text = (most: number) => z.string().trim().min(1).max(most);
/** A formula may be a bare number. */
const formula = z.union([text(400), z.number().finite()]).transform(String);
const names = <T extends string>(record: object) => Object.keys(record) as [T, ...T[]];
const misconception = z.enum(names(misconceptions));

const value = z.number().finite();
const vary = z.union([
  /** Every combination of the values listed. */
  z.record(z.string().regex(/^[a-z][A-Za-z0-9_]{0,19}$/), z.array(value).min(1).max(40)),
  /** Row by row, where only some combinations give clean numbers. */
  z
    .array(z.record(z.string().regex(/^[a-z][A-Za-z0-9_]{0,19}$/), value))
    .min(1)
    .max(1000),
]);

const base = { id, ask: text(1200), vary: vary.optional() };

const choice = z
  .object({
    ...base,
    kind: z.literal('choice'),
    options: z
      .array(
        z
          .object({
            id,
            text: text(400),
            right: z.boolean().default(false),
            misconception: misconception.optional(),
            feedback: text(600),
          })
          .strict(),
      )
      .min(2)
      .max(8),
  })
  .strict();

const numeric = z
  .object({
    ...base,
    kind: z.literal('numeric'),
    mixture: text(400).optional(),
    key: formula.default('pH(mixture)'),
    unit: z.enum(names(UNITS)).default(''),
    tolerance: z
      .union([
        z.number().positive(),
        z.string().regex(/^\d+(\.\d+)?\s*%$/, "a tolerance is a number or like '2 %'"),
      ])
      .optional(),
    decimals: z.number().int().min(0).max(8).optional(),
    figures: z.number().int().min(1).max(8).optional(),
    wrong: z
      .array(
        z.union([
          z.enum(names<MethodId>(wrongMethods)),
          z
            .object({
              method: z.enum(names<MethodId>(wrongMethods)),
              feedback: text(600).optional(),
              misconception: misconception.optional(),
            })
            .strict(),
          z.object({ value: formula, feedback: text(600), misconception: misconception.optional() }).strict(),
        ]),
      )
      .max(12)
      .default([]),
    pour: z
      .object({ mixture: text(400).optional(), indicator: z.enum(names(indicatorData)) })
      .strict()
      .optional(),
    steps: z.array(text(600)).max(8).default([]),
    help: z.enum(['example', 'faded', 'none']).default('none'),
    solution: text(1200),
  })
  .strict();

const item = z.object({ id, text: text(400) }).strict();

const order = z
  .object({
    ...base,
    kind: z.literal('order'),
    items: z.array(item).min(3).max(8),
    feedback: text(800),
    misconception: misconception.optional(),
  })
  .strict();

const match = z
  .object({
    ...base,
    kind: z.literal('match'),
    pairs: z
      .array(z.object({ id, left: text(300), right: text(300) }).strict())
      .min(2)
      .max(8),
    decoys: z.array(item).max(4).default([]),
    feedback: text(800),
    misconception: misconception.optional(),
  })
  .strict();

const explain = z
  .object({
    ...base,
    kind: z.literal('explain'),
    model: text(1500),
    points: z.array(text(300)).min(1).max(6),
  })
  .strict();

export const questionSchema = z.discriminatedUnion('kind', [choice, numeric, order, match, explain]);
export type QuestionYaml = z.output<typeof questionSchema>;
