import { createHash } from 'node:crypto';
import type { Router } from 'express';
import {
  askReset as askResetEndpoint,
  confirmEmail as confirmEndpoint,
  resetPassword as resetEndpoint,
} from '#contract/account-links.ts';
import * as contract from '#contract/accounts.ts';
import type { Deps } from '../../deps.ts';
import { addressBucket } from '../../http/client-address.ts';
import { spendShared } from '../../http/limits.ts';
import { mount } from '../../http/mount.ts';
import { forgetRequests } from '../../http/request-counts-store.ts';
import { askReset } from './ask-reset.ts';
import { confirmEmail } from './confirm-email.ts';
import { ownAccountRoutes } from './own-account-routes.ts';
import { readSession } from './read-session.ts';
import { resetPassword } from './reset-password.ts';
import { type SetUpParts, setUp } from './set-up.ts';
import { signIn } from './sign-in.ts';
import { signOut } from './sign-out.ts';

/**
 * Guesses a minute at one account: few from one address, and not many more from all addresses together. Two buckets, as
 * with one alone anybody could keep the owner out by guessing.
 */
const GUESSES_FROM_ONE_ADDRESS = 5;
const GUESSES_FROM_ANYWHERE = 20;

export function accountsRoutes(router: Router, deps: Deps, parts: SetUpParts): void {
  const { db } = deps;
  const sessionOf = (personId: string | null) => readSession(db, { personId, at: deps.now() });

  mount(router, deps, contract.getSession, async (_input, { actor }) =>
    sessionOf(actor.kind === 'person' ? actor.personId : null),
  );

  mount(router, deps, contract.signIn, async ({ body }, { session, ip, requestId }) => {
    const account = createHash('sha256').update(body.email).digest('hex');
    const address = addressBucket(ip);
    const here = `sign-in ${account} from ${address}`;
    await spendShared(deps, { bucket: `sign-in from ${address}`, perMinute: contract.signIn.limits.perMinute });
    await spendShared(deps, { bucket: here, perMinute: GUESSES_FROM_ONE_ADDRESS });
    await spendShared(deps, { bucket: `sign-in ${account}`, perMinute: GUESSES_FROM_ANYWHERE });
    const given = { email: body.email, code: body.code, address: ip, requestId, at: deps.now() };
    const personId = await signIn({ db, session, sessionSecrets: deps.sessionSecrets }, given);
    await forgetRequests(db, here);
    return sessionOf(personId);
  });

  mount(router, deps, contract.signOut, async (_input, { actor, session, requestId }) => {
    if (actor.kind === 'person') await signOut({ db, session }, { personId: actor.personId, requestId });
    return undefined;
  });

  mount(router, deps, contract.setUp, async ({ body }, { session, requestId }) => {
    const leadId = await setUp({ db, ...parts }, { ...body, requestId, at: deps.now() });
    await session.begin(leadId);
    return sessionOf(leadId);
  });

  mount(router, deps, askResetEndpoint, async ({ body }, { requestId }) => {
    await askReset(deps, { ...body, requestId, at: deps.now() });
    return undefined;
  });
  mount(router, deps, resetEndpoint, async ({ body }, { requestId }) => {
    await resetPassword(deps, { ...body, requestId, at: deps.now() });
    return undefined;
  });
  mount(router, deps, confirmEndpoint, async ({ body }, { requestId }) => {
    await confirmEmail(db, { ...body, requestId, at: deps.now() });
    return undefined;
  });
  ownAccountRoutes(router, deps);
}
