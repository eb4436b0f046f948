/** A planner's way over the map: J3 of the product, the address of a view, the keyboard's walk, and a phone. */
import AxeBuilder from '@axe-core/playwright';
import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, test, vi } from 'vitest';
import { readDemoAccounts } from '../../server/builders/demo-accounts.ts';
import type { Role } from '../../src/contract/accounts.ts';
import { launchBrowser, type Viewport, type WatchedPage, watchedPage } from '../support/browser.ts';
import { firstLoad } from '../support/first-load.ts';
import { type RunningProduct, startProduct } from '../support/start-product.ts';
import { mapIsDrawn, scoreShown, signIn } from './steps.ts';

const DESK: Viewport = { width: 1440, height: 900 };
const PHONE: Viewport = { width: 360, height: 740 };
/** Long enough for a machine that is busy with other things; nothing waits this long on an idle one. */
const SOON = { timeout: 45_000 };

vi.setConfig({ testTimeout: 300_000 });

let product: RunningProduct;
let browser: Browser;
/** null: a test that looks at no page. */
let watched: WatchedPage | null = null;
let page: Page;

beforeAll(async () => {
  product = await startProduct('demo');
  browser = await launchBrowser();
}, 300_000);

afterAll(async () => {
  await browser?.close();
  await product?.close();
});

/** Closing throws when the console, the network or the page complained about anything. */
afterEach(async ({ task }) => {
  if (task.result?.state === 'fail') await watched?.picture(task.name.slice(0, 60).replaceAll(/\W+/g, '-'));
  await watched?.close();
  watched = null;
});

async function enterAs(role: Role, viewport: Viewport): Promise<void> {
  watched = await watchedPage(browser, { origin: product.origin, viewport });
  page = watched.page;
  const account = (await readDemoAccounts(product.demoAccountsPath)).find((each) => each.role === role);
  if (account === undefined) throw new Error(`there is no ${role} among the demo accounts`);
  await page.goto('/');
  await signIn(page, account);
  await mapIsDrawn(page);
}

async function expectAccessible(what: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  const said = violations.map(({ id, help, nodes }) => `${id}: ${help}: ${nodes.map(({ html }) => html).join(' | ')}`);
  expect(said, what).toEqual([]);
  const widths = await page.evaluate(() => ({
    content: document.documentElement.scrollWidth,
    screen: document.documentElement.clientWidth,
  }));
  expect(widths.content, what).toBeLessThanOrEqual(widths.screen);
}

const textOf = async (place: Locator): Promise<string> => ((await place.textContent()) ?? '').trim();
const asked = (name: string): string | null => new URL(page.url()).searchParams.get(name);
const ranking = () => page.getByRole('listbox', { name: /by score$/ });
const legend = () => page.getByRole('region', { name: 'Legend' });
const chosen = () => page.getByRole('region', { name: 'Chosen place' });
/** Places in each class of the legend, as printed. */
const counts = async (): Promise<string> => (await textOf(legend().getByRole('list').first())).replaceAll(/\s+/g, ' ');

test('a first visit fetches at most 160 kB for the shell and 560 kB for the map with its worker, compressed', () => {
  const { shell, route, file } = firstLoad(product.deps.clientDir ?? '');
  expect(shell).toBeLessThanOrEqual(160_000);
  const map = route('src/app/pages/map/map-page.tsx', 'src/app/pages/map/map-sheet.tsx');
  const worker = file('maplibre-gl-worker');
  // The map's engine alone is more than half of each: a figure below that would not have counted it.
  expect(Math.min(map, worker)).toBeGreaterThan(100_000);
  expect(map + worker).toBeLessThanOrEqual(560_000);
});

test('a planner drags effectiveness and humidity cap, the map and the ranking follow, and she saves what she found', async () => {
  await enterAs('planner', DESK);
  const before = { counts: await counts(), ranking: await textOf(ranking()), score: await scoreShown(page) };
  const thumb = page.getByRole('slider', { name: 'Direct effectiveness' });
  await thumb.focus();
  for (let step = 0; step < 30; step += 1) await page.keyboard.press('ArrowLeft');
  const draft = page.getByRole('region', { name: 'Draft' });
  await draft.getByText(/differs from version 1 in: direct effectiveness 55\s%/).waitFor();
  const cap = page.getByRole('textbox', { name: 'Room humidity, at most, % RH' });
  await cap.fill('50');
  await cap.press('Enter');
  await draft.getByText(/and room humidity, at most 50\s% RH \(65\s% RH\)/).waitFor();
  await expect.poll(counts, SOON).not.toBe(before.counts);
  await expect.poll(() => textOf(ranking()), SOON).not.toBe(before.ranking);
  await expect.poll(() => page.locator('[aria-busy="true"]').count(), SOON).toBe(0);
  const drafted = {
    counts: await counts(),
    score: await scoreShown(page),
    name: await textOf(chosen().getByRole('heading', { level: 2 })),
  };
  expect(asked('draft')).toBe('caps.roomRhPct:50,effDirect:0.55');
  await expectAccessible('map with a draft');

  // A link to the draft shows the draft.
  await page.reload();
  await mapIsDrawn(page);
  await expect.poll(counts, SOON).toBe(drafted.counts);
  await expect.poll(() => scoreShown(page), SOON).toBe(drafted.score);

  await page.getByRole('button', { name: 'Save as version 2' }).click();
  await page
    .getByText(/Brief version 2\.$/)
    .first()
    .waitFor(SOON);
  await expect.poll(() => asked('draft'), SOON).toBeNull();
  // What was saved says what was shown: the draft's figures are those of the runs.
  await expect.poll(counts, SOON).toBe(drafted.counts);
  await chosen()
    .getByText(/Brief version 2, method/)
    .waitFor(SOON);
  await expect.poll(() => textOf(chosen().getByRole('heading', { level: 2 })), SOON).toBe(drafted.name);
  await expect.poll(() => scoreShown(page), SOON).toBe(drafted.score);
  expect(await page.getByRole('slider', { name: 'Direct effectiveness' }).inputValue()).toBe('55');
});

test('layer, place, filter and camera come back on reload and Back', async () => {
  await enterAs('viewer', DESK);
  await page.getByLabel('Layer of the map').selectOption('hours');
  await page.getByLabel('Hour class').selectOption('short');
  await page.getByRole('button', { name: 'Zoom in' }).click();
  await expect.poll(() => asked('view'), SOON).not.toBeNull();
  const third = ranking().getByRole('option').nth(2);
  const name = await textOf(third.locator('span').nth(1));
  await third.click();
  await chosen().getByRole('heading', { name, exact: false, level: 2 }).waitFor();
  const view = asked('view');
  expect(asked('layer')).toBe('hours.short');

  await page.reload();
  await mapIsDrawn(page);
  await chosen().getByRole('heading', { name, exact: false, level: 2 }).waitFor();
  expect(await page.getByLabel('Hour class').inputValue()).toBe('short');
  expect(asked('view')).toBe(view);
  await legend()
    .getByRole('heading', { name: /hours of the year/ })
    .waitFor();

  await page.getByLabel('Layer of the map').selectOption('grade');
  await legend()
    .getByRole('heading', { name: /of the weather/ })
    .waitFor();
  await page.goBack();
  await legend()
    .getByRole('heading', { name: /hours of the year/ })
    .waitFor();
  expect(asked('layer')).toBe('hours.short');
  expect(await page.getByRole('button', { name: /^Save as version/ }).count()).toBe(0);
});

test('the keyboard walks the page in its written order, chooses on the map, and lists the hours of a class, a cell and a day', async () => {
  await enterAs('viewer', DESK);
  await page.getByRole('button', { name: 'By keyboard' }).click();
  const help = page.getByRole('dialog', { name: 'The map by keyboard' });
  await help.getByRole('rowheader').first().waitFor();
  const told = await help.getByRole('rowheader').allInnerTexts();
  await page.keyboard.press('Escape');
  await help.waitFor({ state: 'detached' });
  // What the page tells is what the Tab key does.
  const parts = {
    slider: 'Sliders',
    map: 'Map',
    places: 'Sites on the map, stations on the map',
    zoom: 'Zoom buttons',
  };
  const walked = { ...parts, ledger: 'Ledger', cloth: 'Year cloth' };
  const stops = Object.entries(walked)
    .sort(([, one], [, other]) => told.indexOf(one) - told.indexOf(other))
    .map(([stop]) => stop);
  expect(told).toEqual(expect.arrayContaining(Object.values(walked)));
  const seen: string[] = [];
  await page.getByRole('slider', { name: 'Direct effectiveness' }).focus();
  for (let step = 0; step < 60 && seen.length < stops.length; step += 1) {
    const stop = await page.evaluate(() => {
      const at = document.activeElement;
      const label = at?.getAttribute('aria-label') ?? '';
      if (at instanceof HTMLInputElement && at.type === 'range') return 'slider';
      if (/^Map\./.test(label)) return 'map';
      if (/on the map$/.test(label)) return 'places';
      if (/^Zoom/.test(label)) return 'zoom';
      if (at?.closest('[aria-label="Ledger"]') !== null && at instanceof HTMLButtonElement) return 'ledger';
      return /hour by hour/.test(label) ? 'cloth' : null;
    });
    if (stop !== null && seen.at(-1) !== stop) seen.push(stop);
    await page.keyboard.press('Tab');
  }
  expect(seen.filter((stop, index) => stop !== 'slider' || index === 0)).toEqual(stops);

  const before = await textOf(chosen().getByRole('heading', { level: 2 }));
  await page.getByRole('listbox', { name: 'Stations on the map' }).focus();
  await page.keyboard.press('?');
  await help.waitFor();
  await page.keyboard.press('Escape');
  await help.waitFor({ state: 'detached' });
  await page.keyboard.press('Home');
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  await expect.poll(() => asked('place')).not.toBeNull();
  await expect.poll(() => textOf(chosen().getByRole('heading', { level: 2 })), SOON).not.toBe(before);
  const place = await textOf(chosen().getByRole('heading', { level: 2 }));

  await page.getByRole('region', { name: 'Ledger' }).getByRole('button', { name: 'Outdoor air' }).focus();
  await page.keyboard.press('Enter');
  const dialog = page.getByRole('dialog', { name: `Outdoor air, ${place}` });
  await dialog.getByRole('row').nth(1).waitFor(SOON);
  expect(await textOf(dialog.getByRole('row').nth(1).getByRole('cell').last())).toMatch(/^[\d,]+$/);
  await expectAccessible('list of hours');
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'detached' });

  const cloth = page.getByRole('slider', { name: /hour by hour/ });
  await cloth.focus();
  await page.keyboard.press('ArrowRight');
  // The class is read at once, the state of the air as soon as the day is fetched.
  await expect
    .poll(() => cloth.getAttribute('aria-valuetext'), SOON)
    .toMatch(/^1 Jan, 12:00 to 13:00: .*wet bulb .*RH/);
  await page.keyboard.press('Enter');
  await page
    .getByRole('dialog', { name: `Hours, 1 Jan, ${place}` })
    .getByText('24 hours of')
    .waitFor(SOON);
  await page.keyboard.press('Escape');

  await page.getByText('Unmet hours by month and hour').click();
  const table = page.getByRole('table', { name: 'Unmet hours by month and hour of day' });
  await table.getByRole('button').first().waitFor(SOON);
  const unmet = (await table.getByRole('button').allInnerTexts()).reduce((sum, text) => sum + Number(text), 0);
  const [, met = '', demand = ''] =
    /: ([\d,]+) of ([\d,]+) hours/.exec((await cloth.getAttribute('aria-label')) ?? '') ?? [];
  expect(unmet).toBe(Number(demand.replace(',', '')) - Number(met.replace(',', '')));
});

test('the score between stations is drawn with its error, and any position has an estimate with its basis', async () => {
  await enterAs('viewer', DESK);
  await legend()
    .locator('..')
    .getByText(/Leave-one-out error: \d+(\.\d)? points\./)
    .waitFor(SOON);
  await mapIsDrawn(page);
  const sheet = page.locator('.maplibregl-canvas');
  const withSurface = await sheet.screenshot();
  await page.getByLabel('Between stations').click();
  await expect.poll(() => asked('surface')).toBe('off');
  await mapIsDrawn(page);
  expect((await sheet.screenshot()).equals(withSurface)).toBe(false);

  const box = page.getByRole('combobox', { name: 'Find a place or a position' });
  await box.fill('-115.15, 36.08');
  await page.getByText('Latitude comes first; are the two swapped?').waitFor();
  await page.getByRole('option', { name: /36\.08° N, 115\.15° W/ }).waitFor();
  await box.fill("28°06'S 27°06'E");
  await page.getByRole('option', { name: /28\.10° S, 27\.10° E/ }).waitFor();
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  const point = page.getByRole('region', { name: 'Clicked point' });
  await point.getByRole('heading', { name: /28\.10° S, 27\.10° E/ }).waitFor();
  const basis = point.getByRole('table', { name: /Stations of the estimate/ });
  await basis.waitFor(SOON);
  await point.getByText('Grade D').waitFor();
  const shares = await basis.locator('tbody tr td:nth-child(4)').allInnerTexts();
  const sum = shares.reduce((total, share) => total + Number.parseInt(share, 10), 0);
  // Whole per cents of eight stations.
  expect(Math.abs(sum - 100)).toBeLessThanOrEqual(4);
  await expectAccessible('an estimate');

  await box.fill('twin kopj');
  await page.getByRole('option', { name: /^Twin Kopjes.*station$/ }).click();
  await chosen()
    .getByRole('heading', { name: /Twin Kopjes/, level: 2 })
    .waitFor(SOON);
});

test('on a phone the brief, the ranking and the place stand in the bottom sheet, and the map keeps its names from under its buttons', async () => {
  await enterAs('planner', PHONE);
  await expectAccessible('map on a phone');
  await page.getByRole('button', { name: /panel: low/ }).click();
  await ranking().getByRole('option').first().click();
  await chosen().getByRole('heading', { level: 2 }).waitFor();
  await expectAccessible('place on a phone');
  await page.getByRole('button', { name: 'All places' }).click();
  await page.getByRole('slider', { name: 'Direct effectiveness' }).waitFor();
});
