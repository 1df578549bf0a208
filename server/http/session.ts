import type { Request, RequestHandler, Response } from 'express';
import type { Actor } from '../actor.ts';
import type { Access } from '../auth/access.ts';
import type { PersonCaller } from '../auth/caller.ts';

const accesses = new WeakMap<Response, Access>();

/** Finds out who makes a request, before any route. */
export function session(identify: (request: Request, response: Response) => Promise<Access>): RequestHandler {
  return async (request, response, next) => {
    accesses.set(response, await identify(request, response));
    next();
  };
}

/** What the one who makes the request may do. */
export function accessOf(response: Response): Access {
  const access = accesses.get(response);
  if (!access) throw new TypeError('A route asked who acts before the session was set up');
  return access;
}

export const actorOf = (response: Response): Actor => accessOf(response).actor;

/** The person who makes the request; throws for a bot and for one who is not signed in. */
export const personOf = (response: Response): PersonCaller => accessOf(response).person();
