import { Router } from 'express';
import { z } from 'zod';
import { changePersonBody, peopleQuery } from '../../../shared/schemas/people.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs } from '../../http/permissions.ts';
import { actorOf } from '../../http/session.ts';
import type { PeopleService } from './people.service.ts';

const byId = z.object({ person: z.string().min(1).max(100) });

/** Everyone who has an account, for the site's admins. */
export function peopleRoutes(people: PeopleService): Router {
  const router = Router();
  router.get('/people', needs('site.people'), (request, response) => {
    response.json(people.list(parseRequest(peopleQuery, request.query, 'query')));
  });
  router.patch('/people/:person', needs('site.people'), (request, response) => {
    const { person } = parseRequest(byId, request.params, 'address');
    response.json(people.change(actorOf(response), person, parseBody(changePersonBody, request)));
  });
  return router;
}
