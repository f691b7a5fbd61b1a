export { giveAnswer, markForVisitor, questionOf, type Marked } from './give.ts';
export { mayAnswer } from './limits.ts';
export { learnerOf, seedOf, VISITOR_SEED, type Answerer } from './learner.ts';
export { answeredIn, answersOf, type StoredAnswer } from './stored.ts';
