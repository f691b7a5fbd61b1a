import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { Person, migrate, migrator, sequelize, withTransaction } from '../../src/server/database/index.ts';

beforeAll(async () => void (await migrate()));
afterAll(() => sequelize.close());

const make = (displayName: string, email: string | null = null) =>
  Person.create({
    publicId: randomUUID(),
    displayName,
    email,
    emailVerifiedAt: null,
    passwordHash: null,
    conventions: null,
    disabledAt: null,
  });

test('the schema goes up, down and up again', async () => {
  await migrator().down({ to: 0 });
  expect(await migrator().executed()).toEqual([]);
  expect((await migrate()).length).toBeGreaterThan(0);
});

test('two processes that migrate at once do it once', async () => {
  await migrator().down({ to: 0 });
  const [a, b] = await Promise.all([migrate(), migrate()]);
  expect(a.length + b.length).toBe((await migrator().executed()).length);
});

test('names keep accents and emoji apart and times keep their milliseconds', async () => {
  await make('dúp', 'dúp@example.invalid');
  await make('dup', 'dup@example.invalid');
  await expect(make('DUP', 'DUP@example.invalid')).rejects.toThrow(/Validation error/);
  const at = new Date('2026-03-01T12:00:00.123Z');
  const person = await make('Ines 🧪');
  await person.update({ emailVerifiedAt: at });
  expect((await Person.findByPk(person.id))!.emailVerifiedAt).toEqual(at);
});

test('a deadlock runs the whole work again and nothing is lost', async () => {
  const [first, second] = [await make('first'), await make('second')];
  let runs = 0;
  const swap = (ids: number[]) =>
    withTransaction(async (transaction) => {
      runs += 1;
      for (const id of ids) {
        await sequelize.query('UPDATE people SET display_name = CONCAT(display_name, "+") WHERE id = ?', {
          replacements: [id],
          transaction,
        });
        await new Promise((resolve) => setTimeout(resolve, 60));
      }
    });
  await Promise.all([swap([first.id, second.id]), swap([second.id, first.id])]);
  const rows = await sequelize.query<{ name: string }>(
    'SELECT display_name AS name FROM people WHERE id IN (?, ?) ORDER BY id',
    {
      replacements: [first.id, second.id],
      type: QueryTypes.SELECT,
    },
  );
  expect(rows).toEqual([{ name: 'first++' }, { name: 'second++' }]);
  expect(runs).toBe(3);
});
