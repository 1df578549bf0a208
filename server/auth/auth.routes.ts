import { type RequestHandler, Router } from 'express';
import { z } from 'zod';
import { AppError } from '../../shared/errors.ts';
import {
  emailBody,
  resetPasswordBody,
  signInBody,
  signUpBody,
  verifyEmailBody,
} from '../../shared/schemas/people.ts';
import type { Services } from '../features/services.ts';
import { parseBody } from '../http/parse-request.ts';
import { needs } from '../http/permissions.ts';
import { limitRate } from '../http/rate-limit.ts';
import { authCall, authHeaders } from './auth-call.ts';
import type { Identity } from './identity.ts';

const anyEmail = z.object({ email: z.string() });
const byEmail = ({ body }: { body?: unknown }) => anyEmail.safeParse(body).data?.email.toLowerCase() ?? '';

/** Counted for a client, whatever the account, and for an account, whoever tries. */
function limits(
  minutes: number,
  perClient: number,
  perAccount: number,
  onlyFailures = false,
): RequestHandler[] {
  return [
    limitRate({ minutes, most: perClient, onlyFailures }),
    limitRate({ minutes, most: perAccount, by: byEmail, onlyFailures }),
  ];
}

/** Signing up, in and out. No answer says whether an address has an account. */
export function authRoutes(identity: Identity, { people, invitations }: Services): Router {
  const { api } = identity.auth;
  const router = Router();
  const open = needs('session.open');
  const mailLimits = limits(60, 30, 6);

  router.post('/auth/sign-in/email', open, ...limits(15, 40, 10, true), async (request, response) => {
    const body = parseBody(signInBody, request);
    const headers = authHeaders(request);
    await authCall(response, () => api.signInEmail({ body, headers, returnHeaders: true }));
    response.status(204).end();
  });

  router.post('/auth/sign-up/email', open, ...mailLimits, async (request, response) => {
    const { invitation, ...body } = parseBody(signUpBody, request);
    if (identity.setUp.isOpen())
      throw new AppError('conflict', 'This site has not been set up; its first admin comes first.');
    if (invitation !== undefined) {
      if (invitations.emailOf(invitation) !== body.email)
        throw new AppError('forbidden', 'This invitation is for another address.');
      const person = people.makeProved(body, await people.hash(body.password));
      invitations.accept(invitation, person);
      await identity.openSession(request, response, person.id);
      response.status(201).json({ isSignedIn: true });
      return;
    }
    if (identity.signUp === 'invited')
      throw new AppError('forbidden', 'Accounts here are for people who have been invited to a library.');
    const headers = authHeaders(request);
    await authCall(response, () => api.signUpEmail({ body, headers, returnHeaders: true }));
    response.status(202).json({ isSignedIn: false });
  });

  router.post('/auth/sign-out', open, async (request, response) => {
    const headers = authHeaders(request);
    await authCall(response, () => api.signOut({ headers, returnHeaders: true }));
    response.status(204).end();
  });

  router.post('/auth/request-password-reset', open, ...mailLimits, async (request, response) => {
    const body = parseBody(emailBody, request);
    await authCall(response, () => api.requestPasswordReset({ body, returnHeaders: true }));
    response.status(202).json({ isSent: true });
  });

  router.post(
    '/auth/reset-password',
    open,
    limitRate({ minutes: 15, most: 40 }),
    async (request, response) => {
      const { token, password } = parseBody(resetPasswordBody, request);
      const body = { token, newPassword: password };
      await authCall(response, () => api.resetPassword({ body, returnHeaders: true }));
      response.status(204).end();
    },
  );

  router.post('/auth/send-verification-email', open, ...mailLimits, async (request, response) => {
    const body = parseBody(emailBody, request);
    await authCall(response, () => api.sendVerificationEmail({ body, returnHeaders: true }));
    response.status(202).json({ isSent: true });
  });

  router.post('/auth/verify-email', open, limitRate({ minutes: 15, most: 40 }), async (request, response) => {
    const query = parseBody(verifyEmailBody, request);
    await authCall(response, () => api.verifyEmail({ query, returnHeaders: true }));
    response.status(204).end();
  });
  return router;
}
