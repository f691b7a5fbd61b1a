import type { Migration } from '../migrate.ts';

/** Answers to questions as they were given and marked; the list only grows, and verdicts stay. */
export const answers: Migration = {
  name: '160-answers',
  async up(schema) {
    await schema.sequelize.query(
      `CREATE TABLE answers (
         id BIGINT UNSIGNED AUTO_INCREMENT PRIMARY KEY,
         person_id BIGINT UNSIGNED NOT NULL,
         lesson_id BIGINT UNSIGNED NOT NULL,
         revision INT UNSIGNED NOT NULL,
         question VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
         attempt SMALLINT UNSIGNED NOT NULL,
         op_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
         answer JSON NOT NULL,
         verdict ENUM('right', 'not-yet', 'compare') NOT NULL,
         marking JSON NOT NULL,
         engine_version VARCHAR(20) NOT NULL,
         at DATETIME(3) NOT NULL,
         UNIQUE KEY once (person_id, op_id),
         UNIQUE KEY in_turn (person_id, lesson_id, question, revision, attempt),
         FOREIGN KEY (person_id) REFERENCES people (id) ON DELETE CASCADE,
         FOREIGN KEY (lesson_id) REFERENCES lessons (id) ON DELETE RESTRICT
       ) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_uca1400_as_ci`,
    );
  },
  async down(schema) {
    await schema.dropTable('answers');
  },
};
