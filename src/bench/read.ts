/** What can be seen of the bench: plain JSON for tags, live region, notebook and the server's answers. */
import type { Solution } from '../chemistry/types.ts';
import { sampleIn } from './create.ts';
import { buretteReading, glassware, levelOf, meniscusOf, pathOf, type Glass } from './glassware.ts';
import { anyHidden, hiddenOf, isHidden } from './hiding.ts';
import { bottleOf, colourOf, drawn, pHOf } from './liquid.ts';
import { displayed, meterCalibrated } from './meter.ts';
import { FILM_NL, volumeOf } from './moves/hands.ts';
import { wasteSentence } from './waste.ts';
import { mL, mLShown, pHShown, shown } from './precision.ts';
import type {
  BenchSpec,
  BenchState,
  BottleReading,
  ColourReading,
  Contents,
  Readings,
  Seen,
  ShelfItem,
  Vessel,
  VesselReading,
  VesselSpec,
} from './types.ts';

/** Path through a shelf bottle, cm: drawn alike for all. */
const BOTTLE_PATH_CM = 6;

const colourReading = (liquid: Solution, path_cm: number, spec: BenchSpec): ColourReading => {
  const { words, hex } = colourOf(liquid, path_cm, spec.model);
  return { words, hex };
};

/** A level as the eye reads it: exact, or in careful mode to half a division. */
export function readVolume(spec: BenchSpec, glass: Glass, volume_nL: number): number {
  if (!spec.careful) return mLShown(volume_nL);
  return shown(Math.round(volume_nL / 1e6 / glass.readTo_mL) * glass.readTo_mL, 2);
}

/** Burettes that the learner reads: in careful mode, and where an aim asks for the reading. Nothing then gives its number. */
const leftToLearner = (spec: BenchSpec, id: string): boolean =>
  spec.careful === true || spec.aims.some((aim) => aim.kind === 'reading' && aim.vessel === id);

interface Look {
  readonly state: BenchState;
  readonly seen: Seen;
  readonly spec: VesselSpec;
  readonly glass: Glass;
  readonly vessel: Vessel;
}

/** Whether a probe stands in this vessel's liquid. */
export const hasProbe = (state: BenchState, spec: VesselSpec): boolean =>
  spec.probe === true || state.scene.probe.at === spec.id;

/** The number on the pH display for a vessel, two decimals; null without probe or liquid. */
export function probeReading(state: BenchState, spec: VesselSpec): number | null {
  const vessel = state.scene.vessels[spec.id];
  if (!vessel || vessel.liquid.volume_nL === 0) return null;
  if (spec.probe) return pHShown(pHOf(vessel.liquid, state.spec.model));
  return state.scene.probe.at === spec.id ? displayed(state) : null;
}

/** Why a number on the pH display is not to be trusted, or null. */
function doubtOf({ state, spec, vessel }: Look): string | null {
  if (vessel.layer) return 'Not mixed: swirl it before you read the pH.';
  if (spec.probe) return null;
  if (state.scene.probe.carried) return 'The probe was not rinsed: swirl, or rinse it and dip it again.';
  return meterCalibrated(state) ? null : 'The meter is not calibrated.';
}

function readVessel(look: Look): VesselReading {
  const { state, seen, spec, glass, vessel } = look;
  const hidden = hiddenOf(state.spec, seen, spec.id);
  const shows = (what: VesselReading['hidden'][number]) => !hidden.includes(what);
  const volume_nL = volumeOf(vessel);
  const path = pathOf(glass, volume_nL / 1e6);
  const pH = shows('pH') && hasProbe(state, spec) ? probeReading(state, spec) : null;
  const doubt = pH === null ? null : doubtOf(look);
  const thermometer = spec.thermometer === true || state.spec.instruments?.thermometer === true;
  const contents = shows('contents') ? contentsInWords(state, spec.id, spec.contents) : null;
  const wet = volume_nL > 0;
  const left = glass.family === 'burette' && leftToLearner(state.spec, spec.id);
  return {
    id: spec.id,
    label: vessel.label ?? spec.label,
    glass: spec.glass,
    capacity_mL: glass.capacity_mL,
    empty: volume_nL <= FILM_NL,
    full: volume_nL >= Math.round(glass.capacity_mL * 1e6),
    ...(shows('volume') && !left && { volume_mL: readVolume(state.spec, glass, volume_nL) }),
    level_cm: shown(levelOf(glass, volume_nL / 1e6), 3),
    mixed: vessel.layer === null,
    ...(pH !== null && { pH }),
    ...(doubt !== null && { doubt }),
    ...(shows('temperature') &&
      thermometer &&
      wet && { temperature_C: shown(vessel.liquid.temperature_C, 1) }),
    ...(shows('colour') &&
      vessel.liquid.volume_nL > FILM_NL && { colour: colourReading(vessel.liquid, path, state.spec) }),
    ...(shows('colour') &&
      vessel.layer && {
        layer: {
          ...colourReading(vessel.layer, path, state.spec),
          share: shown(vessel.layer.volume_nL / volume_nL, 4),
        },
      }),
    ...(glass.family === 'burette' &&
      shows('volume') &&
      (left
        ? { meniscus: meniscusOf(glass, volume_nL / 1e6) }
        : { burette_mL: shown(buretteReading(glass, volume_nL / 1e6), 2) })),
    probe: hasProbe(state, spec),
    stirring: vessel.stirring,
    stoppered: vessel.stoppered,
    ...(contents !== null && { contents }),
    hidden,
  };
}

/** One vessel as `read` shows it, without reading the others; null where there is no such vessel. */
export function readOne(state: BenchState, id: string, seen: Seen = {}): VesselReading | null {
  const spec = state.spec.vessels.find((v) => v.id === id);
  const vessel = state.scene.vessels[id];
  return spec && vessel ? readVessel({ state, seen, spec, glass: glassware[spec.glass], vessel }) : null;
}

const stockAtStart = (state: BenchState, item: ShelfItem): number => {
  const dealt = sampleIn(state.spec, state.seed, item.id);
  return bottleOf(dealt ? { ...item, contents: dealt } : item, state.spec.temperature_C, state.seed)
    .volume_nL;
};

/** What was told about the last move, without sentences that hold a hidden number. */
export function openNotices(state: BenchState, seen: Seen): BenchState['notices'] {
  const pHOpen = !anyHidden(state.spec, seen, 'pH');
  const volumeOpen = !anyHidden(state.spec, seen, 'volume');
  return state.notices.filter(
    (n) =>
      n.kind !== 'said' ||
      ((pHOpen || !/\bpH\b/.test(n.sentence)) && (volumeOpen || !/\bmL\b/.test(n.sentence))),
  );
}

function readBottle(state: BenchState, seen: Seen, item: ShelfItem): BottleReading {
  const liquid = state.scene.bottles[item.id];
  const volume = liquid?.volume_nL ?? 0;
  const concentration = isHidden(state.spec, seen, 'contents', item.id) ? null : strengthInWords(state, item);
  return {
    id: item.id,
    label: item.label,
    kind: item.kind,
    left_mL: anyHidden(state.spec, seen, 'volume') ? mLShown(stockAtStart(state, item)) : mLShown(volume),
    empty: volume === 0,
    ...(liquid &&
      volume > 0 &&
      !isHidden(state.spec, seen, 'colour', item.id) && {
        colour: colourReading(liquid, BOTTLE_PATH_CM, state.spec),
      }),
    ...(concentration !== null && { concentration }),
  };
}

/**
 * Everything that the bench shows.
 * @param seen what its reader has earned: predictions made, aims met. Decides what is still absent.
 */
export function read(state: BenchState, seen: Seen = {}): Readings {
  const { spec, scene } = state;
  const { waste, probe } = scene;
  const pHOpen = !anyHidden(spec, seen, 'pH');
  const volumeOpen = !anyHidden(spec, seen, 'volume');
  return {
    model: spec.model,
    vessels: spec.vessels.flatMap((v) => readOne(state, v.id, seen) ?? []),
    bottles: spec.shelf.map((item) => readBottle(state, seen, item)),
    waste: {
      empty: waste.volume_nL === 0,
      ...(volumeOpen && { volume_mL: mLShown(waste.volume_nL) }),
      ...(pHOpen && waste.volume_nL > 0 && { pH: pHShown(pHOf(waste, spec.model)) }),
      sentence: wasteSentence(waste, spec.model, { volume: volumeOpen, pH: pHOpen }),
    },
    spills: scene.spills.map((s) => ({
      from: s.from,
      volume_mL: mLShown(s.liquid.volume_nL),
      sentence: `${mL(s.liquid.volume_nL)} spilt beside ${spec.vessels.find((v) => v.id === s.from)?.label ?? s.from}. Wipe it up.`,
    })),
    ...(spec.instruments?.meter && {
      meter: {
        at: probe.at,
        calibrated: meterCalibrated(state),
        rinsed: probe.film === null && probe.carried === null,
      },
    }),
    goggles: scene.goggles,
    gloves: scene.gloves,
    notices: openNotices(state, seen),
  };
}

/** A concentration as it stands on a label: two significant figures at least, '0.10 mol/L'. */
export function concentrationInWords(value_molL: number): string {
  const digits = Number(value_molL.toPrecision(3));
  const decimals = Math.max(2, Math.min(8, 1 - Math.floor(Math.log10(Math.abs(digits) || 1))));
  const text = digits.toFixed(decimals);
  return `${Number(text) === digits ? text : String(digits)} mol/L`;
}

/** What was put into a glass at the start, in words. */
function contentsInWords(state: BenchState, id: string, own: Contents | undefined): string | null {
  const dealt = sampleIn(state.spec, state.seed, id);
  const contents = dealt ?? own;
  if (!contents || contents.volume_mL <= 0) return null;
  const parts = (contents.parts ?? []).map(
    (p) =>
      `${p.substance} ${concentrationInWords(drawn(p.concentration_molL, state.seed, `${id}/${p.substance}`))}`,
  );
  const waters = {
    boiled: 'boiled water',
    aired: 'water that stood in air',
    sparkling: 'sparkling water',
  } as const;
  const base = parts.length > 0 ? parts.join(' + ') : waters[contents.water ?? 'boiled'];
  const dyes = (contents.indicators ?? []).map(
    (d) => `${d.volume_mL.toFixed(2)} mL ${d.indicator} ${d.massPercent ?? 0.1} %`,
  );
  return [dealt ? `${dealt.name}: ${base}` : base, ...dyes].join(', ');
}

function strengthInWords(state: BenchState, item: ShelfItem): string | null {
  if (item.indicator) return `${item.indicator.massPercent ?? 0.1} %`;
  if (item.standard_pH !== undefined) return `pH ${item.standard_pH.toFixed(2)}`;
  const contents = sampleIn(state.spec, state.seed, item.id) ?? item.contents;
  const parts = contents?.parts ?? [];
  if (parts.length === 0) return null;
  return parts
    .map((p) => concentrationInWords(drawn(p.concentration_molL, state.seed, `${item.id}/${p.substance}`)))
    .join(' + ');
}
