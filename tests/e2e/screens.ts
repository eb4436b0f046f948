/**
 * Takes pictures of a running product that holds the demo: sign-in, map with a place, weather list and record, each at three widths.
 * `node --import tsx tests/e2e/screens.ts ADDRESS DEMO_ACCOUNTS_FILE FOLDER [PLACE]`
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Page } from 'playwright-core';
import { readDemoAccounts } from '../../server/builders/demo-accounts.ts';
import { launchBrowser, watchedPage } from '../support/browser.ts';
import { mapIsDrawn, showStations, signIn, station } from './steps.ts';

const VIEWPORTS = [
  { width: 1440, height: 900 },
  { width: 1024, height: 768 },
  { width: 390, height: 844 },
];

/** The README's pictures stay under this; a larger one is kept as JPEG instead of PNG. */
const LARGEST_BYTES = 300_000;

const [origin, accountsFile, folder, place = 'Kite Hollow'] = process.argv.slice(2);
if (origin === undefined || accountsFile === undefined || folder === undefined) {
  console.error('Give the address of a running product, its demo-accounts.txt and a folder for the pictures.');
  process.exit(2);
}
mkdirSync(folder, { recursive: true });
const engineer = (await readDemoAccounts(accountsFile)).find(({ role }) => role === 'engineer');
if (engineer === undefined) throw new Error(`there is no engineer in ${accountsFile}`);

const browser = await launchBrowser();
try {
  for (const viewport of VIEWPORTS) {
    const watched = await watchedPage(browser, { origin, viewport, timeZone: 'Africa/Johannesburg' });
    const { page } = watched;
    const take = (name: string) => takePicture(page, path.join(folder, `${name}-${viewport.width}`));
    await page.goto('/');
    await page.getByRole('button', { name: 'Sign in' }).waitFor();
    await take('sign-in');
    await signIn(page, engineer);
    await mapIsDrawn(page);
    await take('map');
    await choosePlace(page, place);
    await mapIsDrawn(page);
    await take('place');
    const menu = page.getByRole('button', { name: 'Menu', exact: true });
    if (await menu.isVisible()) await menu.click();
    await page.getByRole('link', { name: 'Weather', exact: true }).click();
    await page.getByRole('heading', { name: 'Weather files', level: 1 }).waitFor();
    await page.getByRole('table').first().waitFor();
    await take('weather');
    await page.getByRole('link', { name: 'Lantern Bay' }).first().click();
    await page.getByRole('heading', { name: /^Lantern Bay/, level: 1 }).waitFor();
    await page.getByRole('heading', { name: 'What was found in the file' }).waitFor();
    await take('record');
    await watched.close();
  }
} finally {
  await browser.close();
}

/** By its link where the list of stations stands beside the map, by the bottom sheet where it does not. */
async function choosePlace(page: Page, name: string): Promise<void> {
  const sheet = page.getByRole('button', { name: /Press to change/ });
  if (await sheet.isVisible()) await sheet.click();
  await showStations(page);
  await station(page, name).click();
  await page.getByRole('heading', { name, exact: true }).waitFor();
}

async function takePicture(page: Page, place: string): Promise<void> {
  // Nothing is marked because the pointer happens to rest on it.
  await page.mouse.move(1, 1);
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
  const png = await page.screenshot();
  const isSmall = png.length <= LARGEST_BYTES;
  const file = `${place}.${isSmall ? 'png' : 'jpg'}`;
  writeFileSync(file, isSmall ? png : await page.screenshot({ type: 'jpeg', quality: 85 }));
  console.log(file);
}
