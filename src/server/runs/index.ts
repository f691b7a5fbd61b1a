export { openRun, ownRun } from './open.ts';
export { saveMoves, type Saved, type SentMove } from './save.ts';
export { lockPrediction, observe, predictionsOf, type StoredPrediction } from './predict.ts';
export { doneIn, progressOf, type Progress } from './progress.ts';
export { rackOf, type Tube } from './rack.ts';
export { runPage, runsOf, type RunInList, type RunPage } from './notebook.ts';
export { takeOver, type LocalWork } from './take-over.ts';
