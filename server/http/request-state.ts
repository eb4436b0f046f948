import { randomUUID } from 'node:crypto';
import type { Request, RequestHandler, Response } from 'express';
import type { Actor, SessionControl } from './request-context.ts';

/** Who a request comes from, and how to look again while it is being answered. */
export interface Identity {
  readonly actor: Actor;
  readonly session: SessionControl;
  /** The actor as of now: signed out when the session has ended since. */
  lookAgain(): Promise<Actor>;
}

/** What holds for every request of one server. */
export interface ServerTerms {
  /** Aborted when the server closes. */
  readonly closing: AbortSignal;
  /** How often an event stream beats, and looks again at who watches. */
  readonly heartbeatMs: number;
}

export interface RequestState {
  readonly requestId: string;
  readonly server: ServerTerms;
  /** Set by `authenticate`; null on what is served without it. */
  identity: Identity | null;
}

const states = new WeakMap<object, RequestState>();

/** How long the rest of a body that nobody wants is swallowed before the connection is cut. */
const LINGER_MS = 5_000;

/** Gives every request an id of its own and tells it to the client, who can quote it. */
export function beginRequest(server: ServerTerms): RequestHandler {
  return (request, response, next) => {
    const requestId = randomUUID();
    states.set(request, { requestId, server, identity: null });
    response.setHeader('x-request-id', requestId);
    cutUnreadRest({ request, response });
    next();
  };
}

/**
 * A connection that is closed over unread bytes is reset, and the answer is lost with it. So Node goes on reading what comes
 * after the answer; this ends it for a client that does not stop sending.
 */
function cutUnreadRest({ request, response }: { request: Request; response: Response }): void {
  response.once('finish', () => {
    if (request.complete) return;
    const cut = setTimeout(() => request.destroy(), LINGER_MS).unref();
    request.once('close', () => clearTimeout(cut));
  });
}

export function stateOf(request: object): RequestState {
  const state = states.get(request);
  if (state === undefined) throw new Error('The request has not passed beginRequest.');
  return state;
}
