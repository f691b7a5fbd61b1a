// A solve works in the arrays of its compiled system: a profile of the heap shows nothing that grows with the number of solves.
import { Session } from 'node:inspector/promises';
import { expect, test } from 'vitest';
import { createSolution } from '../../../src/chemistry/index.ts';
import { solveInto } from '../../../src/chemistry/compiled.ts';
import type { Model, Solution } from '../../../src/chemistry/types.ts';
import type { Activity } from '../../../src/chemistry/system.ts';

const SOLVES = 20_000;
const OWN =
  /^(solveInto|solveInPlace|systemOf|fits|charges|renewActivities|renewConstants|distribute|judge)$/;

const mixtures: readonly Solution[] = Array.from({ length: 16 }, (_, i) =>
  createSolution({
    parts: [
      { substance: 'CH3COOH', concentration_molL: 0.05 },
      { substance: 'NaH2PO4', concentration_molL: 0.05 },
      { substance: 'citric acid', concentration_molL: 0.02 },
      { substance: 'NaOH', concentration_molL: 0.02 + 0.005 * i },
    ],
    volume_mL: 50,
  }),
);

interface Node {
  callFrame: { functionName: string };
  selfSize: number;
  children: Node[];
}
const bytesOf = (node: Node, wanted: (name: string) => boolean): number =>
  (wanted(node.callFrame.functionName) ? node.selfSize : 0) +
  node.children.reduce((sum, child) => sum + bytesOf(child, wanted), 0);

/** Bytes that the named functions took from the heap while `work` ran, those already given back included. */
async function allocatedBy(wanted: (name: string) => boolean, work: () => void): Promise<number> {
  const session = new Session();
  session.connect();
  await session.post('HeapProfiler.startSampling', {
    samplingInterval: 512,
    includeObjectsCollectedByMajorGC: true,
    includeObjectsCollectedByMinorGC: true,
  } as never);
  work();
  const { profile } = await session.post('HeapProfiler.stopSampling');
  session.disconnect();
  return bytesOf(profile.head as unknown as Node, wanted);
}

const solveMany = (model: Model, activity: Activity, times: number) => {
  let sum = 0;
  for (let i = 0; i < times; i++) sum += solveInto(mixtures[i % 16]!, model, activity).system.pH;
  return sum;
};

test.each([
  ['real', 'sit'],
  ['real', 'davies'],
  ['textbook', 'none'],
] as const)('%s model, %s: nothing is allocated for a solve', async (model, activity) => {
  solveMany(model, activity, SOLVES);
  const bytes = await allocatedBy(
    (name) => OWN.test(name),
    () => solveMany(model, activity, SOLVES),
  );
  // Less than a byte for each solve: nothing that a solve makes is that small.
  expect(bytes / SOLVES).toBeLessThan(1);
});

test('the profile does see an allocation of one small object for each call', async () => {
  const kept: { pH: number }[] = [];
  function allocatesForEachSolve(i: number) {
    kept[0] = { pH: i / 3 };
  }
  const bytes = await allocatedBy(
    (name) => name === 'allocatesForEachSolve',
    () => {
      for (let i = 0; i < SOLVES; i++) allocatesForEachSolve(i);
    },
  );
  expect(bytes / SOLVES).toBeGreaterThan(4);
});
