import { isMap, isSeq, LineCounter, parseDocument, type Document } from 'yaml';
import type { z } from 'zod';
import type { Fault } from './types.ts';
import { nearest } from './nearest.ts';

/** Where a piece of YAML stands in its file: the line before its first one. */
export interface Place {
  readonly file: string;
  readonly lineBefore: number;
}

/** Longest block of YAML, characters; a bench needs a fraction of it. */
const LONGEST = 20_000;
const DEEPEST = 12;

type Read<T> = { ok: true; value: T } | { ok: false; faults: Fault[] };

/** Parses and checks YAML; every fault names the line it stands in. Aliases are refused, so nothing can multiply. */
export function readYaml<S extends z.ZodTypeAny>(
  text: string,
  schema: S,
  what: string,
  place: Place,
): Read<z.output<S>> {
  const at = (line: number, column: number, message: string, fix?: string): Fault => ({
    file: place.file,
    line: place.lineBefore + line,
    column,
    message,
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
  if (document.errors.length > 0)
    return {
      ok: false,
      faults: document.errors.map((error) =>
        at(...where(error.pos[0]), `This ${what} is not right YAML: ${error.message.split('\n')[0]}`),
      ),
    };
  if (/(^|[\s[{,:-])[&*][A-Za-z0-9_-]/.test(text.replace(/"[^"]*"|'[^']*'/g, '')))
    return {
      ok: false,
      faults: [at(1, 1, `Anchors and aliases (& and *) are not used in a ${what}: write the value out.`)],
    };
  if (depthOf(document.contents) > DEEPEST)
    return { ok: false, faults: [at(1, 1, `This ${what} is nested too deeply.`)] };
  const parsed = schema.safeParse(document.toJS({ maxAliasCount: 0 }));
  if (parsed.success) return { ok: true, value: parsed.data as z.output<S> };
  return {
    ok: false,
    faults: parsed.error.issues.flatMap((issue) => {
      const [line, column] = where(offsetOf(document, issue.path));
      const name = issue.path.join('.') || what;
      if (issue.code === 'unrecognized_keys')
        return issue.keys.map((key) => {
          const [keyLine, keyColumn] = where(offsetOf(document, [...issue.path, key]));
          const known = keysOf(schema, issue.path);
          const close = nearest(key, known);
          return at(
            keyLine,
            keyColumn,
            `A ${what} has no '${key}'.${known.length ? ` It has: ${known.join(', ')}.` : ''}`,
            close ? `${close}:` : undefined,
          );
        });
      if (issue.code === 'invalid_enum_value') {
        const close = nearest(String(issue.received), issue.options.map(String));
        return [
          at(
            line,
            column,
            `'${name}' cannot be '${issue.received}'. It is one of: ${issue.options.join(', ')}.`,
            close ? `${issue.path.at(-1)}: ${close}` : undefined,
          ),
        ];
      }
      if (issue.code === 'invalid_type' && issue.received === 'undefined')
        return [at(line, column, `'${name}' is missing in this ${what}.`)];
      return [at(line, column, `'${name}': ${issue.message}`)];
    }),
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

/** Keys that the object at a path may have, as far as the schema tells. */
function keysOf(schema: z.ZodTypeAny, path: readonly (string | number)[]): string[] {
  let now = unwrap(schema);
  for (const step of path) {
    const definition = now._def as { shape?: () => Record<string, z.ZodTypeAny>; type?: z.ZodTypeAny };
    const next = typeof step === 'number' ? definition.type : definition.shape?.()[step];
    if (!next) return [];
    now = unwrap(next);
  }
  const shape = (now._def as { shape?: () => Record<string, unknown> }).shape;
  return shape ? Object.keys(shape()) : [];
}

function unwrap(schema: z.ZodTypeAny): z.ZodTypeAny {
  let now = schema;
  for (;;) {
    const { innerType, schema: inner } = now._def as { innerType?: z.ZodTypeAny; schema?: z.ZodTypeAny };
    if (innerType) now = innerType;
    else if (inner) now = inner;
    else return now;
  }
}
