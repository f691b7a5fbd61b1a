/** What the engine finds out about a lesson before anybody reads it. */
import { rehearse, type AimRehearsal } from '../../bench/index.ts';
import { formatQuantity } from '../format.ts';
import { keyOf } from '../questions/numeric.ts';
import { scopeOf } from '../scope.ts';
import type { CompiledLesson } from '../types.ts';
import { giveawaysIn } from './giveaways.ts';
import { HARDEST_LIX, LONGEST_SENTENCE, readingOf, type Reading } from './reading.ts';
import { lacksOf } from './safety.ts';
import { passagesOf } from './sentences.ts';

/** 'fault': a learner would be stuck or misled; 'look': the author decides; worst first in reports. */
export interface Finding {
  readonly level: 'fault' | 'look';
  /** Id of the block, or the line of the text. */
  readonly where: string;
  readonly line?: number;
  readonly sentence: string;
  /** One change that mends it, in the author's own syntax. */
  readonly fix?: string;
}

export interface LessonRehearsal {
  readonly slug: string;
  readonly benches: readonly {
    readonly id: string;
    readonly title: string;
    readonly aims: readonly AimRehearsal[];
  }[];
  readonly predictions: readonly {
    readonly id: string;
    readonly answer: string;
    readonly sentence: string;
  }[];
  /** Keys of numeric questions, of the first and the last variant where they vary. */
  readonly keys: readonly { readonly id: string; readonly key: string; readonly variants: number }[];
  readonly reading: Reading;
  readonly findings: readonly Finding[];
  readonly ok: boolean;
}

export interface Surroundings {
  /** Slugs that links may lead to. */
  readonly lessons?: ReadonlySet<string>;
  /** Files that stand beside the lesson. */
  readonly pictures?: ReadonlySet<string>;
}

/** A lesson of the course has at least so many questions, so many of them numeric. */
const QUESTIONS = 6;
const NUMERIC = 2;

/** Rehearses a compiled lesson together with the text it came from. */
export function rehearseLesson(
  lesson: CompiledLesson,
  markdown: string,
  { lessons, pictures }: Surroundings = {},
): LessonRehearsal {
  const findings: Finding[] = [];
  const fault = (where: string, sentence: string, fix?: string) =>
    findings.push({ level: 'fault', where, sentence, ...(fix ? { fix } : {}) });
  const look = (where: string, sentence: string, more: { line?: number; fix?: string } = {}) =>
    findings.push({ level: 'look', where, sentence, ...more });

  const benches: LessonRehearsal['benches'][number][] = [];
  const predictions: LessonRehearsal['predictions'][number][] = [];
  const keys: LessonRehearsal['keys'][number][] = [];
  for (const block of lesson.blocks) {
    if (block.kind === 'bench') {
      const { spec } = block;
      const found = rehearse(spec);
      benches.push({ id: spec.id, title: spec.title, aims: found.aims });
      for (const aim of found.aims)
        if (!aim.found) fault(aim.id, `${textOfAim(lesson, aim.id)}: ${aim.sentence}`);
      for (const id of found.overflows) fault(spec.id, `'${id}' holds more than its glass can.`);
      if (found.careful && !found.careful.enough)
        fault(
          spec.id,
          `Careful hands reach every aim in ${found.careful.met} of ${found.careful.seeds} runs; 95 of 100 are the least. Widen the bounds.`,
        );
      for (const aim of spec.aims)
        if (aim.kind === 'colour' && !spec.instruments?.meter) {
          const vessel = spec.vessels.find(({ id }) => id === aim.vessel);
          if (vessel && !vessel.probe)
            look(aim.id, `Only colour and its word tell when this aim is met in ${vessel.label}.`, {
              fix: 'probe: true',
            });
        }
    } else if (block.kind === 'prediction') {
      const { spec } = block;
      const right = spec.options.find(({ id }) => id === spec.outcome.right)!;
      predictions.push({ id: spec.id, answer: right.text, sentence: spec.outcome.sentence });
    } else if (block.kind === 'question' && block.spec.kind === 'numeric') {
      const { spec } = block;
      const rows =
        spec.variants.length > 1 ? [spec.variants[0]!, spec.variants.at(-1)!] : [spec.variants[0] ?? {}];
      const told = rows.map((row) => formatQuantity(keyOf(spec, scopeOf(lesson, row)), spec));
      keys.push({ id: spec.id, key: told.join(' … '), variants: Math.max(1, spec.variants.length) });
    }
  }

  for (const lack of lacksOf(lesson)) fault(lack.bench, lack.sentence, lack.fix);

  const passages = passagesOf(markdown);
  const reading = readingOf(passages.flatMap(({ sentences }) => sentences));
  if (lesson.lang.startsWith('en') && reading.lix > HARDEST_LIX)
    look(
      'text',
      `The text reads at LIX ${reading.lix}; ${HARDEST_LIX} is the most for sixteen-year-olds. Shorten sentences and words.`,
    );
  for (const { line, text, words } of reading.long)
    look('text', `${words} words in a sentence; ${LONGEST_SENTENCE} are the most: “${short(text)}”`, {
      line,
    });
  for (const { line, text, prediction } of giveawaysIn(lesson, passages))
    look(prediction, `This sentence before the prediction may give its outcome away: “${short(text)}”`, {
      line,
    });
  for (const { line, text } of passages.flatMap(({ sentences }) => sentences))
    if (/\bbuffers?\b[^.]{0,40}\b(holds?|keeps?|maintains?)\s+(its|the)\s+pH\b/i.test(text))
      look('text', `A buffer changes little; it does not hold its pH: “${short(text)}”`, { line });

  for (const link of linksIn(lesson)) {
    const slug = /^\/lessons\/([a-z0-9-]+)/.exec(link)?.[1];
    if (slug && lessons && !lessons.has(slug)) fault('text', `The link '${link}' leads to no lesson.`);
  }
  for (const picture of picturesIn(lesson))
    if (pictures && !pictures.has(picture))
      fault('text', `The picture '${picture}' does not stand beside the lesson.`);

  const questions = lesson.blocks.flatMap((block) => (block.kind === 'question' ? [block.spec] : []));
  const numeric = questions.filter(({ kind }) => kind === 'numeric').length;
  if (questions.length < QUESTIONS || numeric < NUMERIC)
    look(
      'questions',
      `${questions.length} questions, ${numeric} of them numeric; a lesson of the course has ${QUESTIONS}, ${NUMERIC} of them numeric.`,
    );
  if (
    !questions.some(
      (question) => question.kind === 'choice' && question.options.some(({ misconception }) => misconception),
    )
  )
    look('questions', 'No question probes a misconception.', { fix: 'misconception: M12' });
  findings.sort((a, b) => Number(a.level === 'look') - Number(b.level === 'look'));
  return {
    slug: lesson.slug,
    benches,
    predictions,
    keys,
    reading,
    findings,
    ok: findings.every(({ level }) => level !== 'fault'),
  };
}

const short = (text: string): string => (text.length > 110 ? `${text.slice(0, 109)}…` : text);

const textOfAim = (lesson: CompiledLesson, id: string): string =>
  lesson.checkpoints.find((checkpoint) => checkpoint.id === id)?.title ?? id;

const htmlOf = (lesson: CompiledLesson): string =>
  lesson.blocks
    .map((block) => (block.kind === 'prose' ? block.html : block.kind === 'question' ? block.spec.ask : ''))
    .join('\n');
const linksIn = (lesson: CompiledLesson): string[] =>
  [...htmlOf(lesson).matchAll(/<a href="([^"]+)"/g)].map((match) => match[1]!);
const picturesIn = (lesson: CompiledLesson): string[] =>
  [...htmlOf(lesson).matchAll(/<img src="([^"]+)"/g)].map((match) => match[1]!);
