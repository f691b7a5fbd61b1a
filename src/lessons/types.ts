import type { BenchSpec, Model } from '../bench/index.ts';

/** A mistake in a lesson, told so that its author can mend it. Lines and columns start at 1. */
export interface Fault {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly message: string;
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

/** The outcome as the engine computes it: drops into each vessel until its pH has left the band. */
export interface PredictionOutcome {
  readonly right: string;
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
  | { readonly kind: 'prediction'; readonly spec: Prediction };

/** One thing to do in a lesson; its id is what progress hangs on. */
export interface Checkpoint {
  readonly id: string;
  readonly kind: 'prediction' | 'aim';
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
  readonly minutes: number;
  readonly compilerVersion: number;
  readonly blocks: readonly Block[];
  readonly checkpoints: readonly Checkpoint[];
}

export type Compiled =
  | { readonly ok: true; readonly lesson: CompiledLesson }
  | { readonly ok: false; readonly faults: readonly Fault[] };
