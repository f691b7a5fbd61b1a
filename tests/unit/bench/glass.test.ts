import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import {
  buretteReading,
  glassware,
  heightOf,
  levelOf,
  marksOf,
  meniscusOf,
  pathOf,
  toleranceOf,
  widthAt,
  type GlassId,
} from '../../../src/bench/index.ts';

interface Row {
  kind: string;
  ware: string;
  volume_mL: number;
  class_A_mL: number;
  class_B_mL: number | null;
  source_id: string;
}
const data = JSON.parse(
  readFileSync(new URL('../../reference/data/chemistry.json', import.meta.url), 'utf8'),
) as { sections: { title: string; rows: Row[] }[] };
const rows =
  data.sections.find((s) => s.title === 'Glassware')?.rows.filter((r) => r.kind === 'tolerance') ?? [];

describe('glassware', () => {
  // Which published table each family follows: the cylinders ASTM E1272, burettes and flasks ISO, pipettes Fifield's table.
  const tables = {
    cylinder: ['graduated cylinder', 'E1272'],
    burette: ['burette', 'NIITO'],
    volumetric: ['volumetric flask', 'ISO1042'],
    pipette: ['pipette', 'IGHCE'],
  } as const;
  const measuring = Object.values(glassware).filter((g) => g.family in tables);

  test.each(measuring.map((g) => [g.id, g] as const))(
    'R35 %s is as tolerant as its standard says',
    (_id, glass) => {
      const [ware, source] = tables[glass.family as keyof typeof tables];
      const row = rows.find(
        (r) => r.ware === ware && r.source_id === source && r.volume_mL === glass.nominal_mL,
      );
      expect(row, `${ware} ${glass.nominal_mL} mL in ${source}`).toBeDefined();
      expect(toleranceOf(glass, 'A', glass.nominal_mL)).toBe(row?.class_A_mL);
      if (row?.class_B_mL != null)
        expect(toleranceOf(glass, 'B', glass.nominal_mL)).toBeCloseTo(row.class_B_mL, 6);
    },
  );

  test.each(Object.keys(glassware) as GlassId[])(
    '%s: levels rise with the volume, and the profile holds the capacity',
    (id) => {
      const glass = glassware[id];
      let last = 0;
      for (let k = 1; k <= 50; k++) {
        const level = levelOf(glass, (glass.capacity_mL * k) / 50);
        expect(level).toBeGreaterThan(last);
        last = level;
      }
      expect(last).toBeLessThanOrEqual(heightOf(glass));
      expect(pathOf(glass, glass.capacity_mL / 2)).toBeGreaterThan(0.5);
    },
  );

  test.each(['conical-250', 'volumetric-100', 'beaker-100'] as const)(
    '%s: the volume under a level is the integral of its widths',
    (id) => {
      const glass = glassware[id];
      const level = levelOf(glass, glass.capacity_mL * 0.9);
      const n = 20_000;
      let volume = 0;
      for (let i = 0; i < n; i++)
        volume += (Math.PI / 4) * widthAt(glass, ((i + 0.5) * level) / n) ** 2 * (level / n);
      expect(volume).toBeCloseTo(glass.capacity_mL * 0.9, 2);
    },
  );

  test.each([
    [37.65, 'half way between the 12.3 mL mark and the 12.4 mL mark'],
    [37.7, 'at the 12.3 mL mark'],
    [37.68, 'just below the 12.3 mL mark'],
    [37.62, 'just above the 12.4 mL mark'],
    [50.4, 'above the 0.0 mL mark'],
  ])('a burette that holds %d mL has its meniscus %s', (volume, words) => {
    expect(meniscusOf(glassware['burette-50'], volume)).toBe(words);
  });

  test('a 100 mL beaker is looked through 5 cm, and a burette is read from its zero down', () => {
    expect(pathOf(glassware['beaker-100'], 50)).toBe(5);
    expect(buretteReading(glassware['burette-50'], 37.65)).toBeCloseTo(12.35, 9);
    expect(marksOf(glassware['burette-50'])).toHaveLength(501);
    expect(
      marksOf(glassware['beaker-100'])
        .filter((m) => m.numbered)
        .map((m) => m.mL),
    ).toEqual([20, 40, 60, 80, 100]);
  });
});
