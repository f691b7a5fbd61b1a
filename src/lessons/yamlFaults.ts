/** Words for what a schema finds wrong: what was found, and the corrected form in the author's own syntax. */
import type { z } from 'zod';
import { nearest } from './nearest.ts';

export interface Told {
  readonly path: readonly (string | number)[];
  readonly message: string;
  readonly found?: string;
  readonly fix?: string;
}

type Issue = z.ZodIssue;

/** @param value the whole block as it was read, to name what was found */
export function tellIssues(
  issues: readonly Issue[],
  schema: z.ZodTypeAny,
  value: unknown,
  what: string,
): Told[] {
  const told = issues.flatMap((issue) => tell(issue, schema, value, what));
  // A name that is mistyped is not missing as well.
  const meant = new Set(
    told.flatMap(({ path, found, fix }) =>
      fix?.endsWith(':') && found?.endsWith(':') ? [[...path.slice(0, -1), fix.slice(0, -1)].join('/')] : [],
    ),
  );
  return told.filter(({ path, found }) => found !== undefined || !meant.has(path.join('/')));
}

function tell(issue: Issue, schema: z.ZodTypeAny, value: unknown, what: string): Told[] {
  const { path } = issue;
  const name = path.length > 0 ? nameOf(path) : what;
  // An entry of a list has no name of its own.
  const label = typeof path.at(-1) === 'number' ? '' : `${lastName(path)}: `;
  const key = lastName(path);
  const here = valueAt(value, path);
  const found = here === undefined ? undefined : show(here);
  switch (issue.code) {
    case 'unrecognized_keys': {
      const known = keysAt(schema, value, path);
      return issue.keys.map((wrong) => {
        const close = nearest(wrong, known);
        const owner = path.length > 0 ? `'${name}'` : `A ${what}`;
        return {
          path: [...path, wrong],
          message: `${owner} has no '${wrong}'.${known.length > 0 ? ` It has: ${known.join(', ')}.` : ''}`,
          found: `${wrong}:`,
          ...(close ? { fix: `${close}:` } : {}),
        };
      });
    }
    case 'invalid_enum_value':
    case 'invalid_literal':
    case 'invalid_union_discriminator': {
      const options = (issue.code === 'invalid_literal' ? [issue.expected] : issue.options).map(String);
      if (here === undefined) return [missing(path, name, what, options[0])];
      const close = nearest(String(here), options);
      return [
        {
          path,
          message: `'${name}' cannot be '${show(here)}'. It is one of: ${options.filter(Boolean).join(', ')}.`,
          found: `${label}${show(here)}`,
          ...(close ? { fix: `${label}${close}` } : {}),
        },
      ];
    }
    case 'invalid_type': {
      if (issue.received === 'undefined') return [missing(path, name, what, EXAMPLES[issue.expected])];
      const quoted = issue.expected === 'string' ? `${label}"${show(here)}"` : undefined;
      const digits = issue.expected === 'number' && typeof here === 'string' ? numberIn(here) : null;
      const listed =
        issue.expected === 'array' && typeof here !== 'object' ? `${label}[${show(here)}]` : undefined;
      return [
        {
          path,
          message: `'${name}' has to be ${KINDS[issue.expected] ?? issue.expected}.`,
          ...(found === undefined ? {} : { found: `${label}${found}` }),
          ...(listed
            ? { fix: listed }
            : quoted
              ? { fix: quoted }
              : digits !== null
                ? { fix: `${label}${digits}` }
                : {}),
        },
      ];
    }
    case 'too_small':
    case 'too_big': {
      const least = issue.code === 'too_small';
      const bound = Number(least ? issue.minimum : issue.maximum);
      const edge = !issue.inclusive ? (least ? 'more than' : 'less than') : least ? 'at least' : 'at most';
      const length = issue.type === 'string' ? ' characters' : issue.type === 'array' ? ' entries' : '';
      if (issue.type === 'string' && least && bound === 1)
        return [{ path, message: `'${name}' is empty.`, found: `${key}:` }];
      return [
        {
          path,
          message: `'${name}' has to be ${edge} ${bound}${length}.`,
          ...(length || found === undefined ? {} : { found: `${label}${found}`, fix: `${label}${bound}` }),
        },
      ];
    }
    case 'invalid_union': {
      if (here === undefined) return [missing(path, name, what)];
      // Of the forms that this place may have, the one that came nearest is explained.
      const [nearestForm] = [...issue.unionErrors].sort(
        (a, b) => depth(b) - depth(a) || a.issues.length - b.issues.length,
      );
      return tellIssues(nearestForm!.issues, schema, value, what);
    }
    default:
      return [
        {
          path,
          message: `'${name}': ${issue.message}.`.replace(/\.\.$/, '.'),
          ...(found === undefined || typeof here === 'object' ? {} : { found: `${label}${found}` }),
          ...(typeof here === 'string' && issue.message.startsWith('an id is') && idFrom(here)
            ? { fix: `${label}${idFrom(here)}` }
            : {}),
        },
      ];
  }
}

const depth = (error: z.ZodError): number => Math.max(...error.issues.map(({ path }) => path.length));

function missing(path: readonly (string | number)[], name: string, what: string, example?: string): Told {
  return {
    path,
    message: `'${name}' is missing in this ${what}.`,
    ...(example === undefined ? {} : { fix: `${lastName(path)}: ${example}` }),
  };
}

const EXAMPLES: Readonly<Record<string, string>> = { number: '50', boolean: 'true', array: '[ … ]' };

const KINDS: Readonly<Record<string, string>> = {
  number: 'a number',
  integer: 'a whole number',
  string: 'a text',
  boolean: "'true' or 'false'",
  array: 'a list',
  object: 'a group of lines with names',
};

/** 'vessels 2 contents volume_mL' as an author counts: entries from 1. */
const nameOf = (path: readonly (string | number)[]): string =>
  path
    .map((step) => (typeof step === 'number' ? `[${step + 1}]` : step))
    .join('.')
    .replace(/\.\[/g, '[');

const lastName = (path: readonly (string | number)[]): string =>
  String([...path].reverse().find((step) => typeof step === 'string') ?? '');

function show(value: unknown): string {
  const text = typeof value === 'string' ? value : JSON.stringify(value);
  return text.length > 40 ? `${text.slice(0, 39)}…` : text;
}

const idFrom = (text: string): string =>
  text
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^[^a-z]+|-+$/g, '')
    .slice(0, 40);

/** '50 mL' and '0,5' hold a number that was meant. */
function numberIn(text: string): number | null {
  const found = /^\s*(-?\d+(?:[.,]\d+)?)/.exec(text);
  return found ? Number(found[1]!.replace(',', '.')) : null;
}

function valueAt(value: unknown, path: readonly (string | number)[]): unknown {
  let now = value;
  for (const step of path) {
    if (typeof now !== 'object' || now === null) return undefined;
    now = (now as Record<string | number, unknown>)[step];
  }
  return now;
}

/** Names that the object at a path may have, as far as the schema tells; of alternatives, those that the value fits best. */
function keysAt(schema: z.ZodTypeAny, value: unknown, path: readonly (string | number)[]): string[] {
  let now = plain(schema, value);
  let here = value;
  for (const step of path) {
    here = valueAt(here, [step]);
    const definition = now._def as { shape?: () => Record<string, z.ZodTypeAny>; type?: z.ZodTypeAny };
    const next = typeof step === 'number' ? definition.type : definition.shape?.()[step];
    if (!next) return [];
    now = plain(next, here);
  }
  const { shape } = now._def as { shape?: () => Record<string, unknown> };
  return shape ? Object.keys(shape()) : [];
}

interface Definition {
  readonly innerType?: z.ZodTypeAny;
  readonly schema?: z.ZodTypeAny;
  readonly options?: readonly z.ZodTypeAny[] | Map<string, z.ZodTypeAny>;
}

/** Takes off what wraps a schema (defaults, refinements, alternatives). */
function plain(schema: z.ZodTypeAny, value: unknown): z.ZodTypeAny {
  let now = schema;
  for (;;) {
    const { innerType, schema: inner, options } = now._def as Definition;
    if (innerType) now = innerType;
    else if (inner) now = inner;
    else if (options) {
      const alternatives = [...(Array.isArray(options) ? options : options.values())] as z.ZodTypeAny[];
      const errors = alternatives.map((one) => {
        const parsed = one.safeParse(value);
        return parsed.success ? 0 : parsed.error.issues.length + (wrongKind(parsed.error) ? 100 : 0);
      });
      now = alternatives[errors.indexOf(Math.min(...errors))]!;
    } else return now;
  }
}

const wrongKind = (error: z.ZodError): boolean =>
  error.issues.some(
    (issue) => issue.code === 'invalid_literal' || (issue.code === 'invalid_type' && issue.path.length === 0),
  );
