import { expect, test } from 'vitest';
import { workFor } from '../../src/islands/bench/sync/work.ts';

const given = { lesson: 'meeting-a-buffer', bench: 'water-or-buffer', prediction: 'which' };

test('on the server one person is never shown the work of another', () => {
  const move = { kind: 'drip', from: 'acid', into: 'water', drops: 1 } as const;
  const run = { runId: 'a', seed: 7, moves: [move] };
  const hers = workFor({
    ...given,
    person: 'ines',
    run,
    locked: { answer: 'x', confidence: 2, observed: null },
  });
  const his = workFor({ ...given, person: 'tariq' });
  expect(hers.moves()).toEqual([move]);
  expect(his.moves()).toEqual([]);
  expect(his.store.getState().prediction).toBeNull();
  expect(workFor({ ...given, person: null }).given.person).toBeNull();
});
