// People: signing up and in, secrets by mail, sessions, limits, and what is left when somebody goes.
import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, beforeEach, expect, test, vi } from 'vitest';
import { migrate, Person, School, sequelize, withTransaction } from '../../src/server/database/index.ts';
import { exportPerson } from '../../src/server/people/export.ts';
import {
  changePassword,
  confirmEmailChange,
  deleteAccount,
  requestEmailChange,
  requestReset,
  resetPassword,
  sendVerification,
  signInWithPassword,
  signUp,
  verifyEmail,
} from '../../src/server/sign-in/account.ts';
import { passwordFault } from '../../src/server/sign-in/password.ts';
import { createSession, endSessions, listSessions, readSession } from '../../src/server/sign-in/sessions.ts';
import { afterFailure, afterSuccess, beforeTry } from '../../src/server/sign-in/throttle.ts';

/** Every hash that a password was checked against. */
const hashes = vi.hoisted((): string[] => []);
vi.mock('@node-rs/argon2', async (original) => {
  const argon2 = await original<typeof import('@node-rs/argon2')>();
  return {
    ...argon2,
    verify: (stored: string, password: string) => {
      hashes.push(stored);
      return argon2.verify(stored, password);
    },
  };
});

const PASSWORD = 'samphire at low tide';
let email: string;
let id: number;

const rows = <T extends object>(sql: string, replacements: unknown[] = []) =>
  sequelize.query<T>(sql, { replacements, type: QueryTypes.SELECT });
const mails = (to: string) =>
  rows<{ template: string; content: string | { url?: string } }>(
    'SELECT template, content FROM outbox WHERE recipient = ? ORDER BY id',
    [to],
  );
/** The secret of the newest mail of this kind. */
async function secretOf(to: string, template: string): Promise<string> {
  const found = (await mails(to)).filter((mail) => mail.template === template).at(-1)!;
  const content = (typeof found.content === 'string' ? JSON.parse(found.content) : found.content) as {
    url: string;
  };
  return new URL(content.url).searchParams.get('token')!;
}

beforeAll(async () => void (await migrate()));
beforeEach(async () => {
  email = `${randomUUID()}@learner.example`;
  id = (await signUp({ email, password: PASSWORD, displayName: 'Mira Tallow' }))!;
});
afterAll(() => sequelize.close());

test('a new person confirms their address by a link that works once', async () => {
  const secret = await secretOf(email, 'verify');
  expect((await Person.findByPk(id))!.emailVerifiedAt).toBeNull();
  expect(await verifyEmail(secret)).toBe(id);
  expect((await Person.findByPk(id))!.emailVerifiedAt).toBeInstanceOf(Date);
  expect(await verifyEmail(secret)).toBeNull();
  expect(await verifyEmail('no such secret')).toBeNull();
});

test('a link is stored as a hash, belongs to one purpose, and grows old', async () => {
  const secret = await secretOf(email, 'verify');
  const [token] = await rows<{ hash: string }>('SELECT hash FROM tokens WHERE person_id = ?', [id]);
  expect(token!.hash).not.toContain(secret);
  expect((await resetPassword(secret, 'another one by the sluice')).ok).toBe(false);
  await sequelize.query('UPDATE tokens SET expires_at = NOW(3) - INTERVAL 1 SECOND WHERE person_id = ?', {
    replacements: [id],
  });
  expect(await verifyEmail(secret)).toBeNull();
});

test('a newer link replaces the one before', async () => {
  const first = await secretOf(email, 'verify');
  const person = (await Person.findByPk(id))!;
  await withTransaction((transaction) => sendVerification(person, transaction));
  const second = await secretOf(email, 'verify');
  expect(second).not.toBe(first);
  expect(await verifyEmail(first)).toBeNull();
  expect(await verifyEmail(second)).toBe(id);
});

test('two uses of one link at once: one of them counts', async () => {
  const secret = await secretOf(email, 'verify');
  const answers = await Promise.all(Array.from({ length: 8 }, () => verifyEmail(secret)));
  expect(answers.filter((answer) => answer === id)).toHaveLength(1);
});

test('signing up with a known address makes nobody and says nothing; its owner gets one mail an hour', async () => {
  for (let i = 0; i < 3; i++)
    expect(await signUp({ email, password: 'somebody else’s password', displayName: 'X' })).toBeNull();
  expect((await mails(email)).map(({ template }) => template)).toEqual(['verify', 'sign-up-again']);
  expect(await signInWithPassword(email, 'somebody else’s password')).toBeNull();
  const at = await Promise.all(
    Array.from({ length: 5 }, () =>
      signUp({ email: `race.${email}`, password: PASSWORD, displayName: 'Race' }),
    ),
  );
  expect(at.filter((one) => one !== null)).toHaveLength(1);
});

test('the password opens the account; another, an unknown address and a closed account do not', async () => {
  expect((await signInWithPassword(email, PASSWORD))?.id).toBe(id);
  expect((await signInWithPassword(email.toUpperCase(), PASSWORD))?.id).toBe(id);
  expect(await signInWithPassword(email, `${PASSWORD} `)).toBeNull();
  expect(await signInWithPassword(`nobody.${email}`, PASSWORD)).toBeNull();
  await Person.update({ disabledAt: new Date() }, { where: { id } });
  expect(await signInWithPassword(email, PASSWORD)).toBeNull();
});

test('an unknown address costs as much work as a known one: a hash is checked for it, too', async () => {
  const costOf = async (address: string) => {
    hashes.length = 0;
    await signInWithPassword(address, 'wrong password here');
    return hashes.map((stored) => /^\$argon2id\$v=19\$m=\d+,t=\d+,p=\d+\$/.exec(stored)![0]);
  };
  const known = await costOf(email);
  expect(known).toHaveLength(1);
  expect(await costOf(`nobody.${email}`)).toEqual(known);
});

test('a lost password: silence for strangers; one link, every browser signed out, the address proved', async () => {
  await requestReset(`nobody.${email}`);
  expect(await mails(`nobody.${email}`)).toEqual([]);
  const session = await createSession(id, 'a school tablet');
  await requestReset(email);
  const secret = await secretOf(email, 'reset');
  expect(await resetPassword(secret, 'short')).toMatchObject({ ok: false, field: 'password' });
  expect(await resetPassword(secret, 'sea lavender by the sluice')).toEqual({ ok: true });
  expect((await readSession(session.value)).person).toBeNull();
  expect(await signInWithPassword(email, PASSWORD)).toBeNull();
  expect((await signInWithPassword(email, 'sea lavender by the sluice'))?.emailVerifiedAt).toBeInstanceOf(
    Date,
  );
  expect(await resetPassword(secret, 'sea lavender by the sluice')).toMatchObject({
    ok: false,
    field: 'token',
  });
  expect((await mails(email)).map(({ template }) => template)).toContain('password-changed');
});

test('a changed password needs the current one and ends the other browsers, not this one', async () => {
  const [here, there] = [await createSession(id, 'here'), await createSession(id, 'there')];
  const { sessionId } = await readSession(here.value);
  expect(await changePassword(id, 'wrong', 'glasswort after the tide', sessionId)).toMatchObject({
    field: 'current',
  });
  expect(await changePassword(id, PASSWORD, 'mira tallow', sessionId)).toMatchObject({ field: 'password' });
  expect(await changePassword(id, PASSWORD, 'glasswort after the tide', sessionId)).toEqual({ ok: true });
  expect((await readSession(here.value)).person?.id).toBe(id);
  expect((await readSession(there.value)).person).toBeNull();
});

test('a changed address needs the current password and the new one’s proof; the old one is told', async () => {
  const next = `next.${email}`;
  expect(await requestEmailChange(id, 'wrong', next)).toMatchObject({ field: 'current' });
  expect(await requestEmailChange(id, PASSWORD, next)).toEqual({ ok: true });
  expect((await Person.findByPk(id))!.email).toBe(email);
  expect(await confirmEmailChange(await secretOf(next, 'change-email'))).toBe(true);
  expect((await signInWithPassword(next, PASSWORD))?.id).toBe(id);
  expect((await mails(email)).at(-1)!.template).toBe('email-changed');
});

test('a taken address gives the same answer and no mail; taken meanwhile, the link does nothing', async () => {
  const other = `${randomUUID()}@learner.example`;
  await signUp({ email: other, password: PASSWORD, displayName: 'Jonas Reedmace' });
  expect(await requestEmailChange(id, PASSWORD, other)).toEqual({ ok: true });
  expect((await mails(other)).map(({ template }) => template)).toEqual(['verify']);
  const wanted = `wanted.${email}`;
  await requestEmailChange(id, PASSWORD, wanted);
  const secret = await secretOf(wanted, 'change-email');
  await signUp({ email: wanted, password: PASSWORD, displayName: 'Quicker' });
  expect(await confirmEmailChange(secret)).toBe(false);
  expect((await Person.findByPk(id))!.email).toBe(email);
});

test('sessions: stored as hashes, listed by public ids, ended one by one', async () => {
  const [a, b] = [await createSession(id, 'a tablet'), await createSession(id, 'a laptop')];
  const stored = await rows<{ id_hash: string }>('SELECT id_hash FROM sessions WHERE person_id = ?', [id]);
  for (const { id_hash } of stored) expect([a.value, b.value]).not.toContain(id_hash);
  const list = await listSessions(id);
  expect(list.map(({ device }) => device).sort()).toEqual(['a laptop', 'a tablet']);
  const stranger = await signUp({ email: `s.${email}`, password: PASSWORD, displayName: 'Stranger' });
  expect(await endSessions(stranger!, { only: list[0]!.id })).toBe(0);
  expect(await endSessions(id, { only: list.find(({ device }) => device === 'a tablet')!.id })).toBe(1);
  expect((await readSession(a.value)).person).toBeNull();
  expect((await readSession(b.value)).person?.id).toBe(id);
  expect((await readSession('x'.repeat(5000))).person).toBeNull();
});

test('a session ends when it was idle too long, and at its absolute end whatever was done', async () => {
  const session = await createSession(id, 'a tablet');
  const set = (column: string, when: string) =>
    sequelize.query(`UPDATE sessions SET ${column} = NOW(3) ${when} WHERE person_id = ?`, {
      replacements: [id],
    });
  // More than half of its idle time is over: it is extended, and the browser is told.
  await set('expires_at', '+ INTERVAL 1 DAY');
  expect((await readSession(session.value)).cookie).not.toBeNull();
  await set('ends_at', '- INTERVAL 1 SECOND');
  expect((await readSession(session.value)).person).toBeNull();
  const idle = await createSession(id, 'a tablet');
  await set('expires_at', '- INTERVAL 1 SECOND');
  expect((await readSession(idle.value)).person).toBeNull();
});

test('a class behind one address: 35 sign-ins with 10 typos, and 1,500 in an hour, are not slowed', async () => {
  const address = `198.51.100.${1 + Math.floor(Math.random() * 250)}-${randomUUID()}`;
  for (let i = 0; i < 35; i++) {
    const account = `pupil${i}.${email}`;
    if (i < 10) {
      expect(await beforeTry(account, address, false)).toEqual({ allowed: true, wait_ms: 0 });
      await afterFailure(account);
    }
    expect(await beforeTry(account, address, false)).toEqual({ allowed: true, wait_ms: 0 });
    await afterSuccess(account);
  }
  for (let i = 45; i < 1500; i += 100)
    await Promise.all(
      Array.from({ length: Math.min(100, 1500 - i) }, (_, k) =>
        beforeTry(`${i + k}.${email}`, address, false),
      ),
    );
  // Slower and slower from there, and never shut out.
  for (let i = 0; i < 100; i++) await beforeTry(`later${i}.${email}`, address, false);
  const late = await beforeTry(`last.${email}`, address, false);
  expect(late).toMatchObject({ allowed: true });
  expect((late as { wait_ms: number }).wait_ms).toBeGreaterThan(500);
  expect((late as { wait_ms: number }).wait_ms).toBeLessThanOrEqual(2000);
}, 60_000);

test('an account under attack is paused for strangers; its owner’s own browser gets in; a restart forgets nothing', async () => {
  for (let i = 0; i < 10; i++) await afterFailure(email);
  await beforeTry(email, 'a', false);
  expect(await beforeTry(email, 'b', false)).toMatchObject({ allowed: false });
  expect(await beforeTry(email, 'c', true)).toMatchObject({ allowed: true });
  const [kept] = await rows<{ points: number }>('SELECT MAX(points) points FROM rate_limits');
  expect(kept!.points).toBeGreaterThanOrEqual(10);
  vi.resetModules();
  const again = await import('../../src/server/sign-in/throttle.ts');
  const { sequelize: second } = await import('../../src/server/database/index.ts');
  expect(await again.beforeTry(email.toUpperCase(), 'd', false)).toMatchObject({ allowed: false });
  await second.close();
  // Neither addresses nor accounts stand in the table.
  const keys = await rows<{ key: string }>('SELECT `key` FROM rate_limits');
  expect(keys.filter(({ key }) => key.includes(email))).toEqual([]);
});

test.each([
  ['seven77', /at least 8/],
  ['x'.repeat(257), /at most 256/],
  ['password123', /lists that attackers try/],
  ['aaaaaaaaaaaa', /repeats itself/],
])('the password %s is refused with what to do', (password, why) => {
  expect(passwordFault(password)).toMatch(why);
});

test('a password is taken as typed: emoji, spaces and 256 characters', () => {
  for (const password of ['🧪🧫🔬⚗️ over there', ' leading and trailing ', 'abcd'.repeat(64)])
    expect(passwordFault(password), password).toBeNull();
});

test('whoever goes is gone: a marker in every field that holds a word is nowhere afterwards', async () => {
  const marker = `marker${randomUUID().replaceAll('-', '')}`;
  const address = `${marker}@learner.example`;
  const goer = (await signUp({ email: address, password: PASSWORD, displayName: `Name ${marker}` }))!;
  await createSession(goer, `device ${marker}`);
  await requestReset(address);
  const school = await School.create({
    publicId: randomUUID(),
    name: 'Harrowmere College',
    code: `H${Math.random().toString(36).slice(2, 8)}`.toUpperCase(),
  });
  await sequelize.query(
    `INSERT INTO memberships (person_id, school_id, role, source, starts_at, created_at) VALUES (?, ?, 'learner', 'seat', NOW(3), NOW(3))`,
    { replacements: [goer, school.id] },
  );
  await Person.update({ conventions: { mark: marker } }, { where: { id: goer } });
  const exported = JSON.stringify(await exportPerson(goer));
  expect(exported).toContain(`Name ${marker}`);
  expect(exported).toContain(`device ${marker}`);
  expect(exported).not.toMatch(/argon2|password_hash|id_hash/);

  const found = async () => {
    const columns = await rows<{ t: string; c: string }>(
      `SELECT TABLE_NAME t, COLUMN_NAME c FROM information_schema.COLUMNS
        WHERE TABLE_SCHEMA = DATABASE() AND DATA_TYPE IN ('char', 'varchar', 'text', 'mediumtext', 'longtext', 'json')`,
    );
    const places: string[] = [];
    for (const { t, c } of columns) {
      const [hit] = await rows<{ n: number }>(`SELECT COUNT(*) n FROM \`${t}\` WHERE \`${c}\` LIKE ?`, [
        `%${marker}%`,
      ]);
      if (Number(hit!.n) > 0) places.push(`${t}.${c}`);
    }
    return places.sort();
  };
  expect(await found()).toEqual(
    expect.arrayContaining(['outbox.recipient', 'people.display_name', 'people.email', 'sessions.device']),
  );
  expect(await deleteAccount(goer, 'wrong')).toMatchObject({ field: 'current' });
  expect(await deleteAccount(goer, PASSWORD)).toEqual({ ok: true });
  expect(await found()).toEqual([]);
  const [left] = await rows<{ n: number }>('SELECT COUNT(*) n FROM memberships WHERE person_id = ?', [goer]);
  expect(Number(left!.n)).toBe(0);
});
