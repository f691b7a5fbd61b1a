// `npm run check`: format, lint, types and import rules, the part of the tests that takes seconds.
import { runChecks } from './checks.mjs';

const { passed, failed } = await runChecks();
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
