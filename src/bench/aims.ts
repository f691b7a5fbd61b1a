/** Aims: which are met by the state after a completed move. Judged on displayed precision; once met they stay met. */
import { pairsOf } from './pairs.ts';
import { lastStanding } from './apply.ts';
import { buretteReading, glassware, pathOf } from './glassware.ts';
import { colourOf, pHOf } from './liquid.ts';
import { meterTrue } from './meter.ts';
import { volumeOf } from './moves/hands.ts';
import { mLShown, pHShown, shown } from './precision.ts';
import { readVolume } from './read.ts';
import type { AimSpec, BenchSpec, BenchState, Move, Vessel } from './types.ts';

const within = (value: number, min: number | undefined, max: number | undefined): boolean =>
  (min === undefined || value >= min) && (max === undefined || value <= max);

/** Words for one colour differ by how strong it is; 'pale yellow' answers to 'yellow', 'yellow-green' does not. */
const STRENGTHS = ['very pale', 'pale', 'light', 'deep', 'dark', 'strong', 'vivid', 'dull', 'faint'];

export function sameWords(words: string, asked: string): boolean {
  if (words === asked) return true;
  return STRENGTHS.some((strength) => words === `${strength} ${asked}`);
}

/** The vessel where its liquid is one and there is some; aims on pH and colour wait for swirling. */
function settled(state: BenchState, id: string): Vessel | null {
  const vessel = state.scene.vessels[id];
  return vessel && vessel.liquid.volume_nL > 0 && !vessel.layer ? vessel : null;
}

const pHIn = (state: BenchState, id: string): number | null => {
  const vessel = settled(state, id);
  return vessel && pHShown(pHOf(vessel.liquid, state.spec.model));
};

function colourIn(state: BenchState, id: string) {
  const vessel = settled(state, id);
  const spec = state.spec.vessels.find((v) => v.id === id);
  if (!vessel || !spec) return null;
  return colourOf(
    vessel.liquid,
    pathOf(glassware[spec.glass], vessel.liquid.volume_nL / 1e6),
    state.spec.model,
  );
}

function volumeIn(state: BenchState, id: string): number | null {
  const vessel = state.scene.vessels[id];
  const spec = state.spec.vessels.find((v) => v.id === id);
  return vessel && spec ? readVolume(state.spec, glassware[spec.glass], volumeOf(vessel)) : null;
}

const temperatureIn = (state: BenchState, id: string): number | null => {
  const vessel = settled(state, id);
  return vessel && shown(vessel.liquid.temperature_C, 1);
};

function ratioIn(state: BenchState, id: string, family: string): number | null {
  const vessel = settled(state, id);
  if (!vessel) return null;
  const found = pairsOf(vessel.liquid, state.spec.model).filter(
    (p) => p.family === family && p.acid_mmol > 0,
  );
  const nearest = found.reduce<number | null>((best, p) => {
    const ratio = p.base_mmol / p.acid_mmol;
    return best === null || Math.abs(Math.log(ratio)) < Math.abs(Math.log(best)) ? ratio : best;
  }, null);
  return nearest === null ? null : shown(nearest, 2);
}

const quantity = { pH: pHIn, volume: volumeIn, temperature: temperatureIn } as const;
/** Decimals at which two readings are compared. */
const decimals = { pH: 2, volume: 2, temperature: 1 } as const;

/** The moves that stand since the bench was last set up. */
function standing(state: BenchState): Move[] {
  const list: Move[] = [];
  for (
    let s = lastStanding(state);
    s?.move && s.move.kind !== 'startAgain';
    s = s.back && lastStanding(s.back)
  )
    list.push(s.move);
  return list;
}

const touches = (move: Move, vessel: string): boolean =>
  Object.values(move).some((v) => v === vessel || (Array.isArray(v) && v.includes(vessel)));

function holds(state: BenchState, aim: AimSpec, met: ReadonlySet<string>): boolean {
  switch (aim.kind) {
    case 'pH': {
      const pH = pHIn(state, aim.vessel);
      return pH !== null && within(pH, aim.min, aim.max);
    }
    case 'colour': {
      const colour = colourIn(state, aim.vessel);
      return colour !== null && aim.words.some((word) => sameWords(colour.words, word));
    }
    case 'volume': {
      const volume = volumeIn(state, aim.vessel);
      return volume !== null && within(volume, aim.min_mL, aim.max_mL);
    }
    case 'temperature': {
      const t = temperatureIn(state, aim.vessel);
      return t !== null && within(t, aim.min_C, aim.max_C);
    }
    case 'added': {
      const added = state.scene.vessels[aim.vessel]?.added[aim.of];
      return added !== undefined && within(mLShown(added.volume_nL), aim.min_mL, aim.max_mL);
    }
    case 'drops': {
      const added = state.scene.vessels[aim.vessel]?.added[aim.of];
      return added !== undefined && added.drops > 0 && within(added.drops, aim.min, aim.max);
    }
    case 'ratio': {
      const ratio = ratioIn(state, aim.vessel, aim.family);
      return ratio !== null && within(ratio, aim.min, aim.max);
    }
    case 'equal': {
      const [a, b] = aim.vessels.map((id) => quantity[aim.quantity](state, id));
      return a != null && b != null && shown(Math.abs(a - b), decimals[aim.quantity]) <= aim.within;
    }
    case 'calibrated':
      return meterTrue(state);
    case 'reading': {
      const vessel = state.scene.vessels[aim.vessel];
      if (!vessel || vessel.entered === null) return false;
      const spec = state.spec.vessels.find((v) => v.id === aim.vessel);
      if (!spec) return false;
      const truth = buretteReading(glassware[spec.glass], volumeOf(vessel) / 1e6);
      return shown(Math.abs(vessel.entered - truth), 2) <= aim.within_mL;
    }
    case 'waste-pH': {
      const { waste } = state.scene;
      if (waste.volume_nL === 0 || mLShown(waste.volume_nL) < (aim.min_mL ?? 0)) return false;
      return within(pHShown(pHOf(waste, state.spec.model)), aim.min, aim.max);
    }
    case 'did': {
      const done = standing(state).filter(
        (m) => m.kind === aim.move && (!aim.vessel || touches(m, aim.vessel)),
      );
      return done.length >= (aim.times ?? 1);
    }
    case 'used-at-most':
      return (
        aim.with.every((id) => met.has(id)) && mLShown(state.scene.used[aim.of]?.volume_nL ?? 0) <= aim.max_mL
      );
  }
}

/** On which side of an aim's bounds a state lies: -1 below, 1 above, 0 within or where the aim has no bounds. */
export function sideOfAim(state: BenchState, aim: AimSpec): -1 | 0 | 1 {
  const side = (value: number | null, min: number | undefined, max: number | undefined) =>
    value === null ? 0 : min !== undefined && value < min ? -1 : max !== undefined && value > max ? 1 : 0;
  switch (aim.kind) {
    case 'pH':
      return side(pHIn(state, aim.vessel), aim.min, aim.max);
    case 'ratio':
      return side(ratioIn(state, aim.vessel, aim.family), aim.min, aim.max);
    case 'volume':
      return side(volumeIn(state, aim.vessel), aim.min_mL, aim.max_mL);
    case 'equal': {
      const [a, b] = aim.vessels.map((id) => quantity[aim.quantity](state, id));
      return a == null || b == null ? 0 : side(a - b, -aim.within, aim.within);
    }
    default:
      return 0;
  }
}

function withinLimits(state: BenchState, aim: AimSpec): boolean {
  return (aim.limits ?? []).every((limit) => {
    const used = state.scene.used[limit.of];
    return (
      mLShown(used?.volume_nL ?? 0) <= (limit.max_mL ?? Infinity) &&
      (used?.drops ?? 0) <= (limit.max_drops ?? Infinity)
    );
  });
}

/** Aims that have to come first: those named, and in an ordered bench all above. */
function inTurn(spec: BenchSpec, index: number, met: ReadonlySet<string>): boolean {
  const aim = spec.aims[index];
  if (!aim) return false;
  if (!(aim.after ?? []).every((id) => met.has(id))) return false;
  return spec.aimOrder !== 'in-order' || spec.aims.slice(0, index).every((earlier) => met.has(earlier.id));
}

/**
 * The aims that this state meets and that were not met before, in the order of the specification.
 * The start of a run meets nothing: an aim takes at least one move.
 * @param alreadyMet ids met by earlier states of the run; they stay met
 */
export function judge(spec: BenchSpec, state: BenchState, alreadyMet: readonly string[]): string[] {
  if (state.count === 0) return [];
  const met = new Set(alreadyMet);
  const found: string[] = [];
  for (const [index, aim] of spec.aims.entries()) {
    if (met.has(aim.id) || !inTurn(spec, index, met)) continue;
    if (withinLimits(state, aim) && holds(state, aim, met)) {
      met.add(aim.id);
      found.push(aim.id);
    }
  }
  return found;
}

/** The aims met over a whole run, each with the number of the move that met it (1 is the first). */
export function judgeRun(state: BenchState): { readonly id: string; readonly move: number }[] {
  const list: BenchState[] = [];
  for (let s: BenchState | null = state; s; s = s.before) list.push(s);
  const met: { id: string; move: number }[] = [];
  for (const s of list.reverse()) {
    for (const id of judge(
      state.spec,
      s,
      met.map((m) => m.id),
    ))
      met.push({ id, move: s.count });
  }
  return met;
}
