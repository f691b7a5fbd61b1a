import { QueryTypes, type Transaction } from 'sequelize';
import { sequelize } from '../database/index.ts';
import type { Template } from './templates.ts';

/**
 * Puts a mail into the outbox, within the transaction of what causes it. The cause is unique: however often the same
 * thing is done again, one mail goes out.
 */
export async function enqueue(
  mail: {
    cause: string;
    personId: number | null;
    to: string;
    template: Template;
    content: Record<string, string>;
  },
  transaction?: Transaction,
): Promise<void> {
  await sequelize.query(
    `INSERT IGNORE INTO outbox (cause, person_id, recipient, template, content, next_try_at, created_at)
     VALUES (:cause, :personId, :to, :template, :content, NOW(3), NOW(3))`,
    {
      replacements: { ...mail, content: JSON.stringify(mail.content) },
      type: QueryTypes.INSERT,
      transaction,
    },
  );
}
