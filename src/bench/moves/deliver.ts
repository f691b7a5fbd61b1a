/** Bringing a volume from one place to another: the shared middle of pour, drip, dispense, pipette and their kin. */
import { mL } from '../precision.ts';
import { uniform } from '../seed.ts';
import type { Notice, Refusal, Scene } from '../types.ts';
import {
  cautionsFor,
  delivered,
  findSource,
  findVessel,
  fits,
  putInto,
  takeOut,
  unknownThing,
  volumeOf,
  whole,
  type Held,
} from './hands.ts';
import { refuse, type Effect, type Situation } from './kinds.ts';
import { take } from '../liquid.ts';

export interface Delivery {
  readonly from: string;
  readonly into: string;
  readonly read_nL: number;
  /** 0 for a stream. */
  readonly drops: number;
  /** Liquid that runs in by a tip does not go beside a narrow neck. */
  readonly byTip: boolean;
  /** The pipette or the marked glass that measures, where it is not the source. */
  readonly measure?: string;
}

export const drops_nL = (drops: number): number => drops * 50_000;

interface Ends {
  readonly from: Held;
  readonly into: NonNullable<ReturnType<typeof findVessel>>;
}

/** Both ends of a delivery, or why there is none. */
export function ends(
  at: Situation,
  fromId: string,
  intoId: string,
): { ok: true; ends: Ends } | { ok: false; refusal: Refusal } {
  const from = findSource(at, fromId);
  if (!from) return { ok: false, refusal: unknownThing(fromId) };
  const into = findVessel(at, intoId);
  if (!into) {
    const bottle = at.spec.shelf.find((s) => s.id === intoId);
    return {
      ok: false,
      refusal: bottle
        ? refuse(
            'wrong-vessel',
            'Nothing goes back into a bottle: it would spoil the rest. Use the waste or another vessel.',
          )
        : unknownThing(intoId),
    };
  }
  if (fromId === intoId)
    return { ok: false, refusal: refuse('same-vessel', 'Choose two different vessels.') };
  if (into.glass.family === 'pipette')
    return {
      ok: false,
      refusal: refuse('wrong-vessel', `${into.spec.label} is filled by its own move, not by pouring.`),
    };
  return { ok: true, ends: { from, into } };
}

/** What really arrives: within stock and room wherever what is read is. */
function real(at: Situation, { from, into }: Ends, d: Delivery): number {
  const tool = d.measure === undefined ? null : findVessel(at, d.measure);
  const drawn = delivered(at, from, d.from, tool ?? into, d.read_nL, d.drops, tool !== null);
  const room = Math.round(into.glass.capacity_mL * 1e6) - volumeOf(into.state);
  const limit = d.read_nL <= room ? room : drawn;
  return d.read_nL <= from.liquid.volume_nL
    ? Math.min(drawn, from.liquid.volume_nL, limit)
    : Math.min(drawn, limit);
}

export function checkDelivery(at: Situation, d: Delivery): Refusal | null {
  const found = ends(at, d.from, d.into);
  if (!found.ok) return found.refusal;
  return fits(found.ends.from, found.ends.into, real(at, found.ends, d));
}

/** A hand may miss a narrow neck without a funnel: one pour in four of a careful bench loses two drops. */
const MISS_ODDS = 0.25;
const MISS_NL = 100_000;

export function deliver(at: Situation, d: Delivery): Effect {
  const found = ends(at, d.from, d.into);
  if (!found.ok) throw new Error(found.refusal.sentence);
  const { from, into } = found.ends;
  const amount = real(at, found.ends, d);
  const out = takeOut(at, at.scene, d.from, amount, d.read_nL, d.drops);
  const notices: Notice[] = cautionsFor(at, from.liquid, whole(into.state));
  let { scene } = out;
  let arriving = out.taken;
  const misses =
    at.spec.careful &&
    into.glass.narrow &&
    !d.byTip &&
    amount > 4 * MISS_NL &&
    uniform(at.seed, 'miss', at.number, d.into) < MISS_ODDS;
  if (misses) {
    const split = take(arriving, MISS_NL);
    arriving = split.left;
    const spilt = spill(scene, d.into, split.taken, into.spec.label);
    scene = spilt.scene;
    notices.push(spilt.notice);
  }
  return { scene: putInto(at, scene, d.into, arriving, d.from, d.read_nL, d.drops), notices };
}

/** Liquid on the bench top. */
export function spill(
  scene: Scene,
  from: string,
  liquid: Scene['waste'],
  label: string,
): { scene: Scene; notice: Notice } {
  return {
    scene: { ...scene, spills: [...scene.spills, { from, liquid }] },
    notice: {
      kind: 'spill',
      sentence: `${mL(liquid.volume_nL)} went beside ${label}. Wipe it up before you go on.`,
    },
  };
}

/** The first refusal of a series of checks. */
export const first = (...checks: readonly (Refusal | null | false | undefined)[]): Refusal | null => {
  for (const found of checks) if (found) return found;
  return null;
};
