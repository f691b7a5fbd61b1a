/** Moves that keep hands and eyes safe. */
import { join } from '../liquid.ts';
import { LOCAL_RULES } from './hands.ts';
import { define, refuse } from './kinds.ts';

export const wear = define<'wear'>({
  kind: 'wear',
  name: 'Goggles and gloves',
  label: 'Puts goggles or gloves on, or takes them off.',
  key: 'v',
  fields: { what: 'gear', on: 'on' },
  handlesLiquid: false,
  delivers: false,
  offered: () => true,
  check: (at, m) => {
    if ((m.what !== 'goggles' && m.what !== 'gloves') || typeof m.on !== 'boolean')
      return refuse('bad-value', 'Choose goggles or gloves, on or off.');
    return at.scene[m.what] === m.on
      ? refuse('already-so', `The ${m.what} are ${m.on ? 'on' : 'off'} already.`)
      : null;
  },
  perform: (at, m) => ({ scene: { ...at.scene, [m.what]: m.on }, notices: [] }),
  tell: (_at, m) => `${m.what} ${m.on ? 'on' : 'off'}`,
});

export const wipe = define<'wipe'>({
  kind: 'wipe',
  name: 'Wipe up',
  label: 'Wipes up what went beside; the cloth goes to the waste.',
  key: 'y',
  fields: {},
  handlesLiquid: false,
  delivers: false,
  offered: () => true,
  check: (at) =>
    at.scene.spills.length === 0 ? refuse('nothing-to-wipe', 'There is nothing to wipe up.') : null,
  perform: (at) => ({
    scene: {
      ...at.scene,
      waste: at.scene.spills.reduce((sum, s) => join(sum, s.liquid), at.scene.waste),
      spills: [],
    },
    notices: [
      {
        kind: 'said',
        sentence: `Wiped up. Real spills: contain, dilute, wipe, and wash your hands. ${LOCAL_RULES}`,
      },
    ],
  }),
  tell: () => 'spill wiped up',
});
