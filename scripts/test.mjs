import { spawnSync } from 'node:child_process';
import fs from 'node:fs';
import { giveUp, say } from './console.mjs';
import { findServer } from './database.mjs';
import { checkNode, ensureDebianPackage, ensurePackages, ROOT } from './install.mjs';

/** `npm test`: installs what the checks need, then runs all of them; stops at the first that fails. */

const STEPS = [
  ['types', ['run', '--silent', 'types']],
  ['lint', ['run', '--silent', 'lint']],
  ['layout', ['run', '--silent', 'format:check']],
  ['build', ['run', '--silent', 'build']],
  ['tests of engine, server and pages', ['run', '--silent', 'test:unit']],
  ['journeys in a browser', ['run', '--silent', 'test:e2e']],
];

checkNode();
ensurePackages();
if (!findServer()) ensureDebianPackage('mariadb-server', 'The database server');
if (!fs.existsSync('/usr/bin/chromium'))
  ensureDebianPackage('chromium', 'The browser for the journeys');

for (const [name, args] of /** @type {[string, string[]][]} */ (STEPS)) {
  const start = Date.now();
  say(`— ${name}`);
  const { status } = spawnSync('npm', args, { cwd: ROOT, stdio: 'inherit' });
  if (status !== 0) giveUp(`The check ‘${name}’ failed; its report stands above.`);
  say(`  passed in ${Math.round((Date.now() - start) / 1000)} s`);
}
say('All checks passed.');
