import type { Standing } from '../access/memberships.ts';

/** For whom an author publishes: one school's people, or (null) everyone whom Dropwise's lessons are open to. */
export type Home = number | null;

/** The homes of this person's lessons; empty for who is no author. A school's author never reaches beyond the school. */
export const homesOf = (standing: Standing | null): Home[] => [
  ...new Set(
    (standing?.memberships ?? []).flatMap(({ role, schoolId }) => (role === 'author' ? [schoolId] : [])),
  ),
];
