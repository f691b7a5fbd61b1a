export { homesOf, type Home } from './authors.ts';
export { checkLesson, type Checked } from './check.ts';
export { mayCheck } from './limits.ts';
export { publishFromDesk, revisionsOf, tellVanishing, textOf, vanishingWith } from './publish.ts';
