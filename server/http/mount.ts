import type { Readable } from 'node:stream';
import type { Router } from 'express';
import type * as z from 'zod/mini';
import type { Endpoint, EventsResponse, FileResponse, JsonResponse, ParsedOf } from '#contract/endpoint.ts';
import type { Deps } from '../deps.ts';
import type { RequestContext } from './request-context.ts';

/** Bytes to send; `fileName` is what the browser is told to call them. */
export interface FileAnswer {
  readonly body: Uint8Array | Readable;
  readonly fileName?: string;
}

/** What a handler returns, by the kind of answer that its endpoint declares. */
export type HandlerAnswer<E extends Endpoint> =
  E['response'] extends JsonResponse<infer S>
    ? z.input<S>
    : E['response'] extends EventsResponse<infer S>
      ? AsyncIterable<z.input<S>>
      : E['response'] extends FileResponse
        ? FileAnswer
        : undefined;

export type Handler<E extends Endpoint> = (input: ParsedOf<E>, request: RequestContext) => Promise<HandlerAnswer<E>>;

/** Serves one declared endpoint: limits, authorise, parse, handle, answer; the handler sees only what is allowed and well formed. */
export function mount<E extends Endpoint>(router: Router, deps: Deps, endpoint: E, handler: Handler<E>): void {
  void router;
  void deps;
  void handler;
  throw new Error(`${endpoint.method} ${endpoint.path} has nobody to serve it yet.`);
}
