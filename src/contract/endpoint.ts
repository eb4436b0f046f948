/**
 * One endpoint, one declaration: client, server, permission matrix and rate limits are all made from it.
 * Requests and answers are both parsed, so nothing undeclared crosses the wire in either direction.
 */
import * as z from 'zod/mini';
import type { ErrorCode } from './errors.ts';
import type { PolicyName } from './policies.ts';

type Schema = z.ZodMiniType;

export interface JsonBody<S extends Schema = Schema> {
  readonly kind: 'json';
  readonly schema: S;
}
/** Multipart upload in the field `file`; each file is streamed to storage and hashed on the way. */
export interface UploadBody {
  readonly kind: 'upload';
  readonly maxFiles: number;
  readonly maxBytes: number;
}
export interface NoBody {
  readonly kind: 'none';
}
export type Body = JsonBody | UploadBody | NoBody;

export interface JsonResponse<S extends Schema = Schema> {
  readonly kind: 'json';
  readonly schema: S;
}
/** Server-sent events, each a JSON value of the schema. */
export interface EventsResponse<S extends Schema = Schema> {
  readonly kind: 'events';
  readonly schema: S;
}
/** Bytes with their media type; `attachment` makes the browser keep them as a file. */
export interface FileResponse {
  readonly kind: 'file';
  readonly mediaType: string;
  readonly attachment: boolean;
}
export interface NoResponse {
  readonly kind: 'none';
}
export type Response = JsonResponse | EventsResponse | FileResponse | NoResponse;

export interface Limits {
  readonly bodyBytes: number;
  /** Requests a minute from one person, or from one address when nobody is signed in. */
  readonly perMinute: number;
  /** Longest time to answer; server-sent events are exempt. */
  readonly seconds: number;
}

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

export interface Endpoint<
  P extends Schema = Schema,
  Q extends Schema = Schema,
  B extends Body = Body,
  R extends Response = Response,
> {
  readonly method: Method;
  readonly path: `/api/${string}`;
  /** What it does, in a sentence; shown in the API description. */
  readonly summary: string;
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  readonly response: R;
  /** The codes that this endpoint may answer beyond those that every endpoint may. */
  readonly errors: readonly ErrorCode[];
  readonly allow: PolicyName;
  readonly limits: Limits;
}

export function endpoint<P extends Schema, Q extends Schema, B extends Body, R extends Response>(
  declaration: Endpoint<P, Q, B, R>,
): Endpoint<P, Q, B, R> {
  return declaration;
}

export function json<S extends Schema>(schema: S): JsonBody<S> & JsonResponse<S> {
  return { kind: 'json', schema };
}
export function events<S extends Schema>(schema: S): EventsResponse<S> {
  return { kind: 'events', schema };
}
export function upload(limits: { maxFiles: number; maxBytes: number }): UploadBody {
  return { kind: 'upload', ...limits };
}
export function file(options: { mediaType: string; attachment: boolean }): FileResponse {
  return { kind: 'file', ...options };
}
export const none: NoBody & NoResponse = { kind: 'none' };

/** No params or no query. */
export const empty = z.strictObject({});

/** Limits of an ordinary small request. */
export const ordinary: Limits = { bodyBytes: 64 * 1024, perMinute: 600, seconds: 30 };

type JsonOf<B> = B extends JsonBody<infer S> ? z.input<S> : never;
type ParsedJsonOf<B> = B extends JsonBody<infer S> ? z.output<S> : never;

/** What a caller gives: JSON body, or the files of an upload. */
export type InputOf<E extends Endpoint> = {
  params: z.input<E['params']>;
  query: z.input<E['query']>;
} & (E['body'] extends JsonBody ? { body: JsonOf<E['body']> } : unknown) &
  (E['body'] extends UploadBody ? { files: readonly Blob[] } : unknown);

/** What a handler gets. */
export type ParsedOf<E extends Endpoint> = {
  params: z.output<E['params']>;
  query: z.output<E['query']>;
} & (E['body'] extends JsonBody ? { body: ParsedJsonOf<E['body']> } : unknown);

/** The JSON that an endpoint answers, or one event of its stream. */
export type AnswerOf<E extends Endpoint> =
  E['response'] extends JsonResponse<infer S>
    ? z.output<S>
    : E['response'] extends EventsResponse<infer S>
      ? z.output<S>
      : undefined;
