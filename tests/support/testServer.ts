import { spawn, type ChildProcess } from 'node:child_process';
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { freePort } from '../../scripts/database.mjs';

const ROOT = path.resolve(import.meta.dirname, '../..');
const READY_LIMIT_MS = 120_000;

/** The application as a user starts it, on a data folder and ports of its own. */
export interface RunningServer {
  readonly url: string;
  readonly folder: string;
  readonly process: ChildProcess;
  readonly output: () => string;
  /** SIGTERM; resolves with the exit code. */
  readonly stop: () => Promise<number | null>;
}

export function makeFolder(): string {
  return fs.mkdtempSync(path.join(os.tmpdir(), 'cragline-run-'));
}

/** Runs `npm start`’s own script and waits for the ready line, or for the end. */
export async function startServer(
  folder: string,
  environment: NodeJS.ProcessEnv = {},
): Promise<RunningServer> {
  const port = await freePort();
  const child = spawn(process.execPath, ['scripts/start.mjs'], {
    cwd: ROOT,
    env: { ...process.env, PORT: String(port), CRAGLINE_DATA: folder, ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let text = '';
  child.stdout.on('data', (chunk: Buffer) => (text += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (text += chunk.toString()));
  const ended = new Promise<number | null>((resolve) => child.once('exit', resolve));
  const url = `http://127.0.0.1:${port}`;
  await new Promise<void>((resolve, reject) => {
    const limit = setTimeout(
      () => reject(new Error(`Not ready in time:\n${text}`)),
      READY_LIMIT_MS,
    );
    const timer = setInterval(() => {
      if (!text.includes(`Cragline is ready at ${url}`)) return;
      clearTimeout(limit);
      clearInterval(timer);
      resolve();
    }, 50);
    void ended.then((code) => {
      clearTimeout(limit);
      clearInterval(timer);
      reject(new Error(`It ended with ${code}:\n${text}`));
    });
  });
  return {
    url,
    folder,
    process: child,
    output: () => text,
    async stop() {
      child.kill('SIGTERM');
      return ended;
    },
  };
}

/** A small client of the API, as a script would write it. */
export async function signIn(url: string, email: string, password = 'demo-tarnlab-2026') {
  const response = await fetch(`${url}/api/auth/sign-in`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email, password }),
  });
  const { accessToken } = (await response.json()) as { accessToken: string };
  return async (method: string, route: string, body?: unknown) => {
    const answer = await fetch(`${url}/api${route}`, {
      method,
      headers: {
        'Content-Type': 'application/json',
        Authorization: `Bearer ${accessToken}`,
        'Idempotency-Key': crypto.randomUUID(),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
    return { status: answer.status, headers: answer.headers, body: (await answer.json()) as never };
  };
}
