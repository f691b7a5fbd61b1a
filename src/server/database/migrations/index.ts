import type { Migration } from '../migrate.ts';
import { people } from './001-people.ts';
import { lessons } from './100-lessons.ts';
import { runs } from './150-runs.ts';
import { answers } from './160-answers.ts';

/** In the order in which they run. A migration that has shipped is never changed. */
export const migrations: readonly Migration[] = [people, lessons, runs, answers];
