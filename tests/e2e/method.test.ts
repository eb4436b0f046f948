import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, onTestFailed, test, vi } from 'vitest';
import { inTransaction } from '../../server/db/in-transaction.ts';
import { makePerson } from '../../server/features/accounts/make-person.ts';
import { startBrief } from '../../server/features/briefs/start-brief.ts';
import { makeTeam } from '../../server/features/teams/make-team.ts';
import { hourClasses } from '../../src/engine/hour-classes/hour-class.ts';
import { launchBrowser, watchedPage } from '../support/browser.ts';
import { publishedChecks } from '../support/published-values.ts';
import { type RunningProduct, startProduct } from '../support/start-product.ts';
import { expectAccessible, expectNoSidewaysScroll } from './accessible.ts';
import { walkPeopleRoad } from './people-road.ts';
import { signIn } from './steps.ts';

const ACCOUNT = { email: 'reader@example.org', password: 'a long pass phrase for tests' };

vi.setConfig({ testTimeout: 240_000 });

let product: RunningProduct;
let browser: Browser;
let teamId: string;

beforeAll(async () => {
  product = await startProduct();
  const { db } = product.deps;
  const leadId = await makePerson(db, { ...ACCOUNT, name: 'A reader' });
  ({ teamId } = await inTransaction(db, (transaction) =>
    makeTeam({ transaction, startBrief }, { name: 'Readers', leadId, invented: true, programmeName: 'Reading' }),
  ));
  browser = await launchBrowser();
}, 300_000);

afterAll(async () => {
  await browser?.close();
  await product?.close();
});

test('the method page runs every published check in the browser, every one holds, and it reads as well on a phone', async () => {
  const watched = await watchedPage(browser, { origin: product.origin, viewport: { width: 1440, height: 900 } });
  const { page } = watched;
  onTestFailed(() => watched.picture('method-failed'));
  await page.goto('/');
  await signIn(page, ACCOUNT);
  await page.getByRole('link', { name: 'Method', exact: true }).click();
  await page.getByRole('heading', { name: 'Method', level: 1 }).waitFor();
  await page.getByText(/^38 checks: (\d+) of \1 values hold\.$/).waitFor();

  const checks = page.getByRole('list', { name: 'Checks' }).getByRole('listitem');
  const summaries = await checks.locator('summary').allInnerTexts();
  expect(summaries).toHaveLength(publishedChecks.length);
  for (const { id, what } of publishedChecks) {
    const shown = summaries.filter((text) => text.startsWith(id));
    expect(shown, id).toHaveLength(1);
    expect(shown[0]).toContain(what);
    expect(shown[0]).toMatch(/holds, (\d+) of \1/);
  }
  const classes = page.getByRole('region', { name: 'Hour classes' }).locator('tbody tr');
  expect(await classes.count()).toBe(hourClasses.length);
  await expectNoSidewaysScroll(page, 'a desk');

  await page.getByRole('button', { name: 'Open all' }).click();
  const verdicts = await checks.locator('tbody td:last-child').allInnerTexts();
  expect(verdicts.length).toBeGreaterThan(150);
  expect(verdicts.filter((word) => word !== 'yes')).toEqual([]);
  const text = await checks.allInnerTexts();
  for (const { id, source } of publishedChecks) {
    expect(
      text.filter((each) => each.startsWith(id) && each.includes(source)),
      id,
    ).toHaveLength(1);
  }

  await page.setViewportSize({ width: 390, height: 844 });
  await expectNoSidewaysScroll(page, 'a phone');
  await expectAccessible(page, 'all checks open');
  await page.getByRole('button', { name: 'Close all' }).click();
  await watched.picture('method-on-a-phone');
  // Closing throws when the console, the network or the page complained about anything.
  await watched.close();
});

test('a lead invites somebody, who joins with two-factor sign-in; the lead changes the role and ends the sessions', async () => {
  await walkPeopleRoad(browser, { origin: product.origin, teamId, lead: ACCOUNT });
});
