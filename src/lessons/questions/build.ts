/** From the YAML of a `question` block to the question: texts rendered, keys and wrong methods proved for every variant. */
import type { Root } from 'mdast';
import { formatQuantity, roundHalfAway, UNITS, USUAL } from '../format.ts';
import { namesOf, parseFormula, type RunScope } from '../formula.ts';
import { FormulaError, namesIn, parseMixture, type Mixture } from '../mixture.ts';
import { nearest } from '../nearest.ts';
import { asFormulaError, computeQuantities, parseMarkdown, prepareProse, renderProse } from '../prose.ts';
import type { Fault } from '../types.ts';
import type { Where } from '../yaml.ts';
import { keyOf, toleranceOf, within, wrongValue } from './numeric.ts';
import { pourAnswer } from './tubes.ts';
import type { QuestionYaml } from './schema.ts';
import type { Numeric, Question, WrongNumber } from './types.ts';
import { MOST_VARIANTS, variantsOf } from './variants.ts';

type Add = (place: { line: number; column: number }, message: string, fix?: string, found?: string) => void;

interface Kit {
  readonly file: string;
  readonly where: Where;
  readonly scope: Omit<RunScope, 'values'>;
  readonly add: Add;
}

/** @returns the question, or null where faults were added. */
export function buildQuestion(yaml: QuestionYaml, kit: Kit): Question | null {
  let sound = true;
  const add: Add = (...fault) => {
    sound = false;
    kit.add(...fault);
  };
  const { where } = kit;
  const variants = variantsOf(yaml.vary);
  if (!variants) {
    add(where('vary'), `This question has more than ${MOST_VARIANTS} variants: list fewer values.`);
    return null;
  }
  const names = Object.keys(variants[0] ?? {});
  for (const [n, row] of variants.entries())
    if (Object.keys(row).sort().join() !== [...names].sort().join()) {
      add(where('vary', n), `Every row under 'vary' has the same names: ${names.join(', ')}.`);
      return null;
    }
  const first: RunScope = { ...kit.scope, values: variants[0] ?? {} };
  let mixture: Mixture | undefined;
  const attempt = (path: (string | number)[], work: () => void) => {
    try {
      work();
    } catch (error) {
      const { message, fix, found } = asFormulaError(error);
      add(where(...path), message, fix, found);
    }
  };
  if (yaml.kind === 'numeric' && yaml.mixture)
    attempt(['mixture'], () => {
      mixture = parseMixture(yaml.mixture!);
      checkNames(namesIn(mixture), names);
    });
  const text = (markdown: string, ...path: (string | number)[]): string => {
    const tree: Root = parseMarkdown(markdown);
    const place = where(...path);
    const faults: Fault[] = prepareProse(tree, markdown, kit.file);
    for (const fault of faults)
      add({ line: place.line + fault.line - 1, column: place.column }, fault.message, fault.fix, fault.found);
    computeQuantities(
      tree.children,
      first,
      (_, error) => add(place, error.message, error.fix, error.found),
      mixture,
    );
    return renderProse(tree.children);
  };
  const base = { id: yaml.id, ask: text(yaml.ask, 'ask'), variants };

  let question: Question;
  switch (yaml.kind) {
    case 'choice':
      question = {
        ...base,
        kind: 'choice',
        options: yaml.options.map((option, n) => ({
          id: option.id,
          right: option.right,
          text: text(option.text, 'options', n, 'text'),
          feedback: text(option.feedback, 'options', n, 'feedback'),
          ...(option.misconception ? { misconception: option.misconception } : {}),
        })),
      };
      unique(yaml.options, 'options');
      if (!yaml.options.some((option) => option.right))
        add(where('options'), 'No option of this question is right.', 'right: true');
      if (yaml.options.every((option) => option.right))
        add(where('options'), 'Every option of this question is right: one has to be wrong.');
      for (const [n, option] of yaml.options.entries())
        if (option.right && option.misconception)
          add(
            where('options', n, 'misconception'),
            'A right option reveals no misconception: take the line out.',
            undefined,
            `misconception: ${option.misconception}`,
          );
      break;
    case 'order':
      question = {
        ...base,
        kind: 'order',
        items: yaml.items.map((item, n) => ({ id: item.id, text: text(item.text, 'items', n, 'text') })),
        feedback: text(yaml.feedback, 'feedback'),
        ...(yaml.misconception ? { misconception: yaml.misconception } : {}),
      };
      unique(yaml.items, 'items');
      break;
    case 'match':
      question = {
        ...base,
        kind: 'match',
        pairs: yaml.pairs.map((pair, n) => ({
          id: pair.id,
          left: text(pair.left, 'pairs', n, 'left'),
          right: text(pair.right, 'pairs', n, 'right'),
        })),
        decoys: yaml.decoys.map((decoy, n) => ({
          id: decoy.id,
          text: text(decoy.text, 'decoys', n, 'text'),
        })),
        feedback: text(yaml.feedback, 'feedback'),
        ...(yaml.misconception ? { misconception: yaml.misconception } : {}),
      };
      unique([...yaml.pairs, ...yaml.decoys], 'pairs');
      break;
    case 'explain':
      question = {
        ...base,
        kind: 'explain',
        model: text(yaml.model, 'model'),
        points: yaml.points.map((point, n) => text(point, 'points', n)),
      };
      break;
    case 'numeric':
      question = {
        ...base,
        kind: 'numeric',
        ...(yaml.mixture ? { mixture: yaml.mixture } : {}),
        key: yaml.key,
        unit: yaml.unit,
        tolerance: toleranceIn(yaml),
        ...digitsIn(yaml),
        wrong: yaml.wrong.map((wrong, n): WrongNumber => {
          if (typeof wrong === 'string') return { method: wrong };
          const feedback = wrong.feedback ? text(wrong.feedback, 'wrong', n, 'feedback') : undefined;
          const rest = {
            ...(feedback ? { feedback } : {}),
            ...(wrong.misconception ? { misconception: wrong.misconception } : {}),
          };
          return 'value' in wrong
            ? { method: 'own', value: wrong.value, ...rest }
            : { method: wrong.method, ...rest };
        }),
        ...(yaml.pour ? { pour: yaml.pour } : {}),
        solution: text(yaml.solution, 'solution'),
        steps: yaml.steps.map((step, n) => text(step, 'steps', n)),
        help: yaml.help,
      };
      if (yaml.decimals !== undefined && yaml.figures !== undefined)
        add(
          where('figures'),
          "A number has 'decimals' or 'figures', not both.",
          'decimals: 2',
          `figures: ${yaml.figures}`,
        );
      if (yaml.help !== 'none' && yaml.steps.length === 0)
        add(
          where('help'),
          `'help: ${yaml.help}' shows steps, and there are none.`,
          'steps:',
          `help: ${yaml.help}`,
        );
      if (yaml.help === 'example' && variants.length < 2)
        add(
          where('help'),
          "A worked example shows other values: list at least two under 'vary'.",
          'vary:',
          'help: example',
        );
      if (sound) checkNumeric(question, mixture, yaml);
      break;
  }
  return sound ? question : null;

  function unique(list: readonly { id: string }[], key: string): void {
    const seen = new Set<string>();
    for (const [n, { id }] of list.entries()) {
      if (seen.has(id)) add(where(key, n), `Two parts of this question have the id '${id}'.`, undefined, id);
      seen.add(id);
    }
  }

  /** Proves the key for every variant: a number, reachable with its digits, and apart from every wrong method. */
  function checkNumeric(
    numeric: Numeric,
    asked: Mixture | undefined,
    from: Extract<QuestionYaml, { kind: 'numeric' }>,
  ): void {
    attempt(['key'], () => checkNames(namesOf(parseFormula(numeric.key, asked)), names));
    if (numeric.pour && !numeric.pour.mixture && !asked)
      add(
        where('pour'),
        "To pour an answer, give the block a mixture, or 'pour' one that uses 'answer'.",
        'mixture: 50 mL of 0.10 mol/L HCl',
      );
    if (numeric.pour?.mixture)
      attempt(['pour', 'mixture'], () =>
        checkNames(namesIn(parseMixture(numeric.pour!.mixture!)), [...names, 'answer']),
      );
    if (!sound) return;
    const applied = numeric.wrong.map(() => false);
    for (const row of variants!.length > 0 ? variants! : [{}]) {
      const scope: RunScope = { ...kit.scope, values: row };
      const which =
        names.length > 0 ? ` with ${names.map((name) => `${name} = ${row[name]}`).join(', ')}` : '';
      attempt(['key'], () => {
        const key = keyOf(numeric, scope);
        const tolerance = toleranceOf(numeric, key);
        const factor = UNITS[numeric.unit]!;
        const shown = key / factor;
        const rounded =
          numeric.by === 'decimals'
            ? roundHalfAway(shown, numeric.digits)
            : Number(shown.toPrecision(numeric.digits));
        if (!within(rounded * factor, key, tolerance))
          throw new FormulaError(
            `The key is ${formatQuantity(key, { ...numeric, digits: numeric.digits + 2 }, USUAL)}${which}: with ${numeric.digits} ${numeric.by} it cannot be given within the tolerance.`,
            undefined,
            numeric.by === 'decimals' ? `decimals: ${numeric.digits + 1}` : `figures: ${numeric.digits + 1}`,
          );
        if (numeric.pour && row === (variants![0] ?? row)) pourAnswer(numeric, key, key, scope, USUAL);
        for (const [n, wrong] of numeric.wrong.entries()) {
          const value = wrongValue(wrong, numeric, scope, key);
          if (value === null) continue;
          applied[n] = true;
          if (within(value, key, 2 * tolerance)) {
            const given = from.wrong[n]!;
            const name = typeof given === 'string' ? given : 'value' in given ? given.value : given.method;
            add(
              where('wrong', n),
              `The wrong method '${name}' gives ${formatQuantity(value, numeric, USUAL)}, the key is ${formatQuantity(key, numeric, USUAL)}${which}: too near to tell them apart.`,
              undefined,
              name,
            );
          }
        }
      });
      if (!sound) return;
    }
    for (const [n, does] of applied.entries())
      if (!does)
        add(
          where('wrong', n),
          `The wrong method '${numeric.wrong[n]!.method}' gives no number here: take it out.`,
          undefined,
          numeric.wrong[n]!.method,
        );
  }
}

function checkNames(used: readonly string[], known: readonly string[]): void {
  for (const name of used)
    if (!known.includes(name))
      throw new FormulaError(
        known.length > 0
          ? `There is no value called '${name}' under 'vary'. There are: ${known.join(', ')}.`
          : `There is no value called '${name}': this question has no 'vary'.`,
        name,
        nearest(name, known) ?? undefined,
      );
}

type NumericYaml = Extract<QuestionYaml, { kind: 'numeric' }>;
const isPH = (yaml: NumericYaml): boolean => yaml.unit === '' && /^pH\(|^own\(pH/.test(yaml.key.trim());

/** ±0.02 for a pH, as schools mark it; 2 % for everything else. */
function toleranceIn(yaml: NumericYaml): Numeric['tolerance'] {
  if (typeof yaml.tolerance === 'string') return { of: 'percent', value: parseFloat(yaml.tolerance) };
  if (yaml.tolerance !== undefined) return { of: 'unit', value: yaml.tolerance };
  return isPH(yaml) ? { of: 'unit', value: 0.02 } : { of: 'percent', value: 2 };
}

function digitsIn(yaml: NumericYaml): Pick<Numeric, 'digits' | 'by'> {
  if (yaml.figures !== undefined) return { digits: yaml.figures, by: 'figures' };
  if (yaml.decimals !== undefined) return { digits: yaml.decimals, by: 'decimals' };
  return isPH(yaml) ? { digits: 2, by: 'decimals' } : { digits: 3, by: 'figures' };
}
