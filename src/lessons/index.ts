export * from './types.ts';
export { compile, COMPILER_VERSION, slugOf } from './compile.ts';
export { forLearner } from './learner.ts';
export {
  CONVENTIONS,
  conventionsFrom,
  htmlIn,
  usualIn,
  USUAL,
  wordsIn,
  type Conventions,
} from './conventions.ts';
export { formatNumber, formatProse, formatQuantity, unitName, type NumberStyle } from './format.ts';
export { misconceptions } from './misconceptions.ts';
export { AnswerError, mark, TELLING_ATTEMPT } from './questions/mark.ts';
export type { Answer, Marking, Question, QuestionForLearner, QuestionKind, Tube } from './questions/types.ts';
export { rehearseLesson, type Finding, type LessonRehearsal } from './rehearsal/rehearse.ts';
export { tellFault, tellRehearsal } from './rehearsal/report.ts';
