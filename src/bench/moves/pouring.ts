/** Moves that bring liquid from one place to another. */
import { marksOf } from '../glassware.ts';
import { mL } from '../precision.ts';
import type { Refusal } from '../types.ts';
import { DROP_UL } from '../types.ts';
import { checkDelivery, deliver, drops_nL, ends, first, type Delivery } from './deliver.ts';
import {
  badVolume,
  findSource,
  findVessel,
  MAX_DROPS,
  MAX_UL,
  nameOf,
  unknownThing,
  volumeOf,
  wholeNumber,
} from './hands.ts';
import { define, refuse, type Situation } from './kinds.ts';
import { shown } from '../precision.ts';

const stream = (from: string, into: string, volume_uL: number): Delivery => ({
  from,
  into,
  read_nL: volume_uL * 1000,
  drops: 0,
  byTip: false,
});
const dripping = (from: string, into: string, drops: number): Delivery => ({
  from,
  into,
  read_nL: drops_nL(drops),
  drops,
  byTip: true,
});

const badDrops = (): Refusal => refuse('bad-value', `Give a whole number of drops from 1 to ${MAX_DROPS}.`);
const plural = (n: number, word: string) => `${n} ${word}${n === 1 ? '' : 's'}`;

/** A burette runs through its tap; a pipette is a move of its own. */
function handPoured(at: Situation, id: string): Refusal | null {
  const family = findVessel(at, id)?.glass.family;
  if (family === 'burette')
    return refuse('wrong-vessel', `${nameOf(at, id)} is clamped to its stand. Open its tap instead.`);
  if (family === 'pipette')
    return refuse('wrong-vessel', `Use the pipette's own move to deliver from ${nameOf(at, id)}.`);
  return null;
}

export const pour = define<'pour'>({
  kind: 'pour',
  name: 'Pour',
  label: 'Pours an exact volume of a bottle or vessel into a vessel.',
  key: 'p',
  fields: { from: 'source', into: 'vessel', volume_uL: 'volume' },
  handlesLiquid: true,
  delivers: true,
  offered: () => true,
  check: (at, m) =>
    !wholeNumber(m.volume_uL, 1, MAX_UL)
      ? badVolume()
      : first(handPoured(at, m.from), checkDelivery(at, stream(m.from, m.into, m.volume_uL))),
  perform: (at, m) => deliver(at, stream(m.from, m.into, m.volume_uL)),
  tell: (at, m) => `${mL(m.volume_uL * 1000)} of ${nameOf(at, m.from)} into ${nameOf(at, m.into)}`,
});

/** What has to be poured for the liquid to stand at the mark, or why not. */
function toMark(
  at: Situation,
  intoId: string,
  mark_mL: number,
): { ok: true; volume_nL: number } | { ok: false; refusal: Refusal } {
  const into = findVessel(at, intoId);
  if (!into) return { ok: false, refusal: unknownThing(intoId) };
  const marks = marksOf(into.glass);
  if (into.glass.scaleFromTop) {
    return {
      ok: false,
      refusal: refuse('wrong-vessel', `${into.spec.label} is filled to its zero mark. Use Fill.`),
    };
  }
  if (!marks.some((mark) => mark.mL === mark_mL)) {
    const nearest = marks.reduce<number | null>(
      (best, mark) =>
        best === null || Math.abs(mark.mL - mark_mL) < Math.abs(best - mark_mL) ? mark.mL : best,
      null,
    );
    return {
      ok: false,
      refusal: refuse(
        'no-such-mark',
        nearest === null
          ? `${into.spec.label} has no marks. Pour a volume instead.`
          : `${into.spec.label} has no mark at ${mark_mL} mL. The nearest is ${nearest} mL.`,
      ),
    };
  }
  const missing = Math.round(mark_mL * 1e6) - volumeOf(into.state);
  if (missing < 1000) {
    return {
      ok: false,
      refusal: refuse('already-so', `${into.spec.label} already stands at ${mark_mL} mL or above it.`),
    };
  }
  return { ok: true, volume_nL: missing };
}

/** The glass that is filled to its mark is what measures. */
const markDelivery = (from: string, into: string, volume_nL: number): Delivery => ({
  from,
  into,
  read_nL: volume_nL,
  drops: 0,
  byTip: true,
  measure: into,
});

export const pourToMark = define<'pourToMark'>({
  kind: 'pourToMark',
  name: 'Pour to a mark',
  label: 'Pours until the liquid stands at a mark of the glass.',
  key: 'm',
  fields: { from: 'source', into: 'vessel', mark_mL: 'mark' },
  handlesLiquid: true,
  delivers: true,
  offered: (spec) =>
    spec.vessels.some((v) => v.glass !== 'waste' && v.glass !== 'test-tube' && v.glass !== 'burette-50'),
  check: (at, m) => {
    if (typeof m.mark_mL !== 'number' || !Number.isFinite(m.mark_mL))
      return refuse('bad-value', 'Give the mark in mL.');
    const need = toMark(at, m.into, m.mark_mL);
    if (!need.ok) return need.refusal;
    return first(handPoured(at, m.from), checkDelivery(at, markDelivery(m.from, m.into, need.volume_nL)));
  },
  perform: (at, m) => {
    const need = toMark(at, m.into, m.mark_mL);
    if (!need.ok) throw new Error(need.refusal.sentence);
    return deliver(at, markDelivery(m.from, m.into, need.volume_nL));
  },
  tell: (at, m) => `${nameOf(at, m.from)} into ${nameOf(at, m.into)}, up to the ${m.mark_mL} mL mark`,
});

const tooFew = (at: Situation, id: string): Refusal | null => {
  const source = findSource(at, id);
  return source?.vessel?.glass.family === 'pipette'
    ? refuse('wrong-vessel', `${source.label} delivers its whole volume at once.`)
    : null;
};

export const drip = define<'drip'>({
  kind: 'drip',
  name: 'Drip',
  label: `Lets drops of ${DROP_UL / 1000} mL fall into a vessel.`,
  key: 'd',
  fields: { from: 'source', into: 'vessel', drops: 'drops' },
  handlesLiquid: true,
  delivers: true,
  offered: () => true,
  check: (at, m) =>
    !wholeNumber(m.drops, 1, MAX_DROPS)
      ? badDrops()
      : first(tooFew(at, m.from), checkDelivery(at, dripping(m.from, m.into, m.drops))),
  perform: (at, m) => deliver(at, dripping(m.from, m.into, m.drops)),
  tell: (at, m) => `${plural(m.drops, 'drop')} of ${nameOf(at, m.from)} into ${nameOf(at, m.into)}`,
});

export const addIndicator = define<'addIndicator'>({
  kind: 'addIndicator',
  name: 'Add indicator',
  label: 'Lets drops of an indicator fall into a vessel.',
  key: 'i',
  fields: { indicator: 'indicator', into: 'vessel', drops: 'drops' },
  handlesLiquid: true,
  delivers: true,
  offered: (spec) => spec.shelf.some((s) => s.kind === 'indicator'),
  check: (at, m) => {
    const item = at.spec.shelf.find((s) => s.id === m.indicator);
    if (!item) return unknownThing(m.indicator);
    if (item.kind !== 'indicator')
      return refuse('wrong-vessel', `${item.label} is no indicator. Pour or drip it.`);
    if (!wholeNumber(m.drops, 1, MAX_DROPS)) return badDrops();
    return checkDelivery(at, dripping(m.indicator, m.into, m.drops));
  },
  perform: (at, m) => deliver(at, dripping(m.indicator, m.into, m.drops)),
  tell: (at, m) => `${plural(m.drops, 'drop')} of ${nameOf(at, m.indicator)} into ${nameOf(at, m.into)}`,
});

/** The same into two vessels, one after the other, as one move: both or neither. */
const bothDeliveries = (m: {
  from: string;
  into: readonly [string, string];
  volume_uL?: number;
  drops?: number;
}): Delivery[] =>
  m.into.map((into) =>
    m.drops === undefined ? stream(m.from, into, m.volume_uL ?? 0) : dripping(m.from, into, m.drops),
  );

export const addToBoth = define<'addToBoth'>({
  kind: 'addToBoth',
  name: 'Add to both',
  label: 'Adds the same to two vessels in one move.',
  key: 'b',
  fields: { from: 'source', into: 'two-vessels', volume_uL: 'volume', drops: 'drops' },
  handlesLiquid: true,
  delivers: true,
  offered: (spec) => spec.vessels.length > 1,
  check: (at, m) => {
    if (!Array.isArray(m.into) || m.into.length !== 2) return refuse('bad-value', 'Choose two vessels.');
    if (m.into[0] === m.into[1]) return refuse('same-vessel', 'Choose two different vessels.');
    if ((m.drops === undefined) === (m.volume_uL === undefined))
      return refuse('bad-value', 'Give a volume or a number of drops.');
    if (m.drops === undefined ? !wholeNumber(m.volume_uL, 1, MAX_UL) : !wholeNumber(m.drops, 1, MAX_DROPS)) {
      return m.drops === undefined ? badVolume() : badDrops();
    }
    if (m.drops === undefined) {
      const byHand = handPoured(at, m.from);
      if (byHand) return byHand;
    }
    const [one, two] = bothDeliveries(m) as [Delivery, Delivery];
    const refusal = checkDelivery(at, one) ?? checkDelivery(at, two);
    if (refusal) return refusal;
    return checkDelivery({ ...at, scene: deliver(at, one).scene }, two);
  },
  perform: (at, m) => {
    const [one, two] = bothDeliveries(m) as [Delivery, Delivery];
    const after = deliver(at, one);
    const both = deliver({ ...at, scene: after.scene }, two);
    return { scene: both.scene, notices: [...after.notices, ...both.notices] };
  },
  tell: (at, m) =>
    `${m.drops === undefined ? mL((m.volume_uL ?? 0) * 1000) : plural(m.drops, 'drop')} of ${nameOf(at, m.from)} into both ${nameOf(at, m.into[0])} and ${nameOf(at, m.into[1])}`,
});

export const dispense = define<'dispense'>({
  kind: 'dispense',
  name: 'Open the tap',
  label: "Lets an exact volume run from a burette's tap.",
  key: 't',
  fields: { burette: 'burette', into: 'vessel', volume_uL: 'volume' },
  handlesLiquid: true,
  delivers: true,
  offered: (spec) => spec.vessels.some((v) => v.glass === 'burette-50'),
  check: (at, m) => {
    const burette = findVessel(at, m.burette);
    if (!burette) return unknownThing(m.burette);
    if (burette.glass.family !== 'burette')
      return refuse('wrong-vessel', `${burette.spec.label} has no tap. Pour from it.`);
    if (!wholeNumber(m.volume_uL, 1, MAX_UL)) return badVolume();
    return checkDelivery(at, { ...stream(m.burette, m.into, m.volume_uL), byTip: true });
  },
  perform: (at, m) => deliver(at, { ...stream(m.burette, m.into, m.volume_uL), byTip: true }),
  tell: (at, m) => `${mL(m.volume_uL * 1000)} from ${nameOf(at, m.burette)} into ${nameOf(at, m.into)}`,
});

export const fill = define<'fill'>({
  kind: 'fill',
  name: 'Fill',
  label: 'Fills a burette to its zero mark, other glass to its topmost mark.',
  key: 'f',
  fields: { from: 'source', into: 'vessel' },
  handlesLiquid: true,
  delivers: true,
  offered: (spec) =>
    spec.vessels.some(
      (v) =>
        v.glass.startsWith('burette') || v.glass.startsWith('volumetric') || v.glass.startsWith('cylinder'),
    ),
  check: (at, m) => {
    const into = findVessel(at, m.into);
    if (!into) return unknownThing(m.into);
    if (!into.glass.marks)
      return refuse('no-such-mark', `${into.spec.label} has no mark to fill to. Pour a volume instead.`);
    const missing = Math.round(into.glass.nominal_mL * 1e6) - volumeOf(into.state);
    if (missing < 1000) return refuse('already-so', `${into.spec.label} is filled already.`);
    return first(handPoured(at, m.from), checkDelivery(at, markDelivery(m.from, m.into, missing)));
  },
  perform: (at, m) => {
    const into = findVessel(at, m.into);
    if (!into) throw new Error(`no vessel ${m.into}`);
    return deliver(
      at,
      markDelivery(m.from, m.into, Math.round(into.glass.nominal_mL * 1e6) - volumeOf(into.state)),
    );
  },
  tell: (at, m) => `${nameOf(at, m.into)} filled with ${nameOf(at, m.from)}`,
});

export const pipette = define<'pipette'>({
  kind: 'pipette',
  name: 'Pipette',
  label: "Carries a pipette's whole volume from one place to another.",
  key: 'k',
  fields: { pipette: 'pipette', from: 'source', into: 'vessel' },
  handlesLiquid: true,
  delivers: true,
  offered: (spec) => spec.vessels.some((v) => v.glass.startsWith('pipette')),
  check: (at, m) => {
    const tool = findVessel(at, m.pipette);
    if (!tool) return unknownThing(m.pipette);
    if (tool.glass.family !== 'pipette') return refuse('wrong-vessel', `${tool.spec.label} is no pipette.`);
    const found = ends(at, m.from, m.into);
    if (!found.ok) return found.refusal;
    return checkDelivery(at, pipetted(at, m));
  },
  perform: (at, m) => deliver(at, pipetted(at, m)),
  tell: (at, m) => `${nameOf(at, m.pipette)}: ${nameOf(at, m.from)} into ${nameOf(at, m.into)}`,
});

const pipetted = (at: Situation, m: { pipette: string; from: string; into: string }): Delivery => {
  const nominal = findVessel(at, m.pipette)?.glass.nominal_mL ?? 0;
  return {
    from: m.from,
    into: m.into,
    read_nL: Math.round(shown(nominal, 3) * 1e6),
    drops: 0,
    byTip: true,
    measure: m.pipette,
  };
};
