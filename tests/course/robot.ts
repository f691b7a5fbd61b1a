/**
 * A learner who works through a lesson without a browser: chooses among what the page shows, follows the moves that the
 * rehearsal of a bench found, and finds answers by trying and by what the server says to them, never by looking at keys.
 */
import { judgeRun, rehearse, replay } from '../../src/bench/index.ts';
import {
  forLearner,
  mark,
  type Answer,
  type CompiledLesson,
  type LearnerBlock,
  type Marking,
  type QuestionForLearner,
} from '../../src/lessons/index.ts';

/** Answers an answer, as the server does; `attempt` counts from 1. */
export type Ask = (question: string, answer: Answer, attempt: number) => Marking;

export interface Step {
  readonly kind: 'prediction' | 'aim' | 'question';
  readonly id: string;
  readonly done: boolean;
  /** What was done, or where it ended. */
  readonly sentence: string;
}

export interface Solved {
  readonly steps: readonly Step[];
  /** Checkpoints of the lesson that were not met. */
  readonly open: readonly string[];
}

/** Nobody tries longer: what is not solved by then cannot be solved by what is said. */
const MOST_ATTEMPTS = 60;

/** Works through every block in the order of the page. */
export function solveLesson(lesson: CompiledLesson, seed: number): Solved {
  const ask: Ask = (id, answer, attempt) => {
    const block = lesson.blocks.find((one) => one.kind === 'question' && one.spec.id === id);
    if (block?.kind !== 'question') throw new Error(`The lesson has no question '${id}'.`);
    return mark(lesson, block.spec, answer, { seed }, attempt);
  };
  const locked = new Set<string>();
  const steps: Step[] = [];
  for (const block of forLearner(lesson, { seed })) {
    if (block.kind === 'prediction') {
      const option = block.spec.options[seed % block.spec.options.length]!;
      locked.add(block.spec.id);
      steps.push({ kind: 'prediction', id: block.spec.id, done: true, sentence: `bets on '${option.id}'` });
    } else if (block.kind === 'bench') steps.push(...work(lesson, block, locked));
    else if (block.kind === 'question') steps.push(answerQuestion(block.spec, ask));
  }
  const done = new Set(steps.filter((step) => step.done).map(({ id }) => id));
  return { steps, open: lesson.checkpoints.filter(({ id }) => !done.has(id)).map(({ id }) => id) };
}

function work(
  lesson: CompiledLesson,
  shown: LearnerBlock & { kind: 'bench' },
  locked: ReadonlySet<string>,
): Step[] {
  const step = (id: string, done: boolean, sentence: string): Step => ({ kind: 'aim', id, done, sentence });
  const aims = shown.spec.aims.map(({ id }) => id);
  if (shown.prediction !== null && !locked.has(shown.prediction))
    return aims.map((id) => step(id, false, `the bench waits for '${shown.prediction}', which comes later`));
  const full = lesson.blocks.find((one) => one.kind === 'bench' && one.spec.id === shown.spec.id);
  if (full?.kind !== 'bench') throw new Error(`The lesson has no bench '${shown.spec.id}'.`);
  const plan = rehearse(full.spec);
  const run = replay(full.spec, 1, plan.moves);
  if (!run.ok) return aims.map((id) => step(id, false, 'a move of the plan was refused'));
  const met = new Set(judgeRun(run.state).map(({ id }) => id));
  return plan.aims.map(({ id, sentence }) => step(id, met.has(id), sentence));
}

/** Answers a question by what its page shows and by what is said to each attempt. */
export function answerQuestion(question: QuestionForLearner, ask: Ask): Step {
  let attempt = 0;
  let last: Marking | null = null;
  const tried = (answer: Answer): Marking => {
    attempt += 1;
    if (attempt > MOST_ATTEMPTS)
      throw new Error(`'${question.id}' isn't solved in ${MOST_ATTEMPTS} attempts.`);
    last = ask(question.id, answer, attempt);
    return last;
  };
  const said = SOLVERS[question.kind](question as never, tried);
  const marking = last as Marking | null;
  const done = marking?.verdict === 'right';
  return {
    kind: 'question',
    id: question.id,
    done,
    sentence: `${said} (${attempt} ${attempt === 1 ? 'attempt' : 'attempts'}${done ? '' : `, ${marking?.verdict ?? 'none'}`})`,
  };
}

type Try = (answer: Answer) => Marking;
type Of<K extends QuestionForLearner['kind']> = QuestionForLearner & { kind: K };

const SOLVERS: { [K in QuestionForLearner['kind']]: (question: Of<K>, tried: Try) => string } = {
  choice({ options, several }, tried) {
    const ids = options.map(({ id }) => id);
    for (const chosen of several ? choicesOf(ids) : ids.map((id) => [id]))
      if (tried({ kind: 'choice', chosen }).verdict === 'right') return `chose ${chosen.join(', ')}`;
    return 'no choice was right';
  },
  numeric(_, tried) {
    // Wrong until the key is told, as for a learner who is stuck.
    for (const typed of ['-987654', '-987653', '-987652']) {
      const { key } = tried({ kind: 'numeric', typed });
      if (key === undefined) continue;
      tried({ kind: 'numeric', typed: key });
      return `typed ${key}`;
    }
    return 'the key was never told';
  },
  order({ items }, tried) {
    const ids = items.map(({ id }) => id);
    const right = byPlace(ids, ids, (order) => {
      const { misplaced = [] } = tried({ kind: 'order', order });
      return order.map((id) => !misplaced.includes(id));
    });
    return `ordered ${right.join(', ')}`;
  },
  match({ lefts, rights }, tried) {
    const right = byPlace(
      lefts.map(({ id }) => id),
      rights.map(({ id }) => id),
      (chosen) => {
        const matched = Object.fromEntries(lefts.map(({ id }, place) => [id, chosen[place]!]));
        const { misplaced = [] } = tried({ kind: 'match', matched });
        return lefts.map(({ id }) => !misplaced.includes(id));
      },
    );
    return `matched ${lefts.map(({ id }, place) => `${id}–${right[place]!}`).join(', ')}`;
  },
  explain(_, tried) {
    const text = 'I write down in my own words what I saw, and why.';
    const { points = [] } = tried({ kind: 'explain', text });
    tried({ kind: 'explain', text, points: points.map((_point, n) => n) });
    return `wrote, then ticked ${points.length} points`;
  },
};

/** Every selection of one or more, fewest first. */
function choicesOf(ids: readonly string[]): string[][] {
  const all: string[][] = [];
  for (let bits = 1; bits < 2 ** ids.length; bits++) all.push(ids.filter((_, n) => bits & (1 << n)));
  return all.sort((a, b) => a.length - b.length);
}

/**
 * Fills places with different things by what is told of each try: what stands right stays, what stood wrong somewhere is
 * not put there again.
 */
function byPlace(
  places: readonly string[],
  things: readonly string[],
  look: (chosen: readonly string[]) => readonly boolean[],
): readonly string[] {
  const wrong = places.map(() => new Set<string>());
  const fixed: (string | undefined)[] = places.map(() => undefined);
  for (;;) {
    const chosen = assign(places.length, things, fixed, wrong);
    if (!chosen) throw new Error('What was said about the tries contradicts itself.');
    const right = look(chosen);
    if (right.every(Boolean)) return chosen;
    chosen.forEach((thing, place) => {
      if (right[place]) fixed[place] = thing;
      else wrong[place]!.add(thing);
    });
  }
}

function assign(
  n: number,
  things: readonly string[],
  fixed: readonly (string | undefined)[],
  wrong: readonly ReadonlySet<string>[],
  chosen: readonly string[] = [],
): readonly string[] | null {
  if (chosen.length === n) return chosen;
  const place = chosen.length;
  const sure = fixed[place];
  for (const thing of sure === undefined ? things : [sure]) {
    if (chosen.includes(thing) || wrong[place]!.has(thing)) continue;
    if (sure === undefined && fixed.includes(thing)) continue;
    const rest = assign(n, things, fixed, wrong, [...chosen, thing]);
    if (rest) return rest;
  }
  return null;
}
