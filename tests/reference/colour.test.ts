/** Computed colours: golden values of another program, spectra against published ratios, words against the textbook's. */
import { describe, expect, test } from 'vitest';
import { indicatorData } from '../../src/chemistry/indicatorData.ts';
import { colour, water, type Colour, type Equilibrium, type Species } from '../../src/chemistry/index.ts';
import golden from './data/colour-golden.json' with { type: 'json' };
import source from './data/indicators.json' with { type: 'json' };
import { published } from './published.ts';

/** Short names of the data, in the engine's words. */
const IDS: Readonly<Record<string, string>> = {
  BTB: 'bromothymol-blue',
  MCP: 'm-cresol-purple',
  BPB: 'bromophenol-blue',
  PR: 'phenol-red',
  BCG: 'bromocresol-green',
  BCP: 'bromocresol-purple',
  CR: 'cresol-red',
  TB: 'thymol-blue',
  MR: 'methyl-red',
  MO: 'methyl-orange',
  PP: 'phenolphthalein',
};
const LITRE = water('boiled', 1000);

/** The colour of given shares of an indicator's forms, without an equilibrium in between. */
function seen(id: string, molar: number, path_cm: number, fractions: readonly number[]): Colour {
  const { forms, charge } = indicatorData[id]!;
  const species = fractions.map((share, k): Species => ({
    name: `${id} ${forms[k]!.name}`,
    component: id,
    charge: charge - k,
    amount_mol: molar * share,
  }));
  const equilibrium: Equilibrium = { model: 'textbook', pH: 7, ionicStrength: 0, species, warnings: [] };
  return colour(LITRE, path_cm, equilibrium);
}

/** Absorptivity of one form, L/(mol cm). */
const epsilon = (id: string, form: number, nm: number): number =>
  indicatorData[id]!.forms[form]!.bands.reduce(
    (sum, [nu, eps, sigma]) => sum + eps * Math.exp(-(((1e7 / nm - nu) / sigma) ** 2) / 2),
    0,
  );

test('the bands are those of the data', () => {
  for (const [short, dye] of Object.entries(source.indicators)) {
    const ours = indicatorData[IDS[short]!]!;
    expect(ours.molarMass).toBe(dye.molarMass);
    expect(ours.pKa).toEqual(dye.pKa);
    expect(ours.forms).toEqual(
      dye.forms.map((form) => ({
        name: form.name,
        bands: form.bands.map(({ nu, eps, sigma }) => [nu, eps, sigma]),
      })),
    );
  }
  expect(Object.keys(source.indicators)).toHaveLength(Object.keys(indicatorData).length);
});

// colour-science 0.4.6 with numpy, 1 nm from 360 to 830 nm; 10 nm with whitening stays within 0.0006.
describe('golden values', () => {
  test.each(golden.cases.map((c) => [c.indicator, c.molar, c.fractions.join(' : '), c] as const))(
    '%s %d mol/L, %s',
    (short, _, __, c) => {
      const { xyz } = seen(IDS[short]!, c.molar, c.path_cm, c.fractions);
      c.XYZ.forEach((value, i) => expect(Math.abs(xyz[i]! - value)).toBeLessThan(0.0006));
    },
  );
});

describe('light', () => {
  test('that nothing absorbs is white', () => {
    expect(colour(LITRE, 5, 'textbook')).toMatchObject({
      srgb: [255, 255, 255],
      hex: '#ffffff',
      words: 'colourless',
    });
    expect(seen('methyl-red', 1e-5, 0, [1, 0]).hex).toBe('#ffffff');
  });
  test.each(Object.values(IDS))('%s: twice the strength over half the path is the same', (id) => {
    const forms = indicatorData[id]!.forms.map((_, k) =>
      k === 0 ? 0.4 : 0.6 / (indicatorData[id]!.forms.length - 1),
    );
    const a = seen(id, 1e-5, 4, forms).xyz;
    const b = seen(id, 2e-5, 2, forms).xyz;
    a.forEach((value, i) => expect(b[i]).toBeCloseTo(value, 12));
  });
  test.each(Object.values(IDS))('%s: the more, the darker', (id) => {
    const last = indicatorData[id]!.forms.map((_, k, all) => (k === all.length - 1 ? 1 : 0));
    let Y = Infinity;
    for (const molar of [0, 1e-6, 3e-6, 1e-5, 3e-5, 1e-4]) {
      const now = seen(id, molar, 5, last).xyz[1];
      expect(now).toBeLessThan(Y);
      Y = now;
    }
  });
});

// Where both forms absorb alike, absorbance does not follow pH. Of the spectra that the bands were fitted to; bands are kept as whole
// wavenumbers and absorptivities, which moves a crossing by up to 0.1 nm.
describe('isosbestic points', () => {
  test.each([
    ['bromothymol-blue', 499.3],
    ['m-cresol-purple', 487.6],
    ['bromophenol-blue', 499.0],
    ['phenol-red', 480.5],
    ['methyl-red', 464.8],
    ['methyl-orange', 469.8],
  ])('%s at %d nm', (id, nm) => {
    const crosses = (at: number) => epsilon(id, 0, at) - epsilon(id, 1, at);
    let [low, high] = [nm - 8, nm + 8];
    expect(Math.sign(crosses(low))).not.toBe(Math.sign(crosses(high)));
    for (let i = 0; i < 60; i++) {
      const middle = (low + high) / 2;
      if (Math.sign(crosses(middle)) === Math.sign(crosses(low))) low = middle;
      else high = middle;
    }
    expect(Math.abs(low - nm)).toBeLessThan(0.12);
  });
});

/*
 * A ratio is one of absorbances at the two maxima. The model's maxima of bromocresol purple and cresol red lie a nanometre from the
 * published ones, and ratios on the steep flank of a band follow the wavelength by 3 % a nanometre: they are taken at the model's.
 */
describe('published absorptivity ratios', () => {
  const rows = new Map(
    published<{ dye: string; e2?: number; e3?: number; e3_over_e2?: number; lam1: number; lam2: number }>(
      5,
      'absorptivity_ratios',
    ).map((row) => [row.dye, row]),
  );
  const near = (ours: number, value: number, share = 0.01) =>
    expect(Math.abs(ours / value - 1)).toBeLessThan(share);
  test.each([
    ['bromocresol purple', 'bromocresol-purple', 433, 588],
    ['phenol red', 'phenol-red', 433, 558],
    ['bromophenol blue', 'bromophenol-blue', 436, 590],
  ] as const)('%s: e2 and e3 to 1 %%', (dye, id, nm1, nm2) => {
    const { e2, e3, lam1, lam2 } = rows.get(dye)!;
    expect(Math.abs(nm1 - lam1)).toBeLessThanOrEqual(1);
    expect(Math.abs(nm2 - lam2)).toBeLessThanOrEqual(1);
    near(epsilon(id, 1, nm2) / epsilon(id, 0, nm1), e2!);
    near(epsilon(id, 1, nm1) / epsilon(id, 0, nm1), e3!);
  });
  test('cresol red: e3 over e2 to 1 %', () => {
    near(epsilon('cresol-red', 2, 434) / epsilon('cresol-red', 2, 573), rows.get('cresol red')!.e3_over_e2!);
  });
  // Liu X., Patsavas M.C., Byrne R.H., Environ. Sci. Technol. 45 (2011) 4862: e3/e2 = -0.020813 + 2.60262e-4 T, at 298.15 K.
  test('purified m-cresol purple: e3 over e2 to 1 %', () => {
    near(
      epsilon('m-cresol-purple', 1, 434) / epsilon('m-cresol-purple', 1, 578),
      -0.020813 + 2.60262e-4 * 298.15,
    );
  });
  // Yao W., Byrne R.H., Deep-Sea Res. I 45 (1998): pH = 4.2699 + log((R - 0.00131)/(2.3148 - 0.1299 R)), 444 and 616 nm.
  test('bromocresol green: e2 and e3 to 1 %', () => {
    near(epsilon('bromocresol-green', 1, 616) / epsilon('bromocresol-green', 0, 444), 2.3148);
    near(epsilon('bromocresol-green', 1, 444) / epsilon('bromocresol-green', 0, 444), 0.1299);
  });
});

/*
 * Words: three drops of 0.05 mL of a 0.1 % solution (phenolphthalein 0.5 %) in 50 mL, seen through 5 cm. What the textbook calls a
 * colour (OpenStax Chemistry 2e, section 14.7, text and figure of indicators; cresol red: Patsavas et al. 2013; m-cresol purple from
 * memory), or a neighbour of it: a band at 507 to 558 nm lets blue through, so a dilute 'red' is pink or magenta.
 */
describe("the textbook's word", () => {
  const RED = /red|pink|magenta/;
  const YELLOW = /yellow/;
  const ORANGE = /orange|pink|brown/;
  const GREEN = /green|grey/;
  const BLUE = /blue/;
  const PURPLE = /purple|violet|magenta/;
  // pKa is where both forms are alike in amount; where they look alike in strength is given as the pH of the visible middle.
  test.each([
    ['thymol-blue', 0, RED],
    ['thymol-blue', 1.95, ORANGE],
    ['thymol-blue', 5, YELLOW],
    ['thymol-blue', 8.77, GREEN],
    ['thymol-blue', 13, BLUE],
    ['bromophenol-blue', 1, YELLOW],
    ['bromophenol-blue', 3.83, GREEN],
    ['bromophenol-blue', 8, /blue|violet/],
    ['methyl-orange', 1, RED],
    ['methyl-orange', 3.55, ORANGE],
    ['methyl-orange', 8, /yellow/],
    ['bromocresol-green', 2, YELLOW],
    ['bromocresol-green', 4.8, GREEN],
    ['bromocresol-green', 8, BLUE],
    ['methyl-red', 2, RED],
    ['methyl-red', 5.4, ORANGE],
    ['methyl-red', 9, YELLOW],
    ['bromocresol-purple', 3, YELLOW],
    ['bromocresol-purple', 10, PURPLE],
    ['bromothymol-blue', 4, YELLOW],
    ['bromothymol-blue', 6.98, GREEN],
    ['bromothymol-blue', 10, BLUE],
    ['phenol-red', 5, YELLOW],
    ['phenol-red', 7.6, ORANGE],
    ['phenol-red', 11, RED],
    ['cresol-red', -1, RED],
    ['cresol-red', 1.33, ORANGE],
    ['cresol-red', 4.5, YELLOW],
    ['cresol-red', 7.88, ORANGE],
    ['cresol-red', 12, /red|purple|violet|magenta/],
    ['m-cresol-purple', 5, YELLOW],
    ['m-cresol-purple', 12, PURPLE],
    ['phenolphthalein', 4, /^colourless$/],
    ['phenolphthalein', 8.87, RED],
    ['phenolphthalein', 12, RED],
  ] as const)('%s at pH %d', (id, pH, words) => {
    const { pKa, molarMass } = indicatorData[id]!;
    const weights = [1];
    for (const [k, value] of pKa.entries()) weights.push(weights[k]! * 10 ** (pH - value));
    const sum = weights.reduce((a, b) => a + b);
    const percent = id === 'phenolphthalein' ? 0.5 : 0.1;
    const molar = ((percent * 10) / molarMass) * (0.15 / 50.15);
    expect(
      seen(
        id,
        molar,
        5,
        weights.map((w) => w / sum),
      ).words,
    ).toMatch(words);
  });
});
