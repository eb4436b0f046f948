import type { Router } from 'express';
import { listNotices as listNoticesEndpoint, readNotices as readNoticesEndpoint } from '#contract/notices.ts';
import * as contract from '#contract/own-account.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import { personOf } from '../../http/person-of.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { askEmailChange } from './ask-email-change.ts';
import { changeNoticesOff, renamePerson } from './change-account.ts';
import { changePassword } from './change-password.ts';
import { confirmTwoFactor, endTwoFactor, renewRecoveryCodes, startTwoFactor } from './change-two-factor.ts';
import { endOtherSessions, endSession } from './end-sessions.ts';
import { listNotices, listSessionViews, readAccount, type SessionView } from './own-account-read-model.ts';
import { readNotices } from './read-notices.ts';

/** What a person does with their own account; every act is of the person of the session, whatever the body says. */
export function ownAccountRoutes(router: Router, deps: Deps): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    sid: request.session.id,
    requestId: request.requestId,
    at: deps.now(),
  });
  const accountOf = async (request: RequestContext) => {
    const account = await readAccount(db, personOf(request));
    if (account === null) throw new AppError('not_signed_in', 'Sign in first.');
    return account;
  };

  mount(router, deps, contract.getAccount, (_input, request) => accountOf(request));
  mount(router, deps, contract.renamePerson, async ({ body }, request) => {
    await renamePerson(db, { ...body, ...act(request) });
    return accountOf(request);
  });
  mount(router, deps, contract.setNoticesOff, async ({ body }, request) => {
    await changeNoticesOff(db, { ...body, ...act(request) });
    return accountOf(request);
  });
  mount(router, deps, contract.changePassword, async ({ body }, request) => {
    await changePassword(db, { ...body, ...act(request) });
    return undefined;
  });
  mount(router, deps, contract.askEmailChange, async ({ body }, request) => {
    await askEmailChange(deps, { ...body, ...act(request) });
    return undefined;
  });

  mount(router, deps, contract.listSessions, async (_input, request) => ({
    items: (await listSessionViews(db, act(request))).map(presentSession),
  }));
  mount(router, deps, contract.endSession, async ({ params }, request) => {
    await endSession(db, { ...params, ...act(request) });
    return undefined;
  });
  mount(router, deps, contract.endOtherSessions, async (_input, request) => {
    await endOtherSessions(db, act(request));
    return undefined;
  });

  mount(router, deps, contract.startTwoFactor, ({ body }, request) =>
    startTwoFactor(deps, { ...body, ...act(request) }),
  );
  mount(router, deps, contract.confirmTwoFactor, async ({ body }, request) => ({
    recoveryCodes: [...(await confirmTwoFactor(deps, { ...body, ...act(request) }))],
  }));
  mount(router, deps, contract.endTwoFactor, async ({ body }, request) => {
    await endTwoFactor(db, { ...body, ...act(request) });
    return undefined;
  });
  mount(router, deps, contract.renewRecoveryCodes, async ({ body }, request) => ({
    recoveryCodes: [...(await renewRecoveryCodes(db, { ...body, ...act(request) }))],
  }));

  mount(router, deps, listNoticesEndpoint, (_input, request) => listNotices(db, personOf(request)));
  mount(router, deps, readNoticesEndpoint, async (_input, request) => {
    await readNotices(db, act(request));
    return undefined;
  });
}

function presentSession({ id, endsAt, about, current }: SessionView): contract.SessionOfPerson {
  return {
    id,
    beganAt: about?.beganAt ?? null,
    endsAt: endsAt.toISOString(),
    address: about?.address ?? null,
    browser: about?.browser ?? null,
    current,
  };
}
