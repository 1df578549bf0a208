import { Router } from 'express';
import { z } from 'zod';
import { invitationTokenBody, inviteBody } from '../../../shared/schemas/invitations.ts';
import { rowId, slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary } from '../../http/permissions.ts';
import { actorOf, personOf } from '../../http/session.ts';
import type { InvitationsService } from './invitations.service.ts';

const inLibrary = z.object({ library: slug });
const ofInvitation = z.object({ library: slug, invitation: rowId });

export function invitationsRoutes(invitations: InvitationsService): Router {
  const router = Router();
  const list = '/libraries/:library/invitations';
  router.get(list, needs('members.edit', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.json({ items: invitations.list(library) });
  });
  router.post(list, needs('members.edit', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.status(201).json(invitations.invite(actorOf(response), library, parseBody(inviteBody, request)));
  });
  router.post(`${list}/:invitation/resend`, needs('members.edit', ofLibrary), (request, response) => {
    const { library, invitation } = parseRequest(ofInvitation, request.params, 'address');
    response.json(invitations.resend(actorOf(response), library, invitation));
  });
  router.delete(`${list}/:invitation`, needs('members.edit', ofLibrary), (request, response) => {
    const { library, invitation } = parseRequest(ofInvitation, request.params, 'address');
    invitations.revoke(actorOf(response), library, invitation);
    response.status(204).end();
  });
  // What the link carries comes in the body: addresses are written into logs.
  router.post('/invitations/look', needs('session.open'), (request, response) => {
    response.json(invitations.look(parseBody(invitationTokenBody, request).token));
  });
  router.post('/invitations/accept', needs('account.use'), (request, response) => {
    const { token } = parseBody(invitationTokenBody, request);
    response.json({ library: invitations.accept(token, personOf(response)) });
  });
  return router;
}
