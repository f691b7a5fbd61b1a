/** Whether two vessels make a fair comparison: what differs between them besides what is being tested. */
import { readVolume } from './read.ts';
import { glassware, type Glass } from './glassware.ts';
import { pHOf } from './liquid.ts';
import { pairsOf } from './pairs.ts';
import { volumeOf, whole } from './moves/hands.ts';
import { pHShown, shown } from './precision.ts';
import { isHidden } from './hiding.ts';
import type {
  BenchSpec,
  BenchState,
  Contents,
  FairnessTopic,
  Hideable,
  Seen,
  Vessel,
  VesselSpec,
} from './types.ts';
import type { Solution } from '../chemistry/types.ts';

export type DifferenceTopic = FairnessTopic | 'glass';

export interface Difference {
  readonly topic: DifferenceTopic;
  readonly sentence: string;
}

export interface FairnessNote {
  readonly fair: boolean;
  readonly differences: readonly Difference[];
  /** The note as a whole. */
  readonly sentence: string;
}

interface Side {
  readonly id: string;
  readonly label: string;
  readonly glass: Glass;
  readonly spec: VesselSpec;
  readonly vessel: Vessel;
}

/** Two concentrations or amounts that differ by less than this share are prepared alike. */
const ALIKE = 0.01;
const differ = (a: number, b: number): boolean =>
  Math.abs(a - b) > ALIKE * Math.max(Math.abs(a), Math.abs(b));

/** Starting pH values this near look alike with any indicator (a tenth of a colour change). */
const PH_ALIKE = 0.1;

function dyesOf(spec: BenchSpec): ReadonlySet<string> {
  const from = (c: Contents | undefined) => (c?.indicators ?? []).map((d) => d.indicator);
  return new Set([
    ...spec.vessels.flatMap((v) => from(v.contents)),
    ...spec.shelf.flatMap((s) => [...from(s.contents), ...(s.indicator ? [s.indicator.id] : [])]),
    ...(spec.samples ?? []).flatMap((s) => s.contents.flatMap(from)),
  ]);
}

const perLitre = (liquid: Solution, component: string): number =>
  liquid.volume_nL === 0 ? 0 : (liquid.amounts[component] ?? 0) / (liquid.volume_nL / 1e9);

/** Weak acid families with their total concentration; indicators and the trace of carbonate from air left out. */
function families(state: BenchState, liquid: Solution, dyes: ReadonlySet<string>): Map<string, number> {
  const found = new Map<string, number>();
  for (const { family } of pairsOf(liquid, state.spec.model)) {
    const c = perLitre(liquid, family);
    if (!dyes.has(family) && c > 1e-4) found.set(family, c);
  }
  return found;
}

const strength = (c: number): string => `${Number(c.toPrecision(2))} mol/L`;
const named = (a: Side, b: Side, x: string, y: string): string => `${a.label} ${x}, ${b.label} ${y}`;

function volumes(state: BenchState, a: Side, b: Side): Difference[] {
  const [x, y] = [a, b].map((s) => readVolume(state.spec, s.glass, volumeOf(s.vessel))) as [number, number];
  if (x === y) return [];
  return [
    {
      topic: 'volume',
      sentence: `The volumes differ: ${named(a, b, `${x.toFixed(2)} mL`, `${y.toFixed(2)} mL`)}.`,
    },
  ];
}

function indicatorDoses(a: Side, b: Side, dyes: ReadonlySet<string>): Difference[] {
  const [x, y] = [whole(a.vessel), whole(b.vessel)];
  const different = [...dyes].filter((dye) => differ(perLitre(x, dye), perLitre(y, dye)));
  if (different.length === 0) return [];
  const only = different.filter((dye) => (x.amounts[dye] ?? 0) === 0 || (y.amounts[dye] ?? 0) === 0);
  return [
    {
      topic: 'indicator',
      sentence:
        only.length > 0
          ? `Not both hold the same indicator: ${only.join(', ')} is in one of them alone.`
          : `The indicator is not equally strong in both: ${different.join(', ')}.`,
    },
  ];
}

function concentrations(state: BenchState, a: Side, b: Side, dyes: ReadonlySet<string>): Difference[] {
  const [x, y] = [a, b].map((s) => families(state, whole(s.vessel), dyes)) as [
    Map<string, number>,
    Map<string, number>,
  ];
  const total = (m: Map<string, number>) => [...m.values()].reduce((sum, c) => sum + c, 0);
  const [p, q] = [total(x), total(y)];
  if (p === 0 || q === 0 || !differ(p, q)) return [];
  return [
    {
      topic: 'concentration',
      sentence: `The concentrations differ: ${named(a, b, strength(p), strength(q))}.`,
    },
  ];
}

function substances(a: Side, b: Side, dyes: ReadonlySet<string>): Difference[] {
  const kinds = (s: Side) =>
    Object.entries(whole(s.vessel).amounts)
      .flatMap(([id, n]) => (n > 0 && !dyes.has(id) && perLitre(whole(s.vessel), id) > 1e-4 ? [id] : []))
      .sort()
      .join();
  return kinds(a) === kinds(b)
    ? []
    : [{ topic: 'contents', sentence: 'They do not hold the same substances.' }];
}

function starts(state: BenchState, a: Side, b: Side): Difference[] {
  if (volumeOf(a.vessel) === 0 || volumeOf(b.vessel) === 0) return [];
  const [x, y] = [a, b].map((s) => pHShown(pHOf(whole(s.vessel), state.spec.model))) as [number, number];
  return shown(Math.abs(x - y), 2) < PH_ALIKE
    ? []
    : [
        {
          topic: 'starting-pH',
          sentence: `They do not start at the same pH: ${named(a, b, x.toFixed(2), y.toFixed(2))}.`,
        },
      ];
}

function temperatures(a: Side, b: Side): Difference[] {
  const [x, y] = [a, b].map((s) => shown(s.vessel.liquid.temperature_C, 1)) as [number, number];
  return x === y
    ? []
    : [
        {
          topic: 'temperature',
          sentence: `The temperatures differ: ${named(a, b, `${x.toFixed(1)} °C`, `${y.toFixed(1)} °C`)}.`,
        },
      ];
}

const glasses = (a: Side, b: Side): Difference[] =>
  a.spec.glass === b.spec.glass
    ? []
    : [
        {
          topic: 'glass',
          sentence: `They stand in different glass, so the same liquid looks deeper in one: ${named(a, b, a.glass.name, b.glass.name)}.`,
        },
      ];

/** What follows from the thing that is tested is no flaw of the comparison. */
const FOLLOWS: Readonly<Record<FairnessTopic, readonly DifferenceTopic[]>> = {
  contents: ['contents'],
  concentration: ['concentration', 'starting-pH'],
  volume: ['volume'],
  indicator: ['indicator'],
  temperature: ['temperature', 'starting-pH'],
  'starting-pH': ['starting-pH', 'contents'],
};

function sideOf(state: BenchState, id: string): Side | null {
  const spec = state.spec.vessels.find((v) => v.id === id);
  const vessel = state.scene.vessels[id];
  if (!spec || !vessel) return null;
  return { id, label: vessel.label ?? spec.label, glass: glassware[spec.glass], spec, vessel };
}

const HIDDEN_BY: Partial<Record<DifferenceTopic, readonly Hideable[]>> = {
  volume: ['volume'],
  indicator: ['contents'],
  contents: ['contents'],
  concentration: ['contents'],
  'starting-pH': ['pH'],
  temperature: ['temperature'],
};

/**
 * What differs between two vessels besides what is tested. Read it before the first addition: it judges what is in them now.
 * @param testing the one thing in which they may differ
 * @param seen what the reader has earned; what is hidden from them is not compared, and the note says so
 */
export function fairness(
  state: BenchState,
  vessels: readonly [string, string],
  testing: FairnessTopic,
  seen: Seen = {},
): FairnessNote {
  const [a, b] = vessels.map((id) => sideOf(state, id));
  if (!a || !b) return { fair: false, differences: [], sentence: 'There are no two vessels to compare.' };
  const dyes = dyesOf(state.spec);
  const closed = (topic: DifferenceTopic): boolean =>
    (HIDDEN_BY[topic] ?? []).some((what) => vessels.some((id) => isHidden(state.spec, seen, what, id)));
  const differences = [
    ...volumes(state, a, b),
    ...indicatorDoses(a, b, dyes),
    ...substances(a, b, dyes),
    ...concentrations(state, a, b, dyes),
    ...starts(state, a, b),
    ...temperatures(a, b),
    ...glasses(a, b),
  ].filter((d) => !FOLLOWS[testing].includes(d.topic) && !closed(d.topic));
  const partly = (Object.keys(HIDDEN_BY) as DifferenceTopic[]).some(closed)
    ? ' What is hidden was not compared.'
    : '';
  return {
    fair: differences.length === 0,
    differences,
    sentence:
      differences.length === 0
        ? `A fair comparison: ${a.label} and ${b.label} differ only in what is tested.${partly}`
        : `Not fair yet. ${differences.map((d) => d.sentence).join(' ')}${partly}`,
  };
}
