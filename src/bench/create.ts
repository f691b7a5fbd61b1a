/** The bench before the first move. */
import { bottleOf, liquidOf, nothing } from './liquid.ts';
import { shuffled } from './seed.ts';
import type { BenchSpec, BenchState, Contents, Scene, Vessel, VesselSpec } from './types.ts';

/** The name that `id`'s dealt-out contents have in this run, or null where nothing is dealt out to it. */
export function sampleIn(
  spec: BenchSpec,
  seed: number,
  id: string,
): (Contents & { readonly name: string }) | null {
  for (const sample of spec.samples ?? []) {
    const place = sample.into.indexOf(id);
    if (place >= 0) return shuffled(sample.contents, seed, sample.id)[place] ?? null;
  }
  return null;
}

/** What stands in a vessel or bottle at the start of this run. */
export const contentsOf = (
  spec: BenchSpec,
  seed: number,
  id: string,
  own: Contents | undefined,
): Contents | undefined => sampleIn(spec, seed, id) ?? own;

function vesselAtStart(spec: BenchSpec, seed: number, vessel: VesselSpec): Vessel {
  const liquid = liquidOf(
    contentsOf(spec, seed, vessel.id, vessel.contents),
    spec.temperature_C,
    seed,
    vessel.id,
  );
  const open = vessel.openTo && !vessel.stoppered && liquid.volume_nL > 0;
  return {
    id: vessel.id,
    liquid: open ? { ...liquid, gas: vessel.openTo } : liquid,
    layer: null,
    stirring: vessel.stirrer === 'on',
    stoppered: vessel.stoppered ?? false,
    label: null,
    added: {},
    entered: null,
  };
}

/** The scene that a run begins with; 'start again' leads back to it. */
export function startScene(spec: BenchSpec, seed: number): Scene {
  return {
    vessels: Object.fromEntries(spec.vessels.map((v) => [v.id, vesselAtStart(spec, seed, v)])),
    bottles: Object.fromEntries(
      spec.shelf.map((item) => {
        const dealt = sampleIn(spec, seed, item.id);
        return [item.id, bottleOf(dealt ? { ...item, contents: dealt } : item, spec.temperature_C, seed)];
      }),
    ),
    used: {},
    waste: nothing(spec.temperature_C),
    spills: [],
    probe: { at: null, film: null, carried: null, points: [] },
    goggles: false,
    gloves: false,
  };
}

/**
 * A run without moves.
 * @param options.seed whole number; decides samples, ranges, careful mode's draws and the meter's error
 */
export function createState(spec: BenchSpec, { seed }: { readonly seed: number }): BenchState {
  return {
    spec,
    seed,
    scene: startScene(spec, seed),
    count: 0,
    move: null,
    before: null,
    back: null,
    depth: 0,
    notices: [],
  };
}
