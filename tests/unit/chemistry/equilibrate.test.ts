/** The command line: answers in order, errors as data, never a crash. */
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { answerLine } from '../../../scripts/equilibrate/answer.ts';

interface Answer {
  readonly id: unknown;
  readonly error?: string;
  readonly pH?: number;
  readonly model?: string;
  readonly colour?: { hex: string; XYZ: number[]; words: string } | null;
  readonly bufferCapacity?: number;
  readonly ionicStrength?: number;
  readonly species?: { name: string; amount_mol: number }[];
  readonly warnings?: string[];
}
const ask = (line: unknown): Answer =>
  JSON.parse(answerLine(typeof line === 'string' ? line : JSON.stringify(line))) as Answer;

describe('catalogue form', () => {
  const buffer = {
    id: 'a',
    model: 'real',
    temperature_C: 25,
    volume_L: 1,
    mix: [
      { substance: 'KH2PO4', amount_mol: 0.025 },
      { substance: 'disodium hydrogen phosphate', amount_mol: 0.025 },
    ],
    indicators: [{ name: 'bromothymol blue', amount_mol: 1e-5 }],
    path_cm: 5,
  };
  test('gives everything that is promised', () => {
    const { pH, ionicStrength, species, bufferCapacity, colour, model } = ask(buffer);
    // The standard buffer reads 6.865; a trace of dye does not move it by more than a hundredth.
    expect(Math.abs(pH! - 6.865)).toBeLessThan(0.02);
    expect(ionicStrength).toBeCloseTo(0.1, 2);
    expect(bufferCapacity).toBeGreaterThan(0.02);
    expect(colour!.hex).toMatch(/^#[0-9a-f]{6}$/);
    expect(colour!.XYZ).toHaveLength(3);
    // Inside the range of bromothymol blue, yellow to blue.
    expect(colour!.words).toMatch(/green|blue/);
    expect(model).toBe('real');
    const phosphate = species!.filter((s) => /PO4/.test(s.name)).reduce((sum, s) => sum + s.amount_mol, 0);
    expect(phosphate).toBeCloseTo(0.05, 12);
  });
  test('has defaults: the real model, 25 °C, a litre', () => {
    expect(ask({ id: 1, mix: [{ substance: 'NaCl', amount_mol: 0.1 }] })).toMatchObject({
      id: 1,
      model: 'real',
    });
  });
  test.each(['Na3PO4', 'K2HPO4', 'CO2', 'HNO3', 'hypochlorous acid', 'caustic soda', 'Na2CO3·10H2O'])(
    'knows %s',
    (substance) => {
      expect(ask({ mix: [{ substance, amount_mol: 0.01 }] }).pH).toBeTypeOf('number');
    },
  );
  test('open to a gas', () => {
    const air = ask({ mix: [], co2: { partialPressure_atm: 4.2e-4 } });
    expect(Math.abs(air.pH! - 5.6)).toBeLessThan(0.02);
  });
  test('outside its range it says so', () => {
    expect(ask({ mix: [{ substance: 'HCl', amount_mol: 5 }] }).warnings!.length).toBeGreaterThan(0);
  });
});

describe('errors name the field and the nearest word', () => {
  test.each([
    ['not json', /no JSON/],
    ['[1]', /object/],
    ['null', /object/],
    [{ id: 7, mix: [{ substance: 'sodium chlorid', amount_mol: 1 }] }, /Did you mean 'sodium chloride'/],
    [{ id: 7, mix: [{ substance: 'NaCl', amount_mol: -1 }] }, /mix\[0\]\.amount_mol .* found -1/],
    [{ id: 7, mix: [{ substance: 'NaCl' }] }, /mix\[0\]\.amount_mol/],
    [{ id: 7, mix: [{ amount_mol: 1 }] }, /no substance/],
    [{ id: 7, mix: 'NaCl' }, /mix is a list/],
    [{ id: 7, mix: [], model: 'reel' }, /model is 'real' or 'textbook'/],
    [{ id: 7, mix: [], temperature_C: 99 }, /temperature_C .* 0 to 60; found 99/],
    [{ id: 7, mix: [], volume_L: 0 }, /volume_L is a number of litres above 0; found 0/],
    [{ id: 7, mix: [], path_cm: -5 }, /path_cm/],
    [{ id: 7, mix: [], indicators: [{ name: 'bromthymol blue', amount_mol: 1 }] }, /'bromothymol blue'/],
    [{ id: 7, pKw: 14, volume_L: 1, activity: 'davies', acids: [], ions: [] }, /debyeHuckelA/],
    [{ id: 7, pKw: 14, volume_L: 1, activity: 'sit', acids: [], ions: [] }, /activity/],
    [
      { id: 7, pKw: 14, volume_L: 1, activity: 'none', acids: [{ pKa: [], charge: 0, amount_mol: 1 }] },
      /acids\[0\]\.pKa/,
    ],
    [{ id: 7, pKw: 14, volume_L: 1, activity: 'none', acids: [null] }, /acids\[0\]/],
    [{ id: 7, pKw: 14, volume_L: 1, activity: 'none', ions: [{ charge: 2, amount_mol: 1e9 }] }, /pH/],
  ])('%j', (line, sentence) => {
    const { id, error, pH } = ask(line);
    expect(error).toMatch(sentence);
    expect(pH).toBeUndefined();
    expect(id).toBe(typeof line === 'string' ? null : 7);
  });
});

test('the program answers line by line, in order, and ends well', () => {
  const lines = [
    '{"id":"first","mix":[{"substance":"HCl","amount_mol":0.1}],"model":"textbook"}',
    'broken',
    '',
    '{"id":"last","volume_L":1,"pKw":14,"activity":"none","acids":[],"ions":[]}',
  ];
  const { stdout, status, stderr } = spawnSync('npm', ['run', '-s', 'equilibrate'], {
    cwd: fileURLToPath(new URL('../../..', import.meta.url)),
    input: `${lines.join('\n')}\n`,
    encoding: 'utf8',
  });
  expect(stderr).toBe('');
  expect(status).toBe(0);
  const answers = stdout
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line) as Answer);
  expect(answers.map((a) => a.id)).toEqual(['first', null, 'last']);
  expect(answers[0]!.pH).toBeCloseTo(1, 6);
  expect(answers[2]!.pH).toBeCloseTo(7, 9);
});
