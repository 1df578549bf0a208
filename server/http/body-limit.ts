import type { RequestHandler } from 'express';
import { AppError } from '../../shared/errors.ts';

/**
 * Refuses a body by the length that its head announces, before any of it is read: the parser behind would wait
 * for the end of what it refuses. Forms with files have a limit of their own. A body without a length is counted
 * by the parser.
 */
export function bodyLimit(maxBytes: number): RequestHandler {
  return (request, _response, next) => {
    const announced = Number(request.get('content-length') ?? 0);
    if (announced > maxBytes && !request.is('multipart/form-data'))
      throw new AppError('too_large', 'The body of this request is too large.');
    next();
  };
}
