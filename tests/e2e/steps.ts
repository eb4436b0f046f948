/** What a person does again and again in the browser. */
import type { Locator, Page } from 'playwright-core';

export async function signIn(page: Page, account: { email: string; password: string }): Promise<void> {
  await page.getByRole('textbox', { name: 'E-mail' }).fill(account.email);
  await page.getByLabel('Password').fill(account.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('navigation', { name: 'Main' }).waitFor();
}

export async function signOut(page: Page): Promise<void> {
  await page.getByRole('button', { name: /^Account of/ }).click();
  await page.getByRole('menuitem', { name: 'Sign out' }).click();
  await page.getByRole('button', { name: 'Sign in' }).waitFor();
}

/** Everything that the map has asked for is drawn. */
export async function mapIsDrawn(page: Page): Promise<void> {
  await page.locator('[data-sheet-map][data-idle]').waitFor({ state: 'attached', timeout: 60_000 });
}

/** Brings up the ranking of stations where that of sites stands. */
export async function showStations(page: Page): Promise<void> {
  const other = page.getByRole('button', { name: /^Stations, \d/ });
  await page.getByRole('listbox', { name: /by score$/ }).waitFor({ state: 'attached' });
  if (await other.isVisible()) await other.click();
  await stationList(page).waitFor({ state: 'attached' });
}

/** The list of stations beside the map, or in the bottom sheet. */
export function stationList(page: Page): Locator {
  return page.getByRole('listbox', { name: 'Stations by score' });
}

export function station(page: Page, name: string): Locator {
  return stationList(page).getByRole('option', { name });
}

/** Gives a file to the page as the browser's own choice of files would. */
export async function uploadText(page: Page, file: { name: string; text: string }): Promise<void> {
  const buffer = Buffer.from(file.text, 'utf8');
  await page.locator('input[type="file"]').setInputFiles({ name: file.name, mimeType: 'text/plain', buffer });
}

/**
 * From now on the page notes what the server tells it of the steps of reading, by a stream of its own, and every step that
 * stands on the screen as the present one.
 */
export async function watchSteps(page: Page): Promise<{ seen(): Promise<{ told: string[]; shown: string[] }> }> {
  const teamId = /teams\/([0-9a-f-]{36})/.exec(page.url())?.[1] ?? '';
  await page.evaluate(async (address) => {
    const note = (kind: 'told' | 'shown', step: unknown) => {
      const seen = (document.body.dataset[kind] ?? '').split(' ').filter(Boolean);
      if (typeof step === 'string' && !seen.includes(step)) document.body.dataset[kind] = [...seen, step].join(' ');
    };
    new MutationObserver(() => {
      for (const step of document.querySelectorAll('[aria-label="Steps of reading"] [aria-current="step"]')) {
        note('shown', (step.textContent ?? '').match(/\p{L}+/u)?.[0]);
      }
    }).observe(document.body, {
      subtree: true,
      childList: true,
      characterData: true,
      attributeFilter: ['aria-current'],
    });
    const events = new EventSource(address);
    events.onmessage = ({ data }) => note('told', JSON.parse(data).step);
    await new Promise((resolve) => {
      events.onopen = resolve;
    });
  }, `/api/teams/${teamId}/events`);
  return {
    seen: () =>
      page.evaluate(() => {
        const words = (kind: 'told' | 'shown') => (document.body.dataset[kind] ?? '').split(' ').filter(Boolean);
        return { told: words('told'), shown: words('shown') };
      }),
  };
}

/** The large figure of the chosen place; NaN while there is none. */
export async function scoreShown(page: Page): Promise<number> {
  const block = page.getByRole('region', { name: 'Chosen place' }).getByText(/^\d+\s*of 100$/);
  if ((await block.count()) === 0) return Number.NaN;
  return Number.parseInt((await block.first().textContent()) ?? '', 10);
}
