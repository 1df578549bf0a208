import { Router } from 'express';
import { AppError } from '../../../shared/errors.ts';
import { type DemoPersonView, demoSignInBody } from '../../../shared/schemas/people.ts';
import type { Identity } from '../../auth/identity.ts';
import { parseBody } from '../../http/parse-request.ts';
import { needs } from '../../http/permissions.ts';
import type { PeopleService } from './people.service.ts';

/** Signing in as one of the demo's invented people; where there is no demo, there is nothing here. */
export function demoRoutes(identity: Identity, people: PeopleService): Router {
  const router = Router();
  function requireDemo(): void {
    if (!identity.hasDemo) throw new AppError('not_found', 'There is no demo on this server.');
  }
  router.get('/demo/people', needs('session.open'), (_request, response) => {
    requireDemo();
    const items = people.listDemo().map(({ user, memberships: [first] }): DemoPersonView => {
      const { id, name, isAdmin } = user;
      return { id, name, isAdmin, role: first?.role ?? null, library: first?.library ?? null };
    });
    response.json({ items });
  });
  router.post('/demo/sign-in', needs('session.open'), async (request, response) => {
    requireDemo();
    const { person } = parseBody(demoSignInBody, request);
    const known = people.listDemo().find(({ user }) => user.id === person);
    if (!known) throw new AppError('not_found', 'This is nobody of the demo.');
    await identity.openSession(request, response, known.user.id);
    response.status(204).end();
  });
  return router;
}
