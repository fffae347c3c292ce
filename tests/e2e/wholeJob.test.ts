import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { collectErrors, expectAccessible, openBrowser } from '@tests/support/browser';
import { PRACTICE_HEADINGS, practiceLine } from '@tests/support/practiceCsv';
import { makeFolder, startServer, type RunningServer } from '@tests/support/testServer';

/** The whole job in a browser, by role selectors and keyboard: from sample to signed settings. */

const PASSWORD = 'demo-tarnlab-2026';
let server: RunningServer;
let browser: Browser;
let errors: string[] = [];

beforeAll(async () => {
  server = await startServer(makeFolder());
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
  await server.stop();
});

async function openAs(role: string): Promise<Page> {
  const context = await browser.newContext({
    viewport: { width: 1280, height: 900 },
    reducedMotion: 'reduce',
  });
  const page = await context.newPage();
  page.setDefaultTimeout(20_000);
  errors = collectErrors(page);
  await page.goto(`${server.url}/sign-in`);
  await page.getByLabel('E-mail').fill(`${role}@tarnlab.example`);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.keyboard.press('Enter');
  await page.waitForURL((url) => !url.pathname.includes('sign-in'));
  return page;
}

const button = (page: Page, name: string | RegExp) => page.getByRole('button', { name });

async function fillSetPoint(page: Page, name: string, low: string, high: string): Promise<void> {
  await page.getByLabel(`${name} from`).fill(low);
  await page.getByLabel(`${name} to`, { exact: true }).fill(high);
}

/** Run number and set-points of the open runs, from the table on the bench page. */
async function openRuns(page: Page) {
  const table = page.getByRole('region', { name: 'Runs in run order' });
  await table.waitFor();
  const rows = await table
    .getByRole('row')
    .evaluateAll((all) => all.map((row) => [...row.children].map((cell) => cell.textContent)));
  return rows
    .filter((cells) => cells.includes('open'))
    .map((cells) => ({
      number: Number(cells[0]),
      voltage: Number(cells[2]),
      gap: Number(cells[3]),
      pulses: Number(cells[4]),
    }));
}

describe('from sample to signed settings', () => {
  let studyPath = '';

  it('a researcher registers a sample, writes the Brief, compares plans and freezes one', async () => {
    const page = await openAs('researcher');
    await expectAccessible(page, 'studies');
    await page.getByRole('link', { name: 'Samples' }).first().click();
    await page.getByRole('link', { name: 'Register a sample' }).click();
    await page.getByLabel('Name', { exact: true }).fill('Test granite Ω');
    await page.getByLabel('Material').fill('granite');
    await page.getByLabel('Mass received').fill('12,4 kg');
    await page.getByLabel(/I have looked the sample through/).check();
    await expectAccessible(page, 'new sample');
    await button(page, 'Register the sample').click();
    await page.getByRole('heading', { name: 'Test granite Ω' }).waitFor();
    await page.getByText('12.40\u202Fkg').first().waitFor();
    await expectAccessible(page, 'sample');

    await page.getByRole('link', { name: 'Open a study on it' }).click();
    await page.getByLabel('Title').fill('Sand by the whole path');
    await button(page, 'Open the study').click();
    await page.getByRole('heading', { name: 'Sand by the whole path' }).waitFor();
    studyPath = new URL(page.url()).pathname.replace('/brief', '');

    await page.getByLabel('Sieve stack').selectOption({ label: 'Full stack, 16 mm to 63 µm' });
    await fillSetPoint(page, 'Voltage', '170', '140');
    await fillSetPoint(page, 'Gap', '20', '30');
    await fillSetPoint(page, 'Pulses', '25', '60');
    await page.getByLabel('Frequency held at').fill('2');
    await page.getByLabel('at least', { exact: true }).fill('75');
    await page.getByLabel('best from').fill('92');
    await page.getByLabel('best below').fill('6');
    await page.getByLabel('at most', { exact: true }).fill('22');
    await page.getByLabel('Rehearse on the practice rig').selectOption('granite');
    await button(page, 'Save the Brief').click();
    // the range is reversed: a sentence at its place, and nothing typed is lost
    await page.getByText('Low (170) is above high (140). Swap them?').first().waitFor();
    expect(await page.getByLabel('Gap from').inputValue()).toBe('20');
    await fillSetPoint(page, 'Voltage', '140', '170');
    await expectAccessible(page, 'Brief');
    await button(page, 'Save the Brief').click();
    await page.getByText('Saved.').waitFor();

    await page.getByRole('link', { name: 'Compare the plans' }).click();
    for (const plan of ['Full factorial', 'Central composite, face-centred', 'Box–Behnken'])
      await page.getByRole('article', { name: plan }).getByText('Bench time').waitFor();
    // the rotatable one reaches beyond what this rig can dial: refused with its points
    await page
      .getByRole('article', { name: 'Central composite, rotatable' })
      .getByText(/settings cannot be dialled in/)
      .first()
      .waitFor();
    await page.getByRole('button', { name: 'Pick Central composite, face-centred' }).click();
    await page.getByLabel('Seed of the random order').fill('11');
    await expectAccessible(page, 'matrix');
    await button(page, 'Freeze 20 runs').click();
    await button(page, 'Freeze the matrix').click();
    await page.waitForURL(/\/bench$/);
    expect(errors).toEqual([]);
    await page.context().close();
  });

  it('an operator does a run at the bench, voids one, and imports the rest from a CSV', async () => {
    const page = await openAs('operator');
    await page.goto(`${server.url}${studyPath}/bench`);
    const runs = await openRuns(page);
    expect(runs).toHaveLength(20);
    await expectAccessible(page, 'bench');

    await page.getByRole('link', { name: 'Do run 1' }).click();
    await page.getByText('High voltage and stored charge can kill.').waitFor();
    expect(await button(page, '5 checks to go').isDisabled()).toBe(true);
    for (const check of await page.getByRole('checkbox').all()) await check.click();
    await expectAccessible(page, 'run sheet');
    await button(page, 'Checked: on to the record').click();
    const cells = practiceLine(runs[0]!, 900).split(';');
    await page.getByLabel('Dry feed').fill(cells[4]!);
    await page.getByLabel('Dry product before sieving').fill(cells[5]!);
    await expectAccessible(page, 'run record');
    await button(page, 'On to the sieves').click();
    await page.getByLabel('16\u202Fmm retained, mass in g').focus();
    for (const mass of cells.slice(7)) {
      await page.keyboard.type(mass);
      await page.keyboard.press('Enter');
    }
    await page
      .getByText(/Inside the rule\./)
      .first()
      .waitFor();
    expect(await page.getByText('Treatment: feed against product').isVisible()).toBe(true);
    expect(await page.getByText('Sieving: product against the sum').isVisible()).toBe(true);
    await expectAccessible(page, 'sieve entry');
    // more on the sieves than was fed: refused at once, nothing cleared
    await page.getByLabel('pan, mass in g').fill('900');
    await button(page, 'Close run 1').click();
    await page
      .getByText(/g lies on the sieves, but only/)
      .first()
      .waitFor();
    await page.getByLabel('pan, mass in g').fill(cells.at(-1)!);
    await button(page, 'Close run 1').click();
    await page.getByText('Run 1 is recorded.').waitFor();

    await page.getByRole('link', { name: 'On to run 2' }).click();
    await button(page, 'Cannot run this one …').click();
    await page.getByLabel('What went wrong?').fill('tray tipped over');
    await expectAccessible(page, 'void dialog');
    await button(page, 'Mark it void').click();
    await page.goto(`${server.url}${studyPath}/bench`);
    await page.getByText('void: tray tipped over').waitFor();

    const rest = await openRuns(page);
    expect(rest).toHaveLength(18);
    const csv = [PRACTICE_HEADINGS, ...rest.map((run) => practiceLine(run, 900))].join('\r\n');
    await page
      .getByLabel('CSV file')
      .setInputFiles({ name: 'runs.csv', mimeType: 'text/csv', buffer: Buffer.from(csv) });
    await page.getByText('Read with semicolons between cells and a decimal comma.').waitFor();
    await expectAccessible(page, 'import preview');
    await button(page, 'Record 18 runs').click();
    await page.getByText('19 done, 0 open, 1 void').waitFor();
    expect(errors).toEqual([]);
    await page.context().close();
  });

  it('an analyst fits the model, drops a term, reads the map and keeps it', async () => {
    const page = await openAs('analyst');
    await page.goto(`${server.url}${studyPath}/fit`);
    await page.getByText('Predicted R²').first().waitFor();
    await page.getByRole('region', { name: 'Analysis of variance' }).first().waitFor();
    const straight = page
      .getByRole('group', { name: 'Terms of the model' })
      .getByRole('button', { name: /^g-|^g\d|^g\+|^g/ })
      .first();
    await straight.click();
    // taking a straight term out takes its square and products along
    await page.getByText('6 in').or(page.getByText('5 in')).first().waitFor();
    await straight.click();
    await button(page, 'Suggest').click();
    await page.getByText(/Backward elimination by AICc/).waitFor();
    await expectAccessible(page, 'fit');
    await page.getByLabel('Why these terms and this scale?').fill('suggested by AICc');
    await button(page, /Keep it for Passing 2 mm/).click();
    await button(page, 'This model is kept').waitFor();

    await page.getByRole('link', { name: 'To the map' }).click();
    const map = page.getByRole('application', { name: /Contour map of Passing 2 mm/ });
    await map.waitFor();
    await map.focus();
    await page.keyboard.press('ArrowUp');
    await page.keyboard.press('PageUp');
    await page.getByText(/All goals hold in/).waitFor();
    await page.getByRole('heading', { name: 'Section A–A′' }).waitFor();
    await expectAccessible(page, 'map');
    expect(errors).toEqual([]);
    await page.context().close();
  });

  it('a lead ranks the settings, asks for runs, and signs with the password', async () => {
    const page = await openAs('lead');
    await page.goto(`${server.url}${studyPath}/release`);
    await page.getByText(/settable combinations looked at/).waitFor();
    await button(page, /^Take as candidate/)
      .first()
      .click();
    await page.getByText('A', { exact: true }).first().waitFor();
    await expectAccessible(page, 'release');
    for (const purpose of [
      'replicate, to judge lack of fit',
      'follow the steepest ascent',
      'confirm the setting looked at',
    ]) {
      await page.getByLabel('Purpose').selectOption({ label: purpose });
      await button(page, 'Propose').click();
      await page.getByRole('region', { name: 'Proposed runs' }).waitFor();
    }
    await button(page, 'Go on to sign').click();
    await page.getByLabel('For what use?').fill('sand for the test');
    await page.getByLabel('Your password, to sign').fill('not my password');
    await button(page, 'Sign the release').click();
    await page.getByText('This is not your password. Nothing was signed.').first().waitFor();
    expect(await page.getByLabel('For what use?').inputValue()).toBe('sand for the test');
    await page.getByLabel('Your password, to sign').fill(PASSWORD);
    await button(page, 'Sign the release').click();
    await page.getByRole('heading', { name: 'Release, revision 1' }).waitFor();
    await expectAccessible(page, 'signed release');
    await page.goto(`${server.url}${studyPath}`);
    await page.getByText('These settings are signed').waitFor();
    await expectAccessible(page, 'study home');
    await page.getByRole('link', { name: 'Whole trail' }).click();
    await page.getByRole('heading', { name: /^Trail of/ }).waitFor();
    await expectAccessible(page, 'trail');
    expect(errors).toEqual([]);
    await page.context().close();
  });

  it('a customer sees their own samples and nothing else', async () => {
    const page = await openAs('customer');
    await page.getByRole('heading', { name: 'My samples' }).waitFor();
    await page.getByText('Quernby granite').first().waitFor();
    expect(await page.getByText('Harbour wall concrete').count()).toBe(0);
    await page.goto(`${server.url}${studyPath}`);
    await page.getByRole('heading', { name: 'My samples' }).waitFor();
    await expectAccessible(page, 'my samples');
    expect(errors).toEqual([]);
    await page.context().close();
  });

  it('an admin invites a person, who chooses a password and is in', async () => {
    const page = await openAs('admin');
    await page.goto(`${server.url}/lab`);
    await page.getByLabel('Name', { exact: true }).fill('Ada Fell');
    await page.getByLabel('E-mail').fill('ada.fell@tarnlab.example');
    await page.getByRole('checkbox', { name: 'operator' }).check();
    await button(page, 'Make a one-time address').click();
    const address = await page.locator('code').filter({ hasText: '/invitation#' }).textContent();
    await expectAccessible(page, 'lab');
    await page.goto('about:blank');
    await page.context().clearCookies();
    await page.goto(String(address));
    await page.getByRole('heading', { name: 'Welcome, Ada Fell' }).waitFor();
    await page.getByLabel('Password', { exact: true }).fill('a sentence of my own');
    await page.getByLabel('Password, once more').fill('a sentence of my own');
    await expectAccessible(page, 'invitation');
    await button(page, 'Choose this password').click();
    await page.getByRole('heading', { name: 'Studies', exact: true }).waitFor();
    expect(errors).toEqual([]);
    await page.context().close();
  });
});
