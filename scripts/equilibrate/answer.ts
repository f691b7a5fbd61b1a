/** What the command line answers to one line of JSON. */
import {
  bufferCapacity,
  ChemistryError,
  colour,
  createSolution,
  indicatorStock,
  solve,
  type Model,
  type Solution,
} from '../../src/chemistry/index.ts';
import { checked, nearestWord } from '../../src/chemistry/errors.ts';
import { indicatorData } from '../../src/chemistry/indicatorData.ts';
import { solveRaw, type RawProblem } from '../../src/chemistry/raw.ts';

type Line = Readonly<Record<string, unknown>>;

/** The answer to one line, as one line of JSON: never throws. */
export function answerLine(text: string): string {
  let id: unknown = null;
  try {
    const line: unknown = JSON.parse(text);
    if (line === null || typeof line !== 'object' || Array.isArray(line))
      throw new ChemistryError('line', 'A line is a JSON object.');
    id = (line as Line)['id'] ?? null;
    const answer = isRaw(line as Line) ? raw(line as Line) : catalogue(line as Line);
    return JSON.stringify({ id, ...answer });
  } catch (error) {
    return JSON.stringify({ id, error: sentenceOf(error) });
  }
}

function sentenceOf(error: unknown): string {
  if (error instanceof SyntaxError) return `This line is no JSON: ${error.message}`;
  return error instanceof Error ? error.message : String(error);
}

const isRaw = (line: Line): boolean =>
  !('mix' in line) && ('acids' in line || 'ions' in line || 'pKw' in line);

function raw(line: Line) {
  const { species, ...rest } = solveRaw(line as unknown as RawProblem);
  return {
    pH: rest.pH,
    ionicStrength: rest.ionicStrength,
    species: species.map(({ name, amount_mol }) => ({ name, amount_mol })),
    bufferCapacity: rest.bufferCapacity,
    // Constants without names absorb nothing that could be known.
    colour: null,
    model: 'raw',
  };
}

function modelOf(word: unknown): Model {
  if (word === undefined) return 'real';
  if (word === 'real' || word === 'textbook') return word;
  throw new ChemistryError('model', `model is 'real' or 'textbook'; found ${JSON.stringify(word)}.`, 'real');
}

function objects(field: string, value: unknown): readonly Line[] {
  if (value === undefined || value === null) return [];
  if (!Array.isArray(value)) throw new ChemistryError(field, `${field} is a list.`);
  value.forEach((item, i) => {
    if (item === null || typeof item !== 'object' || Array.isArray(item))
      throw new ChemistryError(`${field}[${i}]`, `${field}[${i}] is an object.`);
  });
  return value as Line[];
}

/** An indicator by id or name in any case, with hyphens or spaces. */
function indicatorId(field: string, name: unknown): string {
  const wanted = String(name)
    .trim()
    .toLowerCase()
    .replace(/[\s_-]+/g, '-');
  if (Object.hasOwn(indicatorData, wanted)) return wanted;
  const nearest = nearestWord(
    String(name),
    Object.values(indicatorData).map((d) => d.name),
  );
  const hint = nearest ? ` Did you mean '${nearest}'?` : '';
  throw new ChemistryError(field, `There is no indicator '${String(name)}'.${hint}`, nearest);
}

/** The solution of a catalogue line. Indicators come as their fully neutralised sodium salts, as from the stock bottle. */
function solutionOf(line: Line): Solution {
  const volume_mL = checked('volume_L', line['volume_L'] ?? 1, 'a number of litres', Number.MIN_VALUE) * 1000;
  const temperature = line['temperature_C'] ?? 25;
  const plain = createSolution({
    parts: objects('mix', line['mix']).map((part, i) => ({
      substance: part['substance'] as string,
      amount_mol: checked(`mix[${i}].amount_mol`, part['amount_mol'], 'a number of mol'),
    })),
    volume_mL,
    temperature_C: temperature as number,
  });
  const amounts: Record<string, number> = { ...plain.amounts };
  objects('indicators', line['indicators']).forEach((dose, i) => {
    const id = indicatorId(`indicators[${i}].name`, dose['name']);
    const n = checked(`indicators[${i}].amount_mol`, dose['amount_mol'], 'a number of mol');
    const stock = indicatorStock(id, { volume_mL: 1 }).amounts;
    for (const component in stock)
      amounts[component] = (amounts[component] ?? 0) + (n * stock[component]!) / stock[id]!;
  });
  const gas = line['co2'] as Line | undefined;
  return {
    ...plain,
    amounts,
    ...(gas === undefined || gas === null
      ? {}
      : {
          gas: {
            co2_atm: checked('co2.partialPressure_atm', gas['partialPressure_atm'], 'a pressure in atm'),
          },
        }),
  };
}

function catalogue(line: Line) {
  const model = modelOf(line['model']);
  const path_cm = checked('path_cm', line['path_cm'] ?? 5, 'a length in cm', 0, 1000);
  const solution = solutionOf(line);
  const { pH, ionicStrength, species, warnings } = solve(solution, model);
  const seen = colour(solution, path_cm, model);
  return {
    pH,
    ionicStrength,
    species: species.map(({ name, amount_mol }) => ({ name, amount_mol })),
    bufferCapacity: bufferCapacity(solution, model),
    colour: { hex: seen.hex, XYZ: seen.xyz, words: seen.words },
    model,
    ...(warnings.length > 0 ? { warnings } : {}),
  };
}
