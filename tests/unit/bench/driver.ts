/**
 * A pair of hands for tests: works the real bench without a browser, in the words of the trade.
 *
 *   const bench = benchOf(spec);
 *   bench.pickUp('acid').pour('20 mL').into('flask');
 *   bench.expectPH('flask', 4.76);
 */
import { expect } from 'vitest';
import {
  apply,
  createState,
  judge,
  movesOf,
  read,
  type BenchSpec,
  type BenchState,
  type Move,
  type Readings,
  type Refusal,
  type Seen,
  type VesselReading,
} from '../../../src/bench/index.ts';

/** '20 mL', '0.5 mL', '3 drops', '250 µL'. */
function amount(text: string): { volume_uL: number } | { drops: number } {
  const found = /^(\d+(?:\.\d+)?)\s*(mL|µL|uL|drops?)$/.exec(text);
  if (!found) throw new Error(`What amount is "${text}"? Write "20 mL" or "3 drops".`);
  const value = Number(found[1]);
  if (found[2]?.startsWith('drop')) return { drops: value };
  return { volume_uL: Math.round(value * (found[2] === 'mL' ? 1000 : 1)) };
}

export class Bench {
  state: BenchState;
  met: string[] = [];
  lastRefusal: Refusal | null = null;
  seen: Seen = {};

  constructor(
    readonly spec: BenchSpec,
    seed = 1,
  ) {
    this.state = createState(spec, { seed });
  }

  /** Does a move; the test fails where it is refused. */
  do(move: Move): this {
    const outcome = apply(this.state, move);
    if (!outcome.ok) throw new Error(`${move.kind} was refused: ${outcome.refusal.sentence}`);
    this.state = outcome.state;
    this.met.push(...judge(this.spec, this.state, this.met));
    this.lastRefusal = null;
    return this;
  }

  /** Tries a move that has to be refused; the state stays. */
  refused(move: Move, code: Refusal['code']): this {
    const before = this.state;
    const outcome = apply(this.state, move);
    expect(outcome.ok, `${move.kind} should be refused`).toBe(false);
    if (!outcome.ok) {
      expect(outcome.refusal.code).toBe(code);
      expect(outcome.refusal.sentence).toMatch(/^[A-Z"].*[.?]$/s);
      this.lastRefusal = outcome.refusal;
    }
    expect(this.state).toBe(before);
    return this;
  }

  pickUp(from: string) {
    return {
      pour: (text: string) => ({ into: (into: string) => this.do(this.delivery(from, into, text)) }),
      drip: (drops: number) => ({ into: (into: string) => this.do({ kind: 'drip', from, into, drops }) }),
      pourTo: (mark_mL: number) => ({
        into: (into: string) => this.do({ kind: 'pourToMark', from, into, mark_mL }),
      }),
    };
  }

  private delivery(from: string, into: string, text: string): Move {
    const a = amount(text);
    if ('drops' in a) return { kind: 'drip', from, into, drops: a.drops };
    const burette = this.spec.vessels.some((v) => v.id === from && v.glass === 'burette-50');
    return burette
      ? { kind: 'dispense', burette: from, into, volume_uL: a.volume_uL }
      : { kind: 'pour', from, into, volume_uL: a.volume_uL };
  }

  swirl = (vessel: string): this => this.do({ kind: 'swirl', vessel });
  undo = (): this => this.do({ kind: 'undo' });
  startAgain = (): this => this.do({ kind: 'startAgain' });

  get readings(): Readings {
    return read(this.state, this.seen);
  }
  vessel(id: string): VesselReading {
    const found = this.readings.vessels.find((v) => v.id === id);
    if (!found) throw new Error(`no vessel ${id}`);
    return found;
  }
  get moves(): Move[] {
    return movesOf(this.state);
  }

  expectPH(id: string, pH: number, within = 0): this {
    const shown = this.vessel(id).pH;
    expect(shown, `pH of ${id}`).toBeDefined();
    expect(Math.abs((shown ?? NaN) - pH), `pH of ${id} is ${shown}, not ${pH}`).toBeLessThanOrEqual(
      within + 1e-9,
    );
    return this;
  }
  expectVolume(id: string, volume_mL: number): this {
    expect(this.vessel(id).volume_mL, `volume of ${id}`).toBe(volume_mL);
    return this;
  }
  expectMet(...ids: string[]): this {
    expect([...this.met].sort()).toEqual([...ids].sort());
    return this;
  }
}

export const benchOf = (spec: BenchSpec, seed = 1): Bench => new Bench(spec, seed);
