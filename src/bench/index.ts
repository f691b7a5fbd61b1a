/** The bench: what a pair of hands does with acid, base and buffer. Pure; imports chemistry alone. */
export * from './types.ts';
export * from './glassware.ts';
export { createState } from './create.ts';
export {
  apply,
  applyJoined,
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
export { read } from './read.ts';
export { judge, judgeRun } from './aims.ts';
export { amountsHidden, forBrowser, isGraded, isHidden, traceHidden } from './hiding.ts';
