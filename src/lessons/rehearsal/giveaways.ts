import type { CompiledLesson, Prediction } from '../types.ts';
import { wordsIn, type Passage, type Sentence } from './sentences.ts';

export interface Giveaway extends Sentence {
  readonly prediction: string;
}

const EMPTY = new Set(
  'a an and are as at be been before both but by can do does each for from has have here how if in into is it its more most much need needs no not of on one only or other same so than that the their them then there these they this to two up was were what when which will with you your'.split(
    ' ',
  ),
);
/** Half of the right answer's words in one sentence: the author should look at it. */
const SHARE = 0.5;
/** Words of outcomes: something happens, or happens sooner, or more. */
const HAPPENS =
  /\b(turns?|turned|changes?|changed|falls?|fell|rises?|rose|stays?|sooner|later|faster|slower|longer|at once|lower|lowest|higher|highest)\b|\b(holds?|keeps?) (its|the) (pH|colou?r)\b/i;

/** Sentences before a prediction that may tell its outcome, listed for the author: a person decides. */
export function giveawaysIn(lesson: CompiledLesson, passages: readonly Passage[]): Giveaway[] {
  const blocks = lesson.blocks.filter(({ kind }) => kind !== 'prose');
  return blocks.flatMap((block, place) => {
    if (block.kind !== 'prediction') return [];
    const before = passages.slice(0, place + 1).flatMap(({ sentences }) => sentences);
    const [labels, right] = [labelsFor(block.spec, lesson), rightWords(block.spec)];
    return before
      .filter(({ text }) => tells(text, labels, right))
      .map((sentence) => ({ ...sentence, prediction: block.spec.id }));
  });
}

const stem = (word: string): string => word.toLowerCase().replace(/(ing|ed|es|s)$/, '');

function rightWords({ options, outcome }: Prediction): Set<string> {
  const right = options.find(({ id }) => id === outcome.right)!.text;
  return new Set(
    wordsIn(right)
      .filter((word) => !EMPTY.has(word.toLowerCase()))
      .map(stem),
  );
}

function labelsFor(prediction: Prediction, lesson: CompiledLesson): Set<string> {
  const bench = lesson.blocks.find((block) => block.kind === 'bench' && block.spec.id === prediction.bench);
  const vessels = bench?.kind === 'bench' ? bench.spec.vessels : [];
  return new Set(vessels.flatMap(({ label }) => wordsIn(label).map(stem)));
}

function tells(text: string, labels: ReadonlySet<string>, right: ReadonlySet<string>): boolean {
  if (text.endsWith('?')) return false;
  const words = new Set(wordsIn(text).map(stem));
  const shared = [...right].filter((word) => words.has(word)).length;
  if (right.size > 1 && shared / right.size >= SHARE) return true;
  return HAPPENS.test(text) && [...labels].some((label) => label.length > 3 && words.has(label));
}
