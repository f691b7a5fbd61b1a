import { createTransport } from 'nodemailer';
import { QueryTypes } from 'sequelize';
import { config } from '../config/index.ts';
import { sequelize, withTransaction } from '../database/index.ts';
import { log } from '../log.ts';
import { render, type Template } from './templates.ts';

const MOST_TRIES = 12;
/** What a mail server says of a recipient who does not exist, has moved or cannot be (RFC 5321, section 4.2.3): asking again is no use. */
const FINAL = new Set([550, 551, 553]);

interface Row {
  id: number;
  recipient: string;
  template: Template;
  content: string | Record<string, string>;
  tries: number;
}

const transport = createTransport({
  url: config.SMTP_URL,
  connectionTimeout: 5000,
  greetingTimeout: 5000,
  socketTimeout: 15_000,
});

/**
 * Sends what is due, one mail a transaction. The row is locked while its mail goes out, so no second process takes it;
 * a process that dies after the server took the mail sends it again with the same Message-ID.
 * @returns how many mails were tried.
 */
export async function sendDue(most = 50): Promise<number> {
  let tried = 0;
  while (tried < most && (await sendOne())) tried += 1;
  return tried;
}

async function sendOne(): Promise<boolean> {
  return withTransaction(async (transaction) => {
    const [row] = await sequelize.query<Row>(
      `SELECT id, recipient, template, content, tries FROM outbox
        WHERE state = 'waiting' AND next_try_at <= NOW(3) ORDER BY next_try_at, id LIMIT 1 FOR UPDATE SKIP LOCKED`,
      { type: QueryTypes.SELECT, transaction },
    );
    if (!row) return false;
    const content =
      typeof row.content === 'string' ? (JSON.parse(row.content) as Record<string, string>) : row.content;
    try {
      const mail = render(row.template, content);
      await transport.sendMail({
        from: config.MAIL_FROM,
        to: { name: '', address: row.recipient },
        messageId: `<outbox-${row.id}@${new URL(config.PUBLIC_URL).hostname}>`,
        ...mail,
      });
      // The link in it is a secret; once sent it is not kept.
      await sequelize.query(
        "UPDATE outbox SET state = 'sent', sent_at = NOW(3), content = '{}', last_error = NULL WHERE id = ?",
        {
          replacements: [row.id],
          type: QueryTypes.UPDATE,
          transaction,
        },
      );
    } catch (error) {
      const tries = row.tries + 1;
      const wait_s = Math.min(3600, 5 * 2 ** row.tries);
      const { responseCode = 0 } = error as { responseCode?: number };
      const state = tries >= MOST_TRIES || FINAL.has(responseCode) ? 'failed' : 'waiting';
      log.warn({ outbox: row.id, tries, state, reason: (error as Error).message }, 'mail not sent');
      await sequelize.query(
        `UPDATE outbox SET tries = :tries, state = :state, next_try_at = DATE_ADD(NOW(3), INTERVAL :wait_s SECOND), last_error = :reason WHERE id = :id`,
        {
          replacements: { id: row.id, tries, state, wait_s, reason: (error as Error).message.slice(0, 300) },
          type: QueryTypes.UPDATE,
          transaction,
        },
      );
    }
    return true;
  });
}
