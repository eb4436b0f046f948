import type { Locator, Page } from 'playwright-core';
import { expect } from 'vitest';
import { expectAccessible } from './accessible.ts';
import { BROKEN_LINE, mixedArchive, newStations, plainTable } from './mixed-archive.ts';
import { uploadText } from './steps.ts';

const ARCHIVE = 'mixed.zip';
const TABLE = 'mast-2023.csv';

interface Look {
  readonly page: Page;
  /** Long enough for what is read in the background. */
  readonly soon: { readonly timeout: number };
}

/** Drops a zip into the library and pauses its batch while it is still on its way. @returns the batch as it is shown */
export async function bringPaused({ page }: Look): Promise<Locator> {
  let letGo = (): void => undefined;
  const paused = new Promise<void>((resolve) => {
    letGo = resolve;
  });
  await page.route('**/archives', async (route) => {
    await paused;
    await route.continue();
  });
  await page
    .locator('input[type="file"]')
    .setInputFiles({ name: ARCHIVE, mimeType: 'application/zip', buffer: await mixedArchive() });
  const batch = page
    .getByRole('region', { name: 'Batches' })
    .getByRole('listitem')
    .filter({ hasText: ARCHIVE })
    .first();
  await batch.getByText(/^Sending 1 file; you can go to other pages/).waitFor();
  await batch.getByRole('button', { name: `Pause ${ARCHIVE}` }).click();
  await batch.getByText(/Paused, 0 of 0 files read/).waitFor();
  letGo();
  await batch.getByText('Waits to be opened.').waitFor();
  await page.unroute('**/archives');
  return batch;
}

/** Lets the batch go on, and sees it to its end. */
export async function resume(batch: Locator, { soon }: Look): Promise<void> {
  await batch.getByRole('button', { name: `Resume ${ARCHIVE}` }).click();
  await batch.getByText(/^Reading, \d of \d files? read/).waitFor(soon);
  expect(await batch.getByRole('progressbar', { name: `Progress of ${ARCHIVE}` }).count()).toBe(1);
  await batch.getByText('5 files, all read.').waitFor(soon);
  await batch.getByText('5 files taken out of 7.').waitFor();
  await batch.getByText('2 files of it left out, and why').click();
  await batch.getByRole('row', { name: /heron again.*same bytes as “heron-spring-typical\.epw”/ }).waitFor();
  await batch.getByRole('row', { name: /readme\.txt/ }).waitFor();
}

/** The refused file says what is wrong by line; Back leads to the filter that it was found by. */
export async function seeRefused(batch: Locator, { page }: Look): Promise<void> {
  await batch.getByRole('link', { name: '1 refused' }).click();
  await page.getByText(/^1 of \d+ files$/).waitFor();
  const address = page.url();
  await page
    .getByRole('row', { name: /broken\.epw/ })
    .getByRole('link')
    .click();
  await page
    .getByRole('row', { name: /warm/ })
    .getByText(new RegExp(`^Line ${BROKEN_LINE.toLocaleString('en')}|^Line ${BROKEN_LINE}`))
    .first()
    .waitFor();
  await page.goBack();
  await page.getByText(/^1 of \d+ files$/).waitFor();
  expect(page.url()).toBe(address);
}

/** The table asks once for its columns, and shows its first rows under the answer as it changes. */
export async function answerTable(batch: Locator, look: Look): Promise<void> {
  const { page, soon } = look;
  await batch.getByRole('link', { name: '1 asks' }).click();
  await page
    .getByRole('row', { name: new RegExp(TABLE) })
    .getByRole('link')
    .click();
  const form = page.getByRole('form', { name: 'Answer what the file asks' });
  await form.waitFor();
  const sample = form.getByRole('region', { name: 'The first rows, read so' });
  expect(await sample.locator('tbody tr').count()).toBe(10);
  await expectAccessible(page, 'questions of a table');
  const dewPoint = form.getByLabel('Dew point', { exact: true });
  await dewPoint.selectOption('');
  await form.getByRole('button', { name: 'Answer and read the file again' }).click();
  await form.getByText('1 fault to mend in the fields above.').waitFor();
  await dewPoint.selectOption('dew');
  await form.getByRole('button', { name: 'Answer and read the file again' }).click();
  await page.getByText(/Other files of the same shape that waited/).waitFor(soon);
  await page
    .getByText(/^In review/)
    .first()
    .waitFor();
}

/** A table of the same shape is read without a question; the library is narrowed to both while their name is typed. */
export async function bringSameShape({ page, soon }: Look): Promise<void> {
  await uploadText(page, { name: 'mast-2024.csv', text: plainTable(2025) });
  const uploads = page.getByRole('region', { name: 'Uploads' });
  await uploads.getByText(/^In review/).waitFor(soon);
  const search = page.getByRole('searchbox', { name: 'File, station or WMO number' });
  await search.pressSequentially('mast-20');
  await page.getByText(/^2 of \d+ files$/).waitFor();
  expect(new URL(page.url()).searchParams.get('text')).toBe('mast-20');
  expect(await search.evaluate((input) => input === document.activeElement)).toBe(true);
  await search.fill('');
  await page.getByText(/^\d+ files, newest first$/).waitFor();
}

/** Accepts at once everything of the batch that waits. */
export async function acceptAll(batch: Locator, { page, soon }: Look): Promise<void> {
  await batch.getByRole('link', { name: '4 in review' }).click();
  await page.getByText(/^4 of \d+ files$/).waitFor();
  await page.getByRole('checkbox', { name: 'Choose all files on this page' }).check();
  await page.getByText('4 files chosen', { exact: true }).waitFor();
  await expectAccessible(page, 'chosen files');
  await page.getByRole('button', { name: 'Accept', exact: true }).click();
  await page.getByText('4 files accepted', { exact: true }).waitFor(soon);
}

export { newStations };
