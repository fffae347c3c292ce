/**
 * One step of the schema. DDL commits by itself in MariaDB, so each statement can be run again: a start
 * that was killed half-way goes on where it stopped.
 */
export interface Migration {
  readonly name: string;
  readonly up: readonly string[];
  readonly down: readonly string[];
}

/** Columns of every editable table. */
export const EDITABLE = `
  version INT UNSIGNED NOT NULL DEFAULT 0,
  created_at DATETIME(3) NOT NULL,
  updated_at DATETIME(3) NOT NULL`;

/** A key of its own, and one with the lab: children refer to both, so nothing can cross labs. */
export const IN_LAB = `
  id BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
  lab_id BIGINT UNSIGNED NOT NULL,
  UNIQUE KEY in_lab (lab_id, id),
  FOREIGN KEY (lab_id) REFERENCES labs (id)`;

/** A reference to a row of the same lab. */
export const sameLab = (column: string, table: string) =>
  `FOREIGN KEY (lab_id, ${column}) REFERENCES ${table} (lab_id, id)`;

/** Triggers that refuse to change or delete what is written once. */
export const writtenOnce = (table: string, words: string): string[] =>
  ['UPDATE', 'DELETE'].map(
    (
      verb,
    ) => `CREATE OR REPLACE TRIGGER ${table}_no_${verb.toLowerCase()} BEFORE ${verb} ON ${table}
      FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${words}'`,
  );
