import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  inHand,
  REST,
  step,
  target,
  type Hand,
  type HandEffect,
  type HandEvent,
} from '../../../src/islands/bench/hand/machine';

function play(
  events: readonly HandEvent[],
  from: Hand = REST,
): { hand: Hand; effects: HandEffect['kind'][] } {
  let hand = from;
  const effects: HandEffect['kind'][] = [];
  for (const event of events) {
    const next = step(hand, event);
    hand = next.hand;
    effects.push(...next.effects.map((effect) => effect.kind));
  }
  return { hand, effects };
}

describe('the hand', () => {
  it('picks by tap, places by tap, then pours from the tipped bottle and leaves it tipped', () => {
    const tipped = play([
      { kind: 'pick', from: 'acid' },
      { kind: 'place', into: 'water' },
    ]);
    expect(tipped.hand).toEqual({ at: 'poised', from: 'acid', into: 'water' });
    const poured = play([{ kind: 'hold' }, { kind: 'letGo' }], tipped.hand);
    expect(poured.effects).toEqual(['startPour', 'endPour']);
    expect(poured.hand).toEqual({ at: 'poised', from: 'acid', into: 'water' });
  });

  it('puts a picked bottle back when it is picked again', () => {
    expect(
      play([
        { kind: 'pick', from: 'acid' },
        { kind: 'pick', from: 'acid' },
      ]).hand,
    ).toEqual(REST);
  });

  it('leaves a dragged bottle tipped over the vessel where it was let go', () => {
    const { hand } = play([
      { kind: 'lift', from: 'acid', by: 'pointer' },
      { kind: 'move', over: 'water' },
      { kind: 'drop' },
    ]);
    expect(hand).toEqual({ at: 'poised', from: 'acid', into: 'water' });
  });

  it('ends the pour of a dragged bottle when it leaves the vessel, and takes it home after', () => {
    const { hand, effects } = play([
      { kind: 'lift', from: 'acid', by: 'pointer' },
      { kind: 'move', over: 'water' },
      { kind: 'hold' },
      { kind: 'move', over: null },
      { kind: 'drop' },
    ]);
    expect(effects).toEqual(['startPour', 'endPour']);
    expect(hand).toEqual(REST);
  });

  it('takes the bottle away from a vessel that takes no more', () => {
    const { hand } = play([
      { kind: 'lift', from: 'acid', by: 'pointer' },
      { kind: 'move', over: 'water' },
      { kind: 'hold' },
      { kind: 'letGo' },
    ]);
    expect(target(hand)).toBeNull();
    expect(inHand(hand)).toBe('acid');
  });

  it('stays over the vessel when keys pour, so that Space can pour again', () => {
    const { hand } = play([
      { kind: 'lift', from: 'acid', by: 'keys' },
      { kind: 'move', over: 'water' },
      { kind: 'hold' },
      { kind: 'letGo' },
    ]);
    expect(target(hand)).toBe('water');
  });

  it('gives the pour up on Escape and keeps what flowed when it is interrupted', () => {
    const pouring = play([{ kind: 'hold', from: 'acid', into: 'water' }]).hand;
    expect(step(pouring, { kind: 'cancel' })).toEqual({ hand: REST, effects: [{ kind: 'cancelPour' }] });
    expect(step(pouring, { kind: 'interrupt' })).toEqual({ hand: REST, effects: [{ kind: 'endPour' }] });
  });

  it('never starts a pour within a pour, and ends each one exactly once, whatever events come', () => {
    const id = fc.constantFrom('a', 'b');
    const event: fc.Arbitrary<HandEvent> = fc.oneof(
      fc.record({ kind: fc.constant('pick' as const), from: id }),
      fc.record({ kind: fc.constant('place' as const), into: id }),
      fc.record({
        kind: fc.constant('lift' as const),
        from: id,
        by: fc.constantFrom('pointer' as const, 'keys' as const),
      }),
      fc.record({ kind: fc.constant('move' as const), over: fc.option(id, { nil: null }) }),
      fc.constant<HandEvent>({ kind: 'drop' }),
      fc.constant<HandEvent>({ kind: 'hold' }),
      fc.record({ kind: fc.constant('hold' as const), from: id, into: id }),
      fc.constantFrom<HandEvent>({ kind: 'letGo' }, { kind: 'cancel' }, { kind: 'interrupt' }),
    );
    fc.assert(
      fc.property(fc.array(event, { maxLength: 60 }), (events) => {
        const { hand, effects } = play([...events, { kind: 'interrupt' }]);
        expect(hand).toEqual(REST);
        effects.forEach((effect, i) => expect(effect === 'startPour').toBe(i % 2 === 0));
        expect(effects.length % 2).toBe(0);
      }),
    );
  });
});
