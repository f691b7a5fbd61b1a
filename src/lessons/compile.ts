import type { Root, RootContent } from 'mdast';
import type { z } from 'zod';
import type { BenchSpec } from '../bench/index.ts';
import { benchProblems } from './benchProblems.ts';
import type { RunScope } from './formula.ts';
import { tooMuch } from './limits.ts';
import { compareOutcome, computeOutcome, countOutcome } from './outcome.ts';
import { nearest } from './nearest.ts';
import { computeQuantities, parseMarkdown, prepareProse, renderProse } from './prose.ts';
import { buildQuestion } from './questions/build.ts';
import { questionSchema, type QuestionYaml } from './questions/schema.ts';
import { benchSchema, frontMatterSchema, predictionSchema } from './schemas.ts';
import type { Block, Checkpoint, Compiled, Fault, Prediction } from './types.ts';
import { readYaml, type Where } from './yaml.ts';

/** Raised whenever the compiled form changes; stored lessons of an older one are compiled again at deployment. */
export const COMPILER_VERSION = 2;

type Read =
  | { readonly kind: 'prose'; readonly nodes: RootContent[] }
  | { readonly kind: 'bench'; readonly spec: BenchSpec }
  | { readonly kind: 'prediction'; readonly line: number; readonly yaml: z.output<typeof predictionSchema> }
  | { readonly kind: 'question'; readonly yaml: QuestionYaml; readonly where: Where };

/**
 * Compiles a lesson: CommonMark with YAML front matter, and fenced blocks `bench`, `prediction` and `question`.
 * @param markdown the whole file
 * @param options.file its name, for faults; the slug is its name without number and ending
 * @returns the lesson, or every fault found with its line and column. Never throws on any text.
 */
export function compile(markdown: string, { file }: { file: string }): Compiled {
  const faults: Fault[] = [];
  const add = (line: number, column: number, message: string, fix?: string, found?: string) =>
    void faults.push({
      file,
      line,
      column,
      message,
      ...(found === undefined ? {} : { found }),
      ...(fix === undefined ? {} : { fix }),
    });
  const refused = tooMuch(markdown);
  if (refused) return { ok: false, faults: [{ file, line: 1, column: 1, message: refused }] };

  const tree: Root = parseMarkdown(markdown);
  faults.push(...prepareProse(tree, markdown, file));

  const [front] = tree.children;
  let head: z.output<typeof frontMatterSchema> | null = null;
  if (front?.type !== 'yaml')
    add(1, 1, 'A lesson starts with front matter between two lines of three hyphens.', '---');
  else {
    const read = readYaml(front.value, frontMatterSchema, 'front matter', {
      file,
      lineBefore: front.position!.start.line,
    });
    if (read.ok) head = read.value;
    else faults.push(...read.faults);
  }
  const model = head?.model ?? 'textbook';

  // First all blocks are read, so that prose and questions may speak of a bench that comes later.
  const parts: Read[] = [];
  const checkpoints: Checkpoint[] = [];
  const benches = new Map<string, BenchSpec>();
  /** Benches with faults of their own: what leans on them is not blamed as well. */
  const faulty = new Set<string>();
  const ids = new Map<string, number>();
  const claim = (id: string, line: number) => {
    const before = ids.get(id);
    if (before !== undefined)
      add(
        line,
        1,
        `The id '${id}' was used already in line ${before}. Progress hangs on ids: choose another.`,
        undefined,
        id,
      );
    else ids.set(id, line);
  };
  for (const node of tree.children) {
    if (node.type === 'yaml') continue;
    if (node.type !== 'code' || !BLOCKS.has(node.lang ?? '')) {
      findNested(node, add);
      const last = parts.at(-1);
      if (last?.kind === 'prose') last.nodes.push(node);
      else parts.push({ kind: 'prose', nodes: [node] });
      continue;
    }
    const line = node.position!.start.line;
    const place = { file, lineBefore: line };
    const block = parts.length;
    if (node.lang === 'bench') {
      const read = readYaml(node.value, benchSchema, 'bench', place);
      if (!read.ok) {
        faults.push(...read.faults);
        const id = /^id:\s*([a-z0-9-]+)/m.exec(node.value)?.[1];
        if (id) faulty.add(id);
        continue;
      }
      const spec: BenchSpec = { ...read.value, model };
      claim(spec.id, line);
      const problems = benchProblems(spec);
      for (const { path, message, fix, found } of problems) {
        const at = read.where(...path);
        add(at.line, at.column, message, fix, found);
      }
      if (problems.length === 0) benches.set(spec.id, spec);
      else faulty.add(spec.id);
      for (const aim of spec.aims) {
        claim(aim.id, line);
        checkpoints.push({ id: aim.id, kind: 'aim', title: aim.text, block });
      }
      parts.push({ kind: 'bench', spec });
    } else if (node.lang === 'prediction') {
      const read = readYaml(node.value, predictionSchema, 'prediction', place);
      if (!read.ok) {
        faults.push(...read.faults);
        continue;
      }
      claim(read.value.id, line);
      checkpoints.push({ id: read.value.id, kind: 'prediction', title: 'Your prediction', block });
      parts.push({ kind: 'prediction', line, yaml: read.value });
    } else {
      const read = readYaml(node.value, questionSchema, 'question', place);
      if (!read.ok) {
        faults.push(...read.faults);
        continue;
      }
      claim(read.value.id, line);
      const count = checkpoints.filter(({ kind }) => kind === 'question').length;
      checkpoints.push({ id: read.value.id, kind: 'question', title: `Question ${count + 1}`, block });
      parts.push({ kind: 'question', yaml: read.value, where: read.where });
    }
  }

  const scope: RunScope = { model, benches, values: {} };
  const addUnlessFaulty = (
    line: number,
    column: number,
    { message, fix, found }: { message: string; fix?: string | undefined; found?: string | undefined },
  ) => {
    if (!(message.startsWith('This lesson has no bench') && faulty.has(found ?? '')))
      add(line, column, message, fix, found);
  };
  const blocks = parts.map((part, at): Block | null => {
    switch (part.kind) {
      case 'bench':
        return part;
      case 'prose':
        computeQuantities(part.nodes, scope, ({ line, column }, error) =>
          addUnlessFaulty(line, column, error),
        );
        return { kind: 'prose', html: renderProse(part.nodes) };
      case 'prediction': {
        if (faulty.has(part.yaml.bench)) return null;
        const spec = predictionOf(part, benches, add);
        const where = parts.findIndex((one) => one.kind === 'bench' && one.spec.id === part.yaml.bench);
        if (where >= 0 && where < at)
          add(part.line, 1, 'A prediction comes before its bench: move this block above it.');
        return spec && { kind: 'prediction', spec };
      }
      case 'question': {
        const spec = buildQuestion(part.yaml, {
          file,
          where: part.where,
          scope,
          add: ({ line, column }, message, fix, found) =>
            addUnlessFaulty(line, column, { message, fix, found }),
        });
        return spec && { kind: 'question', spec };
      }
    }
  });
  if (!head || faults.length > 0)
    return { ok: false, faults: faults.sort((a, b) => a.line - b.line || a.column - b.column) };
  return {
    ok: true,
    lesson: {
      ...head,
      slug: slugOf(file),
      compilerVersion: COMPILER_VERSION,
      blocks: blocks.filter((block) => block !== null),
      checkpoints,
    },
  };
}

const BLOCKS = new Set(['bench', 'prediction', 'question']);

export const slugOf = (file: string): string =>
  file.split('/').at(-1)!.replace(/\.md$/, '').replace(/^\d+-/, '');

function predictionOf(
  { line, yaml }: { line: number; yaml: z.output<typeof predictionSchema> },
  benches: ReadonlyMap<string, BenchSpec>,
  add: (line: number, column: number, message: string, fix?: string, found?: string) => void,
): Prediction | null {
  const bench = benches.get(yaml.bench);
  if (!bench) {
    const close = nearest(yaml.bench, [...benches.keys()]);
    add(
      line,
      1,
      `There is no bench '${yaml.bench}' for this prediction.`,
      close ? `bench: ${close}` : undefined,
      yaml.bench,
    );
    return null;
  }
  const { outcome: ask, options, ...rest } = yaml;
  const outcome =
    'drip' in ask
      ? computeOutcome(bench, ask, options)
      : 'find' in ask
        ? compareOutcome(bench, ask, options)
        : countOutcome(bench, ask, options);
  if ('error' in outcome) {
    add(line, 1, `The outcome of this prediction cannot be computed. ${outcome.error}`);
    return null;
  }
  return { ...rest, options: options.map(({ id, text }) => ({ id, text })), outcome };
}

/** A block inside a list or a quote would be torn out of it: it has to stand by itself. */
function findNested(node: RootContent, add: (line: number, column: number, message: string) => void): void {
  if (!('children' in node)) return;
  for (const child of node.children as RootContent[]) {
    if (child.type === 'code' && BLOCKS.has(child.lang ?? ''))
      add(
        child.position!.start.line,
        child.position!.start.column,
        `A ${child.lang} block has to start at the left margin, outside of lists and boxes.`,
      );
    findNested(child, add);
  }
}
