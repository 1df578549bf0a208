import type { Request, Response } from 'express';
import type { AboutView } from '../../shared/schemas/site.ts';
import type { DatabaseClient } from '../db/client.ts';
import type { Services } from '../features/services.ts';
import { createAccessRepo } from './access.repo.ts';
import { createAccess } from './access.ts';
import { createAuth } from './auth.ts';
import { authCall, authHeaders } from './auth-call.ts';
import { identify, isCallerStillGood } from './identify.ts';
import { createSetUp } from './set-up.ts';

export interface IdentityOptions {
  client: DatabaseClient;
  services: Services;
  secret: string;
  isSecure: boolean;
  hasDemo: boolean;
  signUp: AboutView['signUp'];
}

/** Everything about who somebody is and what they may do, for the web server. */
export function createIdentity(options: IdentityOptions) {
  const { client, services, hasDemo, signUp } = options;
  const { people, tokens, mail, address } = services;
  const auth = createAuth({
    client,
    people,
    mail,
    address,
    secret: options.secret,
    isSecure: options.isSecure,
  });
  const deps = { auth, people, tokens, hasDemo };
  const accessDeps = {
    repo: createAccessRepo(client.db),
    isStillGood: (caller: Parameters<typeof isCallerStillGood>[1]) => isCallerStillGood(deps, caller),
  };
  return {
    auth,
    hasDemo,
    signUp,
    setUp: createSetUp({ people, hasDemo }),
    identify: async (request: Request, response: Response) =>
      createAccess(accessDeps, await identify(deps, request, response)),
    /** Signs a person in without a password; for those whom the server knows otherwise. */
    async openSession(request: Request, response: Response, userId: string): Promise<void> {
      const headers = authHeaders(request);
      await authCall(response, () =>
        auth.api.openSessionFor({ body: { userId }, headers, returnHeaders: true }),
      );
    },
  };
}

export type Identity = ReturnType<typeof createIdentity>;
