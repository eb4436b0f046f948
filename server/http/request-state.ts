import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import type { Actor, SessionControl } from './request-context.ts';

/** Who a request comes from, and how to look again while it is being answered. */
export interface Identity {
  readonly actor: Actor;
  readonly session: SessionControl;
  /** The actor as of now: signed out when the session has ended since. */
  lookAgain(): Promise<Actor>;
}

export interface RequestState {
  readonly requestId: string;
  /** Aborted when the server closes. */
  readonly closing: AbortSignal;
  /** Set by `authenticate`; null on what is served without it. */
  identity: Identity | null;
}

const states = new WeakMap<object, RequestState>();

/** Gives every request an id of its own and tells it to the client, who can quote it. */
export function beginRequest(closing: AbortSignal): RequestHandler {
  return (request, response, next) => {
    const requestId = randomUUID();
    states.set(request, { requestId, closing, identity: null });
    response.setHeader('x-request-id', requestId);
    next();
  };
}

export function stateOf(request: object): RequestState {
  const state = states.get(request);
  if (state === undefined) throw new Error('The request has not passed beginRequest.');
  return state;
}
