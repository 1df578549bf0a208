import type { Request, RequestHandler, Router } from 'express';
import { z } from 'zod';
import { type Action, permissions } from '../../shared/permissions.ts';
import { rowId, slug } from '../../shared/schemas/paging.ts';
import type { Target } from '../auth/access.repo.ts';
import { parseRequest } from './parse-request.ts';
import { accessOf } from './session.ts';

const declared = new WeakMap<object, Action>();

/** What a request is about, for actions on a library. Throws `invalid` where it cannot be read. */
export type FindTargets = (request: Request) => Target | Target[];

/**
 * Says what a route needs, and lets nobody else pass. Stands first in each route: a body that is not allowed
 * is not even looked at.
 */
export function needs(action: Action, targetsOf?: FindTargets): RequestHandler {
  if ((permissions[action].on === 'library') !== (targetsOf !== undefined))
    throw new TypeError(`${action}: actions on a library need to know which, others do not`);
  const handler: RequestHandler = (request, response, next) => {
    accessOf(response).require(action, targetsOf ? [targetsOf(request)].flat() : []);
    next();
  };
  declared.set(handler, action);
  return handler;
}

/** For a route that needs one thing or another, by what is asked of it. */
export function needsEither(
  isFirst: (request: Request) => boolean,
  first: RequestHandler,
  second: RequestHandler,
): RequestHandler {
  const handler: RequestHandler = (request, response, next) =>
    (isFirst(request) ? first : second)(request, response, next);
  const action = declared.get(first);
  if (action === undefined || !declared.has(second)) throw new TypeError('Both have to say what they need');
  declared.set(handler, action);
  return handler;
}

const libraryAddress = z.object({ library: slug });
export const ofLibrary: FindTargets = (request) => parseRequest(libraryAddress, request.params, 'address');

function byNumber(read: (id: number) => Target, name: string): FindTargets {
  const address = z.object({ [name]: rowId });
  return (request) => read(parseRequest(address, request.params, 'address')[name] ?? 0);
}
export const ofBuild = byNumber((build) => ({ build }), 'build');
export const ofRun = byNumber((run) => ({ run }), 'run');
export const ofSolve = byNumber((solve) => ({ solve }), 'solve');
export const ofReference = byNumber((reference) => ({ reference }), 'revision');

const sides = z.object({
  candidate: rowId,
  reference: rowId.optional(),
  revision: rowId.optional(),
});
/** Both sides of a comparison. */
export const ofComparison: FindTargets = (request) => {
  const { candidate, reference, revision } = parseRequest(sides, request.query, 'query');
  const targets: Target[] = [{ run: candidate }];
  if (reference !== undefined) targets.push({ run: reference });
  if (revision !== undefined) targets.push({ reference: revision });
  return targets;
};

export interface DeclaredRoute {
  method: string;
  path: string;
  action: Action;
}

interface RouterLike {
  stack: readonly {
    handle?: unknown;
    route?: { path?: unknown; stack: readonly { method: string; handle: unknown }[] } | undefined;
  }[];
}

function isRouter(value: unknown): value is RouterLike {
  return typeof value === 'function' && 'stack' in value && Array.isArray(value.stack);
}

/**
 * Every route of a router with what it needs. Throws for one that does not say so first of all: the server
 * does not start with a door that nobody has thought about.
 */
export function declaredRoutes(router: Router): DeclaredRoute[] {
  const walk = (one: RouterLike): DeclaredRoute[] =>
    one.stack.flatMap((layer) => {
      if (!layer.route) return isRouter(layer.handle) ? walk(layer.handle) : [];
      const path = String(layer.route.path);
      const first = layer.route.stack[0];
      const action = typeof first?.handle === 'function' ? declared.get(first.handle) : undefined;
      const methods = new Set(layer.route.stack.map((handler) => handler.method));
      if (action === undefined || methods.size !== 1)
        throw new TypeError(`The route ${[...methods].join(', ')} ${path} does not say what it needs`);
      return [...methods].map((method) => ({ method, path, action }));
    });
  return isRouter(router) ? walk(router) : [];
}
