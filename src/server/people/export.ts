import { QueryTypes } from 'sequelize';
import { sequelize } from '../database/index.ts';

/** Everything that is held about a person, as plain data. Secrets (password hash, token hashes) are left out. */
export async function exportPerson(personId: number): Promise<Record<string, unknown>> {
  const all = async (query: string) => {
    const rows = await sequelize.query<Record<string, unknown>>(query, {
      replacements: { personId },
      type: QueryTypes.SELECT,
    });
    return rows.map(readable);
  };
  const [person] = await all(
    'SELECT public_id, email, email_verified_at, display_name, lang, conventions, created_at, updated_at FROM people WHERE id = :personId',
  );
  return {
    exportedAt: new Date().toISOString(),
    person,
    sessions: await all(
      'SELECT public_id, created_at, expires_at, device FROM sessions WHERE person_id = :personId',
    ),
    memberships: await all(
      'SELECT s.name AS school, m.role, m.source, m.starts_at, m.ends_at FROM memberships m LEFT JOIN schools s ON s.id = m.school_id WHERE m.person_id = :personId',
    ),
    groups: await all(
      'SELECT g.name, p.role FROM group_people p JOIN school_groups g ON g.id = p.group_id WHERE p.person_id = :personId',
    ),
    predictions: await all(
      'SELECT l.slug AS lesson, p.prediction, p.answer, p.confidence, p.observed, p.locked_at, p.observed_at FROM predictions p JOIN lessons l ON l.id = p.lesson_id WHERE p.person_id = :personId',
    ),
    answers: await all(
      'SELECT l.slug AS lesson, a.revision, a.question, a.attempt, a.answer, a.verdict, a.marking, a.at FROM answers a JOIN lessons l ON l.id = a.lesson_id WHERE a.person_id = :personId ORDER BY a.id',
    ),
    metAims: await all(
      'SELECT l.slug AS lesson, a.aim, a.move_number, a.met_at FROM met_aims a JOIN lessons l ON l.id = a.lesson_id WHERE a.person_id = :personId',
    ),
    runs: await all(
      'SELECT r.public_id, l.slug AS lesson, r.revision, r.bench, r.seed, r.created_at, r.updated_at FROM runs r JOIN lessons l ON l.id = r.lesson_id WHERE r.person_id = :personId',
    ),
    moves: await all(
      'SELECT r.public_id AS run, m.number, m.move, m.shown, m.engine_version, m.at FROM run_moves m JOIN runs r ON r.id = m.run_id WHERE r.person_id = :personId ORDER BY m.run_id, m.number',
    ),
    mails: await all(
      'SELECT recipient, template, state, created_at, sent_at FROM outbox WHERE person_id = :personId',
    ),
    log: await all('SELECT at, action FROM audit_log WHERE subject_id = :personId ORDER BY id'),
  };
}

/** Columns that hold JSON, which some drivers hand over as text: the file says it as data. */
const JSON_COLUMNS: ReadonlySet<string> = new Set(['conventions', 'move', 'shown', 'answer', 'marking']);

function readable(row: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(row).map(([name, value]) =>
      // A prediction's answer is the id of an option, and no JSON.
      JSON_COLUMNS.has(name) && typeof value === 'string' && /^[[{]/.test(value)
        ? [name, JSON.parse(value) as unknown]
        : [name, value],
    ),
  );
}
