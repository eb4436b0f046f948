import type { ErrorRequestHandler, RequestHandler } from 'express';
import { type ErrorBody, errorStatus } from '#contract/errors.ts';
import { brokenConstraint, isDatabaseAway } from '../db/database-errors.ts';
import type { Log } from '../log.ts';
import { AppError } from './app-error.ts';
import { stateOf } from './request-state.ts';

/** How long a client should wait for a database that is away. */
const DATABASE_RETRY_S = 5;

/** The only place where an error becomes an answer. */
export function errorHandler(log: Log): ErrorRequestHandler {
  return (thrown: unknown, request, response, _next) => {
    const { requestId } = stateOf(request);
    const error = asAppError(thrown);
    const status = errorStatus[error.code];
    const clientGone = request.socket.destroyed;
    if (status >= 500 && !(clientGone && isAbort(thrown)))
      log.error({ requestId, method: request.method, path: request.path, error: thrown }, `answered ${status}`);
    if (response.headersSent || clientGone) {
      response.destroy();
      return;
    }
    const body: ErrorBody = { code: error.code, message: error.message, problems: [...error.problems], requestId };
    if (error.retryAfterS !== null) response.setHeader('Retry-After', String(error.retryAfterS));
    response.removeHeader('Content-Disposition');
    request.resume();
    response.status(status).set('Cache-Control', 'no-store').json(body);
  };
}

/** What stands for a path and method that nothing serves. */
export const nothingHere: RequestHandler = (request, _response, next) => {
  next(new AppError('not_found', `There is no ${request.method} ${request.originalUrl.split('?')[0]?.slice(0, 200)}.`));
};

function asAppError(thrown: unknown): AppError {
  if (thrown instanceof AppError) return thrown;
  if (isDatabaseAway(thrown))
    return new AppError(
      'unavailable',
      'The database is away for the moment. Nothing was lost; try again shortly.',
      [],
      {
        retryAfterS: DATABASE_RETRY_S,
      },
    );
  return asBodyError(thrown) ?? asConstraintError(thrown) ?? internalError();
}

function internalError(): AppError {
  return new AppError('internal', 'Something went wrong on our side. Quote the request id when you report it.');
}

/** A reference or a unique value that changed between looking and storing; verbs name the ones that they expect. */
function asConstraintError(thrown: unknown): AppError | null {
  const broken = brokenConstraint(thrown);
  if (broken === null || broken.kind === 'check' || broken.kind === 'missing') return null;
  return new AppError('wrong_state', 'Something else has changed this meanwhile. Load it again and repeat.');
}

/** Faults that Express and its body parsers find before a handler sees the request; told by the `type` they carry. */
function asBodyError(thrown: unknown): AppError | null {
  if (thrown instanceof URIError) return new AppError('invalid_input', 'The address is not well formed.');
  if (!(thrown instanceof Error) || !('type' in thrown) || typeof thrown.type !== 'string') return null;
  const options = { cause: thrown };
  switch (thrown.type) {
    case 'entity.too.large': {
      const limit = 'limit' in thrown ? `${thrown.limit} bytes` : 'what is taken here';
      return new AppError('too_large', `The body is larger than ${limit}.`, [], options);
    }
    case 'entity.parse.failed':
      return new AppError('unreadable_body', `The body is not JSON: ${thrown.message}.`, [], options);
    case 'charset.unsupported':
    case 'encoding.unsupported':
      return new AppError('unreadable_body', 'Send the body as UTF-8, plain or compressed with gzip.', [], options);
    case 'request.aborted':
    case 'request.size.invalid':
      return new AppError('unreadable_body', 'The body ended before it was whole. Send it again.', [], options);
    default:
      return null;
  }
}

const GONE_CODES = new Set<unknown>(['ABORT_ERR', 'ECONNRESET', 'EPIPE', 'ERR_STREAM_PREMATURE_CLOSE', 'ECONNABORTED']);

/** What a client that leaves causes on our side: expected, and no alarm. */
function isAbort(thrown: unknown): boolean {
  if (!(thrown instanceof Error)) return false;
  return thrown.name === 'AbortError' || ('code' in thrown && GONE_CODES.has(thrown.code));
}
