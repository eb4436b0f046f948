import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

/** Lower-cased and trimmed, so that one address is one account. */
export const Email = z
  .string()
  .check(
    z.trim(),
    z.toLowerCase(),
    z.email('Type an e-mail address, such as name@example.org.'),
    z.maxLength(254, 'Use 254 characters or fewer.'),
  );
export const NewPassword = z
  .string()
  .check(z.minLength(12, 'Use 12 characters or more.'), z.maxLength(200, 'Use 200 characters or fewer.'));
/** On one line: names stand in the heads of mails. */
export const Name = z
  .string()
  .check(
    z.trim(),
    z.minLength(1, 'Type a name.'),
    z.maxLength(120, 'Use 120 characters or fewer.'),
    z.regex(/^\P{Cc}*$/u, 'Use no line breaks or other control characters.'),
  );
/** A password that is there already: whatever it is, it is only compared. */
export const TypedPassword = z
  .string()
  .check(z.minLength(1, 'Type your password.'), z.maxLength(200, 'Use 200 characters or fewer.'));
/** A key out of a link that came by mail. */
export const LinkKey = z.string().check(z.maxLength(200));

/** Typed with or without blanks. */
export const SignInCode = z.string().check(z.trim(), z.maxLength(40, 'Use 40 characters or fewer.'));

export const Role = z.enum(['viewer', 'planner', 'engineer', 'lead']);
export type Role = z.infer<typeof Role>;

export const Membership = z.object({
  teamId: z.uuid(),
  teamName: z.string(),
  role: Role,
  /** Demo teams: every screen says "invented places and weather". */
  invented: z.boolean(),
  programmes: z.array(z.object({ id: z.uuid(), name: z.string() })),
  /** When the team and all that it has will be deleted, while that waits. */
  deletedAt: z.optional(z.iso.datetime()),
});
export type Membership = z.infer<typeof Membership>;

/** Who is signed in on this browser; `person` is null when nobody is. */
export const Session = z.object({
  person: z.nullable(z.object({ id: z.uuid(), name: z.string(), email: z.string() })),
  memberships: z.array(Membership),
});
export type Session = z.infer<typeof Session>;

export const getSession = endpoint({
  method: 'GET',
  path: '/api/session',
  summary: 'Who is signed in, and in which teams.',
  params: empty,
  query: empty,
  body: none,
  response: json(Session),
  errors: [],
  allow: 'anyone',
  limits: ordinary,
});

export const signIn = endpoint({
  method: 'POST',
  path: '/api/session',
  summary: 'Sign in with e-mail and password, and a code where two-factor sign-in is on.',
  params: empty,
  query: empty,
  body: json(
    z.strictObject({
      email: Email,
      password: TypedPassword,
      /** Six figures of the authenticator or a recovery code, where two-factor sign-in is on. */
      code: z.optional(SignInCode),
    }),
  ),
  response: json(Session),
  errors: ['wrong_sign_in', 'code_needed'],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 30 },
});

export const signOut = endpoint({
  method: 'DELETE',
  path: '/api/session',
  summary: 'Sign out and end this session.',
  params: empty,
  query: empty,
  body: none,
  response: none,
  errors: [],
  allow: 'accounts.signOut',
  limits: ordinary,
});

export const setUp = endpoint({
  method: 'POST',
  path: '/api/set-up',
  summary: 'Make the first team and its lead with the one-time key that the first start printed.',
  params: empty,
  query: empty,
  body: json(
    z.strictObject({
      key: LinkKey,
      teamName: Name,
      name: Name,
      email: Email,
      password: NewPassword,
    }),
  ),
  response: json(Session),
  errors: ['link_not_valid'],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 30 },
});
