/** The bench: what a pair of hands does with acid, base and buffer. Pure; imports chemistry alone. */
export * from './types.ts';
export * from './glassware.ts';
export { createState } from './create.ts';
export {
  apply,
  applyJoined,
  BENCH_VERSION,
  check,
  combine,
  definitionOf,
  MAX_MOVES,
  movesOf,
  preview,
  replay,
  statesOf,
  type Replayed,
} from './apply.ts';
export { listMoves, moves, offeredMoves } from './moves/registry.ts';
export type { FieldKind, MoveDefinition } from './moves/kinds.ts';
export { read, readOne } from './read.ts';
export { judge, judgeRun } from './aims.ts';
export { amountsHidden, forBrowser, isGraded, isHidden, traceHidden } from './hiding.ts';
export { notebook, notebookCsv, tellMove, type NotebookReading, type NotebookRow } from './notebook.ts';
export { trace, traceSentence, type TracePoint, type TraceSeries } from './views/trace.ts';
export {
  ledger,
  pairBar,
  speciesBars,
  type Ledger,
  type LedgerRow,
  type PairBar,
  type SpeciesBar,
} from './views/amounts.ts';
export { describe } from './describe.ts';
export { fairness, type Difference, type FairnessNote } from './fairness.ts';
export { changedSpec, whatIf, type Change, type WhatIf } from './what-if.ts';
export { rehearse, type AimRehearsal, type Rehearsal } from './rehearsal/rehearse.ts';
export { roomLeft, type RoomLeft } from './views/room-left.ts';
