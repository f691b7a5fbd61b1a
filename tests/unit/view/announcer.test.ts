import { describe, expect, it } from 'vitest';
import { createAnnouncer, type Timers } from '../../../src/islands/bench/words/announcer';

function rig() {
  const spoken: string[] = [];
  let now = 0;
  let due: { at: number; call: () => void } | null = null;
  const timers: Timers = {
    now: () => now,
    after: (ms, call) => {
      due = { at: now + ms, call };
      return 1;
    },
    clear: () => {
      due = null;
    },
  };
  const pass = (ms: number) => {
    now += ms;
    if (due !== null && due.at <= now) {
      const { call } = due;
      due = null;
      call();
    }
  };
  return { announcer: createAnnouncer((message) => spoken.push(message), timers), spoken, pass };
}

describe('the live region', () => {
  it('says the first message at once and at most one a second after it', () => {
    const { announcer, spoken, pass } = rig();
    announcer.say('one');
    announcer.say('two');
    pass(400);
    announcer.say('three');
    expect(spoken).toEqual(['one']);
    pass(600);
    expect(spoken).toEqual(['one', 'three']);
  });

  it('speaks at once again after a quiet second', () => {
    const { announcer, spoken, pass } = rig();
    announcer.say('one');
    pass(1001);
    announcer.say('two');
    expect(spoken).toEqual(['one', 'two']);
  });

  it('is silent after it was stopped', () => {
    const { announcer, spoken, pass } = rig();
    announcer.say('one');
    announcer.say('two');
    announcer.stop();
    pass(2000);
    expect(spoken).toEqual(['one']);
  });
});
