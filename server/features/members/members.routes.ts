import { Router } from 'express';
import { z } from 'zod';
import { setRoleBody } from '../../../shared/schemas/members.ts';
import { slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary } from '../../http/permissions.ts';
import { accessOf, actorOf, personOf } from '../../http/session.ts';
import type { MembersService } from './members.service.ts';

const inLibrary = z.object({ library: slug });
const ofPerson = z.object({ library: slug, person: z.string().min(1).max(100) });

export function membersRoutes(members: MembersService): Router {
  const router = Router();
  router.get('/libraries/:library/members', needs('members.read', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    const showsEmail = accessOf(response).may('members.edit', { library });
    response.json({ items: members.list(library, showsEmail) });
  });
  router.put('/libraries/:library/members/:person', needs('members.edit', ofLibrary), (request, response) => {
    const { library, person } = parseRequest(ofPerson, request.params, 'address');
    const { role } = parseBody(setRoleBody, request);
    const mayAdd = accessOf(response).may('site.people');
    response.json(members.setRole(actorOf(response), library, person, role, mayAdd));
  });
  router.delete(
    '/libraries/:library/members/:person',
    needs('members.edit', ofLibrary),
    (request, response) => {
      const { library, person } = parseRequest(ofPerson, request.params, 'address');
      members.remove(actorOf(response), library, person);
      response.status(204).end();
    },
  );
  router.post('/libraries/:library/leave', needs('library.leave', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    members.leave(actorOf(response), library, personOf(response).id);
    response.status(204).end();
  });
  return router;
}
