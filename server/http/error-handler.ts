import { DrizzleQueryError } from 'drizzle-orm';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Logger } from 'pino';
import { AppError, type ErrorCode, errorStatus } from '../../shared/errors.ts';
import type { Problem } from '../../shared/schemas/problem.ts';
import { requestIdOf } from './request-id.ts';

const titles: Record<ErrorCode, string> = {
  invalid: 'The request cannot be used',
  unauthenticated: 'Sign-in needed',
  forbidden: 'Not allowed',
  not_found: 'Not found',
  conflict: 'In conflict with what is there',
  gone: 'No longer there',
  too_large: 'Too large',
  unprocessable: 'Cannot be done as asked',
  too_many: 'Too many requests',
  internal: 'Tallyroot failed',
  unavailable: 'Not available now',
};

/** Errors that Express and its body parser raise carry a status; everything else that is unknown is ours. */
function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  const status = error instanceof Error && 'status' in error ? error.status : undefined;
  if (status === 413)
    return new AppError('too_large', 'The body of this request is too large.', { cause: error });
  if (status === 404) return new AppError('not_found', 'There is nothing at this address.', { cause: error });
  if (typeof status === 'number' && status >= 400 && status < 500)
    return new AppError('invalid', 'The body or address of this request cannot be read.', { cause: error });
  return new AppError('internal', 'Something went wrong in Tallyroot; its log has the details.', {
    cause: error,
  });
}

/** A query that failed is logged without its parameters, which can be somebody's secrets. */
function loggable(error: unknown): unknown {
  return error instanceof DrizzleQueryError ? (error.cause ?? new Error('a query failed')) : error;
}

/** Every error leaves here, as problem details (RFC 9457). What is unexpected is logged and told nothing of. */
export function errorHandler(logger: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    const known = toAppError(error);
    const requestId = requestIdOf(response);
    if (known.code === 'internal')
      logger.error(
        { err: loggable(known.cause ?? known), requestId, url: request.originalUrl },
        'request failed',
      );
    if (response.headersSent) {
      next(error);
      return;
    }
    const status = errorStatus[known.code];
    const body: Problem = {
      type: `urn:tallyroot:problem:${known.code.replace('_', '-')}`,
      title: titles[known.code],
      status,
      detail: known.message,
      code: known.code,
      requestId,
    };
    if (known.issues.length > 0) body.issues = known.issues;
    if (known.code === 'unauthenticated') response.set('WWW-Authenticate', 'Bearer');
    response.status(status).set('Cache-Control', 'no-store').type('application/problem+json');
    response.send(JSON.stringify(body));
  };
}

export const noSuchRoute: RequestHandler = (request) => {
  throw new AppError(
    'not_found',
    `There is nothing at ${request.method} ${request.originalUrl.split('?')[0]}.`,
  );
};
