import { describe, expect, it } from 'vitest';
import { compile, type PredictionOutcome } from '../../../src/lessons/index.ts';
import { changed, SOUND } from './lesson.ts';

const file = '90-two-beakers.md';
const OUTCOME = 'outcome: { drip: acid, into: [water, buffer], until: [yellow] }';
const OPTIONS = `options:
  - { id: w, text: The water, first: water }
  - { id: b, text: The buffer, first: buffer }`;

function outcomeOf(markdown: string): PredictionOutcome {
  const result = compile(markdown, { file });
  if (!result.ok) throw new Error(result.faults.map(({ message }) => message).join('\n'));
  const block = result.lesson.blocks.find(({ kind }) => kind === 'prediction')!;
  if (block.kind !== 'prediction') throw new Error('A prediction.');
  return block.spec.outcome;
}
const asked = (outcome: string, options = OPTIONS): string =>
  changed(OPTIONS, options, changed(OUTCOME, `outcome: ${outcome}`));

describe('the outcome of a prediction is computed', () => {
  it('by dripping: which vessel first, and after how many drops', () => {
    expect(outcomeOf(SOUND)).toMatchObject({
      right: 'w',
      drops: [
        { vessel: 'water', drops: 1 },
        { vessel: 'buffer', drops: 28 },
      ],
    });
  });
  it('by comparing pH, whichever way is asked', () => {
    // Water with a trace of sodium salt of the dye is above the pKa of the buffer, 4.76.
    expect(outcomeOf(asked('{ find: lowest-pH, of: [water, buffer] }')).right).toBe('b');
    expect(outcomeOf(asked('{ find: highest-pH, of: [water, buffer] }')).right).toBe('w');
  });
  it('by counting colours', () => {
    const options = 'options: [{ id: zero, text: None, count: 0 }, { id: two, text: Both, count: 2 }]';
    const outcome = outcomeOf(asked('{ count: [yellow], of: [water, buffer] }', options));
    expect(outcome).toMatchObject({ right: 'zero', drops: [] });
    expect(outcome.sentence).toMatch(/^Water: blue\. Buffer: \S+\.$/);
  });
  it('an option that bets on nothing, or on two things, is refused', () => {
    for (const option of [
      '{ id: w, text: The water }',
      '{ id: w, text: The water, first: water, count: 1 }',
    ]) {
      const result = compile(changed('{ id: w, text: The water, first: water }', option), { file });
      expect(result.ok ? '' : result.faults[0]!.message).toBe(
        "'options[1]': an option says 'first' and a vessel, or 'count' and a number.",
      );
    }
  });
});
