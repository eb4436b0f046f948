import { createHash } from 'node:crypto';
import type { Router } from 'express';
import * as contract from '#contract/accounts.ts';
import type { Deps } from '../../deps.ts';
import { addressBucket } from '../../http/client-address.ts';
import { spendShared } from '../../http/limits.ts';
import { mount } from '../../http/mount.ts';
import { forgetRequests } from '../../http/request-counts-store.ts';
import { readSession } from './read-session.ts';
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

  mount(router, deps, contract.getSession, async (_input, { actor }) =>
    readSession(db, actor.kind === 'person' ? actor.personId : null),
  );

  mount(router, deps, contract.signIn, async ({ body }, { session, ip, requestId }) => {
    const account = createHash('sha256').update(body.email).digest('hex');
    const address = addressBucket(ip);
    const here = `sign-in ${account} from ${address}`;
    await spendShared(deps, { bucket: `sign-in from ${address}`, perMinute: contract.signIn.limits.perMinute });
    await spendShared(deps, { bucket: here, perMinute: GUESSES_FROM_ONE_ADDRESS });
    await spendShared(deps, { bucket: `sign-in ${account}`, perMinute: GUESSES_FROM_ANYWHERE });
    const personId = await signIn({ db, session }, { email: body.email, address: ip, requestId });
    await forgetRequests(db, here);
    return readSession(db, personId);
  });

  mount(router, deps, contract.signOut, async (_input, { actor, session, requestId }) => {
    if (actor.kind === 'person') await signOut({ db, session }, { personId: actor.personId, requestId });
    return undefined;
  });

  mount(router, deps, contract.setUp, async ({ body }, { session, requestId }) => {
    const leadId = await setUp({ db, ...parts }, { ...body, requestId, at: deps.now() });
    await session.begin(leadId);
    return readSession(db, leadId);
  });
}
