/** What a person does on a weather record, on a station's page and with API tokens. */
import type { Page } from 'playwright-core';
import { expect } from 'vitest';

/** Reads the cloth by keyboard, takes one of its hours to the psychrometric chart, and looks at the rows of a finding. */
export async function readRecord(page: Page): Promise<void> {
  const cloth = page.getByRole('slider', { name: /^Wet-bulb depression of every hour/ });
  await cloth.focus();
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('End');
  await page.keyboard.press('Enter');
  const read = (await cloth.getAttribute('aria-valuetext')) ?? '';
  expect(read).toMatch(/^31 Dec, 12:00 to 13:00: dry bulb .* wet bulb .* relative humidity /);
  await page.getByRole('img', { name: /^Psychrometric chart at [\d,]+\shPa/ }).waitFor();
  const hour = page.getByRole('slider', { name: /^Hour: 31 Dec, 12:00 to 13:00/ });
  await page.getByRole('table', { name: 'States of the air in the chosen hour' }).waitFor();
  await hour.focus();
  await page.keyboard.press('ArrowLeft');
  await page.getByRole('slider', { name: /^Hour: 31 Dec, 11:00 to 12:00/ }).waitFor();

  const rows = page.getByRole('button', { name: /^Show the rows, Line/ }).first();
  const line = /Lines? (\d+)/.exec((await rows.getAttribute('aria-label')) ?? '')?.[1] ?? '';
  await rows.click();
  const marked = page.getByRole('listitem').filter({ hasText: 'Concerned:' }).first();
  await marked.waitFor();
  expect(((await marked.textContent()) ?? '').replaceAll(',', '')).toContain(line);
}

/** Corrects a station's place and switches a rule off and on, each with a reason. */
export async function putStationRight(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Correct the place' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Elevation').fill('high');
  await dialog.getByRole('button', { name: 'Correct the place' }).click();
  await dialog.getByText('Type a number.').waitFor();
  await dialog.getByText('Say why.').waitFor();
  await dialog.getByLabel('Elevation').fill('23');
  await dialog.getByLabel('Reason').fill('Levelled anew');
  await dialog.getByRole('button', { name: 'Correct the place' }).click();
  await page.getByText(/, 23\sm, UTC\+2/).waitFor();

  await page.getByRole('button', { name: 'Switch off: Spikes' }).click();
  await dialog.getByLabel('Reason').fill('The sensor ticks');
  await dialog.getByRole('button', { name: 'Switch the rule off' }).click();
  await page.getByText(/: The sensor ticks\.$/).waitFor();
  await page.getByRole('button', { name: 'Let it hold again: Spikes' }).click();
  await page.getByText('Every rule holds here.').waitFor();
}

/** Makes a token, which is shown once, and revokes it. */
export async function makeAndRevokeToken(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Make the token' }).click();
  await page.getByText('Name the token.').waitFor();
  await page.getByLabel('Name').fill('nightly upload');
  await page.getByRole('button', { name: 'Make the token' }).click();
  const shown = page.getByRole('status').locator('code');
  await shown.first().waitFor();
  const [token = '', line = ''] = await shown.allInnerTexts();
  expect(token).toMatch(/^muslin_/);
  expect(line).toContain(`Bearer ${token}`);
  await page.reload();
  await page.getByRole('row', { name: /nightly upload.*Valid/ }).waitFor();
  expect(await page.content()).not.toContain(token);
  await page.getByRole('button', { name: 'Revoke nightly upload' }).click();
  await page.getByRole('button', { name: 'Revoke the token' }).click();
  await page.getByRole('row', { name: /nightly upload.*Revoked/ }).waitFor();
}
