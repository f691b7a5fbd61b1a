import { Op, type Transaction } from 'sequelize';
import { Token, type TokenPurpose } from '../database/index.ts';
import { hashSecret, newSecret } from './secrets.ts';

const HOURS: Record<TokenPurpose, number> = { verify: 24, reset: 1, 'change-email': 24 };

/** Makes a link's secret; earlier ones for the same purpose stop working. */
export async function issueToken(
  purpose: TokenPurpose,
  personId: number,
  email: string | null,
  transaction: Transaction,
): Promise<string> {
  const secret = newSecret();
  const now = new Date();
  await Token.destroy({ where: { personId, purpose }, transaction });
  await Token.create(
    {
      hash: hashSecret(secret),
      purpose,
      personId,
      email,
      createdAt: now,
      expiresAt: new Date(now.getTime() + HOURS[purpose] * 3_600_000),
    },
    { transaction },
  );
  return secret;
}

/** Is this secret good? Does not use it up. */
export async function tokenIsGood(purpose: TokenPurpose, secret: string): Promise<boolean> {
  return (
    (await Token.count({
      where: { hash: hashSecret(secret), purpose, expiresAt: { [Op.gt]: new Date() } },
    })) === 1
  );
}

/** Uses a secret up; a second use, or two at once, get null. */
export async function redeemToken(
  purpose: TokenPurpose,
  secret: string,
  transaction: Transaction,
): Promise<{ personId: number; email: string | null } | null> {
  const where = { hash: hashSecret(secret), purpose, expiresAt: { [Op.gt]: new Date() } };
  const token = await Token.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
  if (!token) return null;
  await token.destroy({ transaction });
  return { personId: token.personId, email: token.email };
}

export async function deleteExpiredTokens(): Promise<void> {
  await Token.destroy({ where: { expiresAt: { [Op.lte]: new Date() } } });
}
