/**
 * Saving a move over HTTP, as a share of what the bare driver does with the same statements on the same database: ten savers at
 * once, each with a run of its own, in turns. 0.5 or more is the aim.
 */
import mariadb, { type Pool } from 'mariadb';
import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { Agent, request } from 'node:http';
import { join } from 'node:path';
import { cookiesOf, secretsOf, site, stopSite, type Site } from './site.ts';

const SAVERS = 10;
const SECONDS = 4;
const ROUNDS = 5;
const LESSON = 'meeting-a-buffer';
/** Put in and taken back: no glass runs over, however long it goes on. */
const MOVES = [{ kind: 'drip', from: 'acid', into: 'water', drops: 1 }, { kind: 'undo' }] as const;
/** A run holds 2,000 moves. */
const FULL = 1900;

const agent = new Agent({ keepAlive: true, maxSockets: SAVERS });

function post(one: Site, cookie: string, path: string, data: unknown): Promise<{ count: number }> {
  const body = JSON.stringify(data);
  return new Promise((done, fail) => {
    const sent = request(
      one.address + path,
      {
        method: 'POST',
        agent,
        headers: {
          cookie,
          origin: one.address,
          'content-type': 'application/json',
          'content-length': Buffer.byteLength(body),
        },
      },
      (answer) => {
        let text = '';
        answer.setEncoding('utf8').on('data', (chunk: string) => (text += chunk));
        answer.on('end', () => {
          if (answer.statusCode === 200) done(JSON.parse(text) as { count: number });
          else fail(new Error(`${path}: ${answer.statusCode} ${text}`));
        });
      },
    );
    sent.once('error', fail);
    sent.end(body);
  });
}

/** How often `once` succeeds in a second when ten do it at the same time. */
async function perSecond(savers: readonly (() => Promise<unknown>)[]): Promise<number> {
  const began = performance.now();
  const until = began + SECONDS * 1000;
  const counts = await Promise.all(
    savers.map(async (once) => {
      let count = 0;
      while (performance.now() < until) {
        await once();
        count += 1;
      }
      return count;
    }),
  );
  return counts.reduce((sum, count) => sum + count, 0) / ((performance.now() - began) / 1000);
}

/** A saver over HTTP: opens a run, saves a move a request, opens the next run when one is full. */
function overHttp(one: Site, cookie: string): () => Promise<void> {
  let runId = '';
  let count = FULL;
  return async () => {
    if (count >= FULL) {
      runId = randomUUID();
      count = 0;
      await post(one, cookie, '/api/runs', { runId, lesson: LESSON, bench: 'water-or-buffer', seed: 1 });
    }
    const moves = [{ opId: randomUUID(), move: MOVES[count % 2] }];
    ({ count } = await post(one, cookie, `/api/runs/${runId}/moves`, { after: count, moves }));
  };
}

/** The statements of one saved move, in the order in which the server sends them, by the driver alone. */
function byDriver(pool: Pool, person: number, lesson: number, session: string): () => Promise<void> {
  let publicId = '';
  let id = 0n;
  let count = FULL;
  return async () => {
    const connection = await pool.getConnection();
    try {
      if (count >= FULL) {
        publicId = randomUUID();
        count = 0;
        const made = (await connection.query(
          `INSERT INTO runs (public_id, person_id, lesson_id, revision, bench, seed, created_at, updated_at)
           VALUES (?, ?, ?, 1, 'water-or-buffer', 1, NOW(3), NOW(3))`,
          [publicId, person, lesson],
        )) as { insertId: bigint };
        id = made.insertId;
      }
      await connection.query(
        'SELECT s.public_id, s.expires_at, s.ends_at, s.device, p.display_name, p.email, p.lang, p.conventions FROM sessions s JOIN people p ON p.id = s.person_id WHERE s.id_hash = ? AND p.disabled_at IS NULL',
        [session],
      );
      await connection.query('SELECT * FROM memberships WHERE person_id = ? AND starts_at <= NOW(3)', [
        person,
      ]);
      await connection.query('SELECT * FROM runs WHERE public_id = ? AND person_id = ?', [publicId, person]);
      await connection.query(
        'SELECT l.id, r.revision FROM lessons l JOIN lesson_revisions r ON r.lesson_id = l.id AND r.revision = 1 WHERE l.id = ?',
        [lesson],
      );
      await connection.query('SET SESSION TRANSACTION ISOLATION LEVEL READ COMMITTED');
      await connection.query('START TRANSACTION');
      await connection.query('SELECT * FROM runs WHERE public_id = ? AND person_id = ? FOR UPDATE', [
        publicId,
        person,
      ]);
      await connection.query('SELECT aim FROM met_aims WHERE person_id = ? AND lesson_id = ?', [
        person,
        lesson,
      ]);
      await connection.query(
        "SELECT 1 FROM predictions WHERE person_id = ? AND lesson_id = ? AND prediction = 'which-turns-first'",
        [person, lesson],
      );
      await connection.query(
        'INSERT INTO run_moves (run_id, number, op_id, move, shown, engine_version, at) VALUES (?, ?, ?, ?, ?, ?, NOW(3))',
        [id, count + 1, randomUUID(), JSON.stringify(MOVES[count % 2]), SHOWN, '1.0.0'],
      );
      await connection.query(
        'UPDATE runs SET move_count = ?, updated_at = NOW(3), last_words = ?, last_hex = ?, last_pH = ? WHERE id = ?',
        [count + 1, 'yellow', '#c5c24a', 4.06, id],
      );
      await connection.query('COMMIT');
      count += 1;
    } finally {
      await connection.release();
    }
  };
}
const SHOWN = JSON.stringify([
  { id: 'water', volume_mL: 50.55, pH: 4.06, words: 'yellow' },
  { id: 'buffer', volume_mL: 50.5, pH: 4.76, words: 'green' },
]);

let pool: Pool | undefined;

async function ratio(): Promise<{ median: number; samples: number }> {
  const one = await site();
  const cookie = await cookiesOf(one, 'wren');
  await post(one, cookie, '/api/predictions', {
    lesson: LESSON,
    prediction: 'which-turns-first',
    answer: 'same',
    confidence: 2,
  });
  pool = mariadb.createPool({
    host: '127.0.0.1',
    port: Number(readFileSync(join(one.folder, 'mariadb', 'port'), 'utf8')),
    user: 'dropwise',
    password: secretsOf(one).databasePassword,
    database: 'dropwise',
    connectionLimit: SAVERS,
  });
  const [person] = (await pool.query("SELECT id FROM people WHERE display_name = 'Wren Achterberg'")) as {
    id: bigint;
  }[];
  const [lesson] = (await pool.query('SELECT id FROM lessons WHERE slug = ?', [LESSON])) as { id: bigint }[];
  const [session] = (await pool.query('SELECT id_hash FROM sessions LIMIT 1')) as { id_hash: string }[];
  const http = Array.from({ length: SAVERS }, () => overHttp(one, cookie));
  const bare = Array.from({ length: SAVERS }, () =>
    byDriver(pool!, Number(person!.id), Number(lesson!.id), session!.id_hash),
  );
  const ratios: number[] = [];
  for (let round = 0; round <= ROUNDS; round++) {
    const [driver, served] = [await perSecond(bare), await perSecond(http)];
    // The first round warms both up.
    if (round > 0) ratios.push(served / driver);
  }
  ratios.sort((a, b) => a - b);
  return { median: ratios[ROUNDS >> 1]!, samples: ROUNDS };
}

export const benchmarks = [{ name: 'saving a move / the bare driver', unit: 'ratio', run: ratio }];

export async function finish(): Promise<void> {
  agent.destroy();
  await pool?.end();
  await stopSite();
}
