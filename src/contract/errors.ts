/**
 * The closed list of error codes, each with its HTTP status. A code is permanent: a new meaning gets a new code.
 * 4xx are expected and quiet; 5xx are logged with the request id and carry no detail.
 */
import * as z from 'zod/mini';

export const errorStatus = {
  /** A field, parameter or query value is not what the endpoint takes; each fault is listed in `problems`. */
  invalid_input: 400,
  /** The body is not JSON, or not multipart where an upload is due. */
  unreadable_body: 400,
  /** A session cookie and an Authorization header came together: one request, one identity. */
  two_identities: 400,
  /** Nobody is signed in (or the bearer token is not known). */
  not_signed_in: 401,
  /** E-mail and password do not belong together; never says which is wrong. */
  wrong_sign_in: 401,
  /** E-mail and password are right; a code of the authenticator (or a recovery code) is wanted, or the one given does not hold. */
  code_needed: 401,
  /** The person's role in the team does not allow it. */
  not_allowed: 403,
  /** An unsafe request that did not come from this site's own pages. */
  cross_site: 403,
  /** No such thing, or not one that this person may know of. */
  not_found: 404,
  /** The thing has moved on since it was looked at (already accepted, withdrawn, refused). */
  wrong_state: 409,
  /** Somebody changed the thing since the revision that was sent; `problems` says what, field by field. */
  conflict: 409,
  /** The one-time link was used, has expired, was taken back or never existed. */
  link_not_valid: 410,
  /** More bytes than the endpoint takes. */
  too_large: 413,
  /** Not one of the formats that are read. */
  unsupported_format: 415,
  /** More requests than the limit allows; Retry-After says when. */
  too_many_requests: 429,
  /** A fault of ours. */
  internal: 500,
  /** The database is away; Retry-After says when to ask again. */
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof errorStatus;

const ERROR_CODES = Object.keys(errorStatus) as [ErrorCode, ...ErrorCode[]];

/** One located fault: a path into the request, or a line and column of a file. */
export const Problem = z.object({
  path: z.optional(z.string()),
  line: z.optional(z.int()),
  column: z.optional(z.int()),
  message: z.string(),
});
export type Problem = z.infer<typeof Problem>;

export const ErrorBody = z.object({
  code: z.enum(ERROR_CODES),
  message: z.string(),
  problems: z.array(Problem),
  requestId: z.string(),
});
export type ErrorBody = z.infer<typeof ErrorBody>;
