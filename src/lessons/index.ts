export * from './types.ts';
export { compile, COMPILER_VERSION, slugOf } from './compile.ts';
export { forLearner } from './learner.ts';
