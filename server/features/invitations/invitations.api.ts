import { z } from 'zod';
import {
  invitationList,
  invitationTokenBody,
  invitationView,
  inviteBody,
  openInvitationView,
} from '../../../shared/schemas/invitations.ts';
import { type ApiEntry, created, empty, named, ok } from '../../openapi/entry.ts';

const chapter = 'Invitations';
const refusals = ['invalid', 'unauthenticated', 'forbidden', 'not_found'] as const;
const invitation = named('Invitation', invitationView);
const token = named('InvitationToken', invitationTokenBody);

export const invitationsApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/libraries/:library/invitations',
    chapter,
    summary: 'Lists the invitations to a library, newest first.',
    answers: [ok(named('InvitationList', invitationList))],
    problems: refusals,
  },
  {
    method: 'post',
    path: '/libraries/:library/invitations',
    chapter,
    summary: 'Invites an address; the link is in the mail alone.',
    body: named('Invite', inviteBody),
    answers: [created(invitation, 'A mail is on its way.')],
    problems: [...refusals, 'conflict'],
  },
  {
    method: 'post',
    path: '/libraries/:library/invitations/:invitation/resend',
    chapter,
    summary: 'Sends an invitation again, under a new link.',
    answers: [ok(invitation)],
    problems: [...refusals, 'conflict'],
  },
  {
    method: 'delete',
    path: '/libraries/:library/invitations/:invitation',
    chapter,
    summary: 'Revokes an invitation.',
    answers: [empty()],
    problems: [...refusals, 'conflict'],
  },
  {
    method: 'post',
    path: '/invitations/look',
    chapter,
    summary: 'Shows the invitation that a link is for.',
    body: token,
    answers: [ok(named('OpenInvitation', openInvitationView))],
    problems: ['invalid', 'gone'],
  },
  {
    method: 'post',
    path: '/invitations/accept',
    chapter,
    summary: 'Accepts an invitation to the address that one is signed in with.',
    body: token,
    answers: [ok(named('AcceptedInvitation', z.strictObject({ library: z.string() })))],
    problems: ['invalid', 'unauthenticated', 'forbidden', 'gone'],
  },
];
