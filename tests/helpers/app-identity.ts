import { createIdentity, type Identity } from '../../server/auth/identity.ts';
import type { DatabaseClient } from '../../server/db/client.ts';
import type { Services } from '../../server/features/services.ts';

export type IdentityChoices = Partial<Pick<Identity, 'hasDemo' | 'signUp'> & { isSecure: boolean }>;

/** Who somebody is, for an app under test: the demo is on and anyone may sign up, unless it is said otherwise. */
export function testIdentity(
  client: DatabaseClient,
  services: Services,
  { hasDemo = true, signUp = 'open', isSecure = false }: IdentityChoices = {},
): Identity {
  const secret = 'a secret of the tests, known to everybody';
  return createIdentity({ client, services, secret, isSecure, hasDemo, signUp });
}
