import { isMap, isSeq, LineCounter, parseDocument, type Document } from 'yaml';
import type { z } from 'zod';
import type { Fault } from './types.ts';
import { tellIssues } from './yamlFaults.ts';

/** Where a piece of YAML stands in its file: the line before its first one. */
export interface Place {
  readonly file: string;
  readonly lineBefore: number;
}

/** Longest block of YAML, characters; a bench needs a fraction of it. */
const LONGEST = 20_000;
const DEEPEST = 12;

/** Where the value at a path of the block stands in the file. */
export type Where = (...path: (string | number)[]) => { readonly line: number; readonly column: number };

type Read<T> = { ok: true; value: T; where: Where } | { ok: false; faults: Fault[] };

/** Parses and checks YAML; every fault names the line it stands in. Aliases are refused, so nothing can multiply. */
export function readYaml<S extends z.ZodTypeAny>(
  text: string,
  schema: S,
  what: string,
  place: Place,
): Read<z.output<S>> {
  const at = (line: number, column: number, message: string, fix?: string, found?: string): Fault => ({
    file: place.file,
    line: place.lineBefore + line,
    column,
    message,
    ...(found === undefined ? {} : { found }),
    ...(fix === undefined ? {} : { fix }),
  });
  if (text.length > LONGEST)
    return {
      ok: false,
      faults: [at(1, 1, `This ${what} has ${text.length} characters; ${LONGEST} are the most.`)],
    };
  const lines = new LineCounter();
  const document = parseDocument(text, {
    lineCounter: lines,
    uniqueKeys: true,
    strict: true,
    schema: 'core',
  });
  const where = (offset: number) => {
    const { line, col } = lines.linePos(offset);
    return [Math.max(1, line), Math.max(1, col)] as const;
  };
  // One fault of syntax leads to others that are none: the first is told.
  const [error] = document.errors;
  if (error) {
    const said = error.message.split('\n')[0]!.replace(/ at line \d+, column \d+:?$/, '');
    return { ok: false, faults: [at(...where(error.pos[0]), `This ${what} is not right YAML: ${said}.`)] };
  }
  const alias = /(?:^|[\s[{,:-])([&*][A-Za-z0-9_-]+)/.exec(
    text.replace(/"[^"]*"|'[^']*'/g, (quoted) => ' '.repeat(quoted.length)),
  );
  if (alias)
    return {
      ok: false,
      faults: [
        at(
          ...where(alias.index + alias[0].length - alias[1]!.length),
          `Anchors and aliases (& and *) are not used in a ${what}: write the value out.`,
          undefined,
          alias[1],
        ),
      ],
    };
  if (depthOf(document.contents) > DEEPEST)
    return { ok: false, faults: [at(1, 1, `This ${what} is nested too deeply.`)] };
  const parsed = schema.safeParse(document.toJS({ maxAliasCount: 0 }));
  if (parsed.success)
    return {
      ok: true,
      value: parsed.data as z.output<S>,
      where: (...path) => {
        const [line, column] = where(offsetOf(document, path));
        return { line: place.lineBefore + line, column };
      },
    };
  return {
    ok: false,
    faults: tellIssues(parsed.error.issues, schema, document.toJS({ maxAliasCount: 0 }), what).map(
      ({ path, message, found, fix }) => at(...where(offsetOf(document, path)), message, fix, found),
    ),
  };
}

function depthOf(node: unknown, depth = 0): number {
  if (depth > DEEPEST + 1) return depth;
  if (isMap(node)) return Math.max(depth, ...node.items.map((pair) => depthOf(pair.value, depth + 1)));
  if (isSeq(node)) return Math.max(depth, ...node.items.map((item) => depthOf(item, depth + 1)));
  return depth;
}

/** Offset of the node at a path, or of the nearest parent that exists. */
function offsetOf(document: Document, path: readonly (string | number)[]): number {
  for (let length = path.length; length >= 0; length--) {
    const node = length === 0 ? document.contents : document.getIn(path.slice(0, length), true);
    if (length > 0) {
      const parent = length === 1 ? document.contents : document.getIn(path.slice(0, length - 1), true);
      if (isMap(parent)) {
        const pair = parent.items.find(
          (item) => String((item.key as { value?: unknown } | null)?.value) === String(path[length - 1]),
        );
        const range = (pair?.key as { range?: [number, number, number] } | undefined)?.range;
        if (range) return range[0];
      }
    }
    const range = (node as { range?: [number, number, number] } | null | undefined)?.range;
    if (range) return range[0];
  }
  return 0;
}
