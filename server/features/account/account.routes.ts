import { Router } from 'express';
import { z } from 'zod';
import { changeAccountBody, changePasswordBody } from '../../../shared/schemas/people.ts';
import { authCall, authHeaders } from '../../auth/auth-call.ts';
import type { Identity } from '../../auth/identity.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs } from '../../http/permissions.ts';
import { limitRate } from '../../http/rate-limit.ts';
import { accessOf, actorOf, personOf } from '../../http/session.ts';
import { passwordChangedMail } from '../../mail/templates.ts';
import type { Services } from '../services.ts';

const bySession = z.object({ session: z.string().min(1).max(100) });

/** What people do with their own account. */
export function accountRoutes(identity: Identity, { people, mail }: Services): Router {
  const { api } = identity.auth;
  const router = Router();

  router.get('/me', needs('about.read'), (_request, response) => {
    const { caller } = accessOf(response);
    response.json({ person: caller.kind === 'person' ? people.describe(caller) : null });
  });
  router.patch('/account', needs('account.use'), (request, response) => {
    people.rename(actorOf(response), personOf(response).id, parseBody(changeAccountBody, request).name);
    response.status(204).end();
  });
  const guessing = limitRate({ minutes: 15, most: 10, onlyFailures: true });
  router.post('/account/password', needs('account.use'), guessing, async (request, response) => {
    const { current, next } = parseBody(changePasswordBody, request);
    const person = personOf(response);
    const body = { currentPassword: current, newPassword: next, revokeOtherSessions: true };
    const headers = authHeaders(request);
    await authCall(response, () => api.changePassword({ body, headers, returnHeaders: true }));
    people.recordPasswordChange(actorOf(response));
    mail.send(person.email, passwordChangedMail(person.name));
    response.status(204).end();
  });
  router.get('/account/sessions', needs('account.use'), (_request, response) => {
    response.json({ items: people.listSessions(personOf(response)) });
  });
  router.delete('/account/sessions/:session', needs('account.use'), (request, response) => {
    people.endSession(personOf(response), parseRequest(bySession, request.params, 'address').session);
    response.status(204).end();
  });
  router.post('/account/sign-out-everywhere', needs('account.use'), async (request, response) => {
    people.endAllSessions(personOf(response));
    const headers = authHeaders(request);
    await authCall(response, () => api.signOut({ headers, returnHeaders: true }));
    response.status(204).end();
  });
  return router;
}
