import { Router } from 'express';
import { z } from 'zod';
import { rowId } from '../../../shared/schemas/paging.ts';
import { setUpBody } from '../../../shared/schemas/people.ts';
import { type AboutView, outboxQuery } from '../../../shared/schemas/site.ts';
import type { Identity } from '../../auth/identity.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs } from '../../http/permissions.ts';
import { limitRate } from '../../http/rate-limit.ts';
import { accessOf, actorOf } from '../../http/session.ts';
import type { Services } from '../services.ts';

const byId = z.object({ mail: rowId });

/** The site as a whole: what it is, how it gets its first admin, and the mails that it sends. */
export function siteRoutes(identity: Identity, services: Services, mailCatcher: () => string | null): Router {
  const router = Router();
  router.get('/about', needs('about.read'), (_request, response) => {
    const isKnown = accessOf(response).caller.kind !== 'nobody';
    const about: AboutView = {
      name: 'Tallyroot',
      signUp: identity.signUp,
      hasDemo: identity.hasDemo,
      mailCatcher: mailCatcher(),
      environment: isKnown ? services.environment : null,
    };
    response.json(about);
  });
  router.get('/setup', needs('session.open'), (_request, response) => {
    response.json({ isOpen: identity.setUp.isOpen() });
  });
  const guessing = limitRate({ minutes: 15, most: 10 });
  router.post('/setup', needs('session.open'), guessing, async (request, response) => {
    const { id } = await identity.setUp.makeFirstAdmin(parseBody(setUpBody, request));
    await identity.openSession(request, response, id);
    response.status(201).json({ isSignedIn: true });
  });
  router.get('/site/outbox', needs('site.mail'), (request, response) => {
    response.json(services.mail.list(parseRequest(outboxQuery, request.query, 'query')));
  });
  router.post('/site/outbox/:mail/retry', needs('site.mail'), (request, response) => {
    const { mail } = parseRequest(byId, request.params, 'address');
    response.json(services.mail.retry(actorOf(response), mail));
  });
  return router;
}
