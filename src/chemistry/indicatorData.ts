/** Absorption bands of the indicators' forms: [wavenumber cm-1, eps L/(mol cm), sigma cm-1]; eps(nu) = sum eps exp(-((nu - nu0)/sigma)^2/2). */
export interface IndicatorData {
  readonly name: string;
  readonly molarMass: number;
  readonly pKa: readonly number[];
  readonly charge: number;
  readonly forms: readonly {
    readonly name: string;
    readonly bands: readonly (readonly [number, number, number])[];
  }[];
}
export const indicatorData: Readonly<Record<string, IndicatorData>> = {
  'bromothymol-blue': {
    name: 'bromothymol blue',
    molarMass: 624.38,
    pKa: [7.1],
    charge: -1,
    forms: [
      {
        name: 'HI-',
        bands: [
          [21156, 4461, 1389],
          [23059, 9015, 1647],
          [25690, 7586, 2543],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [16000, 21917, 595],
          [16967, 17241, 929],
          [18545, 8476, 1549],
          [25522, 7915, 1671],
        ],
      },
    ],
  },
  'm-cresol-purple': {
    name: 'm-cresol purple',
    molarMass: 382.43,
    pKa: [8.66],
    charge: -1,
    forms: [
      {
        name: 'HI-',
        bands: [
          [20924, 2973, 1251],
          [22738, 10211, 1611],
          [25320, 9602, 2672],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [17068, 23218, 611],
          [18023, 18429, 967],
          [19713, 8871, 1678],
          [26743, 11938, 1647],
        ],
      },
    ],
  },
  'bromophenol-blue': {
    name: 'bromophenol blue',
    molarMass: 669.96,
    pKa: [3.9],
    charge: -1,
    forms: [
      {
        name: 'HI-',
        bands: [
          [20958, 4946, 1129],
          [22636, 19373, 1485],
          [24675, 16501, 2241],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [16852, 48252, 400],
          [17628, 30757, 766],
          [18986, 12541, 1405],
          [28983, 18237, 2412],
        ],
      },
    ],
  },
  'phenol-red': {
    name: 'phenol red',
    molarMass: 354.38,
    pKa: [8.03],
    charge: -1,
    forms: [
      {
        name: 'HI-',
        bands: [
          [20827, 2457, 983],
          [22519, 12942, 1386],
          [24826, 12668, 1921],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [17813, 36459, 404],
          [18559, 24100, 757],
          [19900, 10908, 1344],
          [23897, 1619, 3000],
        ],
      },
    ],
  },
  'bromocresol-green': {
    name: 'bromocresol green',
    molarMass: 698.01,
    pKa: [4.9],
    charge: -1,
    forms: [
      {
        name: 'HI-',
        bands: [
          [20545, 1358, 1129],
          [22223, 5319, 1485],
          [24262, 4530, 2241],
          [20584, 2598, 1389],
          [22487, 5251, 1647],
          [25117, 4419, 2543],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [16136, 13738, 400],
          [16912, 8757, 766],
          [18270, 3571, 1405],
          [16000, 12585, 595],
          [16967, 9901, 929],
          [18545, 4867, 1549],
          [28267, 8125, 2412],
          [25522, 8055, 1671],
        ],
      },
    ],
  },
  'bromocresol-purple': {
    name: 'bromocresol purple',
    molarMass: 540.22,
    pKa: [6.49],
    charge: -1,
    forms: [
      {
        name: 'HI-',
        bands: [
          [20827, 1385, 983],
          [22519, 7295, 1386],
          [24826, 7141, 1921],
          [21117, 1770, 1129],
          [22795, 6934, 1485],
          [24834, 5906, 2241],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [16899, 21482, 404],
          [17644, 14200, 757],
          [18986, 6427, 1344],
          [16909, 22185, 400],
          [17685, 14141, 766],
          [19043, 5766, 1405],
          [22982, 223, 3000],
          [29040, 951, 2412],
        ],
      },
    ],
  },
  'cresol-red': {
    name: 'cresol red',
    molarMass: 382.43,
    pKa: [1.1, 8.2],
    charge: 0,
    forms: [
      {
        name: 'H2I',
        bands: [
          [19056, 24313, 1000],
          [20756, 13676, 1450],
          [25056, 4255, 2200],
        ],
      },
      {
        name: 'HI-',
        bands: [
          [20774, 1136, 983],
          [22466, 5983, 1386],
          [24773, 5856, 1921],
          [21064, 1452, 1129],
          [22742, 5687, 1485],
          [24781, 4844, 2241],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [17344, 17203, 404],
          [18089, 11372, 757],
          [19431, 5147, 1344],
          [17355, 17766, 400],
          [18131, 11325, 766],
          [19488, 4617, 1405],
          [23427, 1245, 3000],
          [29486, 5299, 2412],
        ],
      },
    ],
  },
  'thymol-blue': {
    name: 'thymol blue',
    molarMass: 466.59,
    pKa: [1.65, 8.92],
    charge: 0,
    forms: [
      {
        name: 'H2I',
        bands: [
          [18132, 24313, 1000],
          [19832, 13676, 1450],
          [24132, 4255, 2200],
        ],
      },
      {
        name: 'HI-',
        bands: [
          [20871, 1359, 1251],
          [22685, 4669, 1611],
          [25267, 4390, 2672],
          [21050, 2336, 1389],
          [22953, 4721, 1647],
          [25583, 3973, 2543],
        ],
      },
      {
        name: 'I2-',
        bands: [
          [16546, 11399, 611],
          [17501, 9048, 967],
          [19191, 4355, 1678],
          [16545, 11664, 595],
          [17512, 9176, 929],
          [19090, 4511, 1549],
          [26221, 5636, 1647],
          [26067, 4722, 1671],
        ],
      },
    ],
  },
  'methyl-red': {
    name: 'methyl red',
    molarMass: 269.3,
    pKa: [5.05],
    charge: 0,
    forms: [
      {
        name: 'HMR',
        bands: [
          [18714, 28913, 1050],
          [20414, 18070, 1312],
        ],
      },
      {
        name: 'MR-',
        bands: [
          [21278, 3066, 1129],
          [22956, 12011, 1485],
          [24995, 10231, 2241],
        ],
      },
    ],
  },
  'methyl-orange': {
    name: 'methyl orange',
    molarMass: 327.33,
    pKa: [3.46],
    charge: 0,
    forms: [
      {
        name: 'HMO',
        bands: [
          [19424, 33541, 1100],
          [21124, 18867, 1430],
        ],
      },
      {
        name: 'MO-',
        bands: [
          [19574, 4140, 1129],
          [21252, 16215, 1485],
          [23291, 13811, 2241],
        ],
      },
    ],
  },
  phenolphthalein: {
    name: 'phenolphthalein',
    molarMass: 318.32,
    pKa: [9.05, 9.5],
    charge: 0,
    forms: [
      { name: 'H2PP', bands: [] },
      { name: 'HPP-', bands: [] },
      {
        name: 'PP2-',
        bands: [
          [18010, 21570, 404],
          [18755, 14259, 757],
          [20096, 6453, 1344],
          [26738, 7260, 1500],
        ],
      },
    ],
  },
};
