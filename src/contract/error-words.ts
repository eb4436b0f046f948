import type { ErrorCode } from './errors.ts';

/** What each code means to whoever writes a program. */
export const errorWords: Readonly<Record<ErrorCode, string>> = {
  invalid_input: 'A parameter or the body is not what is asked for; “problems” names every fault with its path.',
  unreadable_body: 'The body is not JSON, or not a form with a file where one is due.',
  two_identities: 'A session and a token came together. Send one of them.',
  not_signed_in: 'Nobody is signed in, or the token is not known, has expired or was revoked.',
  wrong_sign_in: 'E-mail and password do not belong together.',
  code_needed: 'A code of the authenticator, or a recovery code, is wanted as well.',
  not_allowed: 'The role of the person, or the scopes of the token, do not allow it.',
  cross_site: 'A browser says that another site sent this.',
  not_found: 'There is no such thing, or it belongs to another team.',
  wrong_state: 'The thing has moved on since it was looked at.',
  conflict: 'Somebody changed the thing since the revision that was sent.',
  link_not_valid: 'The link was used already, was taken back, or has expired.',
  too_large: 'More bytes than are taken at once.',
  unsupported_format: 'Not one of the formats that are read.',
  too_many_requests: 'More requests than the limit allows. Retry-After says when to ask again.',
  internal: 'A fault of ours. Quote the request id.',
  unavailable: 'The database is away, or it took too long. Retry-After says when to ask again.',
};
