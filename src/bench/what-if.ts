/** What if one quantity had been different: the same moves on a changed bench, both traces side by side. */
import { apply } from './apply.ts';
import { createState } from './create.ts';
import { trace, traceSentence, trial, type TraceSeries } from './views/trace.ts';
import type { BenchSpec, BenchState, Contents, Model, Refusal, Seen } from './types.ts';

export type Change =
  /** Everything dissolved in a vessel or bottle this many times as concentrated. */
  | { readonly kind: 'strength'; readonly of: string; readonly factor: number }
  | {
      readonly kind: 'concentration';
      readonly of: string;
      readonly substance: string;
      readonly concentration_molL: number;
    }
  | { readonly kind: 'volume'; readonly of: string; readonly volume_mL: number }
  | { readonly kind: 'indicator'; readonly of: string; readonly volume_mL: number }
  | { readonly kind: 'temperature'; readonly temperature_C: number }
  | { readonly kind: 'model'; readonly model: Model };

function changedContents(contents: Contents, change: Change): Contents {
  switch (change.kind) {
    case 'strength':
      return {
        ...contents,
        parts: (contents.parts ?? []).map((p) => ({
          ...p,
          concentration_molL:
            typeof p.concentration_molL === 'number'
              ? p.concentration_molL * change.factor
              : {
                  from: p.concentration_molL.from * change.factor,
                  to: p.concentration_molL.to * change.factor,
                  step: p.concentration_molL.step * change.factor,
                },
        })),
      };
    case 'concentration': {
      const others = (contents.parts ?? []).filter((p) => p.substance !== change.substance);
      return {
        ...contents,
        parts: [...others, { substance: change.substance, concentration_molL: change.concentration_molL }],
      };
    }
    case 'volume':
      return { ...contents, volume_mL: change.volume_mL };
    case 'indicator':
      return {
        ...contents,
        indicators: (contents.indicators ?? []).map((d) => ({ ...d, volume_mL: change.volume_mL })),
      };
    default:
      return contents;
  }
}

/** The bench with one quantity changed. */
export function changedSpec(spec: BenchSpec, change: Change): BenchSpec {
  if (change.kind === 'temperature') return { ...spec, temperature_C: change.temperature_C };
  if (change.kind === 'model') return { ...spec, model: change.model };
  const touch = <T extends { readonly id: string; readonly contents?: Contents }>(thing: T): T =>
    thing.id === change.of && thing.contents
      ? { ...thing, contents: changedContents(thing.contents, change) }
      : thing;
  return { ...spec, vessels: spec.vessels.map(touch), shelf: spec.shelf.map(touch) };
}

export interface WhatIf {
  readonly state: BenchState;
  readonly was: readonly TraceSeries[];
  readonly would: readonly TraceSeries[];
  /** Moves of the run that the changed bench refuses; they are left out. */
  readonly leftOut: readonly { readonly n: number; readonly refusal: Refusal }[];
  readonly sentence: string;
}

/**
 * The moves that stand in this trial, done on the changed bench with the same seed.
 * @param seen what its reader has earned; hidden traces stay hidden
 */
export function whatIf(state: BenchState, change: Change, seen: Seen = {}): WhatIf {
  let now = createState(changedSpec(state.spec, change), { seed: state.seed });
  const leftOut: { n: number; refusal: Refusal }[] = [];
  for (const s of trial(state)) {
    if (!s.move || s.move.kind === 'startAgain') continue;
    const outcome = apply(now, s.move);
    if (outcome.ok) now = outcome.state;
    else leftOut.push({ n: s.count, refusal: outcome.refusal });
  }
  const was = trace(state, seen);
  const would = trace(now, seen);
  const missing =
    leftOut.length === 0
      ? ''
      : ` ${leftOut.length === 1 ? 'One move' : `${leftOut.length} moves`} could not be done there.`;
  return {
    state: now,
    was,
    would,
    leftOut,
    sentence: `As it was: ${traceSentence(was)} As it would be: ${traceSentence(would)}${missing}`,
  };
}
