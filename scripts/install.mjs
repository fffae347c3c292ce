import { execFileSync, spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { giveUp, say } from './console.mjs';

/** What start and test need before anything else is there: nothing here may import a package. */

export const ROOT = path.resolve(import.meta.dirname, '..');
const isRoot = () => process.getuid?.() === 0;

export function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major < 20 || (major === 20 && minor < 19))
    giveUp(`Cragline needs Node.js 20.19 or newer; this is ${process.versions.node}.`);
}

/** @param {string} text */
const sha256 = (text) => createHash('sha256').update(text).digest('hex');

/** Installs the npm packages when there are none, or when the lock file has changed since. */
export function ensurePackages() {
  const lock = sha256(fs.readFileSync(path.join(ROOT, 'package-lock.json'), 'utf8'));
  const marker = path.join(ROOT, 'node_modules', '.cragline-lock');
  if (fs.existsSync(marker) && fs.readFileSync(marker, 'utf8') === lock) return;
  say('Installing the npm packages …');
  const { status } = spawnSync('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], {
    cwd: ROOT,
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  if (status !== 0) giveUp('The npm packages could not be installed; npm’s message stands above.');
  fs.writeFileSync(marker, lock);
}

/**
 * Installs a Debian package when this is root; says which one is missing when it is not.
 *
 * @param {string} name      the package
 * @param {string} purpose   what for, as the end of a sentence
 */
export function ensureDebianPackage(name, purpose) {
  if (!isRoot())
    giveUp(
      `${purpose} is missing: ask an administrator to install the Debian package ${name}, then start again.`,
    );
  say(`Installing the Debian package ${name} …`);
  // its set-up would start a service of its own; 101 forbids that while it installs
  const policy = '/usr/sbin/policy-rc.d';
  const isOurs = !fs.existsSync(policy);
  if (isOurs) fs.writeFileSync(policy, '#!/bin/sh\nexit 101\n', { mode: 0o755 });
  try {
    const options = {
      stdio: /** @type {const} */ ('pipe'),
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    };
    execFileSync('apt-get', ['update', '-qq'], options);
    execFileSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', name], options);
  } catch {
    giveUp(
      `${purpose} is missing and the Debian package ${name} could not be installed; try: apt-get install ${name}`,
    );
  } finally {
    if (isOurs) fs.rmSync(policy, { force: true });
  }
}

const SOURCES = [
  'src',
  'server',
  'shared',
  'public',
  'index.html',
  'vite.config.ts',
  'tailwind.config.ts',
  'package-lock.json',
];

/** @param {string} place @returns {string[]} */
function filesBelow(place) {
  const full = path.join(ROOT, place);
  if (!fs.existsSync(full)) return [];
  if (!fs.statSync(full).isDirectory()) return [place];
  return fs
    .readdirSync(full)
    .sort()
    .flatMap((name) => filesBelow(path.join(place, name)));
}

/** Builds client and server when their sources have changed since the last build. */
export function ensureBuild() {
  const state = SOURCES.flatMap(filesBelow).map(
    (file) => `${file} ${sha256(fs.readFileSync(path.join(ROOT, file), 'utf8'))}`,
  );
  const fingerprint = sha256(state.join('\n'));
  const marker = path.join(ROOT, 'dist', '.fingerprint');
  if (fs.existsSync(marker) && fs.readFileSync(marker, 'utf8') === fingerprint) return;
  say('Building …');
  const { status } = spawnSync('npm', ['run', '--silent', 'build'], {
    cwd: ROOT,
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  if (status !== 0) giveUp('The build failed; its message stands above.');
  fs.writeFileSync(marker, fingerprint);
}
