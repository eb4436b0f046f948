/**
 * The one way to the server: every call goes through an endpoint's declaration, and its answer is parsed by it.
 * `fetch`, XMLHttpRequest (for the progress of an upload) and EventSource stand here and nowhere else.
 */
import type { AnswerOf, Endpoint, InputOf } from '../contract/endpoint.ts';
import { ErrorBody } from '../contract/errors.ts';
import { ApiError } from './api-error.ts';

const NETWORK_MESSAGE =
  'The server did not answer. Check the connection, then try again; what was saved before is still there.';
const UNEXPECTED_MESSAGE =
  'The server answered in a way that this page does not know. Load the page again: it may be older than the server.';

export interface CallOptions {
  readonly signal?: AbortSignal;
}

/** Calls an endpoint that answers JSON or nothing. Throws ApiError, or AbortError when `signal` aborts. */
export async function call<E extends Endpoint>(
  endpoint: E,
  input: InputOf<E>,
  options: CallOptions = {},
): Promise<AnswerOf<E>> {
  const answer = await send(endpoint, input, options);
  if (endpoint.response.kind === 'none') return undefined as AnswerOf<E>;
  return parseAnswer(endpoint, await jsonOf(answer));
}

/** Calls an endpoint that answers bytes. Throws as `call`. */
export async function callForBytes<E extends Endpoint>(
  endpoint: E,
  input: InputOf<E>,
  options: CallOptions = {},
): Promise<Uint8Array> {
  const answer = await send(endpoint, input, options);
  try {
    return new Uint8Array(await answer.arrayBuffer());
  } catch (error) {
    throw asNetworkError(error);
  }
}

export interface UploadOptions extends CallOptions {
  /** Told as bytes leave; `sentBytes` counts the multipart envelope too, so it ends a little over the file's size. */
  readonly onProgress?: (progress: { sentBytes: number; totalBytes: number }) => void;
}

/** Calls an upload endpoint with its files in the field `file`. Throws as `call`. */
export function uploadFiles<E extends Endpoint>(
  endpoint: E,
  input: InputOf<E> & { readonly files: readonly Blob[] },
  options: UploadOptions = {},
): Promise<AnswerOf<E>> {
  const form = new FormData();
  for (const file of input.files) form.append('file', file, file instanceof File ? file.name : 'file');
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open(endpoint.method, urlOf(endpoint, input));
    request.setRequestHeader('Accept', 'application/json');
    request.upload.addEventListener('progress', (event) => {
      options.onProgress?.({ sentBytes: event.loaded, totalBytes: event.total });
    });
    request.addEventListener('load', () => {
      try {
        const body: unknown = parseJson(request.responseText);
        if (request.status >= 200 && request.status < 300) resolve(parseAnswer(endpoint, body));
        else reject(errorOf(request.status, body, request.getResponseHeader('Retry-After')));
      } catch (error) {
        reject(error);
      }
    });
    request.addEventListener('error', () => reject(new ApiError({ code: 'network', message: NETWORK_MESSAGE })));
    request.addEventListener('abort', () => reject(new DOMException('The upload was stopped.', 'AbortError')));
    options.signal?.addEventListener('abort', () => request.abort(), { once: true });
    if (options.signal?.aborted) return reject(new DOMException('The upload was stopped.', 'AbortError'));
    request.send(form);
  });
}

export type StreamState = 'connecting' | 'open' | 'lost' | 'refused';

export interface SubscribeOptions<E extends Endpoint> {
  readonly onEvent: (event: AnswerOf<E>) => void;
  /**
   * `lost`: the stream is down and is being tried again; events may have been missed once it is `open` again.
   * `refused`: the server does not give it, as when the session has ended; it is tried again all the same.
   */
  readonly onState?: (state: StreamState) => void;
  readonly signal: AbortSignal;
}

const REOPEN_AFTER_MS = 5_000;

/** Listens to an endpoint's server-sent events until `signal` aborts; a stream that ends is opened again. */
export function subscribe<E extends Endpoint>(endpoint: E, input: InputOf<E>, options: SubscribeOptions<E>): void {
  let source: EventSource | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  const open = (): void => {
    options.onState?.('connecting');
    source = new EventSource(urlOf(endpoint, input));
    source.addEventListener('open', () => options.onState?.('open'));
    source.addEventListener('message', (message: MessageEvent<string>) => {
      const event = parseEvent(endpoint, message.data);
      if (event !== null) options.onEvent(event);
    });
    source.addEventListener('error', () => {
      // The browser retries a stream that broke; one that the server refused it gives up, so that is opened anew here.
      const isRefused = source?.readyState === EventSource.CLOSED;
      options.onState?.(isRefused ? 'refused' : 'lost');
      if (isRefused) timer = setTimeout(open, REOPEN_AFTER_MS);
    });
  };
  options.signal.addEventListener('abort', () => {
    clearTimeout(timer);
    source?.close();
  });
  if (!options.signal.aborted) open();
}

interface AnyInput {
  readonly params: unknown;
  readonly query: unknown;
}

/** The address of a call: path parameters filled in and escaped, query values that are set appended. */
export function urlOf(endpoint: Endpoint, input: AnyInput): string {
  const params = input.params as Readonly<Record<string, unknown>>;
  const query = input.query as Readonly<Record<string, unknown>>;
  const path = endpoint.path.replace(/:([A-Za-z]+)/g, (_, name: string) => {
    const value = params[name];
    if (value === undefined) throw new TypeError(`${endpoint.path} needs the parameter ${name}.`);
    return encodeURIComponent(String(value));
  });
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) if (value !== undefined) search.set(name, String(value));
  return search.size > 0 ? `${path}?${search}` : path;
}

async function send(endpoint: Endpoint, input: AnyInput, options: CallOptions): Promise<globalThis.Response> {
  const headers: Record<string, string> = { Accept: 'application/json' };
  const init: RequestInit = { method: endpoint.method, headers, credentials: 'same-origin' };
  if (endpoint.body.kind === 'json') {
    headers['Content-Type'] = 'application/json';
    init.body = JSON.stringify((input as AnyInput & { readonly body: unknown }).body);
  }
  if (options.signal) init.signal = options.signal;
  let answer: globalThis.Response;
  try {
    answer = await fetch(urlOf(endpoint, input), init);
  } catch (error) {
    throw asNetworkError(error);
  }
  if (!answer.ok) throw errorOf(answer.status, await jsonOf(answer), answer.headers.get('Retry-After'));
  return answer;
}

async function jsonOf(answer: globalThis.Response): Promise<unknown> {
  try {
    return parseJson(await answer.text());
  } catch (error) {
    throw asNetworkError(error);
  }
}

/** Undefined for text that is not JSON: a proxy's page, or an answer that was cut off. */
function parseJson(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined;
  }
}

function parseAnswer<E extends Endpoint>(endpoint: E, body: unknown): AnswerOf<E> {
  if (endpoint.response.kind !== 'json') throw new TypeError(`${endpoint.path} does not answer JSON.`);
  const parsed = endpoint.response.schema.safeParse(body);
  if (!parsed.success) throw new ApiError({ code: 'unexpected_answer', message: UNEXPECTED_MESSAGE });
  return parsed.data as AnswerOf<E>;
}

/** Null for an event that this program does not know, which a newer server may send. */
function parseEvent<E extends Endpoint>(endpoint: E, data: string): AnswerOf<E> | null {
  if (endpoint.response.kind !== 'events') throw new TypeError(`${endpoint.path} does not answer events.`);
  const parsed = endpoint.response.schema.safeParse(parseJson(data));
  return parsed.success ? (parsed.data as AnswerOf<E>) : null;
}

function errorOf(status: number, body: unknown, retryAfter: string | null): ApiError {
  const retryAfterS = retryAfter !== null && /^\d+$/.test(retryAfter.trim()) ? Number(retryAfter) : null;
  const parsed = ErrorBody.safeParse(body);
  if (parsed.success) return new ApiError({ ...parsed.data, retryAfterS });
  // A gateway in front of the server answers these without our body.
  if (status === 502 || status === 503 || status === 504) {
    return new ApiError({ code: 'unavailable', message: NETWORK_MESSAGE, retryAfterS });
  }
  return new ApiError({ code: 'unexpected_answer', message: UNEXPECTED_MESSAGE, retryAfterS });
}

function asNetworkError(error: unknown): unknown {
  if (error instanceof DOMException && error.name === 'AbortError') return error;
  return new ApiError({ code: 'network', message: NETWORK_MESSAGE });
}
