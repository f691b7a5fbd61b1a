import { z } from 'zod';
import { glassware, listMoves, moves, type GlassId, type MoveKind } from '../bench/index.ts';

/** The YAML of a lesson, one schema for each topic. Lines of content/README.md explain them to authors. */
const id = z
  .string()
  .regex(
    /^[a-z][a-z0-9-]{0,39}$/,
    'an id is small letters, digits and hyphens, starts with a letter and has at most 40 characters',
  );
const text = (most: number) => z.string().trim().min(1).max(most);
const glass = z.enum(Object.keys(glassware) as [GlassId, ...GlassId[]]);
const moveKind = z.enum([...Object.keys(moves), ...Object.keys(listMoves)] as [MoveKind, ...MoveKind[]]);
const model = z.enum(['textbook', 'real']);

export const frontMatterSchema = z
  .object({
    title: text(120),
    number: z.number().int().min(0).max(99),
    summary: text(300),
    lang: z
      .string()
      .regex(/^[a-z]{2}(-[A-Z]{2})?$/, "a language is written like 'en-GB'")
      .default('en-GB'),
    model,
    access: z.enum(['open', 'members']).default('members'),
    /** Compiled and rehearsed, but not published with the course. */
    draft: z.boolean().default(false),
    minutes: z.number().int().min(1).max(180),
  })
  .strict();

const drawn = z.union([
  z.number().nonnegative(),
  z
    .object({ from: z.number().nonnegative(), to: z.number().nonnegative(), step: z.number().positive() })
    .strict(),
]);

const contents = z
  .object({
    volume_mL: z.number().nonnegative().max(5000),
    parts: z
      .array(z.object({ substance: text(60), concentration_molL: drawn }).strict())
      .max(12)
      .optional(),
    indicators: z
      .array(
        z
          .object({
            indicator: text(60),
            massPercent: z.number().positive().max(5).optional(),
            volume_mL: z.number().positive().max(50),
          })
          .strict(),
      )
      .max(4)
      .optional(),
    water: z.enum(['boiled', 'aired', 'sparkling']).optional(),
    temperature_C: z.number().min(0).max(60).optional(),
  })
  .strict();

const vessel = z
  .object({
    id,
    label: text(40),
    glass,
    grade: z.enum(['A', 'B']).optional(),
    contents: contents.optional(),
    probe: z.boolean().optional(),
    thermometer: z.boolean().optional(),
    stirrer: z.enum(['on', 'off']).optional(),
    stoppered: z.boolean().optional(),
    openTo: z
      .object({ co2_atm: z.number().min(0).max(1) })
      .strict()
      .optional(),
  })
  .strict();

const shelfItem = z
  .object({
    id,
    label: text(40),
    kind: z.enum(['reagent', 'indicator', 'wash', 'standard']),
    contents: contents.optional(),
    indicator: z
      .object({
        id: text(60),
        massPercent: z.number().positive().max(5).optional(),
        volume_mL: z.number().positive().max(500),
      })
      .strict()
      .optional(),
    standard_pH: z.number().min(0).max(14).optional(),
  })
  .strict()
  .refine(
    (item) => (item.kind === 'indicator' ? item.indicator : item.contents),
    "an indicator needs 'indicator', every other bottle 'contents'",
  );

const aimBase = {
  id,
  text: text(160),
  after: z.array(id).max(12).optional(),
  limits: z
    .array(
      z
        .object({
          of: id,
          max_mL: z.number().positive().optional(),
          max_drops: z.number().int().positive().optional(),
        })
        .strict(),
    )
    .max(6)
    .optional(),
};
const bound = z.number().optional();
const pairOf = z.tuple([id, id]);

const aim = z.discriminatedUnion('kind', [
  z.object({ ...aimBase, kind: z.literal('pH'), vessel: id, min: bound, max: bound }).strict(),
  z
    .object({ ...aimBase, kind: z.literal('colour'), vessel: id, words: z.array(text(40)).min(1).max(12) })
    .strict(),
  z.object({ ...aimBase, kind: z.literal('volume'), vessel: id, min_mL: bound, max_mL: bound }).strict(),
  z.object({ ...aimBase, kind: z.literal('temperature'), vessel: id, min_C: bound, max_C: bound }).strict(),
  z
    .object({ ...aimBase, kind: z.literal('added'), vessel: id, of: id, min_mL: bound, max_mL: bound })
    .strict(),
  z.object({ ...aimBase, kind: z.literal('drops'), vessel: id, of: id, min: bound, max: bound }).strict(),
  z
    .object({ ...aimBase, kind: z.literal('ratio'), vessel: id, family: text(40), min: bound, max: bound })
    .strict(),
  z
    .object({
      ...aimBase,
      kind: z.literal('equal'),
      quantity: z.enum(['pH', 'volume', 'temperature']),
      vessels: pairOf,
      within: z.number().nonnegative(),
    })
    .strict(),
  z.object({ ...aimBase, kind: z.literal('calibrated') }).strict(),
  z.object({ ...aimBase, kind: z.literal('reading'), vessel: id, within_mL: z.number().positive() }).strict(),
  z
    .object({ ...aimBase, kind: z.literal('waste-pH'), min: z.number(), max: z.number(), min_mL: bound })
    .strict(),
  z
    .object({
      ...aimBase,
      kind: z.literal('did'),
      move: moveKind,
      vessel: id.optional(),
      times: z.number().int().positive().optional(),
    })
    .strict(),
  z
    .object({
      ...aimBase,
      kind: z.literal('used-at-most'),
      of: id,
      max_mL: z.number().positive(),
      with: z.array(id).min(1),
    })
    .strict(),
]);

export const benchSchema = z
  .object({
    id,
    title: text(80),
    intro: text(200).optional(),
    temperature_C: z.number().min(0).max(60).default(25),
    vessels: z.array(vessel).min(1).max(12),
    shelf: z.array(shelfItem).max(12).default([]),
    instruments: z
      .object({
        meter: z
          .object({ calibration: z.enum(['done', 'ask']) })
          .strict()
          .optional(),
        thermometer: z.boolean().optional(),
      })
      .strict()
      .optional(),
    careful: z.boolean().optional(),
    /** Contents dealt out anew for each run: unknown samples. */
    samples: z
      .array(
        z
          .object({
            id,
            into: z.array(id).min(1).max(12),
            contents: z
              .array(contents.extend({ name: text(60) }))
              .min(1)
              .max(12),
            graded: z.boolean().optional(),
          })
          .strict(),
      )
      .max(4)
      .optional(),
    /** Moves offered, where not all that glass and shelf allow. */
    moves: z.array(moveKind).min(1).optional(),
    hide: z
      .array(
        z
          .object({
            what: z
              .array(z.enum(['pH', 'colour', 'volume', 'temperature', 'contents', 'trace', 'ledger']))
              .min(1),
            of: z.array(id).optional(),
            until: z.union([z.enum(['prediction', 'end', 'never']), z.object({ aim: id }).strict()]),
          })
          .strict(),
      )
      .max(12)
      .optional(),
    compare: z
      .object({
        vessels: pairOf,
        testing: z.enum(['contents', 'concentration', 'volume', 'indicator', 'temperature', 'starting-pH']),
      })
      .strict()
      .optional(),
    aims: z.array(aim).max(12).default([]),
    aimOrder: z.enum(['any', 'in-order']).optional(),
    views: z.array(z.enum(['trace', 'pair-bar', 'ledger', 'species', 'ruler', 'room-left'])).optional(),
    safety: z
      .object({
        goggles: z.enum(['first', 'advised']).optional(),
        gloves: z.enum(['first', 'advised']).optional(),
      })
      .strict()
      .optional(),
  })
  .strict();

export const predictionSchema = z
  .object({
    id,
    bench: id,
    ask: text(400),
    options: z
      .array(
        z
          .object({
            id,
            text: text(200),
            /** The vessel that this option bets on, or 'together' or 'none'. */
            first: id.optional(),
            /** Or the number of vessels, where the prediction counts. */
            count: z.number().int().min(0).max(12).optional(),
          })
          .strict()
          .refine(
            ({ first, count }) => (first === undefined) !== (count === undefined),
            "an option says 'first' and a vessel, or 'count' and a number",
          ),
      )
      .min(2)
      .max(6),
    observe: text(300),
    outcome: z.union([
      z
        .object({
          /** The bottle that is dripped, and the vessels it goes into. */
          drip: id,
          into: z.array(id).min(2).max(4),
          /** The change that is waited for: the vessel's colour in these words. */
          until: z.array(text(40)).min(1).max(12),
          most_drops: z.number().int().min(1).max(2000).default(500),
        })
        .strict(),
      z
        .object({
          /** Compares vessels as they stand at the start: which has the lowest or highest pH. */
          find: z.enum(['lowest-pH', 'highest-pH']),
          of: z.array(id).min(2).max(8),
        })
        .strict(),
      z
        .object({
          /** Counts the vessels that have one of these colours at the start. */
          count: z.array(text(40)).min(1).max(12),
          of: z.array(id).min(2).max(12),
        })
        .strict(),
    ]),
  })
  .strict();
