/** A planner's way through briefs: from a preset to a version that the map follows. */
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, expect, test, vi } from 'vitest';
import { readDemoAccounts } from '../../server/builders/demo-accounts.ts';
import { launchBrowser, type Viewport, type WatchedPage, watchedPage } from '../support/browser.ts';
import { type RunningProduct, startProduct } from '../support/start-product.ts';
import { expectAccessible, expectNoSidewaysScroll } from './accessible.ts';
import { scoreShown, signIn } from './steps.ts';

const DESK: Viewport = { width: 1440, height: 900 };
/** Long enough for a machine that is busy with other things; nothing waits this long on an idle one. */
const SOON = { timeout: 45_000 };

vi.setConfig({ testTimeout: 300_000 });

let product: RunningProduct;
let browser: Browser;
let watched: WatchedPage;
let page: Page;

beforeAll(async () => {
  product = await startProduct('demo');
  browser = await launchBrowser();
}, 300_000);

afterAll(async () => {
  await browser?.close();
  await product?.close();
});

beforeEach(async () => {
  watched = await watchedPage(browser, { origin: product.origin, viewport: DESK });
  page = watched.page;
});

/** Closing throws when the console, the network or the page complained about anything. */
afterEach(async ({ task }) => {
  if (task.result?.state === 'fail') await watched.picture(task.name.slice(0, 60).replaceAll(/\W+/g, '-'));
  await watched.close();
});

async function enterAs(role: 'planner' | 'viewer'): Promise<void> {
  const account = (await readDemoAccounts(product.demoAccountsPath)).find((each) => each.role === role);
  if (account === undefined) throw new Error(`there is no ${role} among the demo accounts`);
  await page.goto('/');
  await signIn(page, account);
  await page.getByRole('link', { name: 'Briefs', exact: true }).click();
  await page.getByRole('heading', { name: 'Briefs', level: 1 }).waitFor();
}

async function expectInOrder(what: string): Promise<void> {
  await expectAccessible(page, what);
  await expectNoSidewaysScroll(page, what);
}

const effect = () => page.getByRole('region', { name: 'Effect of the draft' });
const effectScore = async (): Promise<number> => Number(await effect().locator('[data-effect-score]').textContent());

test('a planner makes a brief from the clinic preset, sees what a cooler room does, saves it, and the map follows', async () => {
  await enterAs('planner');
  await page.getByRole('button', { name: 'Begin a brief from Clinic' }).click();
  await page.getByRole('textbox', { name: 'Name' }).fill('Clinics of the east');
  await page.getByRole('button', { name: 'Make the brief' }).click();
  await page.getByRole('heading', { name: 'Clinics of the east', level: 1 }).waitFor();
  await effect().getByText('the same as version 1').waitFor(SOON);
  const before = await effectScore();

  const temperature = page.getByLabel('Room temperature', { exact: true });
  expect(await temperature.inputValue()).toBe('26');
  await temperature.fill('99');
  await page.getByText('A number from -50 to 60 °C is needed, not 99.').waitFor();
  await page.getByRole('button', { name: 'Add a site question' }).click();
  await page.getByText('2 faults to mend before it can be saved.').waitFor();
  await page
    .getByRole('list', { name: 'Fields at fault' })
    .getByRole('button', { name: 'Site questions, row 2' })
    .click();
  await page.keyboard.type('a quiet fan for the neighbours');
  await page.getByText('1 fault to mend before it can be saved.').waitFor();
  await expectInOrder('brief editor with a fault');

  await temperature.fill('23.5');
  await effect()
    .getByText(/−\d+ against version 1/)
    .waitFor(SOON);
  const draft = await effectScore();
  expect(draft).toBeLessThan(before);
  await page.getByText('2 fields changed against version 1.').waitFor();
  const parts = page.getByRole('table', { name: /^Score arithmetic/ });
  await expect
    .poll(async () => await parts.getByRole('row').last().textContent(), SOON)
    .toContain(`printed as ${draft}`);

  // Left by a link, by Back and by loading anew, the draft is there again; nothing is asked.
  await page.getByRole('link', { name: 'Method', exact: true }).click();
  await page.getByRole('heading', { name: 'Method', level: 1 }).waitFor();
  await page.goBack();
  await page.getByText(/^This is your draft of .*, kept on this device and not saved\.$/).waitFor();
  await page.reload();
  await page.getByText('2 fields changed against version 1.').waitFor();
  expect(await temperature.inputValue()).toBe('23.5');

  await page.getByRole('button', { name: 'Save version 2' }).click();
  await page.getByText('Version 2 is saved.').waitFor(SOON);
  const versions = page.getByRole('table', { name: 'Versions of the brief, newest first' });
  await versions.getByRole('row', { name: /^Version 2/ }).waitFor();
  const difference = page.getByRole('table', { name: 'From version 1 to version 2' });
  const changed = difference.getByRole('row', { name: /Room temperature\s*26 °C\s*23\.5 °C/ });
  await changed.waitFor(SOON);
  expect(await page.getByText('kept on this device').count()).toBe(0);
  await expectInOrder('saved brief');

  const name = (await effect().getByLabel('Effect at').locator('option:checked').textContent()) ?? '';
  await page.getByRole('link', { name, exact: true }).click();
  await page.getByText('Brief version 2.').waitFor(SOON);
  await page.getByRole('heading', { name, exact: true }).waitFor(SOON);
  await expect.poll(() => scoreShown(page), SOON).toBe(draft);
  expect(await page.getByLabel('Brief', { exact: true }).locator('option:checked').textContent()).toBe(
    'Clinics of the east',
  );
});

test('a viewer reads a brief and its sources, and cannot change it', async () => {
  await enterAs('viewer');
  await page.getByText('Data hall, recommended').waitFor();
  expect(await page.getByRole('button', { name: /^Begin a brief/ }).count()).toBe(0);
  await page.getByRole('list').getByRole('link').first().click();
  await page.getByText('A planner, an engineer or a lead of the team changes briefs.').waitFor(SOON);
  expect(await page.getByLabel('Direct effectiveness').isDisabled()).toBe(true);
  expect(await page.getByRole('button', { name: /^Save/ }).count()).toBe(0);
});

test('a viewer sets two places side by side, and the address brings them back', async () => {
  await enterAs('viewer');
  await page.goto(page.url().replace(/\/briefs.*$/, '/compare'));
  const names = ['Ashveld Technical School', 'Kite Hollow Primary'];
  for (const [count, name] of names.entries()) {
    await page.getByLabel('Add a place by its name').fill(name);
    await page.getByRole('button', { name, exact: true }).click();
    await expect.poll(() => page.getByRole('button', { name: /^Take .* out$/ }).count(), SOON).toBe(count + 1);
  }
  await page.getByRole('table', { name: /^Figures side by side/ }).waitFor(SOON);
  await page.getByRole('img', { name: /draws at each rank/ }).waitFor(SOON);
  const title = await page.getByRole('list', { name: 'Side by side' }).textContent();
  await expectInOrder('comparison');
  await page.setViewportSize({ width: 390, height: 844 });
  await page.reload();
  await expect.poll(() => page.getByRole('list', { name: 'Side by side' }).textContent(), SOON).toBe(title);
  await page.getByRole('img', { name: /draws at each rank/ }).waitFor(SOON);
  await expectInOrder('comparison on a phone');
  await page.goBack();
  await expect.poll(() => page.getByRole('button', { name: /^Take .* out$/ }).count(), SOON).toBe(1);
});
