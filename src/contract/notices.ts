import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

/** What a person is told of, in the application and by mail; each kind on or off per person. */
export const noticeKinds = [
  'invitation',
  'reset',
  'review asked',
  'signed off',
  'comment',
  'import finished',
  'export ready',
  'team deletion',
] as const;
export const NoticeKind = z.enum(noticeKinds);
export type NoticeKind = z.infer<typeof NoticeKind>;

export const Notice = z.object({
  id: z.uuid(),
  kind: NoticeKind,
  /** A sentence; never a result figure. */
  words: z.string(),
  /** The page of the application that it is about. */
  path: z.string(),
  madeAt: z.iso.datetime(),
  read: z.boolean(),
});
export type Notice = z.infer<typeof Notice>;

export const listNotices = endpoint({
  method: 'GET',
  path: '/api/account/notices',
  summary: "The reader's last fifty notices, newest first, and how many are unread.",
  params: empty,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(Notice), unread: z.int() })),
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});

export const readNotices = endpoint({
  method: 'POST',
  path: '/api/account/notices/reading',
  summary: 'Mark every notice of the reader as read.',
  params: empty,
  query: empty,
  body: none,
  response: none,
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});
