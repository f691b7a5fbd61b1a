/**
 * Shapes of the bench. A `BenchSpec` is plain JSON (a lesson's `bench` block compiles to it), a `Move` is plain JSON
 * (a run stores a list of them), a `BenchState` is an immutable value in memory that follows from both.
 * Volumes: `_mL` in specifications and readings, whole `_uL` in moves, whole nanolitres inside liquids.
 */
import type { Model, Solution } from '../chemistry/types.ts';
import type { GlassId } from './glassware.ts';

export type { GlassId, Model };

// ---------------------------------------------------------------- what stands on the bench

/** A number, or a draw for each run: one of from, from + step, ... to. */
export type Drawn = number | { readonly from: number; readonly to: number; readonly step: number };

/** What a glass or a bottle holds at the start. */
export interface Contents {
  readonly volume_mL: number;
  /** Dissolved substances by chemistry catalogue id, mol/L in `volume_mL`. Empty or absent: water. */
  readonly parts?: readonly { readonly substance: string; readonly concentration_molL: Drawn }[];
  /** Indicator stock put in on top of `volume_mL` (0.1 % unless said otherwise). */
  readonly indicators?: readonly {
    readonly indicator: string;
    readonly massPercent?: number;
    readonly volume_mL: number;
  }[];
  /** The water that it is made with. Default 'boiled' (free of carbon dioxide). */
  readonly water?: 'boiled' | 'aired' | 'sparkling';
  /** Default: the bench's temperature. */
  readonly temperature_C?: number;
}

export interface VesselSpec {
  readonly id: string;
  readonly label: string;
  readonly glass: GlassId;
  /** Tolerance class of measuring glass. Default 'B'. */
  readonly grade?: 'A' | 'B';
  readonly contents?: Contents;
  /** A pH probe of its own stands in it from the start (already clean and, unless the bench asks, calibrated). */
  readonly probe?: boolean;
  readonly thermometer?: boolean;
  /** A magnetic stirrer stands under it: 'on' mixes everything at once; 'off' can be switched on by a move. */
  readonly stirrer?: 'on' | 'off';
  readonly stoppered?: boolean;
  /** Stands in equilibrium with a gas of this carbon dioxide pressure for as long as it is open (air: 4.2e-4). */
  readonly openTo?: { readonly co2_atm: number };
}

export interface ShelfItem {
  readonly id: string;
  readonly label: string;
  readonly kind: 'reagent' | 'indicator' | 'wash' | 'standard';
  /** Reagents and standards. Its volume is the stock in the bottle. */
  readonly contents?: Contents;
  /** Indicators: catalogue id and strength; `volume_mL` of stock. */
  readonly indicator?: { readonly id: string; readonly massPercent?: number; readonly volume_mL: number };
  /** Standards for calibration: the pH printed on the bottle. */
  readonly standard_pH?: number;
}

/**
 * Contents that are dealt out anew for each run: `contents` are laid out over `into` in an order drawn from the run's
 * seed (more contents than glasses: some stay away). Nothing that names them reaches the learner until revealed.
 */
export interface SampleSpec {
  readonly id: string;
  readonly into: readonly string[];
  readonly contents: readonly (Contents & { readonly name: string })[];
  /** The answer counts: the browser gets no contents, readings come from the server. */
  readonly graded?: boolean;
}

export type Hideable = 'pH' | 'colour' | 'volume' | 'temperature' | 'contents' | 'trace' | 'ledger';

export interface HideSpec {
  readonly what: readonly Hideable[];
  /** Absent: every vessel and bottle. */
  readonly of?: readonly string[];
  /** 'prediction': until it is locked; an aim's id: until it is met; 'end': until all aims are met; 'never'. */
  readonly until: 'prediction' | 'end' | 'never' | { readonly aim: string };
}

export type ViewKind = 'trace' | 'pair-bar' | 'ledger' | 'species' | 'ruler' | 'room-left';

export interface BenchSpec {
  readonly id: string;
  readonly title: string;
  /** One plain sentence under the title. */
  readonly intro?: string;
  readonly model: Model;
  readonly temperature_C: number;
  readonly vessels: readonly VesselSpec[];
  readonly shelf: readonly ShelfItem[];
  readonly instruments?: {
    /** A hand-held meter with one probe. 'ask': it has to be calibrated with two standards first. */
    readonly meter?: { readonly calibration: 'done' | 'ask' };
    readonly thermometer?: boolean;
  };
  /** What is delivered differs from what is read within the glass's tolerance; nothing poured can be taken back. */
  readonly careful?: boolean;
  readonly samples?: readonly SampleSpec[];
  readonly hide?: readonly HideSpec[];
  /** Moves offered. Absent: every move that the bench's glass and shelf allow. */
  readonly moves?: readonly MoveKind[];
  /** What is being tested, for the fairness note: the one thing in which two vessels may differ. */
  readonly compare?: { readonly vessels: readonly [string, string]; readonly testing: FairnessTopic };
  readonly aims: readonly AimSpec[];
  readonly aimOrder?: 'any' | 'in-order';
  /** Views that may be opened (two at once). Absent: all that have something to show. */
  readonly views?: readonly ViewKind[];
  readonly safety?: { readonly goggles?: 'first' | 'advised'; readonly gloves?: 'first' | 'advised' };
}

export type FairnessTopic =
  'contents' | 'concentration' | 'volume' | 'indicator' | 'temperature' | 'starting-pH';

// ---------------------------------------------------------------- aims

interface AimBase {
  readonly id: string;
  /** What the learner reads: 'Turn the water yellow'. */
  readonly text: string;
  /** Aims that have to be met before this one counts. */
  readonly after?: readonly string[];
  /** The aim counts only while no more than this was used since the start. */
  readonly limits?: readonly { readonly of: string; readonly max_mL?: number; readonly max_drops?: number }[];
}

/** Bounds are inclusive and compared at the displayed precision. */
export type AimSpec = AimBase &
  (
    | { readonly kind: 'pH'; readonly vessel: string; readonly min?: number; readonly max?: number }
    | { readonly kind: 'colour'; readonly vessel: string; readonly words: readonly string[] }
    | { readonly kind: 'volume'; readonly vessel: string; readonly min_mL?: number; readonly max_mL?: number }
    | {
        readonly kind: 'temperature';
        readonly vessel: string;
        readonly min_C?: number;
        readonly max_C?: number;
      }
    | {
        readonly kind: 'added';
        readonly vessel: string;
        readonly of: string;
        readonly min_mL?: number;
        readonly max_mL?: number;
      }
    | {
        readonly kind: 'drops';
        readonly vessel: string;
        readonly of: string;
        readonly min?: number;
        readonly max?: number;
      }
    /** Conjugate base : weak acid of one family, by amounts. */
    | {
        readonly kind: 'ratio';
        readonly vessel: string;
        readonly family: string;
        readonly min?: number;
        readonly max?: number;
      }
    | {
        readonly kind: 'equal';
        readonly quantity: 'pH' | 'volume' | 'temperature';
        readonly vessels: readonly [string, string];
        readonly within: number;
      }
    | { readonly kind: 'calibrated' }
    /** A burette reading entered by the learner within this of the true one. */
    | { readonly kind: 'reading'; readonly vessel: string; readonly within_mL: number }
    | { readonly kind: 'waste-pH'; readonly min: number; readonly max: number; readonly min_mL?: number }
    /** A move of this kind was done (on this vessel), so often. */
    | { readonly kind: 'did'; readonly move: MoveKind; readonly vessel?: string; readonly times?: number }
    /** Met once all aims named in `with` are met while no more than so much is used. */
    | {
        readonly kind: 'used-at-most';
        readonly of: string;
        readonly max_mL: number;
        readonly with: readonly string[];
      }
  );

// ---------------------------------------------------------------- moves

/** 0.05 mL; twenty to the millilitre is common practice. */
export const DROP_UL = 50;

export type Move =
  /** Exactly so much of a bottle or vessel into a vessel, whatever gesture made it. */
  | { readonly kind: 'pour'; readonly from: string; readonly into: string; readonly volume_uL: number }
  /** Until the liquid in `into` stands at a graduation mark. */
  | { readonly kind: 'pourToMark'; readonly from: string; readonly into: string; readonly mark_mL: number }
  | { readonly kind: 'drip'; readonly from: string; readonly into: string; readonly drops: number }
  | {
      readonly kind: 'addToBoth';
      readonly from: string;
      readonly into: readonly [string, string];
      readonly volume_uL?: number;
      readonly drops?: number;
    }
  /** From a burette: its tap opened until so much has run out. */
  | { readonly kind: 'dispense'; readonly burette: string; readonly into: string; readonly volume_uL: number }
  | { readonly kind: 'pipette'; readonly pipette: string; readonly from: string; readonly into: string }
  /** A bottle's liquid up to the zero mark of a burette or the top mark of measuring glass. */
  | { readonly kind: 'fill'; readonly from: string; readonly into: string }
  | {
      readonly kind: 'addIndicator';
      readonly indicator: string;
      readonly into: string;
      readonly drops: number;
    }
  | { readonly kind: 'swirl'; readonly vessel: string }
  | { readonly kind: 'stir'; readonly vessel: string; readonly on: boolean }
  | { readonly kind: 'dipProbe'; readonly vessel: string }
  | { readonly kind: 'liftProbe' }
  | { readonly kind: 'rinseProbe' }
  | { readonly kind: 'calibrate'; readonly value_pH: number }
  | { readonly kind: 'setTemperature'; readonly vessel: string; readonly temperature_C: number }
  | {
      readonly kind: 'bubble';
      readonly vessel: string;
      readonly gas: 'air' | 'co2' | 'nitrogen';
      readonly seconds: number;
    }
  | { readonly kind: 'stopper'; readonly vessel: string; readonly on: boolean }
  | { readonly kind: 'wear'; readonly what: 'goggles' | 'gloves'; readonly on: boolean }
  | { readonly kind: 'rinse'; readonly vessel: string; readonly with: string }
  | { readonly kind: 'discard'; readonly vessel: string }
  | { readonly kind: 'label'; readonly vessel: string; readonly text: string }
  | { readonly kind: 'enterReading'; readonly vessel: string; readonly value_mL: number }
  | { readonly kind: 'wipe' }
  | { readonly kind: 'undo' }
  | { readonly kind: 'startAgain' };

export type MoveKind = Move['kind'];
export type MoveOf<K extends MoveKind> = Extract<Move, { kind: K }>;

/** Why a move can't be done, and what to do instead. */
export interface Refusal {
  readonly code:
    | 'unknown-thing'
    | 'unknown-move'
    | 'bad-value'
    | 'wrong-vessel'
    | 'same-vessel'
    | 'overflow'
    | 'bottle-empty'
    | 'vessel-empty'
    | 'stoppered'
    | 'goggles-first'
    | 'gloves-first'
    | 'no-probe'
    | 'not-offered'
    | 'nothing-to-undo'
    | 'predict-first'
    | 'cannot-unpour'
    | 'nothing-to-wipe'
    | 'no-such-mark'
    | 'already-so'
    | 'calibration-failed'
    | 'run-full'
    | 'wipe-first';
  readonly sentence: string;
  /** For 'overflow' and 'bottle-empty': how much would go, in whole microlitres. */
  readonly possible_uL?: number;
}

// ---------------------------------------------------------------- state

/** One glass. `layer` is the part of its liquid where a strong solution came in and was not mixed yet. */
export interface Vessel {
  readonly id: string;
  readonly liquid: Solution;
  readonly layer: Solution | null;
  readonly stirring: boolean;
  readonly stoppered: boolean;
  readonly label: string | null;
  /** What was put in since the start, by bottle or vessel id, as it was read (nanolitres) and in drops. */
  readonly added: Readonly<Record<string, { readonly volume_nL: number; readonly drops: number }>>;
  /** Burettes: the last reading that the learner entered, mL. */
  readonly entered: number | null;
}

export interface Probe {
  /** Where the hand-held probe stands, or null on its clip. */
  readonly at: string | null;
  /** Liquid that clings to it. */
  readonly film: Solution | null;
  /** What it carried into the liquid it stands in; tints the reading until that liquid is swirled. */
  readonly carried: Solution | null;
  /** Raw electrode readings taken in standards. */
  readonly points: readonly { readonly value_pH: number; readonly raw_pH: number }[];
}

/** Everything that a move can change. Undo goes back to an earlier scene. */
export interface Scene {
  readonly vessels: Readonly<Record<string, Vessel>>;
  /** What is left in the bottles. */
  readonly bottles: Readonly<Record<string, Solution>>;
  /** What was taken from each bottle or vessel, as read, in nanolitres and drops. */
  readonly used: Readonly<Record<string, { readonly volume_nL: number; readonly drops: number }>>;
  readonly waste: Solution;
  readonly spills: readonly { readonly from: string; readonly liquid: Solution }[];
  readonly probe: Probe;
  readonly goggles: boolean;
  readonly gloves: boolean;
}

/** A run so far: a chain of states, one for each move, the newest in hand. */
export interface BenchState {
  readonly spec: BenchSpec;
  readonly seed: number;
  readonly scene: Scene;
  /** How many moves the list has. */
  readonly count: number;
  /** The move that led here, and the state before it in the list. Null at the start. */
  readonly move: Move | null;
  readonly before: BenchState | null;
  /** Where undo leads: the state before the last move that still stands. */
  readonly back: BenchState | null;
  /** How many moves stand (are not taken back); draws of careful mode hang on it. */
  readonly depth: number;
  /** What was told about the last move: cautions, spills, what was delivered. */
  readonly notices: readonly Notice[];
}

export interface Notice {
  readonly kind: 'caution' | 'spill' | 'said';
  readonly sentence: string;
}

export type Outcome =
  { readonly ok: true; readonly state: BenchState } | { readonly ok: false; readonly refusal: Refusal };

/** What the reader of a bench has already earned; decides what stays hidden. */
export interface Seen {
  readonly predicted?: boolean;
  readonly metAims?: readonly string[];
}

// ---------------------------------------------------------------- readings

export interface ColourReading {
  readonly words: string;
  readonly hex: string;
}

/** What can be seen of one vessel. A hidden or unmeasured quantity is absent. */
export interface VesselReading {
  readonly id: string;
  readonly label: string;
  readonly glass: GlassId;
  readonly capacity_mL: number;
  readonly empty: boolean;
  readonly full: boolean;
  /** Two decimals; in careful mode to half a graduation. */
  readonly volume_mL?: number;
  /** Level above the inner bottom, cm, for drawing. */
  readonly level_cm: number;
  /** False where a strong solution came in and was not swirled yet. */
  readonly mixed: boolean;
  /** Two decimals; only where a probe stands in the liquid. */
  readonly pH?: number;
  /** A sentence where the probe's number is not to be trusted (unmixed, unrinsed, not calibrated). */
  readonly doubt?: string;
  readonly temperature_C?: number;
  readonly colour?: ColourReading;
  /** Local colour of the unmixed part and its share of the volume, 0 to 1. */
  readonly layer?: ColourReading & { readonly share: number };
  /** Burettes: the reading at the meniscus, two decimals, where the bench does not leave it to the learner. */
  readonly burette_mL?: number;
  /** Burettes that the learner reads: where the meniscus stands between the marks, in words, for those who can't see it. */
  readonly meniscus?: string;
  readonly probe: boolean;
  readonly stirring: boolean;
  readonly stoppered: boolean;
  /** Contents in words, where they are not hidden. */
  readonly contents?: string;
  /** The names of hidden quantities, so that a tag can show "?". */
  readonly hidden: readonly Hideable[];
}

export interface BottleReading {
  readonly id: string;
  readonly label: string;
  readonly kind: ShelfItem['kind'];
  /** Where a vessel's volume is hidden, the stock at the start: what is left would tell what was poured. */
  readonly left_mL: number;
  readonly empty: boolean;
  readonly colour?: ColourReading;
  readonly concentration?: string;
}

export interface Readings {
  readonly model: Model;
  readonly vessels: readonly VesselReading[];
  readonly bottles: readonly BottleReading[];
  readonly waste: {
    readonly empty: boolean;
    /** Absent where a vessel's volume is hidden. */
    readonly volume_mL?: number;
    readonly pH?: number;
    readonly sentence: string;
  };
  readonly spills: readonly {
    readonly from: string;
    readonly volume_mL: number;
    readonly sentence: string;
  }[];
  readonly meter?: { readonly at: string | null; readonly calibrated: boolean; readonly rinsed: boolean };
  readonly goggles: boolean;
  readonly gloves: boolean;
  readonly notices: readonly Notice[];
}
