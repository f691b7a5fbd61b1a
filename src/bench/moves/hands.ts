/** What every move does with its hands: find things, take liquid out, put liquid in, measure. */
import { glassware, toleranceOf, type Glass } from '../glassware.ts';
import { concentrationOf, join, sealed, pHOf, take } from '../liquid.ts';
import { mL } from '../precision.ts';
import { triangular, uniform } from '../seed.ts';
import type { Notice, Refusal, Scene, ShelfItem, Vessel, VesselSpec } from '../types.ts';
import { refuse, type Situation } from './kinds.ts';
import type { Solution } from '../../chemistry/types.ts';

/** What clings to emptied glass and to a lifted probe: one drop (common practice, an assumption). */
export const FILM_NL = 50_000;

/** Liquids from this strength on do not spread by themselves in an unstirred glass: pH 3 or less, 11 or more. */
const STRONG_ACID_PH = 3;
const STRONG_BASE_PH = 11;
/** A stream takes this many times its own volume along into the part that is not mixed. */
const ENTRAINED = 4;

export interface Held {
  readonly label: string;
  readonly liquid: Solution;
  readonly item: ShelfItem | null;
  readonly vessel: { readonly state: Vessel; readonly spec: VesselSpec; readonly glass: Glass } | null;
}

export const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null;

export function findVessel(
  at: Situation,
  id: unknown,
): { state: Vessel; spec: VesselSpec; glass: Glass } | null {
  if (typeof id !== 'string' || !Object.hasOwn(at.scene.vessels, id)) return null;
  const spec = at.spec.vessels.find((v) => v.id === id);
  const state = at.scene.vessels[id];
  return spec && state ? { state, spec, glass: glassware[spec.glass] } : null;
}

/** A bottle of the shelf or a vessel; its liquid as it would come out (mixed by pouring). */
export function findSource(at: Situation, id: unknown): Held | null {
  const vessel = findVessel(at, id);
  if (vessel) return { label: vessel.spec.label, liquid: whole(vessel.state), item: null, vessel };
  if (typeof id !== 'string' || !Object.hasOwn(at.scene.bottles, id)) return null;
  const item = at.spec.shelf.find((s) => s.id === id);
  const liquid = at.scene.bottles[id];
  return item && liquid ? { label: item.label, liquid, item, vessel: null } : null;
}

/** A vessel by the learner's label where there is one, a bottle by its own. */
export const nameOf = (at: Situation, id: string): string =>
  (Object.hasOwn(at.scene.vessels, id) ? at.scene.vessels[id]?.label : null) ??
  at.spec.vessels.find((v) => v.id === id)?.label ??
  at.spec.shelf.find((s) => s.id === id)?.label ??
  id;

const wholeMemo = new WeakMap<Vessel, Solution>();
/** Everything in a vessel, as if swirled. */
export function whole(vessel: Vessel): Solution {
  if (!vessel.layer) return vessel.liquid;
  let known = wholeMemo.get(vessel);
  if (!known) wholeMemo.set(vessel, (known = join(vessel.liquid, vessel.layer)));
  return known;
}

export const volumeOf = (vessel: Vessel): number => vessel.liquid.volume_nL + (vessel.layer?.volume_nL ?? 0);

export const withVessel = (scene: Scene, id: string, change: Partial<Vessel>): Scene => ({
  ...scene,
  vessels: { ...scene.vessels, [id]: { ...(scene.vessels[id] as Vessel), ...change } },
});

const count = (table: Vessel['added'], id: string, read_nL: number, drops: number): Vessel['added'] => {
  const before = table[id] ?? { volume_nL: 0, drops: 0 };
  return { ...table, [id]: { volume_nL: before.volume_nL + read_nL, drops: before.drops + drops } };
};

/** Takes a volume out of a bottle or vessel and books it as used. */
export function takeOut(
  at: Situation,
  scene: Scene,
  id: string,
  real_nL: number,
  read_nL: number,
  drops: number,
): { taken: Solution; scene: Scene } {
  const used = count(scene.used, id, read_nL, drops);
  const bottle = scene.bottles[id];
  if (bottle) {
    const { taken, left } = take(bottle, real_nL);
    return { taken, scene: { ...scene, used, bottles: { ...scene.bottles, [id]: left } } };
  }
  const { taken, left } = take(whole(scene.vessels[id] as Vessel), real_nL);
  return {
    taken: sealed(taken, at.spec.model),
    scene: withVessel({ ...scene, used }, id, { liquid: left, layer: null }),
  };
}

/** Whether a liquid of this pH stays apart when it enters the vessel. */
function staysApart(at: Situation, vessel: Vessel, glass: Glass, incoming: Solution): boolean {
  if (vessel.stirring || !glass.canSwirl || vessel.liquid.volume_nL <= FILM_NL) return false;
  if (incoming.volume_nL >= volumeOf(vessel)) return false;
  const pH = pHOf(incoming, at.spec.model);
  if (pH > STRONG_ACID_PH && pH < STRONG_BASE_PH) return false;
  return Math.abs(pH - pHOf(vessel.liquid, at.spec.model)) >= 1;
}

/**
 * Puts liquid into a vessel. A strong solution in an unstirred glass makes a part of its own together with what its stream
 * takes along, until it is swirled.
 */
export function putInto(
  at: Situation,
  scene: Scene,
  id: string,
  incoming: Solution,
  from: string,
  read_nL: number,
  drops: number,
): Scene {
  const vessel = scene.vessels[id] as Vessel;
  const { spec, glass } = findVessel(at, id) as { spec: VesselSpec; glass: Glass };
  const added = count(vessel.added, from, read_nL, drops);
  if (staysApart(at, vessel, glass, incoming)) {
    const half = Math.floor(volumeOf(vessel) / 2);
    const along = Math.max(
      0,
      Math.min(ENTRAINED * incoming.volume_nL, half - (vessel.layer?.volume_nL ?? 0)),
    );
    const { taken, left } = take(vessel.liquid, Math.min(along, vessel.liquid.volume_nL - 1));
    const part = join(sealed(taken, at.spec.model), incoming);
    return withVessel(scene, id, {
      liquid: left,
      layer: vessel.layer ? join(vessel.layer, part) : part,
      added,
    });
  }
  // A weak liquid spreads in the bulk; a part that is not mixed yet stays so until it is swirled or outweighed.
  if (vessel.layer && !vessel.stirring && incoming.volume_nL < volumeOf(vessel)) {
    return withVessel(scene, id, { liquid: settle(vessel, spec, join(vessel.liquid, incoming)), added });
  }
  return withVessel(scene, id, {
    liquid: settle(vessel, spec, join(whole(vessel), incoming)),
    layer: null,
    added,
  });
}

/** Keeps an open glass in equilibrium with its gas. */
export function settle(vessel: Vessel, spec: VesselSpec, liquid: Solution): Solution {
  return spec.openTo && !vessel.stoppered && liquid.volume_nL > 0 ? { ...liquid, gas: spec.openTo } : liquid;
}

/** Swirled or stirred: one liquid, and a probe that stands in it is washed by it. */
export function mixed(at: Situation, scene: Scene, id: string): Scene {
  const vessel = scene.vessels[id] as Vessel;
  const spec = at.spec.vessels.find((v) => v.id === id) as VesselSpec;
  const next = vessel.layer
    ? withVessel(scene, id, { liquid: settle(vessel, spec, whole(vessel)), layer: null })
    : scene;
  return next.probe.at === id && next.probe.carried
    ? { ...next, probe: { ...next.probe, carried: null } }
    : next;
}

// ---------------------------------------------------------------- measuring

/**
 * What is really delivered when so much is read, in nanolitres. Exact unless the bench asks for careful reading.
 * A burette has a calibration of its own for the whole run, so drops don't add up to more than its tolerance; a bottle has
 * its own drop size; every other measurement is drawn from the run's seed and the move's number.
 */
export function delivered(
  at: Situation,
  from: Held,
  fromId: string,
  by: { spec: VesselSpec; glass: Glass },
  read_nL: number,
  drops: number,
  byTool: boolean,
): number {
  if (!at.spec.careful) return read_nL;
  const glass = from.vessel?.glass;
  if (glass?.family === 'burette' && !byTool) {
    const volume = from.liquid.volume_nL;
    const grade = from.vessel?.spec.grade ?? 'B';
    const off =
      buretteError(at.seed, fromId, glass, grade, volume - read_nL) -
      buretteError(at.seed, fromId, glass, grade, volume);
    return Math.max(0, Math.round(read_nL - off * 1e6));
  }
  if (drops > 0)
    return drops * Math.round((read_nL / drops) * (1 + DROP_SPREAD * triangular(at.seed, 'drop', fromId)));
  const measure = !byTool && from.vessel && glass?.tolerance_mL ? from.vessel : by;
  const tolerance = toleranceOf(measure.glass, measure.spec.grade ?? 'B', read_nL / 1e6);
  const off = Math.min(tolerance, read_nL / 2e6) * triangular(at.seed, 'measure', at.number, fromId);
  return Math.max(1, Math.round(read_nL + off * 1e6));
}

/** One dropper's drops are alike; from one dropper to the next they run from 0.03 to 0.07 mL (from memory). */
const DROP_SPREAD = 0.4;

/** Calibration error of a burette at a level, mL: straight lines between draws at every 5 mL, within half its tolerance. */
function buretteError(seed: number, id: string, glass: Glass, grade: 'A' | 'B', volume_nL: number): number {
  const place = Math.max(0, volume_nL) / 5e6;
  const k = Math.floor(place);
  const half = (glass.tolerance_mL?.[grade] ?? 0) / 2;
  const node = (i: number) => half * (2 * uniform(seed, 'burette', id, i) - 1);
  return node(k) + (place - k) * (node(k + 1) - node(k));
}

// ---------------------------------------------------------------- checks

export const wholeNumber = (value: unknown, min: number, max: number): value is number =>
  typeof value === 'number' && Number.isInteger(value) && value >= min && value <= max;

export const MAX_UL = 2_000_000;
export const MAX_DROPS = 2_000;

/** What was given, as far as it can be said. */
export const said = (value: unknown): string =>
  typeof value === 'string' ? `"${value.slice(0, 40)}"` : 'such a thing';

export const unknownThing = (id: unknown): Refusal =>
  refuse('unknown-thing', `There is no ${said(id)} on this bench.`);

export const badVolume = (): Refusal =>
  refuse('bad-value', 'Give a volume in whole microlitres, more than 0 and at most 2000 mL.');

/** Room and stock for a delivery of `real_nL`. */
export function fits(
  from: Held,
  into: { state: Vessel; spec: VesselSpec; glass: Glass },
  real_nL: number,
): Refusal | null {
  if (into.state.stoppered)
    return refuse('stoppered', `${into.spec.label} is stoppered. Take the stopper off first.`);
  if (from.vessel?.state.stoppered)
    return refuse('stoppered', `${from.label} is stoppered. Take the stopper off first.`);
  const stock = from.liquid.volume_nL;
  const room = Math.max(0, Math.round(into.glass.capacity_mL * 1e6) - volumeOf(into.state));
  const possible = Math.floor(Math.min(stock, room) / 1000);
  if (stock === 0) {
    return from.item
      ? refuse('bottle-empty', `The bottle "${from.label}" is empty.`, 0)
      : refuse('vessel-empty', `${from.label} is empty. Pour something into it first.`, 0);
  }
  if (real_nL > stock) {
    return from.item
      ? refuse(
          'bottle-empty',
          `The bottle "${from.label}" holds only ${mL(stock)}. Take at most that.`,
          possible,
        )
      : refuse('vessel-empty', `${from.label} holds only ${mL(stock)}. Take at most that.`, possible);
  }
  if (real_nL > room) {
    const full = `${into.spec.label} is full at ${into.glass.capacity_mL.toFixed(1)} mL.`;
    return refuse(
      'overflow',
      room < 1000 ? `${full} Empty some of it first.` : `${full} At most ${mL(room)} more fits.`,
      possible,
    );
  }
  return null;
}

// ---------------------------------------------------------------- cautions

/** From this concentration of H3O+ or OH- on, skin and eyes are at once in danger (about the corrosive limit of NaOH is 0.5). */
const CORROSIVE_ACID_MOLL = 2;
const CORROSIVE_BASE_MOLL = 0.5;

export const LOCAL_RULES = "Follow your local rules and your school's licensed practice.";

const corrosive = (at: Situation, liquid: Solution): 'acid' | 'base' | null => {
  if (liquid.volume_nL === 0) return null;
  const pH = pHOf(liquid, at.spec.model);
  if (pH < 1 && concentrationOf(liquid, at.spec.model, 1) >= CORROSIVE_ACID_MOLL) return 'acid';
  if (pH > 13 && concentrationOf(liquid, at.spec.model, -1) >= CORROSIVE_BASE_MOLL) return 'base';
  return null;
};

/** Cautions for bringing two liquids together. */
export function cautionsFor(at: Situation, incoming: Solution, present: Solution): Notice[] {
  const found: Notice[] = [];
  const inGlass = corrosive(at, present);
  const coming = corrosive(at, incoming);
  if (inGlass && !coming && present.volume_nL > FILM_NL) {
    const what = inGlass === 'acid' ? 'acid' : 'alkali';
    found.push({
      kind: 'caution',
      sentence: `Watery liquid went into concentrated ${what}: in a real glass it can boil and spit. Always pour ${what} into water, slowly, with stirring. ${LOCAL_RULES}`,
    });
  }
  if (coming) {
    found.push({
      kind: 'caution',
      sentence: `This ${coming === 'acid' ? 'acid' : 'alkali'} is corrosive: goggles and gloves on. If it gets into eyes, rinse at once with plenty of water for 15 minutes or more and get medical help. ${LOCAL_RULES}`,
    });
  }
  return found;
}
