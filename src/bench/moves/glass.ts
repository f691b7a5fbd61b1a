/** Moves on a single glass: swirl, stir, stopper, warm, bubble, rinse, empty, label, read. */
import { join, sealed, take } from '../liquid.ts';
import { mL, shown } from '../precision.ts';
import type { Notice, Refusal, Scene, Vessel, VesselSpec } from '../types.ts';
import { first, spill } from './deliver.ts';
import {
  FILM_NL,
  findSource,
  findVessel,
  mixed,
  nameOf,
  settle,
  takeOut,
  unknownThing,
  volumeOf,
  whole,
  withVessel,
} from './hands.ts';
import { define, refuse, type Situation } from './kinds.ts';
import { bubbled, GASES } from '../gas.ts';
import { wasteSentence } from '../waste.ts';

type Found = NonNullable<ReturnType<typeof findVessel>>;

/** The vessel, or a refusal; with liquid in it where `wet` asks for some. */
function on(
  at: Situation,
  id: string,
  wet: boolean,
): { ok: true; found: Found } | { ok: false; refusal: Refusal } {
  const found = findVessel(at, id);
  if (!found) return { ok: false, refusal: unknownThing(id) };
  if (wet && volumeOf(found.state) === 0) {
    return {
      ok: false,
      refusal: refuse('vessel-empty', `${found.spec.label} is empty. Pour something into it first.`),
    };
  }
  return { ok: true, found };
}

const must = (at: Situation, id: string): Found => {
  const found = findVessel(at, id);
  if (!found) throw new Error(`no vessel ${id}`);
  return found;
};

/** Swirled this full, a beaker loses a little over its rim. */
const SPILLS_FROM = 0.95;
const SPLASH_NL = 200_000;

export const swirl = define<'swirl'>({
  kind: 'swirl',
  name: 'Swirl',
  label: 'Swirls a vessel until its liquid is one.',
  key: 's',
  fields: { vessel: 'vessel' },
  handlesLiquid: true,
  delivers: false,
  offered: () => true,
  check: (at, m) => {
    const found = on(at, m.vessel, true);
    if (!found.ok) return found.refusal;
    const { glass, spec } = found.found;
    return glass.canSwirl
      ? null
      : refuse('wrong-vessel', `${spec.label} is not for swirling. Mix in a beaker or a flask.`);
  },
  perform: (at, m) => {
    const { state, glass, spec } = must(at, m.vessel);
    const scene = mixed(at, at.scene, m.vessel);
    const brim = glass.capacity_mL * 1e6 * SPILLS_FROM;
    if (state.stoppered || volumeOf(state) <= brim) return { scene, notices: [] };
    const { taken, left } = take(whole(state), SPLASH_NL);
    const after = spill(
      withVessel(scene, m.vessel, { liquid: settle(state, spec, left), layer: null }),
      m.vessel,
      sealed(taken, at.spec.model),
      spec.label,
    );
    return { scene: after.scene, notices: [after.notice] };
  },
  tell: (at, m) => `${nameOf(at, m.vessel)} swirled`,
});

export const stir = define<'stir'>({
  kind: 'stir',
  name: 'Stir',
  label: 'Switches the magnetic stirrer under a vessel on or off.',
  key: 'g',
  fields: { vessel: 'vessel', on: 'on' },
  handlesLiquid: false,
  delivers: false,
  offered: (spec) => spec.vessels.some((v) => v.stirrer !== undefined),
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    const { spec, state } = found.found;
    if (typeof m.on !== 'boolean') return refuse('bad-value', 'Say on or off.');
    if (!spec.stirrer)
      return refuse('wrong-vessel', `There is no stirrer under ${spec.label}. Swirl it instead.`);
    return state.stirring === m.on
      ? refuse('already-so', `The stirrer is ${m.on ? 'on' : 'off'} already.`)
      : null;
  },
  perform: (at, m) => {
    const scene = withVessel(at.scene, m.vessel, { stirring: m.on });
    return { scene: m.on ? mixed(at, scene, m.vessel) : scene, notices: [] };
  },
  tell: (at, m) => `stirrer under ${nameOf(at, m.vessel)} ${m.on ? 'on' : 'off'}`,
});

export const setTemperature = define<'setTemperature'>({
  kind: 'setTemperature',
  name: 'Warm or cool',
  label: 'Brings a vessel to a temperature in a water bath.',
  key: 'w',
  fields: { vessel: 'vessel', temperature_C: 'temperature' },
  handlesLiquid: false,
  delivers: false,
  offered: (spec) => spec.instruments?.thermometer === true || spec.vessels.some((v) => v.thermometer),
  check: (at, m) => {
    const found = on(at, m.vessel, true);
    if (!found.ok) return found.refusal;
    const t = m.temperature_C;
    if (typeof t !== 'number' || !(t >= 0 && t <= 60) || shown(t, 1) !== t) {
      return refuse('bad-value', 'Give a temperature from 0 to 60 °C, in tenths at most.');
    }
    return volumeOf(found.found.state) &&
      found.found.state.liquid.temperature_C === t &&
      !found.found.state.layer
      ? refuse('already-so', `${found.found.spec.label} is at ${t} °C already.`)
      : null;
  },
  perform: (at, m) => {
    const { state } = must(at, m.vessel);
    const warmed = (liquid: Vessel['liquid']) => ({ ...liquid, temperature_C: m.temperature_C });
    return {
      scene: withVessel(at.scene, m.vessel, {
        liquid: warmed(state.liquid),
        layer: state.layer && warmed(state.layer),
      }),
      notices: [],
    };
  },
  tell: (at, m) => `${nameOf(at, m.vessel)} brought to ${m.temperature_C} °C`,
});

export const bubble = define<'bubble'>({
  kind: 'bubble',
  name: 'Bubble gas',
  label: 'Bubbles air, carbon dioxide or nitrogen through a liquid for a time.',
  key: 'o',
  fields: { vessel: 'vessel', gas: 'gas', seconds: 'seconds' },
  handlesLiquid: false,
  delivers: false,
  offered: () => true,
  check: (at, m) => {
    const found = on(at, m.vessel, true);
    if (!found.ok) return found.refusal;
    const { state, spec, glass } = found.found;
    if (!Object.hasOwn(GASES, m.gas))
      return refuse('bad-value', 'The gases are air, carbon dioxide and nitrogen.');
    if (typeof m.seconds !== 'number' || !Number.isInteger(m.seconds) || m.seconds < 1 || m.seconds > 3600) {
      return refuse('bad-value', 'Give a time from 1 to 3600 seconds.');
    }
    if (state.stoppered)
      return refuse('stoppered', `${spec.label} is stoppered. Take the stopper off first.`);
    return glass.family === 'burette' || glass.family === 'pipette' || glass.family === 'waste'
      ? refuse('wrong-vessel', `Gas is not bubbled through ${spec.label}. Use a beaker, flask or tube.`)
      : null;
  },
  perform: (at, m) => {
    const { state, spec } = must(at, m.vessel);
    const scene = mixed(at, at.scene, m.vessel);
    const liquid = bubbled(whole(state), m.gas, m.seconds, at.spec.model);
    return {
      scene: withVessel(scene, m.vessel, { liquid: settle(state, spec, liquid), layer: null }),
      notices: [],
    };
  },
  tell: (at, m) => `${GASES[m.gas].name} bubbled through ${nameOf(at, m.vessel)} for ${m.seconds} s`,
});

export const stopper = define<'stopper'>({
  kind: 'stopper',
  name: 'Stopper',
  label: 'Closes a flask or tube with a stopper, or opens it.',
  key: 'c',
  fields: { vessel: 'vessel', on: 'on' },
  handlesLiquid: false,
  delivers: false,
  offered: (spec) => spec.vessels.some((v) => /^(conical|volumetric|test-tube)/.test(v.glass)),
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    const { spec, glass, state } = found.found;
    if (typeof m.on !== 'boolean') return refuse('bad-value', 'Say on or off.');
    if (!glass.canStopper) return refuse('wrong-vessel', `No stopper fits ${spec.label}.`);
    return state.stoppered === m.on
      ? refuse('already-so', `${spec.label} is ${m.on ? 'closed' : 'open'} already.`)
      : null;
  },
  perform: (at, m) => {
    const { state, spec } = must(at, m.vessel);
    const next: Vessel = { ...state, stoppered: m.on };
    const liquid = m.on ? sealed(state.liquid, at.spec.model) : settle(next, spec, state.liquid);
    return { scene: withVessel(at.scene, m.vessel, { stoppered: m.on, liquid }), notices: [] };
  },
  tell: (at, m) => `${nameOf(at, m.vessel)} ${m.on ? 'closed with its stopper' : 'opened'}`,
});

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

export const LABEL_LENGTH = 40;

export const label = define<'label'>({
  kind: 'label',
  name: 'Label',
  label: 'Writes on the tape of a vessel.',
  key: 'l',
  fields: { vessel: 'vessel', text: 'text' },
  handlesLiquid: false,
  delivers: false,
  offered: () => true,
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    if (typeof m.text !== 'string' || m.text.length > LABEL_LENGTH || hasControl(m.text)) {
      return refuse('bad-value', `Write at most ${LABEL_LENGTH} characters on one line.`);
    }
    return null;
  },
  perform: (at, m) => ({
    scene: withVessel(at.scene, m.vessel, { label: m.text.trim() === '' ? null : m.text.trim() }),
    notices: [],
  }),
  tell: (at, m) =>
    m.text.trim() === ''
      ? `label of ${nameOf(at, m.vessel)} taken off`
      : `${nameOf(at, m.vessel)} labelled "${m.text.trim()}"`,
});

const hasControl = (text: string): boolean =>
  [...text].some((c) => c.charCodeAt(0) < 32 || c.charCodeAt(0) === 127);

export const enterReading = define<'enterReading'>({
  kind: 'enterReading',
  name: 'Enter reading',
  label: "Writes down what the learner reads at a burette's meniscus.",
  key: 'e',
  fields: { vessel: 'burette', value_mL: 'reading' },
  handlesLiquid: false,
  delivers: false,
  offered: (spec) => spec.vessels.some((v) => v.glass === 'burette-50'),
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    const { glass, spec } = found.found;
    if (glass.family !== 'burette')
      return refuse('wrong-vessel', `${spec.label} is no burette; its level is read at its marks.`);
    if (
      typeof m.value_mL !== 'number' ||
      !Number.isFinite(m.value_mL) ||
      m.value_mL < -2 ||
      m.value_mL > glass.nominal_mL
    ) {
      return refuse('bad-value', `A reading of this burette lies between 0 and ${glass.nominal_mL} mL.`);
    }
    return Math.abs(m.value_mL * 20 - Math.round(m.value_mL * 20)) > 1e-6
      ? refuse('bad-value', 'Read a burette to 0.05 mL: the second decimal is 0 or 5.')
      : null;
  },
  perform: (at, m) => ({ scene: withVessel(at.scene, m.vessel, { entered: m.value_mL }), notices: [] }),
  tell: (at, m) => `${nameOf(at, m.vessel)} read: ${m.value_mL.toFixed(2)} mL`,
});
