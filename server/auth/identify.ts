import type { Request, Response } from 'express';
import { AppError } from '../../shared/errors.ts';
import type { PeopleService } from '../features/people/people.service.ts';
import type { TokensService } from '../features/tokens/tokens.service.ts';
import type { Auth } from './auth.ts';
import { authCall, authHeaders } from './auth-call.ts';
import { type Caller, nobody } from './caller.ts';

export interface IdentifyDeps {
  auth: Auth;
  people: PeopleService;
  tokens: TokensService;
  hasDemo: boolean;
}

const bearer = /^Bearer +([A-Za-z0-9_-]{1,200})$/i;

/** Who makes a request: by a token if there is one, else by the cookie of a session. */
export async function identify(deps: IdentifyDeps, request: Request, response: Response): Promise<Caller> {
  const authorization = request.get('authorization');
  if (authorization !== undefined) {
    const bot = deps.tokens.identify(bearer.exec(authorization)?.[1] ?? '');
    // Never on to the cookie: who sends a token means to be held to it.
    if (!bot) throw new AppError('unauthenticated', 'This token is not known, or no longer good.');
    return bot;
  }
  if (request.get('cookie') === undefined) return nobody;
  const headers = authHeaders(request);
  const found = await authCall(response, () => deps.auth.api.getSession({ headers, returnHeaders: true }));
  if (!found) return nobody;
  const { user, session } = found;
  const isDemo = user.isDemo === true;
  if (user.disabledAt || (isDemo && !deps.hasDemo)) return nobody;
  return {
    kind: 'person',
    id: user.id,
    name: user.name,
    email: user.email,
    isAdmin: user.isAdmin === true,
    isDemo,
    sessionId: session.id,
  };
}

/** Whether what a caller came with still counts. */
export function isCallerStillGood(deps: Pick<IdentifyDeps, 'people' | 'tokens'>, caller: Caller): boolean {
  if (caller.kind === 'person') return deps.people.isSessionGood(caller);
  return caller.kind === 'bot' && deps.tokens.isStillGood(caller.tokenId);
}
