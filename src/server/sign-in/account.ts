import { randomUUID } from 'node:crypto';
import { UniqueConstraintError, type Transaction } from 'sequelize';
import { audit } from '../audit.ts';
import { config } from '../config/index.ts';
import { Person, Session, withTransaction } from '../database/index.ts';
import { enqueue } from '../mail/outbox.ts';
import { checkPassword, hashPassword, passwordFault } from './password.ts';
import { issueToken, redeemToken } from './tokens.ts';

/** What a person does with their account. Links are made from PUBLIC_URL alone, never from a request. */
const link = (path: string, secret?: string) =>
  new URL(secret ? `${path}?token=${secret}` : path, config.PUBLIC_URL).href;

/** Addresses are compared as written but for case. */
export const tidyEmail = (email: string): string => email.trim().normalize('NFC');

const byEmail = (email: string, transaction?: Transaction) =>
  Person.findOne({ where: { email: tidyEmail(email) }, ...(transaction ? { transaction } : {}) });

/**
 * Signs a person up. Whether the address is new or not, the answer is the same: a mail goes to it, either with the link
 * that confirms it or with word that it has an account already.
 * @returns the new person's id where one was made.
 */
export async function signUp(input: {
  email: string;
  password: string;
  displayName: string;
}): Promise<number | null> {
  const email = tidyEmail(input.email);
  const passwordHash = await hashPassword(input.password);
  const again = async (): Promise<null> => {
    const existing = await byEmail(email);
    const day = new Date().toISOString().slice(0, 13);
    if (existing)
      await enqueue({
        cause: `sign-up-again:${existing.publicId}:${day}`,
        personId: existing.id,
        to: existing.email!,
        template: 'sign-up-again',
        content: { name: existing.displayName, url: link('/sign-in') },
      });
    return null;
  };
  if (await byEmail(email)) return again();
  try {
    return await withTransaction(async (transaction) => {
      const person = await Person.create(
        {
          publicId: randomUUID(),
          email,
          displayName: input.displayName.trim(),
          passwordHash,
          emailVerifiedAt: null,
          conventions: null,
          disabledAt: null,
        },
        { transaction },
      );
      await sendVerification(person, transaction);
      await audit({ action: 'signed up', actorId: person.id, subjectId: person.id }, transaction);
      return person.id;
    });
  } catch (error) {
    if (error instanceof UniqueConstraintError) return again();
    throw error;
  }
}

export async function sendVerification(person: Person, transaction: Transaction): Promise<void> {
  const secret = await issueToken('verify', person.id, person.email, transaction);
  await enqueue(
    {
      cause: `verify:${secret.slice(0, 12)}`,
      personId: person.id,
      to: person.email!,
      template: 'verify',
      content: { name: person.displayName, url: link('/verify', secret) },
    },
    transaction,
  );
}

/** @returns the person's id, or null where the link is used up, too old or wrong. */
export async function verifyEmail(secret: string): Promise<number | null> {
  return withTransaction(async (transaction) => {
    const token = await redeemToken('verify', secret, transaction);
    if (!token) return null;
    // The address must still be the one that the link was sent to.
    const [changed] = await Person.update(
      { emailVerifiedAt: new Date() },
      { where: { id: token.personId, email: token.email }, transaction },
    );
    if (changed === 0) return null;
    await audit(
      { action: 'confirmed e-mail', actorId: token.personId, subjectId: token.personId },
      transaction,
    );
    return token.personId;
  });
}

/** @returns the person whose address and password these are, or null; both answers take equally long. */
export async function signInWithPassword(email: string, password: string): Promise<Person | null> {
  const person = await byEmail(email);
  const right = await checkPassword(person?.passwordHash, password);
  return right && person && !person.disabledAt ? person : null;
}

/** Sends a link for a new password where the address has an account; says nothing either way. */
export async function requestReset(email: string): Promise<void> {
  await withTransaction(async (transaction) => {
    const person = await byEmail(email, transaction);
    if (!person || person.disabledAt) return;
    const secret = await issueToken('reset', person.id, person.email, transaction);
    await enqueue(
      {
        cause: `reset:${secret.slice(0, 12)}`,
        personId: person.id,
        to: person.email!,
        template: 'reset',
        content: { name: person.displayName, url: link('/reset', secret) },
      },
      transaction,
    );
  });
}

type Result = { ok: true } | { ok: false; field: string; message: string };

async function setPassword(
  person: Person,
  password: string,
  keepSession: string | null,
  transaction: Transaction,
): Promise<void> {
  const now = new Date();
  await person.update({ passwordHash: await hashPassword(password) }, { transaction });
  const sessions = await Session.findAll({ where: { personId: person.id }, transaction });
  for (const session of sessions)
    if (session.publicId !== keepSession) await session.destroy({ transaction });
  await audit({ action: 'changed password', actorId: person.id, subjectId: person.id }, transaction);
  if (person.email)
    await enqueue(
      {
        cause: `password-changed:${person.publicId}:${now.getTime()}`,
        personId: person.id,
        to: person.email,
        template: 'password-changed',
        content: { name: person.displayName, url: link('/forgot') },
      },
      transaction,
    );
}

/** Sets a new password by a mailed link, signs all browsers out, and counts as proof of the address. */
export async function resetPassword(secret: string, password: string): Promise<Result> {
  return withTransaction(async (transaction) => {
    const fault = passwordFault(password);
    if (fault) return { ok: false, field: 'password', message: fault };
    const token = await redeemToken('reset', secret, transaction);
    const person =
      token && (await Person.findOne({ where: { id: token.personId, email: token.email }, transaction }));
    if (!person)
      return {
        ok: false,
        field: 'token',
        message: 'This link was used already or is too old. Ask for a new one.',
      };
    await setPassword(person, password, null, transaction);
    if (!person.emailVerifiedAt) await person.update({ emailVerifiedAt: new Date() }, { transaction });
    return { ok: true };
  });
}

export async function changePassword(
  personId: number,
  current: string,
  next: string,
  keepSession: string | null,
): Promise<Result> {
  const person = await Person.findByPk(personId, { rejectOnEmpty: true });
  if (!(await checkPassword(person.passwordHash, current)))
    return { ok: false, field: 'current', message: 'That is not your current password.' };
  const fault = passwordFault(next, [person.email, person.displayName]);
  if (fault) return { ok: false, field: 'password', message: fault };
  await withTransaction((transaction) => setPassword(person, next, keepSession, transaction));
  return { ok: true };
}

/** Sends a link to the new address; nothing changes until it is opened. Says the same when the address is taken. */
export async function requestEmailChange(personId: number, current: string, email: string): Promise<Result> {
  const person = await Person.findByPk(personId, { rejectOnEmpty: true });
  if (!(await checkPassword(person.passwordHash, current)))
    return { ok: false, field: 'current', message: 'That is not your current password.' };
  const next = tidyEmail(email);
  await withTransaction(async (transaction) => {
    if (await byEmail(next, transaction)) return;
    const secret = await issueToken('change-email', personId, next, transaction);
    await enqueue(
      {
        cause: `change-email:${secret.slice(0, 12)}`,
        personId,
        to: next,
        template: 'change-email',
        content: { name: person.displayName, url: link('/verify-change', secret) },
      },
      transaction,
    );
  });
  return { ok: true };
}

/** @returns false where the link is used up, too old, or the address was taken meanwhile. */
export async function confirmEmailChange(secret: string): Promise<boolean> {
  try {
    return await withTransaction(async (transaction) => {
      const token = await redeemToken('change-email', secret, transaction);
      if (!token?.email) return false;
      const person = await Person.findByPk(token.personId, { rejectOnEmpty: true, transaction });
      const old = person.email;
      await person.update({ email: token.email, emailVerifiedAt: new Date() }, { transaction });
      await audit({ action: 'changed e-mail', actorId: person.id, subjectId: person.id }, transaction);
      if (old)
        await enqueue(
          {
            cause: `email-changed:${secret.slice(0, 12)}`,
            personId: person.id,
            to: old,
            template: 'email-changed',
            content: { name: person.displayName, email: token.email },
          },
          transaction,
        );
      return true;
    });
  } catch (error) {
    if (error instanceof UniqueConstraintError) return false;
    throw error;
  }
}

/** Deletes the person and everything that hangs on them; the audit log keeps that it happened, without who. */
export async function deleteAccount(personId: number, current: string): Promise<Result> {
  const person = await Person.findByPk(personId, { rejectOnEmpty: true });
  if (!(await checkPassword(person.passwordHash, current)))
    return { ok: false, field: 'current', message: 'That is not your current password.' };
  await withTransaction(async (transaction) => {
    await person.destroy({ transaction });
    await audit({ action: 'deleted account', actorId: null, subjectId: null }, transaction);
  });
  return { ok: true };
}
