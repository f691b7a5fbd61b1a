/** Moves of the hand-held pH meter: dip, lift, rinse, calibrate. */
import { fitOf, rawReading } from '../meter.ts';
import { join, sealed, take } from '../liquid.ts';
import type { Scene } from '../types.ts';
import {
  FILM_NL,
  findVessel,
  mixed,
  nameOf,
  settle,
  unknownThing,
  volumeOf,
  whole,
  withVessel,
} from './hands.ts';
import { define, refuse, type Situation } from './kinds.ts';

const noMeter = (at: Situation) =>
  at.spec.instruments?.meter ? null : refuse('no-probe', 'There is no hand-held pH meter on this bench.');

/** Lifted out of a liquid, the probe takes a film of it along. */
function lifted(at: Situation, scene: Scene): Scene {
  const { at: id } = scene.probe;
  const vessel = id === null ? undefined : scene.vessels[id];
  if (id === null || !vessel) return scene;
  const spec = at.spec.vessels.find((v) => v.id === id);
  const all = whole(vessel);
  const { taken, left } = take(all, Math.min(FILM_NL, all.volume_nL));
  const next = spec ? withVessel(scene, id, { liquid: settle(vessel, spec, left), layer: null }) : scene;
  return {
    ...next,
    probe: {
      ...scene.probe,
      at: null,
      carried: null,
      film: taken.volume_nL > 0 ? sealed(taken, at.spec.model) : null,
    },
  };
}

export const dipProbe = define<'dipProbe'>({
  kind: 'dipProbe',
  name: 'Dip the probe',
  label: 'Puts the pH probe into a vessel; a film of its last liquid goes with it unless it was rinsed.',
  key: 'h',
  fields: { vessel: 'vessel' },
  handlesLiquid: true,
  delivers: false,
  offered: (spec) => spec.instruments?.meter !== undefined,
  check: (at, m) => {
    const none = noMeter(at);
    if (none) return none;
    const found = findVessel(at, m.vessel);
    if (!found) return unknownThing(m.vessel);
    const { glass, spec, state } = found;
    if (glass.family === 'burette' || glass.family === 'pipette' || glass.family === 'volumetric') {
      return refuse('wrong-vessel', `The probe does not go into ${spec.label}. Pour some into a beaker.`);
    }
    if (state.stoppered)
      return refuse('stoppered', `${spec.label} is stoppered. Take the stopper off first.`);
    if (at.scene.probe.at === m.vessel)
      return refuse('already-so', `The probe stands in ${spec.label} already.`);
    if (volumeOf(state) <= FILM_NL)
      return refuse('vessel-empty', `${spec.label} is empty. Pour something into it first.`);
    const film = at.scene.probe.film;
    return film && volumeOf(state) + film.volume_nL > glass.capacity_mL * 1e6
      ? refuse('overflow', `${spec.label} is full to the brim. Take some out before you dip the probe.`)
      : null;
  },
  perform: (at, m) => {
    const scene = lifted(at, at.scene);
    const vessel = scene.vessels[m.vessel];
    const spec = at.spec.vessels.find((v) => v.id === m.vessel);
    if (!vessel || !spec) throw new Error(`no vessel ${m.vessel}`);
    const { film } = scene.probe;
    const wetted = film
      ? withVessel(scene, m.vessel, { liquid: settle(vessel, spec, join(vessel.liquid, film)) })
      : scene;
    const next = { ...wetted, probe: { ...wetted.probe, at: m.vessel, film: null, carried: film } };
    return { scene: vessel.stirring ? mixed(at, next, m.vessel) : next, notices: [] };
  },
  tell: (at, m) => `probe into ${nameOf(at, m.vessel)}`,
});

export const liftProbe = define<'liftProbe'>({
  kind: 'liftProbe',
  name: 'Lift the probe',
  label: 'Takes the pH probe out and hangs it on its clip, wet.',
  key: 'j',
  fields: {},
  handlesLiquid: true,
  delivers: false,
  offered: (spec) => spec.instruments?.meter !== undefined,
  check: (at) =>
    noMeter(at) ??
    (at.scene.probe.at === null ? refuse('already-so', 'The probe hangs on its clip already.') : null),
  perform: (at) => ({ scene: lifted(at, at.scene), notices: [] }),
  tell: () => 'probe lifted',
});

export const rinseProbe = define<'rinseProbe'>({
  kind: 'rinseProbe',
  name: 'Rinse the probe',
  label: 'Rinses the lifted probe with water over the waste.',
  key: 'n',
  fields: {},
  handlesLiquid: true,
  delivers: false,
  offered: (spec) => spec.instruments?.meter !== undefined,
  check: (at) =>
    noMeter(at) ??
    (at.scene.probe.at !== null
      ? refuse('wrong-vessel', 'Lift the probe first; rinse it over the waste.')
      : at.scene.probe.film === null
        ? refuse('already-so', 'The probe is clean.')
        : null),
  perform: (at) => {
    const { probe, waste } = at.scene;
    return {
      scene: {
        ...at.scene,
        waste: probe.film ? join(waste, probe.film) : waste,
        probe: { ...probe, film: null },
      },
      notices: [],
    };
  },
  tell: () => 'probe rinsed',
});

/** Further from the standard than this, the meter does not believe that it stands in it. */
const MAX_OFF = 1;

export const calibrate = define<'calibrate'>({
  kind: 'calibrate',
  name: 'Calibrate',
  label: 'Tells the meter the pH of the standard that the probe stands in.',
  key: 'a',
  fields: { value_pH: 'pH' },
  handlesLiquid: false,
  delivers: false,
  offered: (spec) => spec.instruments?.meter?.calibration === 'ask',
  check: (at, m) => {
    const none = noMeter(at);
    if (none) return none;
    if (at.spec.instruments?.meter?.calibration !== 'ask')
      return refuse('already-so', 'This meter is calibrated already.');
    const standards = at.spec.shelf.flatMap((s) => (s.standard_pH === undefined ? [] : [s.standard_pH]));
    if (!standards.includes(m.value_pH)) {
      return refuse(
        'bad-value',
        `Choose the pH printed on a standard: ${standards.map((v) => v.toFixed(2)).join(' or ')}.`,
      );
    }
    const raw = rawReading(at);
    if (raw === null) return refuse('no-probe', 'Put the probe into a standard first.');
    return Math.abs(raw - m.value_pH) > MAX_OFF
      ? refuse(
          'calibration-failed',
          `The meter can't take ${m.value_pH.toFixed(2)} here: its probe gives ${raw.toFixed(2)}. Is this the right standard? Rinse the probe and try again.`,
        )
      : null;
  },
  perform: (at, m) => {
    const { probe } = at.scene;
    const point = { value_pH: m.value_pH, raw_pH: rawReading(at) ?? m.value_pH };
    const others = probe.points.filter((p) => p.value_pH !== m.value_pH).slice(-1);
    const points = [...others, point];
    const done = fitOf(points).calibrated;
    return {
      scene: { ...at.scene, probe: { ...probe, points } },
      notices: [
        {
          kind: 'said',
          sentence: done
            ? 'Two standards are set: the meter is calibrated.'
            : `The meter took ${m.value_pH.toFixed(2)}. Rinse the probe and set a second standard.`,
        },
      ],
    };
  },
  tell: (_at, m) => `meter set to ${m.value_pH.toFixed(2)}`,
});
