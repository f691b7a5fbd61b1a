import { Op } from 'sequelize';
import { Membership, type Role } from '../database/index.ts';

export interface Standing {
  readonly memberships: readonly { readonly role: Role; readonly schoolId: number | null }[];
}

/** The memberships that count now. */
export async function standingOf(personId: number): Promise<Standing> {
  const now = new Date();
  const rows = await Membership.findAll({
    where: {
      personId,
      startsAt: { [Op.lte]: now },
      [Op.or]: [{ endsAt: null }, { endsAt: { [Op.gt]: now } }],
    },
  });
  return { memberships: rows.map(({ role, schoolId }) => ({ role, schoolId })) };
}

export const hasRole = (standing: Standing, roles: readonly Role[]): boolean =>
  standing.memberships.some((membership) => roles.includes(membership.role));

/**
 * May this person open this lesson? The one place that answers it: open lessons for everyone; the others for anyone with
 * any membership that counts now, whatever it came from; a school's own lessons for that school's people.
 */
export function mayOpenLesson(
  standing: Standing | null,
  lesson: { access: 'open' | 'members'; schoolId: number | null },
): boolean {
  if (lesson.schoolId !== null)
    return standing?.memberships.some((m) => m.schoolId === lesson.schoolId) ?? false;
  if (lesson.access === 'open') return true;
  return (standing?.memberships.length ?? 0) > 0;
}

/** The schools that a person belongs to now. */
export const standingSchools = (standing: Standing | null): number[] => [
  ...new Set((standing?.memberships ?? []).flatMap(({ schoolId }) => (schoolId === null ? [] : [schoolId]))),
];
