import { randomUUID } from 'node:crypto';
import type { RequestHandler, Response } from 'express';

const acceptable = /^[A-Za-z0-9._-]{8,64}$/;

/** Gives each request an id, or keeps the one that a proxy gave it; sent back as `X-Request-Id`. */
export const requestId: RequestHandler = (request, response, next) => {
  const given = request.get('x-request-id');
  const id = given !== undefined && acceptable.test(given) ? given : randomUUID();
  response.locals.requestId = id;
  response.set('X-Request-Id', id);
  next();
};

export function requestIdOf(response: Response): string {
  return String(response.locals.requestId ?? '');
}
