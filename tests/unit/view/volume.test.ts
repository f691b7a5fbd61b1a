import { describe, expect, it } from 'vitest';
import { formatVolume, nextDown, nextUp, nudge, parseVolume } from '../../../src/islands/bench/hand/volume';

describe('the exact volume', () => {
  it('steps by drops, then halves, then millilitres, then fives', () => {
    expect([50, 450, 500, 1000, 1050, 5000, 9000, 10_000].map((v) => nextUp(v, 100_000))).toEqual([
      100, 500, 1000, 1500, 1500, 6000, 10_000, 15_000,
    ]);
    expect([15_000, 10_000, 6000, 5000, 1000, 500, 100, 50].map(nextDown)).toEqual([
      10_000, 9000, 5000, 4500, 500, 450, 50, 50,
    ]);
  });

  it('goes back where it came from', () => {
    let volume = 50;
    const way: number[] = [volume];
    while (volume < 30_000) way.push((volume = nextUp(volume, 30_000)));
    for (let i = way.length - 1; i > 0; i -= 1) expect(nextDown(way[i]!)).toBe(way[i - 1]);
  });

  it('never steps past what fits', () => {
    expect(nextUp(4500, 4700)).toBe(4700);
    expect(nudge(1000, 50, 1020)).toBe(1020);
    expect(nudge(50, -50, 1020)).toBe(50);
  });

  it.each([
    ['1', 1000],
    [' 1,25 ', 1250],
    ['.5', 500],
    ['2.005 mL', 2005],
  ])('reads %j', (text, volume_uL) => {
    expect(parseVolume(text)).toEqual({ ok: true, volume_uL });
  });

  it.each([
    ['', 'Type a volume in mL, such as 1.00.'],
    ['a lot', 'Write the volume as a number, such as 1.00.'],
    ['-1', 'Write the volume as a number, such as 1.00.'],
    ['1.0005', 'The smallest step is 0.001 mL.'],
    ['0', 'Choose more than 0 mL.'],
  ])('says what to do about %j', (text, sentence) => {
    expect(parseVolume(text)).toEqual({ ok: false, sentence });
  });

  it('shows two decimals, and the third where it counts', () => {
    expect([1000, 50, 2005].map(formatVolume)).toEqual(['1.00', '0.05', '2.005']);
  });
});
