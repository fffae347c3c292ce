import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { chromium, type Browser, type Page } from 'playwright-core';
import { expect } from 'vitest';

const ARGUMENTS = [
  '--no-sandbox',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const openBrowser = (): Promise<Browser> =>
  chromium.launch({ executablePath: '/usr/bin/chromium', args: ARGUMENTS });

const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

interface Violation {
  readonly id: string;
  readonly impact: string | null;
  readonly nodes: readonly { readonly html: string; readonly failureSummary?: string }[];
}

/** What axe-core finds serious or critical on the page as it stands. */
export async function seriousFindings(page: Page): Promise<string[]> {
  // evaluated over the debugging protocol, so the page's own content policy stays in force
  await page.evaluate(AXE);
  const violations = await page.evaluate(
    async (tags) =>
      (
        await (
          globalThis as unknown as {
            axe: { run: (d: Document, o: object) => Promise<{ violations: Violation[] }> };
          }
        ).axe.run(document, { runOnly: { type: 'tag', values: tags } })
      ).violations,
    TAGS,
  );
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(
      ({ id, nodes }) =>
        `${id}: ${nodes
          .slice(0, 3)
          .map(({ html }) => html.slice(0, 160))
          .join(' | ')}`,
    );
}

export async function expectAccessible(page: Page, where: string): Promise<void> {
  expect.soft(await seriousFindings(page), where).toEqual([]);
}

/** Errors of the page itself; refusals of the server show as failed requests and are expected. */
export function collectErrors(page: Page): string[] {
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(error.message));
  page.on('console', (message) => {
    if (message.type() === 'error' && !message.text().includes('Failed to load resource'))
      errors.push(message.text());
  });
  return errors;
}
