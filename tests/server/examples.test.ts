import { execFile } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { PRACTICE_HEADINGS, practiceLine } from '@tests/support/practiceCsv';
import { makeFolder, startServer, type RunningServer } from '@tests/support/testServer';

const ROOT = path.resolve(import.meta.dirname, '../..');
const FOLDER = path.join(ROOT, 'examples/granite-sand');
const SEED = 500;

const read = (name: string) => fs.readFileSync(path.join(FOLDER, name), 'utf8');

describe('the worked study of granite sand', () => {
  let server: RunningServer;
  beforeAll(async () => {
    server = await startServer(makeFolder());
  }, 120_000);
  afterAll(async () => {
    await server.stop();
  });

  it('has masses that the practice rig gives again', () => {
    const [headings, ...lines] = read('runs.csv').trim().split('\n');
    expect(headings).toBe(PRACTICE_HEADINGS);
    expect(lines).toHaveLength(20);
    for (const line of lines) {
      const [number, voltage, gap, pulses] = line.split(';').map(Number);
      const run = { number: number!, voltage: voltage!, gap: gap!, pulses: pulses! };
      expect(practiceLine(run, SEED)).toBe(line);
    }
  });

  it('is a script of under 80 lines that prints what its README says', async () => {
    expect(read('wholeJob.mjs').trimEnd().split('\n').length).toBeLessThan(80);
    const { stdout } = await promisify(execFile)(
      process.execPath,
      ['examples/granite-sand/wholeJob.mjs', server.url],
      { cwd: ROOT },
    );
    const [, promised] = /```text\n([^`]*)```/.exec(read('README.md')) ?? [];
    expect(stdout).toBe(promised);
  });
});
