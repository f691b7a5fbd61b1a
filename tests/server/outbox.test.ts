// The outbox: one mail for one cause, whoever sends, however often the mail server refuses.
import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll, beforeEach, expect, test, vi } from 'vitest';

interface Caught {
  from: string;
  to: string[];
  raw: string;
}
const caught: Caught[] = [];
/** What the server answers to the next recipients: none, a passing refusal, or a lasting one. */
let refusal: { code: number; text: string } | null = null;
const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ['STARTTLS', 'AUTH'],
  logger: false,
  onRcptTo: (_address, _session, done) =>
    done(refusal ? Object.assign(new Error(refusal.text), { responseCode: refusal.code }) : undefined),
  onData: (stream, session, done) => {
    let raw = '';
    stream.setEncoding('utf8').on('data', (chunk: string) => (raw += chunk));
    stream.on('end', () => {
      const { mailFrom, rcptTo } = session.envelope;
      caught.push({
        from: mailFrom ? mailFrom.address : '',
        to: rcptTo.map(({ address }) => address),
        raw,
      });
      done();
    });
  },
});
await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
process.env.SMTP_URL = `smtp://127.0.0.1:${(server.server.address() as { port: number }).port}`;
process.env.LOG_LEVEL = 'silent';

const { migrate, sequelize, withTransaction } = await import('../../src/server/database/index.ts');
const { enqueue } = await import('../../src/server/mail/outbox.ts');
const { sendDue } = await import('../../src/server/mail/send.ts');

beforeAll(async () => void (await migrate()));
beforeEach(async () => {
  caught.length = 0;
  refusal = null;
  await sequelize.query('DELETE FROM outbox');
});
afterAll(async () => {
  await sequelize.close();
  await new Promise<void>((resolve) => server.close(() => resolve()));
});

const to = () => `${randomUUID()}@learner.example`;
const mail = (cause: string, recipient: string, name = 'Mira Tallow') => ({
  cause,
  personId: null,
  to: recipient,
  template: 'verify' as const,
  content: { name, url: 'http://127.0.0.1:4321/verify?token=secret' },
});
const rows = () =>
  sequelize.query<{
    state: string;
    tries: number;
    content: string | object;
    wait: number;
    last_error: string;
  }>(
    'SELECT state, tries, content, TIMESTAMPDIFF(SECOND, NOW(3), next_try_at) wait, last_error FROM outbox ORDER BY id',
    { type: QueryTypes.SELECT },
  );
const dueNow = () => sequelize.query('UPDATE outbox SET next_try_at = NOW(3)');

test('one cause, one mail, however often it is put in and sent', async () => {
  const address = to();
  for (let i = 0; i < 3; i++) await enqueue(mail('verify:one', address));
  expect(await sendDue()).toBe(1);
  expect(await sendDue()).toBe(0);
  await enqueue(mail('verify:one', address));
  expect(await sendDue()).toBe(0);
  expect(caught.map((one) => one.to)).toEqual([[address]]);
});

test('a mail whose cause was rolled back is never sent', async () => {
  await withTransaction(async (transaction) => {
    await enqueue(mail('verify:rolled-back', to()), transaction);
    throw new Error('nothing of it');
  }).catch(() => undefined);
  expect(await sendDue()).toBe(0);
});

test('plain text and HTML say the same, with the one link; what was sent keeps no secret', async () => {
  await enqueue(mail('verify:text', to()));
  await sendDue();
  expect(caught[0]!.raw).toContain('multipart/alternative');
  expect(caught[0]!.raw.replaceAll('=3D', '=').match(/verify\?token=secret/g)!.length).toBeGreaterThanOrEqual(
    2,
  );
  expect(JSON.stringify(await rows())).not.toContain('secret');
});

test('a refusal is tried again with growing pauses, and given up at last with its reason', async () => {
  refusal = { code: 451, text: 'try later' };
  await enqueue(mail('verify:refused', to()));
  const waits: number[] = [];
  for (let tries = 1; tries <= 12; tries++) {
    await dueNow();
    expect(await sendDue(1)).toBe(1);
    const [row] = await rows();
    expect(row).toMatchObject({ tries, state: tries === 12 ? 'failed' : 'waiting' });
    expect(row!.last_error).toContain('try later');
    waits.push(Number(row!.wait));
  }
  for (let i = 1; i < 9; i++) expect(waits[i]!).toBeGreaterThan(waits[i - 1]!);
  expect(Math.max(...waits)).toBeLessThanOrEqual(3600);
  await dueNow();
  expect(await sendDue()).toBe(0);
  expect(caught).toEqual([]);
});

test.each([550, 551, 553])(
  'a recipient whom the server does not know (%d) is given up at once',
  async (code) => {
    refusal = { code, text: 'no such mailbox' };
    await enqueue(mail(`verify:unknown-${code}`, to()));
    await sendDue();
    const [row] = await rows();
    expect(row).toMatchObject({ state: 'failed', tries: 1 });
    expect(row!.last_error).toContain('no such mailbox');
  },
);

test('after a refusal the mail goes out once the server takes it', async () => {
  const address = to();
  refusal = { code: 421, text: 'shutting down' };
  await enqueue(mail('verify:later', address));
  await sendDue(1);
  // Not before its time.
  refusal = null;
  expect(await sendDue()).toBe(0);
  await dueNow();
  await sendDue();
  expect(caught.map((one) => one.to)).toEqual([[address]]);
  expect((await rows())[0]).toMatchObject({ state: 'sent', tries: 1 });
});

test('senders at once send each mail once', async () => {
  const addresses = Array.from({ length: 20 }, to);
  for (const [i, address] of addresses.entries()) await enqueue(mail(`verify:many-${i}`, address));
  await Promise.all(Array.from({ length: 5 }, () => sendDue()));
  await vi.waitFor(() => expect(caught).toHaveLength(20));
  expect(caught.flatMap((one) => one.to).sort()).toEqual([...addresses].sort());
});

test('a sender that dies after the server took the mail sends it again under the same Message-ID', async () => {
  await enqueue(mail('verify:died', to()));
  await sendDue();
  // As it is when the process was killed before it could write that down.
  await sequelize.query('UPDATE outbox SET state = ?, content = ?', {
    replacements: ['waiting', JSON.stringify(mail('', '').content)],
  });
  await sendDue();
  const ids = caught.map(({ raw }) => /^Message-ID: (.+)$/im.exec(raw)![1]);
  expect(ids).toHaveLength(2);
  expect(new Set(ids).size).toBe(1);
});

test('a name cannot write headers or markup', async () => {
  const address = to();
  await enqueue(mail('verify:name', address, 'Eve\r\nBcc: all@school.example\r\n\r\n<b>hi</b>'));
  await sendDue();
  const [one] = caught;
  expect(one!.to).toEqual([address]);
  const [head] = one!.raw.split('\r\n\r\n');
  expect(head).not.toMatch(/^Bcc:/im);
  const [, html] = one!.raw.split('Content-Type: text/html');
  expect(html).toContain('&lt;b&gt;hi&lt;/b&gt;');
  expect(html).not.toContain('<b>hi</b>');
});
