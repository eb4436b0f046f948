import { queryOptions } from '@tanstack/react-query';
import type { AnswerOf, Endpoint, InputOf } from '../contract/endpoint.ts';
import { call } from './api-client.ts';

/** Key of every cached answer: the endpoint's path, then what it was asked. Invalidate by the path alone or by more of it. */
export function apiKey<E extends Endpoint>(endpoint: E, input?: InputOf<E>): readonly unknown[] {
  return input === undefined ? [endpoint.path] : [endpoint.path, input.params, input.query];
}

/** The query of a GET endpoint that answers JSON, for useQuery and for the cache. */
export function apiQuery<E extends Endpoint>(endpoint: E, input: InputOf<E>) {
  return queryOptions<AnswerOf<E>>({
    queryKey: apiKey(endpoint, input),
    queryFn: ({ signal }) => call(endpoint, input, { signal }),
  });
}
