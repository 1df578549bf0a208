import { createAuthEndpoint } from 'better-auth/api';
import { setSessionCookie } from 'better-auth/cookies';
import type { BetterAuthPlugin } from 'better-auth/types';
import { z } from 'zod';
import { AppError } from '../../shared/errors.ts';

/**
 * Opens a session for a person whom the server knows by other means than a password: the first admin, who
 * has just made one; whoever holds an invitation; an invented person of the demo. Called by the server's own
 * code; the package's own handler of requests is not mounted, so that no request reaches it.
 */
export const openSession = {
  id: 'open-session',
  endpoints: {
    openSessionFor: createAuthEndpoint(
      '/open-session-for',
      { method: 'POST', body: z.object({ userId: z.string() }), metadata: { SERVER_ONLY: true } },
      async (context) => {
        const { internalAdapter } = context.context;
        const user = await internalAdapter.findUserById(context.body.userId);
        if (!user) throw new AppError('not_found', 'There is no such person.');
        const session = await internalAdapter.createSession(user.id);
        await setSessionCookie(context, { session, user });
        return context.json({ opened: true });
      },
    ),
  },
} satisfies BetterAuthPlugin;
