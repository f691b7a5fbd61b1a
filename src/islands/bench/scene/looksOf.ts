import { glassware, levelOf } from '../../../bench/glassware';
import type { BenchSpec, BottleReading, Readings, ShelfItem, VesselReading } from '../../../bench/types';
import { paint } from '../glass/light';
import { shapeOf } from '../glass/shapeOf';
import { formatPh, type PhReading, type ShelfLook, type VesselLook } from './looks';

/** Why a vessel's pH is not told, in one sentence. */
function hiddenSentence(spec: BenchSpec, vessel: string): string {
  const rule = spec.hide?.find(
    (hide) => hide.what.includes('pH') && (hide.of === undefined || hide.of.includes(vessel)),
  );
  if (rule?.until === 'prediction') return 'Hidden until you predict';
  if (rule?.until === 'never') return 'Hidden on this bench';
  return 'Hidden for now';
}

function phOf(spec: BenchSpec, reading: VesselReading): PhReading {
  if (reading.hidden.includes('pH')) return { kind: 'hidden', sentence: hiddenSentence(spec, reading.id) };
  return reading.pH === undefined ? { kind: 'none' } : { kind: 'value', text: formatPh(reading.pH) };
}

function vesselLook(spec: BenchSpec, reading: VesselReading): VesselLook {
  const glass = glassware[reading.glass];
  const shape = shapeOf(reading.glass);
  const plan = spec.vessels.find((vessel) => vessel.id === reading.id);
  const brim = levelOf(glass, glass.capacity_mL) * 10 * shape.squash;
  return {
    id: reading.id,
    name: reading.label,
    shape,
    level_mm: reading.empty ? null : Math.min(brim, reading.level_cm * 10 * shape.squash),
    volume_uL: reading.volume_mL === undefined ? null : Math.round(reading.volume_mL * 1000),
    paint: paint(reading.colour),
    hex: reading.colour?.hex ?? '#ffffff',
    words: reading.empty ? '' : (reading.colour?.words ?? ''),
    ph: phOf(spec, reading),
    doubt: reading.doubt ?? null,
    temperature_C: reading.temperature_C ?? null,
    // The region's depth on the drawing grows with its share; a sliver would not be seen.
    unmixed: reading.layer
      ? {
          paint: paint(reading.layer),
          words: reading.layer.words,
          depth: 0.35 + 0.6 * Math.min(1, reading.layer.share),
        }
      : null,
    mixed: reading.mixed,
    probe: reading.probe,
    stirrer: plan?.stirrer !== undefined,
    stirring: reading.stirring,
    stoppered: reading.stoppered,
    room_uL:
      reading.volume_mL === undefined
        ? null
        : Math.max(0, Math.round((glass.capacity_mL - reading.volume_mL) * 1000)),
    full: reading.full ? { h: brim, text: `Full at ${glass.capacity_mL.toFixed(1)} mL` } : null,
  };
}

function firstVolume(item: ShelfItem | undefined): number {
  return item?.contents?.volume_mL ?? item?.indicator?.volume_mL ?? 0;
}

function shelfLook(spec: BenchSpec, reading: BottleReading, hazards: readonly string[]): ShelfLook {
  const first = firstVolume(spec.shelf.find((item) => item.id === reading.id));
  return {
    id: reading.id,
    name: reading.label,
    strength: reading.concentration ?? '',
    hazards,
    kind: reading.kind === 'standard' ? 'reagent' : reading.kind,
    paint: paint(reading.colour),
    level: reading.empty ? 0 : first > 0 ? Math.min(1, reading.left_mL / first) : 1,
    left_uL: Math.round(reading.left_mL * 1000),
  };
}

type Words = (text: string) => string;

const inWords = (look: VesselLook, words: Words): VesselLook => ({
  ...look,
  ph: look.ph.kind === 'value' ? { kind: 'value', text: words(look.ph.text) } : look.ph,
  full: look.full && { ...look.full, text: words(look.full.text) },
});
const inStrength = (look: ShelfLook, words: Words): ShelfLook => ({
  ...look,
  strength: words(look.strength),
});

export interface Looks {
  readonly vessels: readonly VesselLook[];
  readonly shelf: readonly ShelfLook[];
}

/**
 * Readings as they are to be drawn. What reads the same keeps its object, so that still vessels and bottles are not drawn
 * again while another one fills.
 * @param hazardsOf the marks that a bottle's concentration carries
 * @param words puts what is read into the reader's conventions
 */
export function createLooks(
  spec: BenchSpec,
  hazardsOf: (item: ShelfItem) => readonly string[],
  words: Words = (text) => text,
): (readings: Readings) => Looks {
  const known = new Map<string, { readonly text: string; readonly look: VesselLook | ShelfLook }>();
  const hazards = new Map(spec.shelf.map((item) => [item.id, hazardsOf(item)]));
  const stable = <T extends VesselLook | ShelfLook>(key: string, reading: object, draw: () => T): T => {
    const text = JSON.stringify(reading);
    const before = known.get(key);
    if (before?.text === text) return before.look as T;
    const look = draw();
    known.set(key, { text, look });
    return look;
  };
  return (readings) => ({
    vessels: readings.vessels.map((reading) =>
      stable(`vessel ${reading.id}`, reading, () => inWords(vesselLook(spec, reading), words)),
    ),
    shelf: readings.bottles.map((reading) =>
      stable(`bottle ${reading.id}`, reading, () =>
        inStrength(shelfLook(spec, reading, hazards.get(reading.id) ?? []), words),
      ),
    ),
  });
}
