/** The whole scene in sentences, made from readings alone, so that nothing hidden can be told. */
import { glassware } from './glassware.ts';
import type { Readings, VesselReading } from './types.ts';

const list = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`;

function vesselSentence(v: VesselReading): string {
  const glass = glassware[v.glass].name;
  const head = `${v.label}, ${/^[aeiou]/i.test(glass) ? 'an' : 'a'} ${glass}`;
  if (v.empty)
    return `${head}, is empty${v.volume_mL ? ' but wet' : ''}${v.probe ? '; a pH probe hangs in it' : ''}.`;
  const facts: string[] = [];
  if (v.burette_mL !== undefined) facts.push(`reads ${v.burette_mL.toFixed(2)} mL`);
  else if (v.meniscus !== undefined) facts.push(`has its meniscus ${v.meniscus}`);
  else if (v.volume_mL !== undefined) facts.push(`holds ${v.volume_mL.toFixed(2)} mL`);
  else facts.push('holds a liquid');
  if (v.colour) facts.push(`is ${v.colour.words}`);
  if (v.pH !== undefined) facts.push(`shows pH ${v.pH.toFixed(2)}`);
  if (v.temperature_C !== undefined) facts.push(`is at ${v.temperature_C.toFixed(1)} °C`);
  if (v.stirring) facts.push('is being stirred');
  if (v.stoppered) facts.push('is stoppered');
  if (v.full) facts.push('is full');
  const more = [
    v.layer && `It is not mixed: where the last liquid came in it is ${v.layer.words}.`,
    !v.layer && !v.mixed && 'It is not mixed.',
    v.doubt,
    v.hidden.includes('pH') && v.probe && 'Its pH is hidden.',
    v.contents && `In it at the start: ${v.contents}.`,
  ].filter((s): s is string => typeof s === 'string' && s !== '');
  return [`${head}, ${list(facts)}.`, ...more].join(' ');
}

/**
 * The text alternative of a bench.
 * @returns sentences: the vessels from left to right, what stands level, the shelf, instruments, spills, waste
 */
export function describe(readings: Readings): string[] {
  const { vessels, bottles } = readings;
  const filled = vessels.filter(
    (v) => !v.empty && v.volume_mL !== undefined && glassware[v.glass].family !== 'burette',
  );
  const level = filled.length > 1 && filled.every((v) => v.volume_mL === filled[0]?.volume_mL);
  const shelf = bottles.map(
    (b) => `${b.label}${b.concentration ? ` ${b.concentration}` : ''}${b.empty ? ' (empty)' : ''}`,
  );
  const worn = [readings.goggles && 'goggles', readings.gloves && 'gloves'].filter(
    (w): w is string => w !== false,
  );
  return [
    ...vessels.map(vesselSentence),
    ...(level ? [`They hold equal volumes, ${filled[0]?.volume_mL?.toFixed(2) ?? ''} mL each.`] : []),
    ...(shelf.length > 0 ? [`On the shelf: ${list(shelf)}.`] : []),
    ...(readings.meter
      ? [
          `The pH meter's probe ${readings.meter.at === null ? `hangs on its clip${readings.meter.rinsed ? ', clean' : ', not rinsed'}` : `stands in ${vessels.find((v) => v.id === readings.meter?.at)?.label ?? 'a vessel'}`}${readings.meter.calibrated ? '' : '; it is not calibrated'}.`,
        ]
      : []),
    ...(worn.length > 0 ? [`You wear ${list(worn)}.`] : []),
    ...readings.spills.map((s) => s.sentence),
    ...(!readings.waste.empty ? [readings.waste.sentence] : []),
  ];
}
