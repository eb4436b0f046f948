/** J8 of the product in the browser, as far as people go: a lead invites, somebody joins, the lead changes a role, ends sessions and reads of it all. */
import { generateSync } from 'otplib';
import type { Browser, Page } from 'playwright-core';
import { expect, onTestFailed } from 'vitest';
import { watchedPage } from '../support/browser.ts';
import { expectAccessible, expectNoSidewaysScroll } from './accessible.ts';

const desk = { width: 1440, height: 900 };
const INVITED = { email: 'joins@example.org', password: 'another long pass phrase' };

interface Road {
  readonly origin: string;
  readonly teamId: string;
  readonly lead: { readonly email: string; readonly password: string };
}

/** Signs in to a page by its address, so that no map is drawn on the way. */
async function signInTo(page: Page, address: string, account: { email: string; password: string }): Promise<void> {
  await page.goto(`/sign-in?from=${encodeURIComponent(address)}`);
  await page.getByRole('textbox', { name: 'E-mail' }).fill(account.email);
  await page.getByLabel('Password').fill(account.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

export async function walkPeopleRoad(browser: Browser, { origin, teamId, lead }: Road): Promise<void> {
  const leads = await watchedPage(browser, { origin, viewport: desk });
  onTestFailed(() => leads.picture('people-of-a-lead'));
  await signInTo(leads.page, `/teams/${teamId}/team`, lead);
  await leads.page.getByRole('heading', { name: 'Invitations' }).waitFor();
  await leads.page.getByRole('textbox', { name: 'E-mail' }).fill(INVITED.email);
  await leads.page.getByLabel('Role', { exact: true }).selectOption('viewer');
  await leads.page.getByRole('button', { name: 'Invite' }).click();
  await leads.page.getByRole('rowheader', { name: INVITED.email }).waitFor();
  await expectAccessible(leads.page, 'people');
  await leads.page.getByRole('link', { name: 'Mails' }).click();
  const mail = await leads.page.getByRole('list', { name: 'Mails' }).getByRole('listitem').first().textContent();
  await expectAccessible(leads.page, 'mails');
  const link = /\/invitations\/[\w-]{43}/.exec(mail ?? '')?.[0] ?? '';
  await leads.page.getByRole('link', { name: 'People', exact: true }).click();

  const joins = await watchedPage(browser, { origin, viewport: desk });
  onTestFailed(() => joins.picture('people-who-join'));
  const { page } = joins;
  await page.goto(link);
  await page.getByRole('textbox', { name: 'Your name' }).fill('Newly Joined');
  await page.getByLabel('Password').fill(INVITED.password);
  await expectAccessible(page, 'an invitation');
  const accepted = page.waitForResponse((response) => response.url().endsWith('/api/invitations/acceptance'));
  await page.getByRole('button', { name: 'Accept' }).click();
  expect((await accepted).status()).toBe(200);
  await page.goto('/account');
  await turnTwoFactorOn(page);
  await page.setViewportSize({ width: 390, height: 844 });
  await expectNoSidewaysScroll(page, 'the account on a phone');

  // Whoever joins shows to the lead, who has not loaded the page again.
  await leads.page.getByLabel('Role of Newly Joined').selectOption('engineer');
  await leads.page.getByRole('button', { name: 'Sign out: Newly Joined' }).click();
  await leads.page.getByRole('button', { name: 'End the sessions' }).click();
  await leads.page.getByRole('dialog').waitFor({ state: 'detached' });
  await leads.page.setViewportSize({ width: 390, height: 844 });
  await expectNoSidewaysScroll(leads.page, 'people on a phone');
  await leads.page.goto(`/teams/${teamId}/team/programmes`);
  await leads.page.getByRole('list', { name: 'Programmes' }).getByRole('listitem').first().waitFor();
  await expectAccessible(leads.page, 'programmes');
  await leads.page.getByRole('link', { name: 'Audit trail' }).click();
  const ended = leads.page.getByRole('list', { name: 'Events' }).getByRole('listitem').first();
  await ended.getByText('Sessions of a member ended').waitFor();
  await expectAccessible(leads.page, 'the audit trail');
  await expectNoSidewaysScroll(leads.page, 'the audit trail on a phone');
  await leads.page.getByRole('link', { name: 'API', exact: true }).click();
  await leads.page.locator('summary', { hasText: 'weather-batches' }).first().click();
  await leads.page.getByRole('region', { name: 'What can go wrong' }).waitFor();
  await expectAccessible(leads.page, 'the description of the API');
  await expectNoSidewaysScroll(leads.page, 'the description of the API on a phone');
  await leads.page.goto(`/teams/${teamId}/team/data`);
  await leads.page.getByRole('button', { name: 'Delete the team' }).waitFor();
  await expectAccessible(leads.page, 'export and deletion');
  await expectNoSidewaysScroll(leads.page, 'export and deletion on a phone');
  await leads.close();

  await page.reload();
  await page.getByRole('button', { name: 'Sign in' }).waitFor();
  // The password alone was answered with 401, and the page asked for the code.
  expect(joins.forgive(/401 .*\/api\/session\)$/)).toBe(1);
  await joins.close();
}

async function turnTwoFactorOn(page: Page): Promise<void> {
  const section = page.getByRole('region', { name: 'Two-factor sign-in' });
  await section.getByLabel('Your password').fill(INVITED.password);
  await section.getByRole('button', { name: 'Set up an authenticator' }).click();
  const secret = (await section.locator('code').textContent())?.replaceAll(' ', '') ?? '';
  await section.getByLabel('Code that it shows now').fill(generateSync({ secret }));
  await section.getByRole('button', { name: 'Begin two-factor sign-in' }).click();
  await section.getByText('Your recovery codes, shown this once').waitFor();
  await section.getByText('10 recovery codes left').waitFor();
  await expectAccessible(page, 'an account');

  await page.context().clearCookies();
  await signInTo(page, '/account', INVITED);
  await page.getByLabel('Code').fill(generateSync({ secret, epoch: Math.floor(Date.now() / 1000) + 30 }));
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByText('10 recovery codes left').waitFor();
}
