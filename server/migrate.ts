import { QueryTypes, type Sequelize } from 'sequelize';
import { Umzug, type UmzugStorage } from 'umzug';
import { accounts } from './migrations/2026-12-01-1-accounts';
import { studies } from './migrations/2026-12-01-2-studies';
import type { Migration } from './migrations/migration';

/** In order. A migration is never edited once it has been merged. */
export const MIGRATIONS: readonly Migration[] = [accounts, studies];

/** Tables that the application may add to and read, and nothing else. */
const WRITTEN_ONCE = ['audit_events', 'releases'];
const LOCK = 'cragline-migrate';

function storageOf(owner: Sequelize): UmzugStorage {
  return {
    async logMigration({ name }) {
      await owner.query('INSERT INTO migrations (name, run_at) VALUES (?, UTC_TIMESTAMP(3))', {
        replacements: [name],
      });
    },
    async unlogMigration({ name }) {
      await owner.query('DELETE FROM migrations WHERE name = ?', { replacements: [name] });
    },
    async executed() {
      await owner.query(
        'CREATE TABLE IF NOT EXISTS migrations (name VARCHAR(100) PRIMARY KEY, run_at DATETIME(3) NOT NULL)',
      );
      const rows = await owner.query<{ name: string }>(
        'SELECT name FROM migrations ORDER BY name',
        {
          type: QueryTypes.SELECT,
        },
      );
      return rows.map(({ name }) => name);
    },
  };
}

export function umzugOf(owner: Sequelize): Umzug<Sequelize> {
  const run = async (statements: readonly string[]) => {
    for (const statement of statements) await owner.query(statement);
  };
  return new Umzug({
    migrations: MIGRATIONS.map(({ name, up, down }) => ({
      name,
      up: () => run(up),
      down: () => run(down),
    })),
    context: owner,
    storage: storageOf(owner),
    logger: undefined,
  });
}

/** Gives the application's account what it needs on each table, and no more. */
async function grant(owner: Sequelize, account: string): Promise<void> {
  const tables = await owner.query<{ name: string }>(
    "SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE() AND table_type = 'BASE TABLE'",
    { type: QueryTypes.SELECT },
  );
  for (const { name } of tables) {
    if (name === 'migrations') continue;
    const rights = WRITTEN_ONCE.includes(name)
      ? 'SELECT, INSERT'
      : 'SELECT, INSERT, UPDATE, DELETE';
    await owner.query(`GRANT ${rights} ON ${name} TO ${account}`);
  }
  await owner.query(`GRANT SELECT ON migrations TO ${account}`);
}

/**
 * Brings the schema up to date, one start at a time, and grants the application its rights.
 *
 * @param appUser the application's account when it differs from the owner's, else null.
 * @returns the names of the migrations that ran.
 * @throws Error with one sentence when the data come from a newer Cragline.
 */
export async function migrate(owner: Sequelize, appUser: string | null): Promise<string[]> {
  const umzug = umzugOf(owner);
  await owner.query(`SELECT GET_LOCK('${LOCK}', 60)`);
  try {
    const known = new Set(MIGRATIONS.map(({ name }) => name));
    const unknown = (await umzug.executed()).filter(({ name }) => !known.has(name));
    if (unknown.length > 0)
      throw new Error(
        `The data folder was written by a newer Cragline (it has ${unknown.map(({ name }) => name).join(', ')}); start that version, or choose another folder with CRAGLINE_DATA.`,
      );
    const ran = await umzug.up();
    if (appUser !== null) await grant(owner, `'${appUser}'@'127.0.0.1'`);
    return ran.map(({ name }) => name);
  } finally {
    await owner.query(`SELECT RELEASE_LOCK('${LOCK}')`);
  }
}
