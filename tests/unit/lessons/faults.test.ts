import { describe, expect, it } from 'vitest';
import { compile } from '../../../src/lessons/index.ts';
import { block, changed, SOUND } from './lesson.ts';

const file = '90-two-beakers.md';
const question = (yaml: string): string => block('question', yaml);

/** What an author reads, word for word: place, what is wrong, what was found, and what to write. */
const told = (markdown: string): string[] => {
  const result = compile(markdown, { file });
  return result.ok
    ? []
    : result.faults.map(
        ({ line, column, message, found, fix }) =>
          `${line}:${column} ${message}${found === undefined ? '' : ` Found: ${found}`}${fix === undefined ? '' : ` Write: ${fix}`}`,
      );
};

const CASES: readonly (readonly [mistake: string, lesson: string, words: readonly string[]])[] = [
  [
    'a glass mistyped',
    changed('glass: beaker-100', 'glass: beeker-100'),
    [
      "28:5 'vessels[1].glass' cannot be 'beeker-100'. It is one of: beaker-50, beaker-100, beaker-250, beaker-400, conical-100, conical-250, test-tube, cylinder-10, cylinder-25, cylinder-50, cylinder-100, volumetric-50, volumetric-100, volumetric-250, burette-50, pipette-5, pipette-10, pipette-25, pipette-50, waste. Found: glass: beeker-100 Write: glass: beaker-100",
    ],
  ],
  [
    'a unit in a number',
    changed('volume_mL: 100,', 'volume_mL: 100 mL,'),
    [
      "45:17 'shelf[1].contents.volume_mL' has to be a number. Found: volume_mL: 100 mL Write: volume_mL: 100",
    ],
  ],
  [
    'a decimal comma in a number',
    changed('concentration_molL: 0.1 }', 'concentration_molL: "0,1" }'),
    [
      "45:59 'shelf[1].contents.parts[1].concentration_molL' has to be a number. Found: concentration_molL: 0,1 Write: concentration_molL: 0.1",
    ],
  ],
  [
    'a name in the wrong case',
    changed('volume_mL: 100,', 'volume_ml: 100,'),
    [
      "45:17 'shelf[1].contents' has no 'volume_ml'. It has: volume_mL, parts, indicators, water, temperature_C. Found: volume_ml: Write: volume_mL:",
    ],
  ],
  [
    'an American spelling',
    changed('kind: colour', 'kind: color'),
    [
      "47:49 'aims[1].kind' cannot be 'color'. It is one of: pH, colour, volume, temperature, added, drops, ratio, equal, calibrated, reading, waste-pH, did, used-at-most. Found: kind: color Write: kind: colour",
    ],
  ],
  [
    'a model that there is none of',
    changed('model: textbook', 'model: textbok'),
    [
      "5:1 'model' cannot be 'textbok'. It is one of: textbook, real. Found: model: textbok Write: model: textbook",
    ],
  ],
  ['a title missing', changed('title: Two beakers\n', ''), ["2:1 'title' is missing in this front matter."]],
  [
    'minutes beyond reason',
    changed('minutes: 20', 'minutes: 900'),
    ["6:1 'minutes' has to be at most 180. Found: minutes: 900 Write: minutes: 180"],
  ],
  [
    'a text where a list belongs',
    changed('words: [yellow] }', 'words: yellow }'),
    ["47:79 'aims[1].words' has to be a list. Found: words: yellow Write: words: [yellow]"],
  ],
  [
    'an id with a space',
    changed('id: yellow,', 'id: Buffer Yellow,'),
    [
      "47:7 'aims[1].id': an id is small letters, digits and hyphens, starts with a letter and has at most 40 characters. Found: id: Buffer Yellow Write: id: buffer-yellow",
    ],
  ],
  [
    'a substance mistyped',
    changed('substance: HCl,', 'substance: HCll,'),
    ["45:43 There is no substance 'HCll'. Found: HCll Write: substance: HCl"],
  ],
  [
    'an indicator mistyped',
    changed('indicator: bromocresol-green', 'indicator: bromcresol-green'),
    [
      "30:62 There is no indicator 'bromcresol-green'. Found: bromcresol-green Write: indicator: bromocresol-green",
    ],
  ],
  [
    'an aim for a vessel that is not there',
    changed('vessel: buffer, words', 'vessel: bufer, words'),
    [
      "47:63 The aim 'yellow' names the vessel 'bufer', which this bench does not have. Found: bufer Write: vessel: buffer",
    ],
  ],
  [
    'a prediction for a bench that is not there',
    changed('bench: pour', 'bench: poor'),
    ["11:1 There is no bench 'poor' for this prediction. Found: poor Write: bench: pour"],
  ],
  [
    'a field of a prediction mistyped',
    changed('observe:', 'obsrve:'),
    [
      "18:1 A prediction has no 'obsrve'. It has: id, bench, ask, options, observe, outcome. Found: obsrve: Write: observe:",
    ],
  ],
  [
    'an option missing for what the bench answers',
    changed('first: water', 'first: together'),
    [
      "11:1 The outcome of this prediction cannot be computed. The bench answers 'water', but no option has 'first: water'.",
    ],
  ],
  [
    'an id used twice',
    changed('id: which', 'id: dilute'),
    [
      "63:1 The id 'dilute' was used already in line 52. Progress hangs on ids: choose another. Found: dilute",
    ],
  ],
  [
    'a box that there is none of',
    SOUND + '\n:::warning\nHot.\n:::\n',
    ["72:1 There is no box ':::warning'. There are: :::caution, :::aside. Found: :::warning"],
  ],
  [
    'raw HTML',
    SOUND + '\n<b>Hot</b>\n',
    ['72:1 Raw HTML is not used in a lesson. Write it in Markdown. Found: <b>'],
  ],
  [
    'a heading of the first level',
    SOUND + '\n# Hot\n',
    ["72:1 The title stands in the front matter. Start the text's headings with two signs. Write: ## …"],
  ],
  [
    'a picture from elsewhere',
    SOUND + '\n![A beaker](https://pictures.example/beaker.png)\n',
    [
      '72:1 A picture has to stand beside the lesson; foreign addresses are not loaded. Found: https://pictures.example/beaker.png Write: ![A beaker](picture.png)',
    ],
  ],
  [
    'a picture without words',
    SOUND + '\n![](beaker.png)\n',
    ['72:1 Say in words what the picture shows. Write: ![What it shows](beaker.png)'],
  ],
  [
    'a link that runs a script',
    SOUND + '\n[press](javascript:alert(1))\n',
    ['72:1 A link starts with https:// or with a / for a page of ours. Found: javascript:alert(1)'],
  ],
  [
    'a block inside a list',
    SOUND + '\n- item\n\n  ```question\n  id: x\n  ```\n',
    ['74:3 A question block has to start at the left margin, outside of lists and boxes.'],
  ],
  [
    'a quantity of a substance mistyped',
    SOUND + '\n`= pH(50 mL of 0.10 mol/L CH3COOHH)`\n',
    ["72:1 There is no substance 'CH3COOHH'. Found: CH3COOHH Write: CH3COOH"],
  ],
  [
    'a quantity without "of"',
    SOUND + '\n`= pH(50 mL 0.10 mol/L HCl)`\n',
    [
      "72:1 '50 mL 0.10 mol/L HCl' is not a portion: a volume, 'of', and what it is of. Found: 50 mL 0.10 mol/L HCl Write: 50 mL of 0.10 mol/L HCl",
    ],
  ],
  [
    'a quantity in the wrong case',
    SOUND + '\n`= ph(50 mL of water)`\n',
    [
      "72:1 There is no 'ph(…)'. There are: lg, ln, sqrt, abs, pH, volume, conc, amount, share, ratio, pKa, drops, own. Found: ph Write: pH(…)",
    ],
  ],
  [
    'a quantity with a unit mistyped',
    SOUND + '\n`= 5 in mol/l`\n',
    [
      "72:1 There is no unit 'mol/l'. There are: mol/L, mmol/L, µmol/L, mol, mmol, µmol, L, mL, µL, %, drops, g, g/L, g/mol, °C, times. Found: mol/l Write: in mol/L",
    ],
  ],
  [
    'a quantity of a vessel that is not there',
    SOUND + '\n`= pH(vessel bufer on pour)`\n',
    ["72:1 The bench 'pour' has no vessel 'bufer'. Found: bufer Write: buffer"],
  ],
  ['a quantity that ends early', SOUND + '\n`= 2 *`\n', ["72:1 '2 *' ends too early. Found: 2 *"]],
  [
    'a question of no kind',
    question('id: q1\nkind: multiple\nask: Which?'),
    [
      "74:1 'kind' cannot be 'multiple'. It is one of: choice, numeric, order, match, explain. Found: kind: multiple",
    ],
  ],
  [
    'a question without a right option',
    question(
      'id: q1\nkind: choice\nask: Which?\noptions:\n  - { id: a, text: A, feedback: No. }\n  - { id: b, text: B, feedback: No. }',
    ),
    ['76:1 No option of this question is right. Write: right: true'],
  ],
  [
    'a misconception that there is none of',
    question(
      'id: q1\nkind: choice\nask: Which?\noptions:\n  - { id: a, text: A, right: true, feedback: Yes. }\n  - { id: b, text: B, misconception: M99, feedback: No. }',
    ),
    [
      "78:23 'options[2].misconception' cannot be 'M99'. It is one of: M1, M2, M3, M4, M5, M6, M7, M8, M9, M10, M11, M12, M13, M14, M15, M16, M17, M18, M19, M20, M21, M22, M23. Found: misconception: M99 Write: misconception: M9",
    ],
  ],
  [
    'a key that cannot be given with its digits',
    question(
      'id: q1\nkind: numeric\nask: What?\nmixture: 50 mL of 0.10 mol/L CH3COOH\ndecimals: 0\nsolution: So.',
    ),
    ['73:1 The key is 2.88: with 0 decimals it cannot be given within the tolerance. Write: decimals: 1'],
  ],
  [
    'a wrong method too near the key',
    question(
      'id: q1\nkind: numeric\nask: What?\nmixture: 50 mL of 0.10 mol/L CH3COOH and 0.10 mol/L CH3COONa\nwrong: [pKa-for-pH]\nsolution: So.',
    ),
    [
      "77:9 The wrong method 'pKa-for-pH' gives 4.76, the key is 4.76: too near to tell them apart. Found: pKa-for-pH",
    ],
  ],
  [
    'a wrong method that does not apply',
    question(
      'id: q1\nkind: numeric\nask: What?\nmixture: 50 mL of 0.10 mol/L HCl\nwrong: [ratio-inverted]\nsolution: So.',
    ),
    ["77:9 The wrong method 'ratio-inverted' gives no number here: take it out. Found: ratio-inverted"],
  ],
  [
    'a wrong method mistyped',
    question(
      'id: q1\nkind: numeric\nask: What?\nmixture: 50 mL of 0.10 mol/L HCl\nwrong: [sign-losst]\nsolution: So.',
    ),
    [
      "77:9 'wrong[1]' cannot be 'sign-losst'. It is one of: strong-for-weak, root-forgotten, volume-forgotten, reaction-forgotten, addition-forgotten, sides-swapped, ratio-inverted, pKa-for-pH, pOH-for-pH, sign-lost, natural-logarithm, concentration-for-pH, pH-seven, thousand-times, thousandth, ten-times, tenth. Found: sign-losst Write: sign-lost",
    ],
  ],
  [
    'a value that does not vary',
    question(
      'id: q1\nkind: numeric\nask: What?\nvary: { c: [0.1, 0.2] }\nmixture: 50 mL of d mol/L HCl\nsolution: So.',
    ),
    ["77:1 There is no value called 'd' under 'vary'. There are: c. Found: d Write: c"],
  ],
  [
    'too many variants',
    question(
      'id: q1\nkind: numeric\nask: What?\nvary: { a: [1,2,3,4,5,6,7,8,9,10,11], b: [1,2,3,4,5,6,7,8,9,10,11], c: [1,2,3,4,5,6,7,8,9,10,11] }\nkey: a + b + c\nsolution: So.',
    ),
    ['76:1 This question has more than 1000 variants: list fewer values.'],
  ],
  [
    'a worked example without steps',
    question(
      'id: q1\nkind: numeric\nask: What?\nmixture: 50 mL of 0.10 mol/L HCl\nhelp: example\nsolution: So.',
    ),
    [
      "77:1 'help: example' shows steps, and there are none. Found: help: example Write: steps:",
      "77:1 A worked example shows other values: list at least two under 'vary'. Found: help: example Write: vary:",
    ],
  ],
  [
    'YAML that is not right',
    question('id: q1\nkind: numeric\n  ask: What?'),
    ['74:7 This question is not right YAML: Nested mappings are not allowed in compact mappings.'],
  ],
  [
    'an alias',
    question('id: &a q1\nkind: explain\nask: *a\nmodel: M\npoints: [P]'),
    ['73:5 Anchors and aliases (& and *) are not used in a question: write the value out. Found: &a'],
  ],
  [
    'no front matter',
    'Text alone.\n',
    ['1:1 A lesson starts with front matter between two lines of three hyphens. Write: ---'],
  ],
];

describe('an author reads what is wrong and what to write', () => {
  it('nothing, where nothing is wrong', () => expect(told(SOUND)).toEqual([]));
  it.each(CASES)('%s', (_, lesson, words) => expect(told(lesson)).toEqual(words));
});
