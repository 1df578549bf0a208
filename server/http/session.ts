import type { RequestHandler, Response } from 'express';
import { type Actor, localActor } from '../actor.ts';

/**
 * Says who makes a request. The server listens to this machine alone, so whoever reaches it is the person
 * at it; routes ask `actorOf` and nothing else, so that they need not change when people sign in.
 */
export const session: RequestHandler = (_request, response, next) => {
  response.locals.actor = localActor;
  next();
};

export function actorOf(response: Response): Actor {
  const actor: unknown = response.locals.actor;
  if (typeof actor === 'object' && actor !== null && 'name' in actor && typeof actor.name === 'string')
    return { name: actor.name };
  throw new TypeError('A route asked who acts before the session was set up');
}
