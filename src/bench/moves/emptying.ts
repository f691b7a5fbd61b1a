/** Moves that empty and rinse glass; what comes out goes to the waste. */
import { join, sealed, take } from '../liquid.ts';
import { mL } from '../precision.ts';
import type { Notice, Scene, Vessel, VesselSpec } from '../types.ts';
import { wasteSentence } from '../waste.ts';
import { first } from './deliver.ts';
import {
  FILM_NL,
  findSource,
  nameOf,
  settle,
  takeOut,
  unknownThing,
  volumeOf,
  whole,
  withVessel,
} from './hands.ts';
import { define, refuse, type Situation } from './kinds.ts';
import { must, on, type Found } from './on.ts';

/** What is left on the walls after emptying. */
function emptied(
  at: Situation,
  scene: Scene,
  id: string,
  spec: VesselSpec,
  state: Vessel,
): { scene: Scene; out: Vessel['liquid'] } {
  const all = whole(state);
  const { taken: film, left } = take(all, Math.min(FILM_NL, all.volume_nL));
  return {
    scene: withVessel(scene, id, {
      liquid: settle(state, spec, film),
      layer: null,
      added: {},
      entered: null,
    }),
    out: sealed(left, at.spec.model),
  };
}

const into = (scene: Scene, liquid: Vessel['liquid']): Scene => ({
  ...scene,
  waste: join(scene.waste, liquid),
});

export const discard = define<'discard'>({
  kind: 'discard',
  name: 'Empty into waste',
  label: 'Empties a vessel into the waste bottle; one drop stays on its walls until it is rinsed.',
  key: 'x',
  fields: { vessel: 'vessel' },
  handlesLiquid: true,
  delivers: true,
  offered: () => true,
  check: (at, m) => {
    const found = on(at, m.vessel, true);
    if (!found.ok) return found.refusal;
    const { state, spec } = found.found;
    if (state.stoppered)
      return refuse('stoppered', `${spec.label} is stoppered. Take the stopper off first.`);
    return volumeOf(state) <= FILM_NL
      ? refuse('vessel-empty', `${spec.label} is empty; rinse it if it has to be clean.`)
      : null;
  },
  perform: (at, m) => {
    const { state, spec } = must(at, m.vessel);
    const { scene, out } = emptied(at, at.scene, m.vessel, spec, state);
    const next = into(scene, out);
    return { scene: next, notices: wasteNotice(at, next) };
  },
  tell: (at, m) => `${nameOf(at, m.vessel)} emptied into the waste`,
});

const wasteNotice = (at: Situation, scene: Scene): Notice[] => [
  { kind: 'said', sentence: wasteSentence(scene.waste, at.spec.model) },
];

/** One rinse: a tenth of the glass, 5 mL at the most. */
const rinseVolume = (found: Found): number => Math.min(5e6, Math.round(found.glass.capacity_mL * 1e5));

export const rinse = define<'rinse'>({
  kind: 'rinse',
  name: 'Rinse',
  label: 'Rinses an emptied glass once and lets the rinsing run into the waste.',
  key: 'r',
  fields: { vessel: 'vessel', with: 'source' },
  handlesLiquid: true,
  delivers: true,
  offered: () => true,
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    const { state, spec } = found.found;
    const source = findSource(at, m.with);
    if (!source) return unknownThing(m.with);
    if (m.with === m.vessel)
      return refuse('same-vessel', 'Rinse with a bottle of the shelf, or with another vessel.');
    return first(
      state.stoppered && refuse('stoppered', `${spec.label} is stoppered. Take the stopper off first.`),
      volumeOf(state) > FILM_NL &&
        refuse('wrong-vessel', `${spec.label} still holds ${mL(volumeOf(state))}. Empty it first.`),
      source.liquid.volume_nL < rinseVolume(found.found) &&
        refuse(
          source.item ? 'bottle-empty' : 'vessel-empty',
          `${source.label} holds only ${mL(source.liquid.volume_nL)}; a rinse takes ${mL(rinseVolume(found.found))}.`,
        ),
    );
  },
  perform: (at, m) => {
    const found = must(at, m.vessel);
    const volume = rinseVolume(found);
    const out = takeOut(at, at.scene, m.with, volume, volume, 0);
    const washed: Vessel = { ...found.state, liquid: join(found.state.liquid, out.taken), layer: null };
    const { scene, out: run } = emptied(at, out.scene, m.vessel, found.spec, washed);
    return { scene: into(scene, run), notices: [] };
  },
  tell: (at, m) => `${nameOf(at, m.vessel)} rinsed with ${nameOf(at, m.with)}`,
});
