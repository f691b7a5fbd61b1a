import { describe, expect, it } from 'vitest';
import { nextTarget } from '../../../src/islands/bench/hand/targets';

const ids = ['water', 'buffer', 'third'];

describe('arrow keys between vessels', () => {
  it('begin at the vessel that the sentence names', () => {
    expect(nextTarget(ids, null, 'buffer', 'ArrowDown')).toBe('buffer');
    expect(nextTarget(ids, null, 'gone', 'ArrowLeft')).toBe('water');
  });

  it('go one vessel on and stop at the ends', () => {
    expect(nextTarget(ids, 'water', 'water', 'ArrowRight')).toBe('buffer');
    expect(nextTarget(ids, 'third', 'water', 'ArrowRight')).toBe('third');
    expect(nextTarget(ids, 'buffer', 'water', 'ArrowUp')).toBe('water');
    expect(nextTarget(ids, 'water', 'water', 'ArrowLeft')).toBe('water');
  });

  it('leave other keys and an empty slab alone', () => {
    expect(nextTarget(ids, 'water', 'water', 'KeyA')).toBeNull();
    expect(nextTarget([], null, 'water', 'ArrowDown')).toBeNull();
  });
});
