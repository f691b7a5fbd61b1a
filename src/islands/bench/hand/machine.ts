/**
 * What the learner's hand is doing with a bottle, as one small state machine. Pointer, touch, keys and buttons all
 * feed the same events, so that no gesture can do what another cannot. Pure: time, layout and the run stay outside.
 *
 *   rest ── pick ──▶ picked ── place ──▶ poised ── hold ──▶ pouring ── let go ──▶ rest
 *    └───── lift ──▶ carried (over a vessel or not) ── drop over ──▶ poised
 *                        └── hold ──▶ pouring ── let go ──▶ rest or carried
 */

/** How the pour under way is being held; it decides where the bottle goes when the pour ends. */
export type Grip = 'button' | 'poised' | 'carried';
export type By = 'pointer' | 'keys';

export type Hand =
  | { readonly at: 'rest' }
  | { readonly at: 'picked'; readonly from: string }
  | {
      readonly at: 'carried';
      readonly from: string;
      readonly by: By;
      readonly over: string | null;
      readonly poured: boolean;
    }
  | { readonly at: 'poised'; readonly from: string; readonly into: string }
  | {
      readonly at: 'pouring';
      readonly from: string;
      readonly into: string;
      readonly grip: Grip;
      readonly by: By;
    };

export type HandEvent =
  /** A click, tap or Enter on a bottle that is not being dragged. */
  | { readonly kind: 'pick'; readonly from: string }
  /** A click, tap or Enter on a vessel. */
  | { readonly kind: 'place'; readonly into: string }
  /** A drag begins. */
  | { readonly kind: 'lift'; readonly from: string; readonly by: By }
  /** The carried bottle comes over a vessel, or leaves it. */
  | { readonly kind: 'move'; readonly over: string | null }
  /** The drag ends where it is. */
  | { readonly kind: 'drop' }
  /** Pouring begins: from the main button with both named, else with what the hand holds. */
  | { readonly kind: 'hold'; readonly from?: string; readonly into?: string; readonly by?: By }
  /** Pouring ends and stays. */
  | { readonly kind: 'letGo' }
  /** Escape: what is under way is given up, the bottle goes home. */
  | { readonly kind: 'cancel' }
  /** The system took the gesture away (call, tab change, lost pointer): what flowed stays, the bottle goes home. */
  | { readonly kind: 'interrupt' };

/** What the run has to be told. */
export type HandEffect =
  | { readonly kind: 'startPour'; readonly from: string; readonly into: string }
  | { readonly kind: 'endPour' }
  | { readonly kind: 'cancelPour' };

export interface Step {
  readonly hand: Hand;
  readonly effects: readonly HandEffect[];
}

export const REST: Hand = { at: 'rest' };
const stay = (hand: Hand): Step => ({ hand, effects: [] });
const END: HandEffect = { kind: 'endPour' };

/** The hand after an event. Events that make no sense in a state leave it as it is. */
export function step(hand: Hand, event: HandEvent): Step {
  switch (event.kind) {
    case 'pick':
      if (hand.at === 'picked' && hand.from === event.from) return stay(REST);
      if (hand.at === 'rest' || hand.at === 'picked' || hand.at === 'poised') {
        return stay({ at: 'picked', from: event.from });
      }
      return stay(hand);

    case 'place':
      if (hand.at === 'picked' || (hand.at === 'poised' && hand.into !== event.into)) {
        return stay({ at: 'poised', from: hand.from, into: event.into });
      }
      return stay(hand);

    case 'lift':
      if (hand.at === 'pouring') return stay(hand);
      return stay({ at: 'carried', from: event.from, by: event.by, over: null, poured: false });

    case 'move':
      if (hand.at === 'carried')
        return hand.over === event.over ? stay(hand) : stay({ ...hand, over: event.over });
      if (hand.at === 'pouring' && hand.grip === 'carried' && hand.into !== event.over) {
        return {
          hand: { at: 'carried', from: hand.from, by: hand.by, over: event.over, poured: true },
          effects: [END],
        };
      }
      return stay(hand);

    case 'drop':
      if (hand.at === 'carried') {
        // A bottle that has already poured goes home; one that has not stays tipped, so that a tap or a hold can follow.
        if (hand.over !== null && !hand.poured)
          return stay({ at: 'poised', from: hand.from, into: hand.over });
        // By keys, Enter twice on the bottle picks it up: Enter on a vessel can follow.
        if (hand.by === 'keys' && hand.over === null) return stay({ at: 'picked', from: hand.from });
        return stay(REST);
      }
      if (hand.at === 'pouring' && hand.grip === 'carried') return { hand: REST, effects: [END] };
      return stay(hand);

    case 'hold': {
      if (hand.at === 'pouring') return stay(hand);
      const by = event.by ?? 'pointer';
      if (event.from !== undefined && event.into !== undefined) {
        return begin(
          event.from,
          event.into,
          hand.at === 'poised' && hand.from === event.from && hand.into === event.into ? 'poised' : 'button',
          by,
        );
      }
      if (hand.at === 'poised') return begin(hand.from, hand.into, 'poised', by);
      if (hand.at === 'carried' && hand.over !== null) return begin(hand.from, hand.over, 'carried', hand.by);
      return stay(hand);
    }

    case 'letGo':
      if (hand.at !== 'pouring') return stay(hand);
      if (hand.grip === 'carried') {
        return {
          // A pointer's pour ends by itself only where no more can flow: the bottle comes away. By keys it stays over.
          hand: {
            at: 'carried',
            from: hand.from,
            by: hand.by,
            over: hand.by === 'keys' ? hand.into : null,
            poured: true,
          },
          effects: [END],
        };
      }
      return {
        hand: hand.grip === 'poised' ? { at: 'poised', from: hand.from, into: hand.into } : REST,
        effects: [END],
      };

    case 'cancel':
      return { hand: REST, effects: hand.at === 'pouring' ? [{ kind: 'cancelPour' }] : [] };

    case 'interrupt':
      return { hand: REST, effects: hand.at === 'pouring' ? [END] : [] };
  }
}

function begin(from: string, into: string, grip: Grip, by: By): Step {
  return { hand: { at: 'pouring', from, into, grip, by }, effects: [{ kind: 'startPour', from, into }] };
}

/** The vessel that the hand's bottle is over, if any. */
export function target(hand: Hand): string | null {
  if (hand.at === 'carried') return hand.over;
  return hand.at === 'poised' || hand.at === 'pouring' ? hand.into : null;
}

/** The bottle that is off the shelf, if any. */
export function inHand(hand: Hand): string | null {
  return hand.at === 'carried' || hand.at === 'poised' || hand.at === 'pouring' ? hand.from : null;
}
