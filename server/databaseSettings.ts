import { QueryTypes, type Sequelize } from 'sequelize';

type Variables = Readonly<Record<string, string>>;

/** A setting without which an acknowledged record could be lost or misdated, and how to mend it. */
interface Demand {
  readonly name: string;
  readonly holds: (variables: Variables) => boolean;
  readonly remedy: string;
}

const value = (variables: Variables, name: string) => variables[name] ?? '';

const DEMANDS: readonly Demand[] = [
  {
    name: 'innodb_flush_log_at_trx_commit',
    holds: (v) => value(v, 'innodb_flush_log_at_trx_commit') === '1',
    remedy: 'set it to 1, so that a commit is on disk before it is acknowledged',
  },
  {
    name: 'innodb_doublewrite',
    holds: (v) => value(v, 'innodb_doublewrite') !== 'OFF',
    remedy: 'switch it on',
  },
  {
    name: 'sync_binlog',
    holds: (v) => value(v, 'log_bin') === 'OFF' || value(v, 'sync_binlog') === '1',
    remedy: 'set it to 1 while the binary log is on',
  },
  {
    name: 'sql_mode',
    holds: (v) => value(v, 'sql_mode').includes('STRICT_TRANS_TABLES'),
    remedy: 'add STRICT_TRANS_TABLES, or values would be cut silently',
  },
  {
    name: 'character_set_database',
    holds: (v) => value(v, 'character_set_database') === 'utf8mb4',
    remedy: 'make the schema with utf8mb4',
  },
  {
    name: 'time_zone',
    holds: (v) => ['+00:00', 'UTC'].includes(value(v, 'time_zone')),
    remedy: 'set it to +00:00',
  },
  {
    name: 'secure_timestamp',
    holds: (v) => ['REPLICATION', 'YES', 'SUPER'].includes(value(v, 'secure_timestamp')),
    remedy: 'set it to REPLICATION, so that nobody can date rows',
  },
];

/**
 * The settings that are not safe for records, each as one sentence; empty when all hold.
 * The session's own time zone is set by the driver, so the server's global one is read.
 */
export async function unsafeSettings(sequelize: Sequelize): Promise<string[]> {
  const rows = await sequelize.query<{ Variable_name: string; Value: string }>(
    'SHOW GLOBAL VARIABLES',
    { type: QueryTypes.SELECT },
  );
  const charset = await sequelize.query<{ Value: string }>(
    'SELECT default_character_set_name AS Value FROM information_schema.schemata WHERE schema_name = DATABASE()',
    { type: QueryTypes.SELECT },
  );
  const variables: Record<string, string> = Object.fromEntries(
    rows.map(({ Variable_name: name, Value }) => [name, Value]),
  );
  variables['character_set_database'] = charset[0]?.Value ?? '';
  return DEMANDS.filter(({ holds }) => !holds(variables)).map(
    ({ name, remedy }) =>
      `The database is not safe for records: ${name} is ‘${variables[name] ?? 'unknown'}’; ${remedy}.`,
  );
}
