import { readFile } from 'node:fs/promises';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, expect, test, vi } from 'vitest';
import { demoWeatherFile } from '../../data/demo/demo-weather-file.ts';
import { sampleStation, sampleUpload } from '../../data/demo/sample-upload.ts';
import { demoStations } from '../../data/demo/stations.ts';
import { type DemoAccount, readDemoAccounts } from '../../server/builders/demo-accounts.ts';
import type { Role } from '../../src/contract/accounts.ts';
import { paths } from '../../src/lib/paths.ts';
import { launchBrowser, type Viewport, type WatchedPage, watchedPage } from '../support/browser.ts';
import { type RunningProduct, startProduct } from '../support/start-product.ts';
import { expectAccessible, expectNoSidewaysScroll } from './accessible.ts';
import {
  acceptAll,
  answerTable,
  bringPaused,
  bringSameShape,
  newStations,
  resume,
  seeRefused,
} from './mixed-archive-road.ts';
import { makeAndRevokeToken, putStationRight, readRecord } from './record-road.ts';
import {
  mapIsDrawn,
  scoreShown,
  showStations,
  signIn,
  signOut,
  station,
  stationList,
  uploadText,
  watchSteps,
} from './steps.ts';

const DESK: Viewport = { width: 1440, height: 900 };
const PHONE: Viewport = { width: 390, height: 844 };
const SAMPLE = sampleStation.name;
const STEPS = ['received', 'reading', 'reducing', 'storing'];
const PLACE = 'Kite Hollow';
/** Long enough for a machine that is busy with other things; nothing waits this long on an idle one. */
const SOON = { timeout: 45_000 };

vi.setConfig({ testTimeout: 300_000 });

let product: RunningProduct;
let browser: Browser;
let teamId: string;
let accounts: readonly Omit<DemoAccount, 'name'>[];
let watched: WatchedPage;
let page: Page;

beforeAll(async () => {
  product = await startProduct('demo');
  accounts = await readDemoAccounts(product.demoAccountsPath);
  teamId = (await product.deps.db('teams').first<{ id: string }>('id')).id;
  browser = await launchBrowser();
}, 300_000);

afterAll(async () => {
  await browser?.close();
  await product?.close();
});

beforeEach(() => look(DESK));

/** Closing throws when the console, the network or the page complained about anything. */
afterEach(async ({ task }) => {
  if (task.result?.state === 'fail') await watched.picture(task.name.slice(0, 60).replaceAll(/\W+/g, '-'));
  await watched.close();
});

async function look(viewport: Viewport): Promise<void> {
  watched = await watchedPage(browser, { origin: product.origin, viewport });
  page = watched.page;
}

async function lookAgain(viewport: Viewport): Promise<void> {
  await watched.close();
  await look(viewport);
}

function account(role: Role): { email: string; password: string } {
  const found = accounts.find((each) => each.role === role);
  if (found === undefined) throw new Error(`there is no ${role} among the demo accounts`);
  return found;
}

/** To the map, or to the page that `from` leads to. */
async function enterAs(role: Role, from?: string): Promise<void> {
  await page.goto(paths.signIn.to(from));
  await signIn(page, account(role));
}

/** Without the map, whose drawing takes a while. */
async function enterAtWeather(role: Role): Promise<void> {
  await enterAs(role, paths.weather.to(teamId));
  await page.getByRole('heading', { name: 'Weather files', level: 1 }).waitFor();
}

/** By the top bar, where the pages of a narrow screen stand behind a menu. */
async function openWeather(): Promise<void> {
  const menu = page.getByRole('button', { name: 'Menu', exact: true });
  if (await menu.isVisible()) {
    await menu.focus();
    await page.keyboard.press('Enter');
    await expectAccessible(page, 'menu');
  }
  await page.getByRole('link', { name: 'Weather', exact: true }).click();
  await page.getByRole('heading', { name: 'Weather files', level: 1 }).waitFor();
}

/** "1,324 h" or "96" as a number. */
function figure(text: string | null): number {
  const digits = (text ?? '').replaceAll(/[^\d.-]/g, '');
  return digits === '' ? Number.NaN : Number(digits);
}

test('a wrong password is refused without saying which of the two was wrong', async () => {
  await page.goto('/');
  await page.getByRole('textbox', { name: 'E-mail' }).fill(account('engineer').email);
  await page.getByLabel('Password').fill('not the password at all');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByText('E-mail and password do not belong together.').waitFor();
  await expectAccessible(page, 'sign-in refused');
  // Chromium itself writes the refused request into the console.
  expect(watched.forgive(/status of 401.*\/api\/session/)).toBe(1);
});

test('the whole road: an engineer uploads a file, sees each step, accepts it, derives a warmer year, and finds the station with a score on the map', async () => {
  await enterAs('engineer');
  await mapIsDrawn(page);
  await showStations(page);
  expect(await stationList(page).getByRole('option').count()).toBe(demoStations.length);
  await openWeather();

  const watching = await watchSteps(page);
  await uploadText(page, sampleUpload());
  const uploads = page.getByRole('region', { name: 'Uploads' });
  await uploads.getByText('In review').waitFor(SOON);
  const { told, shown } = await watching.seen();
  expect(told).toEqual(STEPS);
  // Two steps within one frame of the screen are shown as the second.
  expect(shown.length).toBeGreaterThanOrEqual(1);
  expect(shown).toEqual(STEPS.filter((step) => shown.includes(step)));
  const steps = uploads.getByRole('list', { name: 'Steps of reading' }).getByRole('listitem');
  expect((await steps.allInnerTexts()).slice(0, 4).map((text) => /done/.test(text))).toEqual([true, true, true, true]);

  await uploads.getByRole('link', { name: sampleUpload().name }).click();
  await page.getByRole('heading', { name: `${SAMPLE}, typical year`, level: 1 }).waitFor();
  const found = page.getByRole('region', { name: 'What was found in the file' });
  expect(await found.getByRole('row', { name: /Line [\d,]+.*pressure/ }).count()).toBeGreaterThan(0);
  expect(await found.getByRole('row', { name: /They stay missing/ }).count()).toBe(1);

  const account = page.getByRole('region', { name: 'The hours and the air' });
  const sources = await account.getByRole('table').first().locator('tbody td').allInnerTexts();
  const total = figure(await account.getByRole('table').first().locator('tfoot td').textContent());
  expect(total).toBe(8760);
  expect(sources.map(figure).reduce((sum, hours) => sum + hours, 0)).toBe(total);
  expect(figure(sources[3] ?? '')).toBeGreaterThan(5);
  await readRecord(page);
  await expectAccessible(page, 'weather record in review');

  await page.getByRole('button', { name: 'Accept' }).click();
  await deriveExample('Two kelvin warmer');
  await page.getByRole('link', { name: 'Show on the map' }).click();
  await page.getByRole('heading', { name: SAMPLE, exact: true }).waitFor();
  await expect.poll(() => stationList(page).getByRole('option').count(), SOON).toBe(demoStations.length + 1);
  await expect.poll(() => scoreShown(page), SOON).toBeGreaterThan(0);
  await mapIsDrawn(page);
  const climates = page.getByRole('region', { name: 'Other climates' });
  await climates.getByRole('row', { name: /^Derived: Two kelvin warmer/ }).waitFor(SOON);
});

/** From the record of an accepted year to that of the derived one. */
async function deriveExample(name: string): Promise<void> {
  await page.getByRole('link', { name: 'Change the climate' }).click();
  await page.getByRole('button', { name: /^Example/ }).click();
  await page.getByText('Dry bulb +2.0 K in every month, days not stretched, humidity ratio kept.').waitFor(SOON);
  await expectAccessible(page, 'change of climate');
  await page.getByRole('textbox', { name: 'Name of the derived year' }).fill(name);
  await page.getByRole('button', { name: 'Save as a derived year' }).click();
  await page.getByRole('heading', { name: `${SAMPLE}, derived year`, level: 1 }).waitFor();
  await page.getByRole('heading', { name: 'Derived, beside its parent' }).waitFor();
  await expectAccessible(page, 'derived year');
}

test('a file that is there already is recognised and not stored again', async () => {
  await enterAtWeather('engineer');
  const total = page.getByText(/^\d+ files, newest first$/);
  const before = await total.textContent();
  const [korrelPan] = demoStations;
  if (korrelPan === undefined) throw new Error('the demo has no station');
  await uploadText(page, { ...demoWeatherFile(korrelPan), name: 'another name.epw' });
  const uploads = page.getByRole('region', { name: 'Uploads' });
  await uploads.getByText('Already here: these are the same bytes as korrel-pan-typical.epw').waitFor();
  await page.reload();
  await page.getByRole('table').first().waitFor();
  expect(await total.textContent()).toBe(before);
});

test('the chosen place shows a ledger that adds up, a verdict, a grade and the arithmetic of its score', async () => {
  await enterAs('planner');
  await showStations(page);
  await station(page, PLACE).click();
  const place = page.getByRole('region', { name: 'Chosen place' });
  await place.getByRole('heading', { name: PLACE, exact: true }).waitFor();
  await place.getByText(/^(Meets|Does not meet) the brief:/).waitFor();
  await place
    .getByText(/Grade [A-D]/)
    .first()
    .waitFor();

  const ledger = page.getByRole('region', { name: 'Ledger' });
  const counts = await ledger.locator('tbody td:nth-child(2)').allInnerTexts();
  expect(counts.length).toBeGreaterThanOrEqual(7);
  expect(counts.map(figure).reduce((sum, hours) => sum + hours, 0)).toBe(8760);
  await ledger.getByText('The classes add up to 8,760 hours.').waitFor();

  const arithmetic = page.getByRole('region', { name: 'How the score is made' });
  const points = await arithmetic.locator('tbody td:last-child').allInnerTexts();
  expect(points).toHaveLength(7);
  const sum = points.map(figure).reduce((total, each) => total + each, 0);
  const printed = figure(await arithmetic.locator('tfoot td:last-child').textContent());
  // Each of the seven figures is rounded to a hundredth.
  expect(Math.abs(sum - printed)).toBeLessThan(0.04);
  expect(await scoreShown(page)).toBe(Math.round(printed));
});

test('the year cloth paints 365 days by 24 hours and reads any hour aloud', async () => {
  await enterAs('planner');
  await showStations(page);
  await station(page, PLACE).click();
  const cloth = page.getByRole('slider', {
    name: new RegExp(`The year at ${PLACE} hour by hour: [\\d,]+ of [\\d,]+ hours`),
  });
  await cloth.waitFor();
  expect(await cloth.getAttribute('aria-valuemax')).toBe(String(365 * 24));
  const colours = await cloth.locator('canvas').evaluate((canvas) => {
    if (!(canvas instanceof HTMLCanvasElement)) return 0;
    const pixels = canvas.getContext('2d')?.getImageData(0, 0, canvas.width, canvas.height).data ?? [];
    const seen = new Set<number>();
    for (let at = 0; at + 2 < pixels.length; at += 4) {
      seen.add(((pixels[at] ?? 0) << 16) | ((pixels[at + 1] ?? 0) << 8) | (pixels[at + 2] ?? 0));
    }
    return seen.size;
  });
  // Closed, idle, outdoor air, direct and two-stage at least.
  expect(colours).toBeGreaterThanOrEqual(5);

  await cloth.focus();
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('End');
  expect(await cloth.getAttribute('aria-valuetext')).toMatch(/^31 Dec.*: \S/);
  await page.keyboard.press('ArrowDown');
  expect(Number(await cloth.getAttribute('aria-valuenow'))).toBeGreaterThan(364 * 24);
});

test('the map tells the dry interior from the humid coast, and the keyboard goes from station to station', async () => {
  await enterAs('viewer');
  await mapIsDrawn(page);
  const keys = page.getByRole('listbox', { name: 'Stations on the map' });
  await keys.focus();
  await page.keyboard.press('k');
  await page.keyboard.press('Enter');
  const chosen = page.getByRole('region', { name: 'Chosen place' });
  await chosen.getByRole('heading', { name: 'Kite Hollow', exact: true }).waitFor();
  await station(page, 'Korrel Pan').click();
  await chosen.getByRole('heading', { name: 'Korrel Pan', exact: true }).waitFor();
  const dry = await scoreShown(page);
  await station(page, 'Mangrove Landing').click();
  await chosen.getByRole('heading', { name: 'Mangrove Landing', exact: true }).waitFor();
  const humid = await scoreShown(page);
  expect(dry - humid).toBeGreaterThan(50);
  expect(page.url()).toContain('place=');
  await page.goBack();
  await chosen.getByRole('heading', { name: 'Korrel Pan', exact: true }).waitFor();
  await page.getByRole('region', { name: 'How the score is made' }).waitFor();
  await expectAccessible(page, 'map');
});

test('a viewer reads everything of a file and is offered neither upload nor acceptance', async () => {
  await enterAtWeather('engineer');
  const { name, text } = sampleUpload();
  // Another year of the same place waits for review: one dew point more is given.
  const other = { name: `other-${name}`, text: text.replace(',99.9,99.9,999,999999,', ',20.0,5.0,37,90400,') };
  await uploadText(page, other);
  await page.getByRole('region', { name: 'Uploads' }).getByText('In review').waitFor(SOON);
  await signOut(page);

  await signIn(page, account('viewer'));
  await openWeather();
  expect(await page.getByRole('button', { name: 'Upload files' }).count()).toBe(0);
  await page
    .getByRole('row', { name: new RegExp(`other-${name}`) })
    .getByRole('link')
    .click();
  await page.getByText('Waits for an engineer of the team to accept it.').waitFor();
  expect(await page.getByRole('button', { name: /Accept|Withdraw/ }).count()).toBe(0);
  await page.goBack();
  await page.getByRole('link', { name: 'Lantern Bay' }).click();
  await page.getByRole('heading', { name: 'Doubts: used as they stand, or left out' }).waitFor();
  await expectAccessible(page, 'weather record with doubts');
});

test('a file with letters for numbers is refused with line and column, and another upload goes on as before', async () => {
  await enterAtWeather('engineer');
  const lines = sampleUpload().text.split('\r\n');
  // Line 1009 is the first after 1000 hours: its dry bulb becomes letters.
  const fields = (lines[1008] ?? '').split(',');
  const columnOfDryBulb = fields.slice(0, 6).join(',').length + 2;
  lines[1008] = fields.with(6, 'warm').join(',');
  await uploadText(page, { name: 'letters.epw', text: lines.join('\r\n') });
  const uploads = page.getByRole('region', { name: 'Uploads' });
  await uploads.getByText('Refused').waitFor(SOON);
  await uploads.getByRole('link', { name: 'letters.epw' }).click();
  await page.getByRole('heading', { name: 'Why it is refused' }).waitFor();
  const row = page.getByRole('row', { name: /warm/ });
  await row.getByText(`Line 1009, column ${columnOfDryBulb}`).waitFor();
  expect(await page.getByRole('button', { name: 'Accept' }).count()).toBe(0);
  await expectAccessible(page, 'weather record of a refused file');
});

test('a zip of mixed files is read with live progress, paused, resumed and answered once; accepting what waits puts its stations on the map', async () => {
  await enterAtWeather('engineer');
  const look = { page, soon: SOON };
  const batch = await bringPaused(look);
  await page.reload();
  await batch.getByText(/^Paused, 0 of 0 files read/).waitFor();
  await resume(batch, look);
  await expectAccessible(page, 'library with a batch');
  await seeRefused(batch, look);
  await answerTable(batch, look);
  await openWeather();
  await bringSameShape(look);
  await acceptAll(batch, look);
  await page.getByRole('link', { name: 'Map', exact: true }).click();
  await showStations(page);
  for (const name of newStations) await station(page, name).waitFor(SOON);
  await mapIsDrawn(page);
});

test('a lead puts a station right with reasons, and makes a token that is shown once and revokes it', async () => {
  await enterAtWeather('lead');
  await page.getByRole('link', { name: 'Stations' }).click();
  await page.getByLabel('Name or WMO number').fill('gannet');
  await page.getByRole('button', { name: 'Search' }).click();
  await page.getByText('1 station with "gannet", by name').waitFor();
  await page.getByRole('link', { name: 'Gannet Point' }).click();
  await page.getByRole('heading', { name: 'Gannet Point', level: 1 }).waitFor();
  await putStationRight(page);
  await expectAccessible(page, 'station');
  await page.getByRole('link', { name: 'Team', exact: true }).click();
  await page.getByRole('link', { name: 'API tokens' }).click();
  await makeAndRevokeToken(page);
  await expectAccessible(page, 'API tokens');
});

test('the map asks nothing of any other origin, and tiles, fonts and code come from this one under the policy of the page', async () => {
  const requests: string[] = [];
  watched.context.on('request', (request) => requests.push(request.url()));
  const answered = page.waitForResponse((response) => response.request().isNavigationRequest());
  await enterAs('viewer');
  const policy = (await (await answered).allHeaders())['content-security-policy'] ?? '';
  expect(policy).toMatch(/default-src 'none'/);
  expect(policy).not.toMatch(/unsafe/);
  await mapIsDrawn(page);
  const kinds = (pattern: RegExp) => requests.filter((url) => pattern.test(url)).length;
  expect(kinds(/\/tiles\//)).toBeGreaterThan(0);
  expect(kinds(/\.woff2/)).toBeGreaterThan(0);
  const foreign = requests.filter((url) => !/^(data|blob):/.test(url) && new URL(url).origin !== product.origin);
  expect(foreign).toEqual([]);
  expect(watched.faults()).toEqual([]);
});

test('on a phone nothing scrolls sideways and the sheet at the foot of the map opens, shows a place and closes', async () => {
  await lookAgain(PHONE);
  await page.goto('/');
  await page.getByRole('button', { name: 'Sign in' }).waitFor();
  await expectNoSidewaysScroll(page, 'sign-in');
  await signIn(page, account('viewer'));
  await mapIsDrawn(page);
  await expectNoSidewaysScroll(page, 'map');
  expect((await page.getByRole('banner').boundingBox())?.height).toBeLessThanOrEqual(56);

  const sheet = page.getByRole('region', { name: 'Stations panel' });
  const low = await sheet.boundingBox();
  await sheet.getByRole('button', { name: /Press to change/ }).click();
  await expect
    .poll(async () => (await sheet.boundingBox())?.height ?? 0, SOON)
    .toBeGreaterThan((low?.height ?? 0) + 150);
  await showStations(page);
  await station(page, 'Cane Coast').click();
  const place = page.getByRole('region', { name: 'Place panel' });
  await place.getByRole('heading', { name: 'Cane Coast', exact: true }).waitFor();
  await place.getByRole('button', { name: /Press to change/ }).focus();
  await page.keyboard.press('ArrowUp');
  await page.getByRole('region', { name: 'How the score is made' }).scrollIntoViewIfNeeded();
  await expectNoSidewaysScroll(page, 'map with a place');
  await expectAccessible(page, 'map on a phone');
  await page.keyboard.press('Escape');
  await expect.poll(async () => (await place.boundingBox())?.height ?? 0, SOON).toBeLessThan(160);

  await openWeather();
  await page.getByRole('link', { name: 'Lantern Bay' }).waitFor();
  await expectNoSidewaysScroll(page, 'weather list');
  await page.getByRole('link', { name: 'Lantern Bay' }).click();
  await page.getByRole('heading', { name: 'Design values of this year' }).waitFor();
  await expectNoSidewaysScroll(page, 'weather record');
});

test('signing out ends the session: the address of a page leads to sign-in and back to the page', async () => {
  await enterAtWeather('viewer');
  const address = page.url();
  await signOut(page);
  await page.goto(address);
  await page.getByRole('button', { name: 'Sign in' }).waitFor();
  await signIn(page, account('viewer'));
  await page.getByRole('heading', { name: 'Weather files', level: 1 }).waitFor();
  expect(page.url()).toBe(address);
});

test('the passwords are in the file of the demo accounts alone, and the server has nothing to complain about', async () => {
  const file = await readFile(product.demoAccountsPath, 'utf8');
  await page.goto('/');
  const served = await page.content();
  for (const { password } of accounts) {
    expect(file).toContain(password);
    expect(served).not.toContain(password);
  }
  expect(product.log.errors).toEqual([]);
});
