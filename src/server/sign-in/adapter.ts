import { randomUUID } from 'node:crypto';
import type { Adapter, DatabaseSession, DatabaseUser } from 'lucia';
import { Op, QueryTypes } from 'sequelize';
import { Session, sequelize } from '../database/index.ts';
import { hashSecret } from './secrets.ts';

interface Row {
  personId: number;
  publicId: string;
  createdAt: Date;
  expiresAt: Date;
  endsAt: Date;
  device: string;
  personPublicId: string;
  displayName: string;
  email: string | null;
  emailVerifiedAt: Date | null;
  lang: string;
  conventions: Record<string, string> | string | null;
}

/**
 * Lucia's storage. Lucia hands over raw session ids; only their SHA-256 reaches the database, so that a copy of the
 * database opens no session.
 */
export const adapter: Adapter = {
  async getSessionAndUser(id) {
    const [row] = await sequelize.query<Row>(
      `SELECT s.person_id AS personId, s.public_id AS publicId, s.created_at AS createdAt, s.expires_at AS expiresAt,
              s.ends_at AS endsAt, s.device AS device, p.public_id AS personPublicId, p.display_name AS displayName,
              p.email AS email, p.email_verified_at AS emailVerifiedAt, p.lang AS lang, p.conventions AS conventions
         FROM sessions s JOIN people p ON p.id = s.person_id
        WHERE s.id_hash = ? AND p.disabled_at IS NULL`,
      { replacements: [hashSecret(id)], type: QueryTypes.SELECT },
    );
    if (!row) return [null, null];
    // The absolute end counts like the idle one, whichever comes first.
    const expiresAt = row.expiresAt < row.endsAt ? row.expiresAt : row.endsAt;
    const session: DatabaseSession = {
      id,
      userId: row.personId,
      expiresAt,
      attributes: {
        publicId: row.publicId,
        createdAt: row.createdAt,
        endsAt: row.endsAt,
        device: row.device,
      },
    };
    const user: DatabaseUser = {
      id: row.personId,
      attributes: {
        publicId: row.personPublicId,
        displayName: row.displayName,
        email: row.email,
        emailVerifiedAt: row.emailVerifiedAt,
        lang: row.lang,
        conventions: typeof row.conventions === 'string' ? JSON.parse(row.conventions) : row.conventions,
      },
    };
    return [session, user];
  },
  async getUserSessions(personId) {
    const rows = await Session.findAll({
      where: { personId, expiresAt: { [Op.gt]: new Date() } },
      order: [['createdAt', 'DESC']],
    });
    return rows.map((row) => ({
      id: row.idHash,
      userId: personId,
      expiresAt: row.expiresAt,
      attributes: {
        publicId: row.publicId,
        createdAt: row.createdAt,
        endsAt: row.endsAt,
        device: row.device,
      },
    }));
  },
  async setSession(session) {
    const { attributes } = session;
    await Session.create({
      idHash: hashSecret(session.id),
      personId: session.userId,
      expiresAt: session.expiresAt,
      publicId: attributes.publicId ?? randomUUID(),
      createdAt: attributes.createdAt,
      endsAt: attributes.endsAt,
      device: attributes.device,
    });
  },
  async updateSessionExpiration(id, expiresAt) {
    await Session.update({ expiresAt }, { where: { idHash: hashSecret(id) } });
  },
  async deleteSession(id) {
    await Session.destroy({ where: { idHash: hashSecret(id) } });
  },
  async deleteUserSessions(personId) {
    await Session.destroy({ where: { personId } });
  },
  async deleteExpiredSessions() {
    const now = new Date();
    await Session.destroy({
      where: { [Op.or]: [{ expiresAt: { [Op.lte]: now } }, { endsAt: { [Op.lte]: now } }] },
    });
  },
};
