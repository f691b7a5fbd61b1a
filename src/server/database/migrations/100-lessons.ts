import type { Migration } from '../migrate.ts';

/** Lessons and their revisions. A revision's Markdown never changes; its compiled form is renewed with the compiler. */
export const lessons: Migration = {
  name: '100-lessons',
  async up(schema) {
    await schema.sequelize.query(
      `CREATE TABLE lessons (
         id BIGINT UNSIGNED AUTO_INCREMENT PRIMARY KEY,
         slug VARCHAR(80) CHARACTER SET ascii COLLATE ascii_bin NOT NULL UNIQUE,
         school_id BIGINT UNSIGNED NULL,
         current_revision INT UNSIGNED NOT NULL,
         created_at DATETIME(3) NOT NULL,
         updated_at DATETIME(3) NOT NULL,
         FOREIGN KEY (school_id) REFERENCES schools (id) ON DELETE CASCADE
       ) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_uca1400_as_ci`,
    );
    await schema.sequelize.query(
      `CREATE TABLE lesson_revisions (
         lesson_id BIGINT UNSIGNED NOT NULL,
         revision INT UNSIGNED NOT NULL,
         file VARCHAR(120) NOT NULL,
         markdown MEDIUMTEXT NOT NULL,
         markdown_hash CHAR(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
         compiler_version INT UNSIGNED NOT NULL,
         engine_version VARCHAR(20) NOT NULL,
         compiled LONGTEXT NOT NULL,
         vanished JSON NOT NULL,
         published_at DATETIME(3) NOT NULL,
         PRIMARY KEY (lesson_id, revision),
         FOREIGN KEY (lesson_id) REFERENCES lessons (id) ON DELETE CASCADE
       ) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_uca1400_as_ci`,
    );
  },
  async down(schema) {
    await schema.dropTable('lesson_revisions');
    await schema.dropTable('lessons');
  },
};
