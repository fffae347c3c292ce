import type { Express } from 'express';
import type { Sequelize } from 'sequelize';
import { inject } from 'vitest';
import { buildApp } from '@server/app';
import { readConfig } from '@server/config';
import { connect } from '@server/database';
import { defineModels } from '@server/models/registry';
import { setServices } from '@server/runtime';

export interface TestApp {
  readonly app: Express;
  readonly sequelize: Sequelize;
  readonly close: () => Promise<void>;
}

/** The whole application over the tests' database, not listening. One for each test file. */
export function startTestApp(environment: NodeJS.ProcessEnv = {}): TestApp {
  const config = readConfig({
    CRAGLINE_DB_URL: inject('appUrl'),
    CRAGLINE_TOKEN_KEY: 'token-key-of-the-tests-0123456789abcdef',
    CRAGLINE_SEAL_KEY: 'seal-key-of-the-tests-0123456789abcdef-',
    CRAGLINE_TEST: '1',
    CRAGLINE_LOG: 'silent',
    CRAGLINE_SIGN_IN_TRIES: '1000',
    CRAGLINE_REQUESTS_PER_MINUTE: '100000',
    CRAGLINE_CALC_PER_MINUTE: '100000',
    ...environment,
  });
  const sequelize = connect(config.databaseUrl);
  defineModels(sequelize);
  setServices({ config, sequelize });
  return { app: buildApp(null), sequelize, close: () => sequelize.close() };
}
