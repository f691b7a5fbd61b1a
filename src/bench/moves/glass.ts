/** Moves on a single glass: swirl, stir, stopper, warm, bubble. */
import { bubbled, GASES } from '../gas.ts';
import { sealed, take } from '../liquid.ts';
import { shown } from '../precision.ts';
import type { Vessel } from '../types.ts';
import { spill } from './deliver.ts';
import { mixed, nameOf, settle, volumeOf, whole, withVessel } from './hands.ts';
import { define, refuse } from './kinds.ts';
import { must, on } from './on.ts';

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
