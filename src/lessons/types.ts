import type { BenchSpec, BenchState, Model } from '../bench/index.ts';
import type { Conventions } from './format.ts';
import type { Question, QuestionForLearner } from './questions/types.ts';

/** A mistake in a lesson, told so that its author can mend it. Lines and columns start at 1. */
export interface Fault {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly message: string;
  /** The words in the lesson that the fault is about. */
  readonly found?: string;
  /** The nearest valid word or the corrected form, in the author's own syntax. */
  readonly fix?: string;
}

export interface PredictionOption {
  readonly id: string;
  readonly text: string;
}

/** What a learner commits to before a pour, without its outcome. */
export interface PredictionForLearner {
  readonly id: string;
  /** The bench that stays closed until this is locked in. */
  readonly bench: string;
  readonly ask: string;
  readonly options: readonly PredictionOption[];
  /** Asked after the pour. */
  readonly observe: string;
}

/** The outcome as the engine computes it: drops until a colour shows in each vessel, or a quantity compared. */
export interface PredictionOutcome {
  readonly right: string;
  /** Empty where the prediction compares vessels as they stand. */
  readonly drops: readonly {
    readonly vessel: string;
    readonly label: string;
    readonly drops: number | null;
  }[];
  readonly sentence: string;
}

export interface Prediction extends PredictionForLearner {
  readonly outcome: PredictionOutcome;
}

export type Block =
  | { readonly kind: 'prose'; readonly html: string }
  | { readonly kind: 'bench'; readonly spec: BenchSpec }
  | { readonly kind: 'prediction'; readonly spec: Prediction }
  | { readonly kind: 'question'; readonly spec: Question };

export type LearnerBlock =
  | { readonly kind: 'prose'; readonly html: string }
  | { readonly kind: 'bench'; readonly spec: BenchSpec; readonly prediction: string | null }
  | { readonly kind: 'prediction'; readonly spec: PredictionForLearner }
  | { readonly kind: 'question'; readonly spec: QuestionForLearner };

/** One thing to do in a lesson; its id is what progress hangs on. */
export interface Checkpoint {
  readonly id: string;
  readonly kind: 'prediction' | 'aim' | 'question';
  readonly title: string;
  /** Place in `blocks`. */
  readonly block: number;
}

export interface CompiledLesson {
  readonly slug: string;
  readonly number: number;
  readonly title: string;
  readonly summary: string;
  readonly lang: string;
  readonly model: Model;
  readonly access: 'open' | 'members';
  /** Compiled and rehearsed, but not published with the shipped course. */
  readonly draft: boolean;
  readonly minutes: number;
  readonly compilerVersion: number;
  readonly blocks: readonly Block[];
  readonly checkpoints: readonly Checkpoint[];
}

export type Compiled =
  | { readonly ok: true; readonly lesson: CompiledLesson }
  | { readonly ok: false; readonly faults: readonly Fault[] };

/** Whose lesson it is: what variants, shuffles and numbers hang on. */
export interface Learner {
  /** Whole number; equal for one person and lesson, whatever the device. */
  readonly seed: number;
  readonly conventions?: Conventions;
  /** The learner's runs by bench, where a key is taken from them. */
  readonly runs?: Readonly<Record<string, BenchState>>;
}
