import { QueryTypes, type Transaction } from 'sequelize';
import { sequelize } from './database/index.ts';

/** Writes one line into the audit log, in the transaction of what it tells of. Details hold no secrets and no names. */
export async function audit(
  entry: {
    action: string;
    actorId: number | null;
    subjectId?: number | null;
    schoolId?: number | null;
    details?: Record<string, string | number | boolean>;
  },
  transaction?: Transaction,
): Promise<void> {
  await sequelize.query(
    `INSERT INTO audit_log (at, actor_id, subject_id, school_id, action, details)
     VALUES (NOW(3), :actorId, :subjectId, :schoolId, :action, :details)`,
    {
      replacements: {
        actorId: entry.actorId,
        subjectId: entry.subjectId ?? null,
        schoolId: entry.schoolId ?? null,
        action: entry.action,
        details: entry.details ? JSON.stringify(entry.details) : null,
      },
      type: QueryTypes.INSERT,
      transaction,
    },
  );
}
