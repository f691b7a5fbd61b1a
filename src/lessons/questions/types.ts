/** Questions in two cuts: the full one stays on the server, the learner's has no keys, feedback or model answers. */
import type { MethodId } from './wrongMethods.ts';

/** Values that differ from learner to learner: each row is one variant. Empty: all get the same question. */
export type Variants = readonly Readonly<Record<string, number>>[];

interface Base {
  readonly id: string;
  /** Sanitised HTML. Quantities that vary stand in `<data data-formula>` and are filled for each learner. */
  readonly ask: string;
  readonly variants: Variants;
}

export interface Choice extends Base {
  readonly kind: 'choice';
  readonly options: readonly {
    readonly id: string;
    readonly text: string;
    readonly right: boolean;
    readonly misconception?: string;
    /** Why somebody chooses it, and what to look at. */
    readonly feedback: string;
  }[];
}

export interface WrongNumber {
  readonly method: MethodId | 'own';
  /** Formula, for a method of the author's own. */
  readonly value?: string;
  readonly feedback?: string;
  readonly misconception?: string;
}

export interface Numeric extends Base {
  readonly kind: 'numeric';
  readonly mixture?: string;
  /** Formula in base units. */
  readonly key: string;
  readonly unit: string;
  /** In `unit`, or in percent of the key. */
  readonly tolerance: { readonly of: 'unit' | 'percent'; readonly value: number };
  readonly digits: number;
  readonly by: 'decimals' | 'figures';
  readonly wrong: readonly WrongNumber[];
  /** The answer is poured: a mixture that may use `answer`, and the dye it is shown with. */
  readonly pour?: { readonly mixture?: string; readonly indicator: string };
  readonly solution: string;
  readonly steps: readonly string[];
  /** 'example': steps of another variant; 'faded': own steps but the last; 'none'. */
  readonly help: 'example' | 'faded' | 'none';
}

export interface Order extends Base {
  readonly kind: 'order';
  /** In the right order. */
  readonly items: readonly { readonly id: string; readonly text: string }[];
  readonly feedback: string;
  readonly misconception?: string;
}

export interface Match extends Base {
  readonly kind: 'match';
  readonly pairs: readonly { readonly id: string; readonly left: string; readonly right: string }[];
  readonly decoys: readonly { readonly id: string; readonly text: string }[];
  readonly feedback: string;
  readonly misconception?: string;
}

export interface Explain extends Base {
  readonly kind: 'explain';
  readonly model: string;
  /** What a full answer says; the learner ticks what theirs says. */
  readonly points: readonly string[];
}

export type Question = Choice | Numeric | Order | Match | Explain;
export type QuestionKind = Question['kind'];

interface ItemForLearner {
  readonly id: string;
  readonly text: string;
}

export type QuestionForLearner = { readonly id: string; readonly ask: string } & (
  | { readonly kind: 'choice'; readonly several: boolean; readonly options: readonly ItemForLearner[] }
  | {
      readonly kind: 'numeric';
      /** As the reader's conventions write it; '' for a plain number. */
      readonly unit: string;
      readonly hint: string;
      readonly example?: { readonly ask: string; readonly steps: readonly string[] };
      readonly steps?: readonly string[];
    }
  | { readonly kind: 'order'; readonly items: readonly ItemForLearner[] }
  | {
      readonly kind: 'match';
      readonly lefts: readonly ItemForLearner[];
      readonly rights: readonly ItemForLearner[];
    }
  | { readonly kind: 'explain' }
);

export type Answer =
  | { readonly kind: 'choice'; readonly chosen: readonly string[] }
  | { readonly kind: 'numeric'; readonly typed: string }
  | { readonly kind: 'order'; readonly order: readonly string[] }
  /** Right-hand id for each left-hand id. */
  | { readonly kind: 'match'; readonly matched: Readonly<Record<string, string>> }
  /** First the text; then, with the model answer in sight, the numbers of the points that it says. */
  | { readonly kind: 'explain'; readonly text: string; readonly points?: readonly number[] };

/** A tube as it is shown beside another one. */
export interface Tube {
  readonly label: string;
  /** Null while it would tell the key. */
  readonly pH: number | null;
  readonly words: string;
  readonly hex: string;
}

export interface Marking {
  /** 'ask': the input was not clear and nothing is counted; 'compare': a model answer to be compared with. */
  readonly verdict: 'right' | 'not-yet' | 'ask' | 'compare';
  /** Sanitised HTML, a sentence or more: never right or wrong alone. */
  readonly feedback: string;
  /** The wrong method that gives this answer. */
  readonly method?: string;
  readonly misconceptions: readonly string[];
  /** Ids of the parts that do not stand where they belong. */
  readonly misplaced?: readonly string[];
  /** The learner's answer, poured beside the asked-for one, which shows its colour alone until the key may be told. */
  readonly poured?: { readonly yours: Tube; readonly asked: Tube };
  /** Told once the answer is right or was tried often enough. */
  readonly key?: string;
  readonly solution?: string;
  readonly points?: readonly string[];
}
