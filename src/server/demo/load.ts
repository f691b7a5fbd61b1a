/**
 * The demo world: Harrowmere College, its people and what they did in the past weeks. Everything goes through the functions that
 * serve real people; then the clock of what was done is set back.
 */
import { createHash } from 'node:crypto';
import { giveAnswer, learnerOf } from '../answers/index.ts';
import { config } from '../config/index.ts';
import { Group, GroupPerson, Membership, Person, School, sequelize } from '../database/index.ts';
import { audit } from '../audit.ts';
import { slugOf } from '../../lessons/index.ts';
import { listLessons, publishLesson, readLesson, type StoredLesson } from '../lessons/index.ts';
import { lockPrediction, observe, openRun, saveMoves } from '../runs/index.ts';
import { hashPassword } from '../sign-in/password.ts';
import { dice, movesFor, rightAnswer, wrongAnswer } from './histories.ts';
import { demoPassword } from './passwords.ts';
import { emailOf, GROUPS, PEOPLE, SCHOOL, type DemoPerson } from './people.ts';
import { SCHOOL_LESSON } from './school-lesson.ts';

const DAY_MS = 86_400_000;
/** Between one move and the next. */
const MOVE_S = 6;
const AT_ONCE = 8;

/** An id that is the same wherever the demo is loaded, in the form of a UUID of version 8 (RFC 9562). */
export function demoId(what: string): string {
  const hex = createHash('sha256').update(`Dropwise demo: ${what}`).digest('hex');
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-8${hex.slice(13, 16)}-a${hex.slice(17, 20)}-${hex.slice(20, 32)}`;
}
const seedFrom = (what: string): number =>
  1 + (createHash('sha256').update(what).digest().readUInt32BE(0) % (2 ** 31 - 1));
const daysAgo = (days: number): Date => new Date(Date.now() - days * DAY_MS);

/** A demo shows what it likes; a real site begins empty. */
function onlyInDemo(): void {
  if (config.DEMO !== 'true') throw new Error('The demo world is loaded by the demo alone (DEMO=true).');
}

/**
 * Loads the demo world where it is not there yet. A load that broke off is taken up again by the next one.
 * @returns the sign-ins, as lines for a terminal
 */
export async function loadDemoWorld(): Promise<string> {
  onlyInDemo();
  const loaded = await School.findOne({ where: { code: SCHOOL.code } });
  const finished = loaded && (await wasFinished(loaded.id));
  if (!finished) await load();
  return signIns();
}

/** Its last act is a line in the audit log: without it, something is missing. */
async function wasFinished(schoolId: number): Promise<boolean> {
  const [rows] = await sequelize.query('SELECT 1 FROM audit_log WHERE school_id = ? AND action = ?', {
    replacements: [schoolId, 'demo loaded'],
  });
  return rows.length > 0;
}

async function load(): Promise<void> {
  const [school] = await School.findOrCreate({
    where: { code: SCHOOL.code },
    defaults: { publicId: demoId(SCHOOL.key), name: SCHOOL.name, code: SCHOOL.code },
  });
  const published = await readLesson(slugOf(SCHOOL_LESSON.file));
  for (const markdown of SCHOOL_LESSON.revisions.slice(published?.revision ?? 0))
    await publishLesson(markdown, SCHOOL_LESSON.file, school.id);
  const groups = new Map<string, number>();
  for (const name of GROUPS) {
    const [group] = await Group.findOrCreate({
      where: { schoolId: school.id, name },
      defaults: { publicId: demoId(`group ${name}`), schoolId: school.id, name },
    });
    groups.set(name, group.id);
  }
  const people = await loadPeople(school.id, groups);
  const lessons = await listLessons([school.id]);
  const workers = people.filter(({ demo }) => demo.works);
  const next = workers[Symbol.iterator]();
  await Promise.all(
    Array.from({ length: AT_ONCE }, async () => {
      for (const { demo, person } of { [Symbol.iterator]: () => next }) await work(demo, person, lessons);
    }),
  );
  await audit({ action: 'demo loaded', actorId: null, schoolId: school.id });
}

async function loadPeople(
  schoolId: number,
  groups: ReadonlyMap<string, number>,
): Promise<{ demo: DemoPerson; person: Person }[]> {
  // The crowd shares one password, and so one hash: fifty of them would take longer than the rest of the start.
  const crowd = await hashPassword(demoPassword(config.COOKIE_SECRET, 'everyone else'));
  const hashes = await Promise.all(
    PEOPLE.map((one) =>
      one.shown ? hashPassword(demoPassword(config.COOKIE_SECRET, one.key)) : Promise.resolve(crowd),
    ),
  );
  const before = new Set((await Person.findAll()).map(({ publicId }) => publicId));
  const fresh = PEOPLE.map((one, i) => ({ one, i })).filter(({ one }) => !before.has(demoId(one.key)));
  await Person.bulkCreate(
    fresh.map(({ one, i }) => ({
      publicId: demoId(one.key),
      displayName: one.name,
      email: emailOf(one),
      emailVerifiedAt: daysAgo(one.roles[0]!.from),
      passwordHash: hashes[i]!,
      conventions: null,
      disabledAt: null,
      createdAt: daysAgo(one.roles[0]!.from),
    })),
  );
  const rows = await Person.findAll({ where: { publicId: PEOPLE.map((one) => demoId(one.key)) } });
  const byId = new Map(rows.map((person) => [person.publicId, person]));
  const people = PEOPLE.map((demo) => ({ demo, person: byId.get(demoId(demo.key))! }));
  const added = people.filter(({ person }) => !before.has(person.publicId));
  await Membership.bulkCreate(
    added.flatMap(({ demo, person }) =>
      demo.roles.map(({ role, school, source, from, to }) => ({
        personId: person.id,
        schoolId: school ? schoolId : null,
        role,
        source,
        startsAt: daysAgo(from),
        endsAt: to === undefined ? null : daysAgo(to),
      })),
    ),
  );
  await GroupPerson.bulkCreate(
    added.flatMap(({ demo, person }) =>
      (demo.groups ?? []).map(({ name, role }) => ({
        groupId: groups.get(name)!,
        personId: person.id,
        role,
      })),
    ),
  );
  for (const { demo, person } of added)
    for (const { source, to } of demo.roles)
      if (source === 'purchase' && to !== undefined && to > 0)
        await audit({ action: 'purchase refunded', actorId: null, subjectId: person.id });
  return people;
}

/** One person's work, lesson after lesson, as far as they have come. */
async function work(demo: DemoPerson, person: Person, lessons: readonly StoredLesson[]): Promise<void> {
  const { habit, through } = demo.works!;
  const inSchool = demo.roles.some(({ school }) => school);
  const theirs = lessons.filter(({ schoolId }) => schoolId === null || inSchool);
  const checkpoints = theirs.reduce((sum, { lesson }) => sum + lesson.checkpoints.length, 0);
  let left = Math.max(2, Math.round(checkpoints * through));
  const { from, to = 0 } = demo.roles[0]!;
  const latest = Math.max(to, 0) + 1;
  const earliest = Math.max(latest + 1, Math.min(from - 1, latest + 60));
  for (const [i, lesson] of theirs.entries()) {
    if (left <= 0) return;
    const roll = dice(seedFrom(`${demo.key}/${lesson.slug}`));
    const part = Math.min(1, left / lesson.lesson.checkpoints.length);
    const day = earliest - ((earliest - latest) * (i + roll())) / theirs.length;
    await workOn(lesson, { demo, person, habit, part, roll, at: daysAgo(day) });
    left -= lesson.lesson.checkpoints.length;
  }
}

interface Session {
  readonly demo: DemoPerson;
  readonly person: Person;
  readonly habit: NonNullable<DemoPerson['works']>['habit'];
  readonly part: number;
  readonly roll: () => number;
  readonly at: Date;
}

async function workOn(lesson: StoredLesson, session: Session): Promise<void> {
  const { demo, person, habit, part, roll, at } = session;
  const { blocks } = lesson.lesson;
  const until = Math.ceil(blocks.length * part);
  for (const [n, block] of blocks.entries()) {
    if (n >= until) break;
    const what = `${demo.key}/${lesson.slug}`;
    if (block.kind === 'prediction') {
      const { options, outcome } = block.spec;
      const guess = roll() < 0.55 ? outcome.right : options[Math.floor(roll() * options.length)]!.id;
      await lockPrediction(person.id, lesson, block.spec.id, guess, 1 + Math.floor(roll() * 4));
    }
    if (block.kind === 'bench') {
      const runId = demoId(`${what}/${block.spec.id}`);
      const seed = seedFrom(runId);
      const stopped = habit === 'stopping' && n + 2 >= until;
      const moves = movesFor(lesson.lesson, block.spec, { seed, habit, part: stopped ? 0.4 : 1, roll });
      await openRun(person.id, lesson, block.spec.id, runId, { seed });
      await saveMoves(
        person.id,
        runId,
        0,
        moves.map((move, i) => ({ opId: demoId(`${runId} ${i}`), move })),
      );
      await setBack(person.id, lesson.id, runId, at);
      await sayWhatWasSeen(lesson, block.spec.id, session);
    }
    if (block.kind === 'question') await answer(lesson, block.spec.id, session);
  }
  await datePredictions(person.id, lesson.id, at);
}

/** About one in six says they saw something else than what was there. */
async function sayWhatWasSeen(lesson: StoredLesson, bench: string, { person, roll }: Session): Promise<void> {
  for (const block of lesson.lesson.blocks) {
    if (block.kind !== 'prediction' || block.spec.bench !== bench || roll() > 0.85) continue;
    const { options, outcome, id } = block.spec;
    const seen = roll() < 0.84 ? outcome.right : options[Math.floor(roll() * options.length)]!.id;
    await observe(person.id, lesson, id, seen);
  }
}

async function answer(
  lesson: StoredLesson,
  id: string,
  { demo, person, habit, roll }: Session,
): Promise<void> {
  const block = lesson.lesson.blocks.find((one) => one.kind === 'question' && one.spec.id === id);
  if (block?.kind !== 'question') return;
  const learner = await learnerOf(person, lesson, [block.spec]);
  const tries = roll() < 0.6 ? 0 : 1 + Math.floor(roll() * 2);
  for (let i = 0; i < tries; i++) {
    const wrong = wrongAnswer(block.spec, learner, roll);
    if (wrong) await giveAnswer(person, lesson, id, demoId(`${demo.key}/${lesson.slug}/${id} ${i}`), wrong);
  }
  const right = habit === 'steady' || roll() < 0.9 ? rightAnswer(lesson.lesson, block.spec, learner) : null;
  if (right) await giveAnswer(person, lesson, id, demoId(`${demo.key}/${lesson.slug}/${id} right`), right);
}

/** The moves were made at that hour, one every few seconds. */
async function setBack(personId: number, lessonId: number, runId: string, at: Date): Promise<void> {
  const replacements = { personId, lessonId, runId, at, MOVE_S };
  await sequelize.query(
    `UPDATE runs r LEFT JOIN run_moves m ON m.run_id = r.id
        SET m.at = :at + INTERVAL m.number * :MOVE_S SECOND, r.created_at = :at,
            r.updated_at = :at + INTERVAL r.move_count * :MOVE_S SECOND
      WHERE r.public_id = :runId`,
    { replacements },
  );
  await sequelize.query(
    `UPDATE met_aims a JOIN runs r ON r.id = a.run_id
        SET a.met_at = :at + INTERVAL a.move_number * :MOVE_S SECOND
      WHERE r.public_id = :runId AND a.person_id = :personId AND a.lesson_id = :lessonId`,
    { replacements },
  );
}

async function datePredictions(personId: number, lessonId: number, at: Date): Promise<void> {
  const replacements = { personId, lessonId, at };
  await sequelize.query(
    `UPDATE predictions
        SET locked_at = :at - INTERVAL 2 MINUTE,
            observed_at = IF(observed IS NULL, NULL, :at + INTERVAL 12 MINUTE)
      WHERE person_id = :personId AND lesson_id = :lessonId`,
    { replacements },
  );
  await sequelize.query(
    'UPDATE answers SET at = :at + INTERVAL 15 MINUTE + INTERVAL attempt MINUTE WHERE person_id = :personId AND lesson_id = :lessonId',
    { replacements },
  );
}

/** Who can be signed in as, and how. */
export function signIns(): string {
  onlyInDemo();
  const shown = PEOPLE.filter((one) => one.shown);
  const width = Math.max(...shown.map((one) => emailOf(one).length));
  const lines = shown.map(
    (one) =>
      `  ${emailOf(one).padEnd(width)}  ${demoPassword(config.COOKIE_SECRET, one.key)}\n  ${' '.repeat(width)}  ${one.name}, ${one.shown}`,
  );
  return [
    'Sign in as',
    ...lines,
    `  Everyone else of ${SCHOOL.name} signs in with ${demoPassword(config.COOKIE_SECRET, 'everyone else')}, for example ${emailOf(PEOPLE.at(-1)!)}`,
  ].join('\n');
}
