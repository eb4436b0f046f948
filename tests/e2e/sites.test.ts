import { readFile } from 'node:fs/promises';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, onTestFailed, test, vi } from 'vitest';
import { demoStations } from '../../data/demo/stations.ts';
import { readDemoAccounts } from '../../server/builders/demo-accounts.ts';
import { demoSites } from '../../server/builders/demo-sites.ts';
import { queueSiteRuns } from '../../server/features/runs/queue-site-runs.ts';
import { changeSite } from '../../server/features/sites/change-site.ts';
import { shippedRelief } from '../../server/tiles/relief.ts';
import { paths } from '../../src/lib/paths.ts';
import { launchBrowser, type WatchedPage, watchedPage } from '../support/browser.ts';
import { type RunningProduct, startProduct } from '../support/start-product.ts';
import { expectAccessible, expectNoSidewaysScroll } from './accessible.ts';
import { signIn } from './steps.ts';

vi.setConfig({ testTimeout: 240_000 });

/** Sites of the demo itself that wait: one too far from every station, three too high above theirs. */
const FLAGGED_IN_DEMO = 4;

let product: RunningProduct;
let browser: Browser;
let watched: WatchedPage;
let page: Page;

beforeAll(async () => {
  product = await startProduct('demo');
  browser = await launchBrowser();
  watched = await watchedPage(browser, { origin: product.origin, viewport: { width: 1440, height: 900 } });
  ({ page } = watched);
  const planner = (await readDemoAccounts(product.demoAccountsPath)).find(({ role }) => role === 'planner');
  if (planner === undefined) throw new Error('the demo has a planner');
  const { db } = product.deps;
  const { id: programmeId, team_id: teamId } = await db('programmes').first<{ id: string; team_id: string }>();
  // Straight to the sites: the map takes a while to draw.
  await page.goto(paths.signIn.to(paths.sites.to({ teamId, programmeId })));
  await signIn(page, planner);
}, 300_000);

afterAll(async () => {
  await browser?.close();
  await product?.close();
});

/** 200 schools: 188 beside the demo's stations at their height, six in the empty north-west, six on mountains that are not there. */
function schools(): string {
  const odd = ['=cmd|calc', '🏫 École', 'مدرسة النور'];
  const rows = Array.from({ length: 200 }, (_none, index) => {
    const { latitude, longitude, elevationM } = demoStations[index % demoStations.length] ??
      demoSites[0] ?? { latitude: 0, longitude: 0, elevationM: 0 };
    const name = odd[index] ?? `School ${index + 1}`;
    const step = 0.01 + 0.005 * Math.floor(index / demoStations.length);
    if (index >= 194) return [name, -19 - step, 15 + (index - 194) / 10, '', 100];
    const heightM = (elevationM ?? 0) + (index >= 188 ? 1500 : 0);
    return [name, latitude + step, longitude, heightM, 50 + index];
  });
  return ['School name,Lat,Long,Altitude (m),Cooling load (kW)', ...rows.map((row) => row.join(','))].join('\n');
}

test('a planner imports 200 sites, 12 are flagged, and she goes from one flagged site to the next', async () => {
  onTestFailed(() => watched.picture('sites-failed'));
  await page.getByRole('link', { name: demoSites[0]?.name ?? '' }).waitFor();
  await expectAccessible(page, 'the table of sites');
  await page.getByRole('link', { name: 'Import a table' }).click();
  const buffer = Buffer.from(`${schools()}\nNowhere,95,200,x,y\n`);
  await page.locator('input[type="file"]').setInputFiles({ name: 'schools.csv', mimeType: 'text/csv', buffer });

  // Columns are guessed, and the one faulty row is told by line and column.
  await page.getByRole('heading', { name: '4 faults in 1 row' }).waitFor();
  expect(await page.getByRole('combobox', { name: 'Design load, kW' }).inputValue()).toBe('4');
  const faults = page.getByRole('table', { name: 'Faults by line and column' }).getByRole('row');
  const [line, column, fault] = await faults.nth(1).getByRole('cell').allInnerTexts();
  expect([line, column]).toEqual(['202', 'Latitude']);
  expect(fault).toContain('lies between -90 and 90');
  await expectAccessible(page, 'a table in preview');
  await page.getByRole('checkbox', { name: 'Leave the 1 row with faults out' }).check();
  await page.getByRole('button', { name: 'Check 200 rows with the server' }).click();
  await page.getByText(/^200 rows checked/).waitFor();
  await expectAccessible(page, 'a table that the server checked');
  await page.getByRole('button', { name: 'Import 200 sites' }).click();
  await page.getByText('12 sites are flagged').waitFor();

  // From flagged to flagged: another station each time, with the reason that the second in the ranking asks for.
  await page.getByRole('link', { name: 'Go through the flagged ones' }).click();
  for (const left of [12, 11, 10]) {
    await page.getByText(`${left + FLAGGED_IN_DEMO} sites left to settle`, { exact: true }).waitFor();
    await page.getByRole('radio').nth(2).check();
    if (left === 12) {
      await page.getByRole('button', { name: 'Save this choice' }).click();
      await page.getByText(/stands first. Say why/).waitFor();
      await expectAccessible(page, 'a site that waits for its station');
    }
    await page.getByLabel('Reason for this station').fill('Same side of the range');
    await page.getByRole('button', { name: 'Save this choice' }).click();
  }
  await page.getByText(`${9 + FLAGGED_IN_DEMO} sites left to settle`, { exact: true }).waitFor();
  await page.getByRole('link', { name: 'Back to the table' }).click();
  await page.getByRole('link', { name: 'Station chosen 3' }).click();
  await page.getByText('3 of 212 sites', { exact: true }).waitFor();
  expect(await page.getByText('chosen: Same side of the range').count()).toBe(3);
});

test('what leaves is guarded against formulas, and an import is undone whole', async () => {
  onTestFailed(() => watched.picture('sites-undo-failed'));
  await page.getByRole('link', { name: 'Show every site' }).click();
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: 'Export as CSV' }).click(),
  ]);
  const table = await readFile(await download.path(), 'utf8');
  expect(table.trim().split('\r\n')).toHaveLength(213);
  expect(table).toMatch(/^m,'=cmd\|calc,/m);
  await page.getByRole('button', { name: 'Undo this import' }).click();
  await page.getByText('among them 3 that somebody has changed since').waitFor();
  await page.getByRole('button', { name: 'Undo the import' }).click();
  await page.getByText(/; undone by Veldway planner/).waitFor();
  await page.getByText('12 sites', { exact: true }).waitFor();
});

test('whoever saves second is told what the first one did, and loses nothing', async () => {
  onTestFailed(() => watched.picture('sites-conflict-failed'));
  await page.getByRole('link', { name: 'Twin Kopjes Combined' }).click();
  const notes = page.getByLabel('Notes', { exact: true });
  await notes.fill('Borehole tested in May.');
  await moveMeanwhile();
  await page.getByRole('button', { name: 'Save place and load' }).click();
  await page.getByText(/^Veldway engineer changed position.* of Twin Kopjes Combined meanwhile/).waitFor();
  expect(watched.forgive(/409/)).toBe(1);
  expect(await notes.inputValue()).toBe('Borehole tested in May.');
  await page.setViewportSize({ width: 390, height: 844 });
  await expectNoSidewaysScroll(page, 'a site on a phone');
  await page.getByRole('button', { name: 'Save mine on top' }).click();
  await page
    .getByRole('listitem')
    .filter({ hasText: 'notes: Invented place. → Borehole tested in May.' })
    .first()
    .waitFor();
  await page.getByText('27.50° S, 26.80° E', { exact: false }).first().waitFor();
  await watched.close();
});

/** The engineer moves the site that the planner has before her. */
async function moveMeanwhile(): Promise<void> {
  const { db, now } = product.deps;
  const { rows } = await db.raw<{ rows: [{ teamId: string; programmeId: string; siteId: string; personId: string }] }>(
    `select sites.team_id as "teamId", sites.programme_id as "programmeId", sites.id as "siteId",
       memberships.person_id as "personId"
     from sites join memberships on memberships.team_id = sites.team_id and memberships.role = 'engineer'
     where sites.name = 'Twin Kopjes Combined'`,
  );
  const deps = { db, relief: shippedRelief(), queueSiteRuns };
  await changeSite(deps, { ...rows[0], requestId: null, at: now(), revision: 1, patch: { latitude: -27.5 } });
}
