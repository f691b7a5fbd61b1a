// The demo world: invented people whose every run is a list of moves that replays.
import path from 'node:path';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createState, read, replay, type BenchSpec, type Move } from '../../src/bench/index.ts';

process.env.DEMO = 'true';
const { migrate, sequelize } = await import('../../src/server/database/index.ts');
const { loadDemoWorld } = await import('../../src/server/demo/load.ts');
const { demoPassword } = await import('../../src/server/demo/passwords.ts');
const { PEOPLE, emailOf } = await import('../../src/server/demo/people.ts');
const { publishShippedCourse, readLesson, readLessonById } =
  await import('../../src/server/lessons/index.ts');
const { signInWithPassword } = await import('../../src/server/sign-in/account.ts');
const { config } = await import('../../src/server/config/index.ts');
const { readConfig } = await import('../../src/server/config/index.ts');

let words: string;
beforeAll(async () => {
  await migrate();
  await publishShippedCourse(path.resolve('content/lessons'));
  words = await loadDemoWorld();
}, 120_000);
afterAll(() => sequelize.close());

const rows = <T extends object>(sql: string) => sequelize.query<T>(sql, { type: QueryTypes.SELECT });
const counts = () =>
  rows<Record<string, number>>(
    `SELECT (SELECT COUNT(*) FROM people) people, (SELECT COUNT(*) FROM memberships) memberships,
            (SELECT COUNT(*) FROM runs) runs, (SELECT COUNT(*) FROM run_moves) moves,
            (SELECT COUNT(*) FROM predictions) predictions, (SELECT COUNT(*) FROM answers) answers,
            (SELECT COUNT(*) FROM lesson_revisions) revisions, (SELECT COUNT(*) FROM audit_log) audit`,
  );

test('every run of the demo replays to what was shown when it was made', async () => {
  const runs = await rows<{
    id: number;
    lesson: number;
    revision: number;
    bench: string;
    seed: number;
    count: number;
  }>('SELECT id, lesson_id lesson, revision, bench, seed, move_count count FROM runs');
  expect(runs.length).toBeGreaterThan(50);
  for (const run of runs) {
    const { lesson } = (await readLessonById(run.lesson, run.revision))!;
    const spec = lesson.blocks.flatMap((block): BenchSpec[] =>
      block.kind === 'bench' && block.spec.id === run.bench ? [block.spec] : [],
    )[0]!;
    const moves = await sequelize.query<{ move: string | Move; shown: string | object }>(
      'SELECT move, shown FROM run_moves WHERE run_id = ? ORDER BY number',
      { replacements: [run.id], type: QueryTypes.SELECT },
    );
    const parse = <T>(value: string | T) => (typeof value === 'string' ? (JSON.parse(value) as T) : value);
    expect(moves).toHaveLength(run.count);
    const done = replay(
      createState(spec, { seed: run.seed }),
      run.seed,
      moves.map(({ move }) => parse<Move>(move)),
    );
    expect(done.ok).toBe(true);
    const shown = read(done.state, { predicted: true }).vessels.map(({ id, volume_mL, pH, colour }) => ({
      id,
      volume_mL,
      pH,
      words: colour?.words,
    }));
    expect(JSON.parse(JSON.stringify(shown))).toEqual(parse(moves.at(-1)!.shown));
  }
}, 60_000);

test('loading it again changes nothing and prints the same', async () => {
  const before = await counts();
  expect(await loadDemoWorld()).toBe(words);
  expect(await counts()).toEqual(before);
});

test('a load that broke off is taken up again, without a second copy of anything', async () => {
  const before = await counts();
  await sequelize.query("DELETE FROM audit_log WHERE action = 'demo loaded'");
  await sequelize.query("DELETE FROM people WHERE display_name = 'Yuki Hanada'");
  await loadDemoWorld();
  expect(await counts()).toEqual(before);
}, 60_000);

test('whoever is printed can sign in with what is printed, and nothing of it stands in the repository', async () => {
  for (const person of PEOPLE.filter((one) => one.shown)) {
    const password = demoPassword(config.COOKIE_SECRET, person.key);
    expect(words).toContain(password);
    expect((await signInWithPassword(emailOf(person), password))?.displayName).toBe(person.name);
  }
  const crowd = demoPassword(config.COOKIE_SECRET, 'everyone else');
  expect((await signInWithPassword(emailOf(PEOPLE.at(-1)!), crowd))?.displayName).toBe('Yuki Hanada');
  expect(demoPassword('another secret', 'noor')).not.toBe(demoPassword(config.COOKIE_SECRET, 'noor'));
});

test('everything is in the past, and people stand at different points', async () => {
  const [late] = await rows<{ late: number }>(
    `SELECT (SELECT COUNT(*) FROM run_moves WHERE at > NOW(3)) + (SELECT COUNT(*) FROM runs WHERE updated_at > NOW(3))
          + (SELECT COUNT(*) FROM predictions WHERE locked_at > NOW(3)) + (SELECT COUNT(*) FROM answers WHERE at > NOW(3)) late`,
  );
  expect(late!.late).toBe(0);
  const spread = await rows<{ done: number }>(
    'SELECT COUNT(*) done FROM met_aims GROUP BY person_id ORDER BY done',
  );
  expect(new Set(spread.map(({ done }) => done)).size).toBeGreaterThan(3);
  const wrong = await rows<{ verdict: string }>("SELECT verdict FROM answers WHERE verdict = 'not-yet'");
  expect(wrong.length).toBeGreaterThan(5);
  expect((await readLesson('the-sluice-sample'))!.revision).toBe(3);
});

test('a site that is no demo refuses it', async () => {
  const { DEMO } = config;
  Object.assign(config, { DEMO: 'false' });
  try {
    await expect(loadDemoWorld()).rejects.toThrow('by the demo alone');
  } finally {
    Object.assign(config, { DEMO });
  }
  expect(readConfig({ COOKIE_SECRET: 'x'.repeat(32) }).DEMO).toBe('false');
});
