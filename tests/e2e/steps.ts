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

/** The list of stations beside the map, or in the bottom sheet. */
export function stationList(page: Page): Locator {
  return page.getByRole('listbox', { name: 'Stations by score' });
}

export function station(page: Page, name: string): Locator {
  return stationList(page).getByRole('option', { name });
}
