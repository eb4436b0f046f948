import { Readable } from 'node:stream';
import express, { type Request, type Response, type Router } from 'express';
import type * as z from 'zod/mini';
import type { Endpoint, EventsResponse, FileResponse, JsonResponse, ParsedOf } from '#contract/endpoint.ts';
import type { Deps } from '../deps.ts';
import { answerEvents } from './answer-events.ts';
import { answerFile, type FileAnswer } from './answer-file.ts';
import { AppError } from './app-error.ts';
import { authorise, policies } from './authorise.ts';
import { addressBucket } from './client-address.ts';
import { compress } from './compress.ts';
import { type KeptAnswers, keep, keptFor, sendPacked } from './kept-answers.ts';
import { COUNTED_IN_DATABASE_UP_TO, makeLocalCounter, spendShared } from './limits.ts';
import { parseInput } from './parse-input.ts';
import type { Actor, RequestContext, UploadedFile } from './request-context.ts';
import { type Identity, type ServerTerms, stateOf } from './request-state.ts';
import { abortWhenGone, withinTime } from './time-limit.ts';
import { withUploads } from './uploads.ts';

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

/** One request on its way through an endpoint. */
interface Passage {
  readonly endpoint: Endpoint;
  readonly deps: Deps;
  readonly request: Request;
  readonly response: Response;
  readonly identity: Identity;
  readonly requestId: string;
  readonly server: ServerTerms;
  /** Aborted when the client has gone, the server closes (events only) or the time is over. */
  readonly signal: AbortSignal;
  readonly handle: (input: unknown, context: RequestContext) => Promise<unknown>;
  readonly readJson: express.RequestHandler;
  readonly kept: KeptAnswers | null;
}

/**
 * Serves one declared endpoint: limits, authorise, parse, handle, answer. The handler sees only what is allowed and well
 * formed; the client sees only what is declared. Refuses a declaration that no rule guards, at start.
 * @param kept where the answer hangs on the team's rows and the input alone, so that it is made once for a revision of the team
 */
export function mount<E extends Endpoint>(
  router: Router,
  deps: Deps,
  endpoint: E,
  handler: Handler<E>,
  kept: KeptAnswers | null = null,
): void {
  if (!Object.hasOwn(policies, endpoint.allow))
    throw new Error(`${endpoint.method} ${endpoint.path}: nothing says who may ("${endpoint.allow}" has no rule).`);
  const spend = requestLimit(deps, endpoint);
  const readJson = express.json({ limit: endpoint.limits.bodyBytes });
  // The two places where what was parsed by a schema is given the type that the schema says.
  const handle = (input: unknown, context: RequestContext) => handler(input as ParsedOf<E>, context);
  const verb = endpoint.method.toLowerCase() as Lowercase<Endpoint['method']>;

  router[verb](endpoint.path, async (request, response) => {
    const { identity, requestId, server } = stateOf(request);
    if (identity === null) throw new Error('The request has not passed authentication.');
    const { actor } = identity;
    await spend(bucketOf(endpoint, { actor, ip: actor.kind === 'signed-out' ? (request.ip ?? '') : '' }));
    authorise(endpoint.allow, { actor, params: textParams(request) });
    const ready = kept === null ? null : keptFor(kept, { request, identity });
    if (ready !== null) return sendPacked(response, await ready);

    const over = abortWhenGone(response);
    const streams = endpoint.response.kind === 'events';
    const signal = streams ? AbortSignal.any([over.signal, server.closing]) : over.signal;
    const passage: Passage = {
      ...{ endpoint, deps, request, response, identity, requestId, server, signal },
      ...{ handle, readJson, kept },
    };
    try {
      if (streams) await pass(passage);
      else await withinTime(() => pass(passage), { seconds: endpoint.limits.seconds, over, response });
    } finally {
      // Events that nobody reads any more are let go of, whyever their reading ended.
      if (streams) over.abort();
    }
  });
}

async function pass(passage: Passage): Promise<void> {
  const { endpoint, request, response, signal, deps } = passage;
  const { body } = endpoint;
  if (body.kind === 'json') await readBody(passage.readJson, { request, response });
  const input = parse(passage);
  const made = passage.kept === null ? null : keep(passage.kept, passage, () => textOfAnswer(passage, input));
  if (made !== null) {
    const packed = await made;
    if (!response.headersSent && !signal.aborted) sendPacked(response, packed);
    return;
  }
  if (body.kind !== 'upload') return answer(passage, await passage.handle(input, contextOf(passage, [])));
  const receiving = { request, response, limits: body, folder: deps.uploadsDir, signal };
  const answered = await withUploads(receiving, (files) => passage.handle(input, contextOf(passage, files)));
  return answer(passage, answered);
}

async function textOfAnswer(passage: Passage, input: unknown): Promise<string> {
  return JSON.stringify(parsedAnswer(passage, await passage.handle(input, contextOf(passage, []))));
}

function parse({ endpoint, request }: Passage): unknown {
  const parts = [
    { name: 'params', schema: endpoint.params, value: { ...request.params } },
    { name: 'query', schema: endpoint.query, value: { ...request.query } },
  ];
  if (endpoint.body.kind === 'json') parts.push({ name: 'body', schema: endpoint.body.schema, value: request.body });
  const parsed = parseInput(parts);
  // Passport reads e-mail and password from here: as the contract understands them, not as they were typed.
  if (endpoint.body.kind === 'json') request.body = parsed.body;
  return parsed;
}

function contextOf(passage: Passage, uploads: readonly UploadedFile[]): RequestContext {
  const { identity, requestId, request, signal } = passage;
  return { actor: identity.actor, session: identity.session, requestId, ip: request.ip ?? '', signal, uploads };
}

async function answer(passage: Passage, answered: unknown): Promise<void> {
  const { endpoint, request, response, signal } = passage;
  const declared = endpoint.response;
  // The time was over, or the client has gone: somebody else has answered, or nobody is there to be answered.
  if (response.headersSent || (declared.kind !== 'events' && signal.aborted)) return letGo(answered);
  response.setHeader('Cache-Control', 'no-store');
  switch (declared.kind) {
    case 'json': {
      await compress(passage);
      response.json(parsedAnswer(passage, answered));
      return;
    }
    case 'none':
      response.status(204).end();
      return;
    case 'file':
      await compress(passage);
      return answerFile({ request, response }, { declared, answer: answered as FileAnswer });
    case 'events':
      if (request.method === 'HEAD') {
        response.type('text/event-stream').end();
        return;
      }
      return answerEvents({
        response,
        schema: declared.schema,
        events: answered as AsyncIterable<unknown>,
        signal,
        heartbeatMs: passage.server.heartbeatMs,
        mayStillWatch: () => mayStill(passage),
      });
  }
}

/** The JSON of an answer, which holds nothing that is not declared. */
function parsedAnswer({ endpoint }: Passage, answered: unknown): unknown {
  if (endpoint.response.kind !== 'json') throw new Error(`${endpoint.path} does not answer JSON.`);
  const parsed = endpoint.response.schema.safeParse(answered);
  if (parsed.success) return parsed.data;
  const message = `The answer of ${endpoint.method} ${endpoint.path} is not what is declared.`;
  throw new Error(message, { cause: parsed.error });
}

/** Closes a stream that nobody will read. */
function letGo(answered: unknown): void {
  if (typeof answered !== 'object' || answered === null || !('body' in answered)) return;
  if (answered.body instanceof Readable) answered.body.destroy();
}

/** Looks again at session, membership and role while a stream is open. */
async function mayStill({ endpoint, identity, request }: Passage): Promise<boolean> {
  const actor = await identity.lookAgain();
  try {
    authorise(endpoint.allow, { actor, params: textParams(request) });
    return true;
  } catch (error) {
    if (error instanceof AppError) return false;
    throw error;
  }
}

function requestLimit(deps: Deps, endpoint: Endpoint): (bucket: string) => Promise<void> {
  const { perMinute } = endpoint.limits;
  if (perMinute <= COUNTED_IN_DATABASE_UP_TO) return (bucket) => spendShared(deps, { bucket, perMinute });
  const spend = makeLocalCounter(deps.now);
  return async (bucket) => spend({ bucket, perMinute });
}

function bucketOf(endpoint: Endpoint, { actor, ip }: { actor: Actor; ip: string }): string {
  return `${endpoint.method} ${endpoint.path} ${whoOf(actor, ip)}`;
}

function whoOf(actor: Actor, ip: string): string {
  if (actor.kind === 'person') return `person ${actor.personId}`;
  return actor.kind === 'token' ? `token ${actor.tokenId}` : `address ${addressBucket(ip)}`;
}

function textParams(request: Request): Record<string, string> {
  const entries = Object.entries(request.params);
  return Object.fromEntries(entries.map(([name, value]) => [name, Array.isArray(value) ? value.join('/') : value]));
}

function readBody(readJson: express.RequestHandler, web: { request: Request; response: Response }): Promise<void> {
  const { request, response } = web;
  if (request.is('application/json') === false || request.is('application/json') === null)
    throw new AppError('unreadable_body', 'Send the body as JSON, with Content-Type: application/json.');
  return new Promise((resolve, reject) => {
    readJson(request, response, (error?: unknown) => (error === undefined ? resolve() : reject(error)));
  });
}
