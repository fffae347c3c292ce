import { Sequelize } from 'sequelize';

/** Each limit lies below the next one out: statement < socket < request < browser. */
const STATEMENT_LIMIT_S = 3;
const CONNECT_LIMIT_MS = 2000;
const SOCKET_LIMIT_MS = 4000;
const ACQUIRE_LIMIT_MS = 3000;

/**
 * A Sequelize instance on one MariaDB. A hung database fails a request within seconds instead of
 * holding it; doubles are stored as DOUBLE, times as UTC.
 */
export function connect(
  url: string,
  options: { poolMax?: number; statementLimitS?: number } = {},
): Sequelize {
  const { poolMax = 12, statementLimitS = STATEMENT_LIMIT_S } = options;
  const sequelize = new Sequelize(url, {
    dialect: 'mariadb',
    logging: false,
    timezone: '+00:00',
    define: { underscored: true },
    pool: { max: poolMax, min: 0, acquire: ACQUIRE_LIMIT_MS, idle: 10_000, evict: 2000 },
    dialectOptions: {
      connectTimeout: CONNECT_LIMIT_MS,
      socketTimeout: statementLimitS > STATEMENT_LIMIT_S ? statementLimitS * 1000 : SOCKET_LIMIT_MS,
      foundRows: true,
      logParam: false,
      initSql: [`SET SESSION max_statement_time = ${statementLimitS}`],
    },
  });
  // Sequelize writes a column's name into its definition: one definition used for two columns would
  // give both the same name
  sequelize.addHook('beforeDefine', (attributes) => {
    for (const [name, definition] of Object.entries(attributes))
      if (typeof definition === 'object' && 'type' in definition)
        attributes[name] = Object.assign({}, definition);
  });
  return sequelize;
}
