import fs from 'node:fs';
import http from 'node:http';
import https from 'node:https';
import path from 'node:path';
import { ZodError } from 'zod';
import { buildApp } from './app';
import { readConfig, type Config } from './config';
import { connect } from './database';
import { unsafeSettings } from './databaseSettings';
import { ensureDemo, inviteFirstAdmin, refuseDemoPeople } from './demo/ensureDemo';
import { logger } from './logger';
import { migrate } from './migrate';
import { defineModels } from './models/registry';
import { setServices } from './runtime';

const START_LIMIT_MS = 30_000;
const STOP_LIMIT_MS = 20_000;

/** Trouble that a person has to put right: one sentence, and exit code 1 tells the starter not to retry. */
function giveUp(sentence: string): never {
  process.stderr.write(`${sentence}\n`);
  process.exit(1);
}

function configure(): Config {
  try {
    return readConfig(process.env);
  } catch (error) {
    if (error instanceof ZodError)
      giveUp(error.issues[0]?.message ?? 'The environment could not be read.');
    throw error;
  }
}

async function untilDatabaseAnswers(owner: ReturnType<typeof connect>): Promise<void> {
  for (const start = Date.now(); ;) {
    try {
      await owner.authenticate();
      return;
    } catch (error) {
      if (Date.now() - start > START_LIMIT_MS)
        giveUp(
          `The database does not answer (${error instanceof Error ? error.message : 'unknown'}); check that it runs and that CRAGLINE_DB_URL is right.`,
        );
      await new Promise((resolve) => setTimeout(resolve, 500));
    }
  }
}

async function prepareDatabase(config: Config): Promise<void> {
  const owner = connect(config.ownerUrl, { poolMax: 1, statementLimitS: 120 });
  try {
    await untilDatabaseAnswers(owner);
    const unsafe = await unsafeSettings(owner);
    if (unsafe.length > 0) giveUp(unsafe.join('\n'));
    const appUser = new URL(config.databaseUrl).username;
    const ran = await migrate(
      owner,
      appUser === new URL(config.ownerUrl).username ? null : appUser,
    );
    if (ran.length > 0) logger.info({ ran }, 'migrated');
  } catch (error) {
    giveUp(error instanceof Error ? error.message : String(error));
  } finally {
    await owner.close();
  }
}

function listen(config: Config): Promise<http.Server> {
  const clientFolder = path.resolve(import.meta.dirname, '../client');
  const app = buildApp(fs.existsSync(path.join(clientFolder, 'index.html')) ? clientFolder : null);
  const server = config.tls
    ? https.createServer(
        { cert: fs.readFileSync(config.tls.certFile), key: fs.readFileSync(config.tls.keyFile) },
        app,
      )
    : http.createServer(app);
  server.headersTimeout = 20_000;
  server.requestTimeout = 60_000;
  return new Promise((resolve) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      const why =
        error.code === 'EADDRINUSE'
          ? 'is in use by another program'
          : `cannot be opened (${error.code ?? error.message})`;
      giveUp(`Port ${config.port} on ${config.host} ${why}; choose another one with PORT.`);
    });
    server.listen(config.port, config.host, () => {
      resolve(server);
    });
  });
}

const config = configure();
await prepareDatabase(config);
const sequelize = connect(config.databaseUrl);
defineModels(sequelize);
setServices({ config, sequelize });
if (config.wantsDemo && config.isLoopback) await ensureDemo();
else await refuseDemoPeople(giveUp);
if (!config.wantsDemo) {
  const address = await inviteFirstAdmin();
  if (address !== null) process.stdout.write(`First admin, once: ${address}\n`);
}
const server = await listen(config);

let isEnding = false;
/** Finishes what runs, takes nothing new, then goes. */
function end(): void {
  if (isEnding) return;
  isEnding = true;
  const limit = setTimeout(() => {
    server.closeAllConnections();
  }, STOP_LIMIT_MS);
  server.close(() => {
    clearTimeout(limit);
    void sequelize.close().finally(() => process.exit(0));
  });
  server.closeIdleConnections();
}
process.on('SIGTERM', end);
process.on('SIGINT', end);
process.on('disconnect', end);

process.stdout.write(
  `Cragline is ready at ${config.tls ? 'https' : 'http'}://${config.host}:${config.port}\n`,
);
