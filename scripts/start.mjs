import { spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { giveUp } from './console.mjs';
import { findServer, freePort, isAlive, startDatabase } from './database.mjs';
import { checkNode, ensureBuild, ensureDebianPackage, ensurePackages, ROOT } from './install.mjs';

/** `npm start`: installs what is missing, keeps the database and the server running, ends both cleanly. */

const host = process.env['HOST'] ?? '127.0.0.1';
const port = Number(process.env['PORT'] ?? 4173);
const dataFolder = path.resolve(ROOT, process.env['CRAGLINE_DATA'] ?? '.data');
const outsideUrl = process.env['CRAGLINE_DB_URL'];
/** A server that fell over comes back after a moment; one that keeps falling is given up. */
const RESTARTS_A_MINUTE = 10;

/** @returns {Promise<boolean>} */
function isPortFree() {
  return new Promise((resolve) => {
    const probe = net.createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, host, () => probe.close(() => resolve(true)));
  });
}

/** Random keys, made once, readable by their owner only. */
function readKeys() {
  const file = path.join(dataFolder, 'keys.json');
  if (!fs.existsSync(file)) {
    const make = () => randomBytes(32).toString('base64url');
    const keys = { owner: make(), app: make(), token: make(), seal: make() };
    fs.writeFileSync(file, JSON.stringify(keys, null, 2), { mode: 0o600, flag: 'wx' });
  }
  return /** @type {Record<'owner' | 'app' | 'token' | 'seal', string>} */ (
    JSON.parse(fs.readFileSync(file, 'utf8'))
  );
}

function holdFolder() {
  fs.mkdirSync(dataFolder, { recursive: true, mode: 0o700 });
  const file = path.join(dataFolder, 'cragline.pid');
  const other = fs.existsSync(file) ? Number(fs.readFileSync(file, 'utf8')) : 0;
  if (other && other !== process.pid && isAlive(other) && runsCragline(other))
    giveUp(
      `Another Cragline (process ${other}) uses the data folder ${dataFolder}; stop it, or set CRAGLINE_DATA to another folder.`,
    );
  fs.writeFileSync(file, String(process.pid));
  process.once('exit', () => fs.rmSync(file, { force: true }));
}

/** @param {number} pid */
function runsCragline(pid) {
  const file = `/proc/${pid}/cmdline`;
  return !fs.existsSync(file) || fs.readFileSync(file, 'utf8').includes('start.mjs');
}

checkNode();
if (!Number.isInteger(port) || port < 1 || port > 65535)
  giveUp(`PORT is ‘${process.env['PORT']}’; it has to be a number from 1 to 65535.`);
if (!(await isPortFree()))
  giveUp(
    `Port ${port} on ${host} is in use by another program; stop it, or start with another one, like PORT=${port + 1} npm start.`,
  );
try {
  holdFolder();
} catch (error) {
  giveUp(
    `The data folder ${dataFolder} cannot be written (${error instanceof Error ? error.message : error}); set CRAGLINE_DATA to one that can.`,
  );
}
ensurePackages();
if (!outsideUrl && !findServer()) ensureDebianPackage('mariadb-server', 'The database server');
ensureBuild();
const keys = readKeys();

let isEnding = false;
/** @type {import('./database.mjs').Database | undefined} */
let database;
/** @type {import('node:child_process').ChildProcess | undefined} */
let server;

async function runDatabase() {
  const dbPort = Number(process.env['CRAGLINE_DB_PORT'] ?? 0) || (await freePort());
  const start = async () => {
    database = await startDatabase({
      folder: path.join(dataFolder, 'mariadb'),
      port: dbPort,
      ownerPassword: keys.owner,
      appPassword: keys.app,
    });
    void database.ended.then(async () => {
      for (let wait = 200; !isEnding; wait = Math.min(wait * 2, 10_000)) {
        await sleep(wait);
        if (isEnding) return;
        try {
          return await start();
        } catch (error) {
          process.stderr.write(`${error instanceof Error ? error.message : error}\n`);
        }
      }
    });
  };
  await start();
}

/** @type {number[]} */
const falls = [];

function runServer() {
  server = spawn(
    process.execPath,
    ['--enable-source-maps', path.join(ROOT, 'dist/server/index.js')],
    {
      cwd: ROOT,
      // the channel tells the server when this process is gone, however it went
      stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
      env: {
        ...process.env,
        NODE_ENV: 'production',
        HOST: host,
        PORT: String(port),
        CRAGLINE_DATA: dataFolder,
        CRAGLINE_DB_URL: outsideUrl ?? database?.appUrl,
        CRAGLINE_DB_OWNER_URL:
          process.env['CRAGLINE_DB_OWNER_URL'] ?? outsideUrl ?? database?.ownerUrl,
        CRAGLINE_TOKEN_KEY: process.env['CRAGLINE_TOKEN_KEY'] ?? keys.token,
        CRAGLINE_SEAL_KEY: process.env['CRAGLINE_SEAL_KEY'] ?? keys.seal,
      },
    },
  );
  server.once('exit', (code, signal) => {
    if (isEnding) return;
    // the server exits by itself with 1 only after one sentence on what a person has to put right
    const now = Date.now();
    falls.push(now);
    const isHopeless = falls.filter((at) => now - at < 60_000).length > RESTARTS_A_MINUTE;
    if ((code === 1 && signal === null) || isHopeless) void end(1);
    else setTimeout(runServer, 300);
  });
}

/** @param {number} code */
async function end(code) {
  if (isEnding) return;
  isEnding = true;
  if (server && server.exitCode === null && server.signalCode === null) {
    const gone = new Promise((resolve) => server?.once('exit', resolve));
    server.kill('SIGTERM');
    await gone;
  }
  await database?.stop();
  process.exit(code);
}

process.on('SIGTERM', () => void end(0));
process.on('SIGINT', () => void end(0));
process.on('SIGHUP', () => void end(0));

try {
  if (!outsideUrl) await runDatabase();
} catch (error) {
  giveUp(error instanceof Error ? error.message : String(error));
}
if (!isEnding) runServer();
