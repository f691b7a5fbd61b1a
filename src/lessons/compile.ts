import type { Root, RootContent } from 'mdast';
import type { z } from 'zod';
import { createState, type BenchSpec } from '../bench/index.ts';
import { computeOutcome } from './outcome.ts';
import { parseMarkdown, prepareProse, renderProse } from './prose.ts';
import { benchSchema, frontMatterSchema, predictionSchema } from './schemas.ts';
import type { Block, Checkpoint, Compiled, Fault } from './types.ts';
import { readYaml } from './yaml.ts';

/** Raised whenever the compiled form changes; stored lessons of an older one are compiled again at deployment. */
export const COMPILER_VERSION = 1;

const LONGEST = 200_000;
/** Nested lists and quotes beyond this are a mistake or an attack; the parser's work grows with them. */
const DEEPEST = 40;

/**
 * Compiles a lesson: CommonMark with YAML front matter, and fenced blocks `bench` and `prediction`.
 * @param markdown the whole file
 * @param options.file its name, for faults; the slug is its name without number and ending
 * @returns the lesson, or every fault found with its line and column. Never throws on any text.
 */
export function compile(markdown: string, { file }: { file: string }): Compiled {
  const faults: Fault[] = [];
  const add = (line: number, column: number, message: string, fix?: string) =>
    void faults.push({ file, line, column, message, ...(fix ? { fix } : {}) });
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

  const blocks: Block[] = [];
  const checkpoints: Checkpoint[] = [];
  const benches = new Map<string, BenchSpec>();
  const ids = new Map<string, number>();
  const pending: { at: number; line: number; value: z.output<typeof predictionSchema> }[] = [];
  let prose: RootContent[] = [];
  const flush = () => {
    if (prose.length > 0) blocks.push({ kind: 'prose', html: renderProse(prose) });
    prose = [];
  };
  const claim = (id: string, line: number) => {
    const before = ids.get(id);
    if (before !== undefined)
      add(
        line,
        1,
        `The id '${id}' was used already in line ${before}. Progress hangs on ids: choose another.`,
      );
    else ids.set(id, line);
  };

  for (const node of tree.children) {
    if (node.type === 'yaml') continue;
    if (node.type !== 'code' || !BLOCKS.has(node.lang ?? '')) {
      findNested(node, add);
      prose.push(node);
      continue;
    }
    flush();
    const line = node.position!.start.line;
    const place = { file, lineBefore: line };
    if (node.lang === 'bench') {
      const read = readYaml(node.value, benchSchema, 'bench', place);
      if (!read.ok) {
        faults.push(...read.faults);
        continue;
      }
      const spec = { ...read.value, model } as BenchSpec;
      claim(spec.id, line);
      for (const problem of benchProblems(spec)) add(line, 1, problem);
      benches.set(spec.id, spec);
      for (const aim of spec.aims) {
        claim(aim.id, line);
        checkpoints.push({ id: aim.id, kind: 'aim', title: aim.text, block: blocks.length });
      }
      blocks.push({ kind: 'bench', spec });
    } else {
      const read = readYaml(node.value, predictionSchema, 'prediction', place);
      if (!read.ok) {
        faults.push(...read.faults);
        continue;
      }
      claim(read.value.id, line);
      checkpoints.push({
        id: read.value.id,
        kind: 'prediction',
        title: 'Your prediction',
        block: blocks.length,
      });
      pending.push({ at: blocks.length, line, value: read.value });
      // Its outcome is computed once the bench that follows is known.
      blocks.push({ kind: 'prose', html: '' });
    }
  }
  flush();

  for (const { at, line, value } of pending) {
    const spec = benches.get(value.bench);
    const where = blocks.findIndex((block) => block.kind === 'bench' && block.spec.id === value.bench);
    if (!spec) {
      add(line, 1, `There is no bench '${value.bench}' for this prediction.`);
      continue;
    }
    if (where < at) add(line, 1, 'A prediction comes before its bench: move this block above it.');
    const { outcome: ask, options, ...rest } = value;
    const outcome = computeOutcome(spec, ask, options);
    if ('error' in outcome) {
      add(line, 1, `The outcome of this prediction cannot be computed. ${outcome.error}`);
      continue;
    }
    blocks[at] = {
      kind: 'prediction',
      spec: { ...rest, options: options.map(({ id, text }) => ({ id, text })), outcome },
    };
  }
  if (!head || faults.length > 0)
    return { ok: false, faults: faults.sort((a, b) => a.line - b.line || a.column - b.column) };
  return {
    ok: true,
    lesson: { ...head, slug: slugOf(file), compilerVersion: COMPILER_VERSION, blocks, checkpoints },
  };
}

const BLOCKS = new Set(['bench', 'prediction']);

export const slugOf = (file: string): string =>
  file.split('/').at(-1)!.replace(/\.md$/, '').replace(/^\d+-/, '');

function tooMuch(markdown: string): string | null {
  if (markdown.length > LONGEST)
    return `This lesson has ${markdown.length} characters; ${LONGEST} are the most.`;
  for (const line of markdown.split('\n')) {
    const marks = /^[\s>*+\-\d.)]*/.exec(line)![0];
    if (marks.replace(/[\s\d.)]/g, '').length > DEEPEST || /^ {200}/.test(line))
      return `Lists and quotes are nested more than ${DEEPEST} deep.`;
    if (/[[(*_`$]{200}/.test(line) || /(!?\[){100}/.test(line))
      return 'A line repeats the same signs too often.';
  }
  return null;
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

/** What the schema cannot see: names that point to nothing, glasses too small, substances that do not exist. */
function benchProblems(spec: BenchSpec): string[] {
  const problems: string[] = [];
  const vessels = new Set(spec.vessels.map((vessel) => vessel.id));
  const all = new Set([...vessels, ...spec.shelf.map((item) => item.id)]);
  if (all.size < spec.vessels.length + spec.shelf.length)
    problems.push('Two things on this bench have the same id.');
  for (const aim of spec.aims) {
    const named = [
      ...('vessel' in aim && aim.vessel ? [aim.vessel] : []),
      ...('vessels' in aim ? aim.vessels : []),
    ];
    for (const vessel of named)
      if (!vessels.has(vessel))
        problems.push(`The aim '${aim.id}' names the vessel '${vessel}', which this bench does not have.`);
    if ('of' in aim && !all.has(aim.of))
      problems.push(`The aim '${aim.id}' names '${aim.of}', which this bench does not have.`);
  }
  try {
    createState(spec, { seed: 1 });
  } catch (error) {
    problems.push((error as Error).message);
  }
  return problems;
}
