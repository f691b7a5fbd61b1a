import type { Migration } from '../migrate.ts';

/** Runs: one person's moves on one bench. The list of moves only grows; verdicts stay. */
const tables: readonly (readonly [string, string])[] = [
  [
    'runs',
    `id BIGINT UNSIGNED AUTO_INCREMENT PRIMARY KEY,
     public_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL UNIQUE,
     person_id BIGINT UNSIGNED NOT NULL,
     lesson_id BIGINT UNSIGNED NOT NULL,
     revision INT UNSIGNED NOT NULL,
     bench VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
     seed INT UNSIGNED NOT NULL,
     move_count INT UNSIGNED NOT NULL DEFAULT 0,
     branched_from CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL,
     last_words VARCHAR(60) NULL,
     last_hex CHAR(7) NULL,
     last_pH DECIMAL(6, 2) NULL,
     created_at DATETIME(3) NOT NULL,
     updated_at DATETIME(3) NOT NULL,
     KEY mine (person_id, lesson_id, bench, updated_at),
     FOREIGN KEY (person_id) REFERENCES people (id) ON DELETE CASCADE,
     FOREIGN KEY (lesson_id) REFERENCES lessons (id) ON DELETE RESTRICT`,
  ],
  [
    'run_moves',
    `run_id BIGINT UNSIGNED NOT NULL,
     number INT UNSIGNED NOT NULL,
     op_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
     move JSON NOT NULL,
     shown JSON NULL,
     engine_version VARCHAR(20) NOT NULL,
     at DATETIME(3) NOT NULL,
     PRIMARY KEY (run_id, number),
     UNIQUE KEY once (run_id, op_id),
     FOREIGN KEY (run_id) REFERENCES runs (id) ON DELETE CASCADE`,
  ],
  [
    'predictions',
    `person_id BIGINT UNSIGNED NOT NULL,
     lesson_id BIGINT UNSIGNED NOT NULL,
     prediction VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
     answer VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
     confidence TINYINT UNSIGNED NOT NULL,
     observed VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NULL,
     locked_at DATETIME(3) NOT NULL,
     observed_at DATETIME(3) NULL,
     PRIMARY KEY (person_id, lesson_id, prediction),
     FOREIGN KEY (person_id) REFERENCES people (id) ON DELETE CASCADE,
     FOREIGN KEY (lesson_id) REFERENCES lessons (id) ON DELETE RESTRICT`,
  ],
  [
    'met_aims',
    `person_id BIGINT UNSIGNED NOT NULL,
     lesson_id BIGINT UNSIGNED NOT NULL,
     aim VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
     run_id BIGINT UNSIGNED NULL,
     move_number INT UNSIGNED NOT NULL,
     met_at DATETIME(3) NOT NULL,
     PRIMARY KEY (person_id, lesson_id, aim),
     FOREIGN KEY (person_id) REFERENCES people (id) ON DELETE CASCADE,
     FOREIGN KEY (lesson_id) REFERENCES lessons (id) ON DELETE RESTRICT,
     FOREIGN KEY (run_id) REFERENCES runs (id) ON DELETE SET NULL`,
  ],
];

export const runs: Migration = {
  name: '150-runs',
  async up(schema) {
    for (const [name, columns] of tables)
      await schema.sequelize.query(
        `CREATE TABLE ${name} (${columns}) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_uca1400_as_ci`,
      );
  },
  async down(schema) {
    for (const [name] of [...tables].reverse()) await schema.dropTable(name);
  },
};
