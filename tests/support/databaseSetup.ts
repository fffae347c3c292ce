import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import type { TestProject } from 'vitest/node';
import { freePort, startDatabase } from '../../scripts/database.mjs';
import { connect } from '../../server/database';
import { migrate } from '../../server/migrate';

declare module 'vitest' {
  interface ProvidedContext {
    ownerUrl: string;
    appUrl: string;
  }
}

/** One private MariaDB for all server tests, migrated; its folder goes when they are done. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), 'cragline-test-'));
  const database = await startDatabase({
    folder: path.join(folder, 'mariadb'),
    port: await freePort(),
    ownerPassword: 'owner-password-of-the-tests',
    appPassword: 'app-password-of-the-tests',
    fast: true,
  });
  const owner = connect(database.ownerUrl, { poolMax: 1, statementLimitS: 120 });
  await migrate(owner, new URL(database.appUrl).username);
  await owner.close();
  project.provide('ownerUrl', database.ownerUrl);
  project.provide('appUrl', database.appUrl);
  return async () => {
    await database.stop();
    fs.rmSync(folder, { recursive: true, force: true });
  };
}
