/**
 * What links in mails lead to. The key travels in the body, never in an address that a log would keep; the answers to asking say
 * nothing of whether there is an account.
 */
import * as z from 'zod/mini';
import { Email, LinkKey, NewPassword } from './accounts.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

export const askReset = endpoint({
  method: 'POST',
  path: '/api/password-reset/request',
  summary:
    'Ask for a link with which a new password is set. The answer is the same whether there is such an account or not.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ email: Email })),
  response: none,
  errors: [],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 10 },
});

export const resetPassword = endpoint({
  method: 'POST',
  path: '/api/password-reset',
  summary: 'Set a new password with the key of a link; every session of the account ends.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ key: LinkKey, password: NewPassword })),
  response: none,
  errors: ['link_not_valid'],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 20 },
});

export const confirmEmail = endpoint({
  method: 'POST',
  path: '/api/email-confirmation',
  summary: 'Make a new e-mail address hold, with the key of the link that was sent to it.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ key: LinkKey })),
  response: none,
  errors: ['link_not_valid'],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 20 },
});
