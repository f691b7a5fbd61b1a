/** What the demo's people did: lists of moves that the bench itself accepted, and answers that were marked as any others. */
import {
  apply,
  createState,
  movesOf,
  rehearse,
  type BenchSpec,
  type BenchState,
  type Move,
} from '../../bench/index.ts';
import { mark, type Answer, type CompiledLesson, type Learner, type Question } from '../../lessons/index.ts';
import { itemsOf, rightsOf } from '../../lessons/questions/variants.ts';
import type { Habit } from './people.ts';

/** Numbers from 0 to 1 that follow from a seed: the demo is the same wherever it is loaded. */
export function dice(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    // mulberry32, public domain (Tommy Ettinger, 2017)
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

const plans = new Map<string, readonly Move[]>();

/** One list of moves that meets the bench's aims, as its rehearsal found it. */
function planOf(lesson: CompiledLesson, spec: BenchSpec): readonly Move[] {
  const key = `${lesson.slug}/${spec.id}`;
  let plan = plans.get(key);
  if (!plan) plans.set(key, (plan = rehearse(spec, { seeds: 1 }).moves));
  return plan;
}

/** How many drops each stroke of a longer drip has. */
const STROKE: Readonly<Record<Habit, number>> = { steady: 4, bold: 12, undoing: 6, stopping: 3 };

/**
 * One person's way through a bench: the rehearsal's moves in the strokes of their habit, some taken back and done again, and
 * broken off where they stopped. Every move was accepted by the bench.
 * @param part how much of the way they went, 0 to 1
 */
export function movesFor(
  lesson: CompiledLesson,
  spec: BenchSpec,
  options: { seed: number; habit: Habit; part: number; roll: () => number },
): Move[] {
  const { seed, habit, part, roll } = options;
  let state = createState(spec, { seed });
  const act = (move: Move): boolean => {
    const outcome = apply(state, move);
    if (outcome.ok) state = outcome.state as BenchState;
    return outcome.ok;
  };
  const plan = planOf(lesson, spec);
  const length = Math.max(1, Math.round(plan.length * part));
  for (const move of plan.slice(0, length))
    for (const stroke of strokesOf(move, STROKE[habit], roll)) {
      if (!act(stroke)) break;
      if (habit === 'undoing' && roll() < 0.2 && act({ kind: 'undo' })) act(stroke);
    }
  // Some look what one drop more does, and take it back.
  const last = plan[length - 1];
  if (last?.kind === 'drip' && habit !== 'stopping' && roll() < 0.5 && act({ ...last, drops: 1 }))
    act({ kind: 'undo' });
  return [...movesOf(state)];
}

function strokesOf(move: Move, most: number, roll: () => number): Move[] {
  if (move.kind !== 'drip') return [move];
  const strokes: Move[] = [];
  for (let left = move.drops; left > 0;) {
    const drops = Math.min(left, 1 + Math.floor(roll() * most));
    strokes.push({ ...move, drops });
    left -= drops;
  }
  return strokes;
}

/** An answer that somebody who has understood gives; null where it cannot be made up. */
export function rightAnswer(lesson: CompiledLesson, question: Question, learner: Learner): Answer | null {
  switch (question.kind) {
    case 'choice':
      return {
        kind: 'choice',
        chosen: question.options.filter((option) => option.right).map(({ id }) => id),
      };
    case 'order':
      return { kind: 'order', order: inOrder(question, learner) };
    case 'match': {
      const rights = rightsOf(question, learner.seed);
      const partner = (pair: string) => rights.find((right) => right.pair === pair)!.id;
      return {
        kind: 'match',
        matched: Object.fromEntries(question.pairs.map(({ id }) => [id, partner(id)])),
      };
    }
    case 'explain':
      return {
        kind: 'explain',
        text: 'One partner takes the added ions in and becomes the other, so the ratio changes only a little.',
        points: question.points.map((_, i) => i),
      };
    case 'numeric': {
      // The key is told late; whoever works it out types the same number.
      const told = mark(lesson, question, { kind: 'numeric', typed: '-987654321' }, learner, 99).key ?? '';
      const typed = /[-−]?\d+(?:\.\d+)?/.exec(told.replace(/<[^>]*>/g, ''))?.[0]?.replace('−', '-');
      return typed === undefined ? null : { kind: 'numeric', typed };
    }
  }
}

/** The learner's own ids of the items, in the right order. */
function inOrder(question: Extract<Question, { kind: 'order' }>, learner: Learner): string[] {
  const items = itemsOf(question, learner.seed);
  return question.items.map(({ id }) => items.find((one) => one.item === id)!.id);
}

/** A wrong answer that somebody may well give; null where the kind has none to offer. */
export function wrongAnswer(question: Question, learner: Learner, roll: () => number): Answer | null {
  if (question.kind === 'choice') {
    const wrong = question.options.filter((option) => !option.right);
    const chosen = wrong[Math.floor(roll() * wrong.length)];
    return chosen ? { kind: 'choice', chosen: [chosen.id] } : null;
  }
  if (question.kind === 'numeric')
    return { kind: 'numeric', typed: (1 + Math.floor(roll() * 90) / 10).toFixed(1) };
  if (question.kind === 'order') return { kind: 'order', order: inOrder(question, learner).reverse() };
  return null;
}
