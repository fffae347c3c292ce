import { spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { findServer, freePort, startDatabase } from './database.mjs';
import { checkNode, ensureDebianPackage, ensurePackages, ROOT } from './install.mjs';
import { say } from './console.mjs';

/** `npm run dev`: a database of its own in .data-dev, the server restarting on change, Vite with live pages. */

checkNode();
ensurePackages();
if (!findServer()) ensureDebianPackage('mariadb-server', 'The database server');
const folder = path.join(ROOT, '.data-dev');
fs.mkdirSync(folder, { recursive: true, mode: 0o700 });
const database = await startDatabase({
  folder: path.join(folder, 'mariadb'),
  port: await freePort(),
  ownerPassword: 'owner-of-the-development-database',
  appPassword: 'app-of-the-development-database',
});
const port = process.env['PORT'] ?? '4173';
const env = {
  ...process.env,
  PORT: port,
  CRAGLINE_DATA: folder,
  CRAGLINE_DB_URL: database.appUrl,
  CRAGLINE_DB_OWNER_URL: database.ownerUrl,
  CRAGLINE_TOKEN_KEY: randomBytes(32).toString('base64url'),
  CRAGLINE_SEAL_KEY: randomBytes(32).toString('base64url'),
  CRAGLINE_LOG: 'info',
};
const children = [
  spawn('npx', ['tsx', 'watch', 'server/index.ts'], { cwd: ROOT, stdio: 'inherit', env }),
  spawn('npx', ['vite', '--host', '127.0.0.1'], { cwd: ROOT, stdio: 'inherit', env }),
];
say(`The API listens on port ${port}; open the address that Vite prints.`);

let isEnding = false;
async function end() {
  if (isEnding) return;
  isEnding = true;
  for (const child of children) child.kill('SIGTERM');
  await database.stop();
  process.exit(0);
}
process.on('SIGINT', () => void end());
process.on('SIGTERM', () => void end());
for (const child of children) child.once('exit', () => void end());
