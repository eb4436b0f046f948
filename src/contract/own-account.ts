/** What a person does with their own account. Whatever opens the account to somebody else asks for the password again. */
import * as z from 'zod/mini';
import { Email, Name, NewPassword, SignInCode, TypedPassword } from './accounts.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { NoticeKind, noticeKinds } from './notices.ts';

/** What asks for a password may be tried a few times a minute. */
const guarded = { ...ordinary, perMinute: 20 };

export const Account = z.object({
  name: z.string(),
  email: z.string(),
  twoFactor: z.object({ on: z.boolean(), recoveryCodesLeft: z.int() }),
  noticesOff: z.array(NoticeKind),
});
export type Account = z.infer<typeof Account>;

export const getAccount = endpoint({
  method: 'GET',
  path: '/api/account',
  summary: "The reader's own account: name, address, two-factor sign-in, notices that are off.",
  params: empty,
  query: empty,
  body: none,
  response: json(Account),
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});

export const renamePerson = endpoint({
  method: 'PATCH',
  path: '/api/account',
  summary: 'Change the name under which others see the reader.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ name: Name })),
  response: json(Account),
  errors: [],
  allow: 'accounts.own',
  limits: guarded,
});

export const changePassword = endpoint({
  method: 'PUT',
  path: '/api/account/password',
  summary: 'Change the password; every other session of the account ends.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ password: TypedPassword, newPassword: NewPassword })),
  response: none,
  errors: [],
  allow: 'accounts.own',
  limits: guarded,
});

export const askEmailChange = endpoint({
  method: 'POST',
  path: '/api/account/email',
  summary: 'Ask for another e-mail address. It holds once the link that is sent to it has been followed.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ password: TypedPassword, email: Email })),
  response: none,
  errors: [],
  allow: 'accounts.own',
  limits: guarded,
});

export const SessionOfPerson = z.object({
  id: z.uuid(),
  beganAt: z.nullable(z.iso.datetime()),
  endsAt: z.iso.datetime(),
  address: z.nullable(z.string()),
  /** What the browser calls itself, cut short. */
  browser: z.nullable(z.string()),
  current: z.boolean(),
});
export type SessionOfPerson = z.infer<typeof SessionOfPerson>;

export const listSessions = endpoint({
  method: 'GET',
  path: '/api/account/sessions',
  summary: 'Where the account is signed in, newest first.',
  params: empty,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(SessionOfPerson) })),
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});

export const endSession = endpoint({
  method: 'DELETE',
  path: '/api/account/sessions/:sessionId',
  summary: 'End one session of the account at once.',
  params: z.strictObject({ sessionId: z.uuid() }),
  query: empty,
  body: none,
  response: none,
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});

export const endOtherSessions = endpoint({
  method: 'DELETE',
  path: '/api/account/sessions',
  summary: 'End every session of the account but this one.',
  params: empty,
  query: empty,
  body: none,
  response: none,
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});

export const startTwoFactor = endpoint({
  method: 'POST',
  path: '/api/account/two-factor',
  summary: 'Make the secret for an authenticator. Two-factor sign-in begins once a code of it has been confirmed.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ password: TypedPassword })),
  response: json(z.object({ secret: z.string(), uri: z.string() })),
  errors: ['wrong_state'],
  allow: 'accounts.own',
  limits: guarded,
});

const RecoveryCodes = z.object({ recoveryCodes: z.array(z.string()) });

export const confirmTwoFactor = endpoint({
  method: 'PUT',
  path: '/api/account/two-factor',
  summary: 'Begin two-factor sign-in with a code of the authenticator. The answer shows the recovery codes once.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ code: SignInCode })),
  response: json(RecoveryCodes),
  errors: ['wrong_state'],
  allow: 'accounts.own',
  limits: guarded,
});

export const endTwoFactor = endpoint({
  method: 'POST',
  path: '/api/account/two-factor/removal',
  summary: 'End two-factor sign-in; its recovery codes are worth nothing afterwards.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ password: TypedPassword })),
  response: none,
  errors: [],
  allow: 'accounts.own',
  limits: guarded,
});

export const renewRecoveryCodes = endpoint({
  method: 'POST',
  path: '/api/account/recovery-codes',
  summary: 'Make new recovery codes, shown once; the old ones are worth nothing afterwards.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ password: TypedPassword })),
  response: json(RecoveryCodes),
  errors: ['wrong_state'],
  allow: 'accounts.own',
  limits: guarded,
});

export const setNoticesOff = endpoint({
  method: 'PUT',
  path: '/api/account/notices-off',
  summary: 'Say which kinds of notice the reader does not want.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ off: z.array(NoticeKind).check(z.maxLength(noticeKinds.length)) })),
  response: json(Account),
  errors: [],
  allow: 'accounts.own',
  limits: guarded,
});
