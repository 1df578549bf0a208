import { randomBytes } from 'node:crypto';
import { AppError } from '../../../shared/errors.ts';
import type { InvitationView, InviteBody, OpenInvitationView } from '../../../shared/schemas/invitations.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { MailService } from '../../mail/mail.service.ts';
import { invitationMail } from '../../mail/templates.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import type { MembersService } from '../members/members.service.ts';
import type { PeopleService } from '../people/people.service.ts';
import { toIso } from '../present-time.ts';
import { hashToken } from '../tokens/tokens.service.ts';
import { createInvitationsRepo, type InvitationRow } from './invitations.repo.ts';

const daysOpen = 7;
const dayMs = 24 * 60 * 60 * 1000;

/** Invitations to a library by mail: the link proves the address, and is good for that address alone. */
export function createInvitationsService(deps: {
  client: DatabaseClient;
  clock: Clock;
  audit: AuditService;
  libraries: LibrariesService;
  members: MembersService;
  people: PeopleService;
  mail: MailService;
  /** Where people reach the server. */
  address(): string;
}) {
  const { client, clock, audit, libraries, people } = deps;
  const repo = createInvitationsRepo(client.db);

  function stateOf(row: InvitationRow): InvitationView['state'] {
    if (row.acceptedAt !== null) return 'accepted';
    if (row.revokedAt !== null) return 'revoked';
    return row.expiresAt > clock() ? 'open' : 'expired';
  }

  function present(row: InvitationRow): InvitationView {
    const { id, email, role, createdBy } = row;
    const times = { createdAt: toIso(row.createdAt), expiresAt: toIso(row.expiresAt) };
    return { id, email, role, state: stateOf(row), createdBy, ...times };
  }

  const newToken = () => randomBytes(32).toString('base64url');

  function sendMail(row: InvitationRow, library: string, token: string, invitedBy: string): void {
    const address = `${deps.address()}/invitation#token=${token}`;
    deps.mail.send(
      row.email,
      invitationMail({ library, role: row.role, invitedBy, address, days: daysOpen }),
    );
  }

  function requireOpen(token: string): InvitationRow {
    const row = repo.findByHash(hashToken(token));
    if (!row || stateOf(row) !== 'open')
      throw new AppError('gone', 'This invitation is no longer good; ask for another one.');
    return row;
  }

  function requireIn(libraryId: number, id: number): InvitationRow {
    const row = repo.findIn(libraryId, id);
    if (!row) throw new AppError('not_found', `This library has no invitation ${id}.`);
    if (row.acceptedAt !== null) throw new AppError('conflict', 'This invitation has been accepted.');
    return row;
  }

  return {
    list: (slug: string): InvitationView[] => repo.list(libraries.require(slug).id).map(present),
    invite(actor: Actor, slug: string, { email, role }: InviteBody): InvitationView {
      const library = libraries.require(slug);
      return inTransaction(client, () => {
        if (repo.findOpen(library.id, email, clock()))
          throw new AppError('conflict', 'This address has an open invitation; send that one again.');
        const token = newToken();
        const row = repo.insert({
          libraryId: library.id,
          email,
          role,
          tokenHash: hashToken(token),
          createdAt: clock(),
          createdBy: actor.name,
          expiresAt: clock() + daysOpen * dayMs,
        });
        sendMail(row, library.name, token, actor.name);
        audit.record(actor, 'invitation sent', library.id, email, { role });
        return present(row);
      });
    },
    /** Under a new link; the one before is no longer good. */
    resend(actor: Actor, slug: string, id: number): InvitationView {
      const library = libraries.require(slug);
      return inTransaction(client, () => {
        const before = requireIn(library.id, id);
        if (before.revokedAt !== null) throw new AppError('conflict', 'This invitation has been revoked.');
        const token = newToken();
        const change = { tokenHash: hashToken(token), expiresAt: clock() + daysOpen * dayMs };
        const row = repo.update(id, change) ?? before;
        sendMail(row, library.name, token, actor.name);
        audit.record(actor, 'invitation sent again', library.id, row.email, { role: row.role });
        return present(row);
      });
    },
    revoke(actor: Actor, slug: string, id: number): void {
      const library = libraries.require(slug);
      inTransaction(client, () => {
        const row = requireIn(library.id, id);
        if (row.revokedAt !== null) return;
        repo.update(id, { revokedAt: clock() });
        audit.record(actor, 'invitation revoked', library.id, row.email, { role: row.role });
      });
    },
    look(token: string): OpenInvitationView {
      const row = requireOpen(token);
      const library = libraries.requireById(row.libraryId);
      return {
        library: library.slug,
        name: library.name,
        role: row.role,
        email: row.email,
        invitedBy: row.createdBy,
        expiresAt: toIso(row.expiresAt),
        hasAccount: people.findByEmail(row.email)?.emailVerified ?? false,
      };
    },
    /** The address that a link proves. */
    emailOf: (token: string): string => requireOpen(token).email,
    /** Makes a person a member; one who has a role already keeps it where it is the higher one. */
    accept(token: string, person: { id: string; name: string; email: string }): string {
      return inTransaction(client, () => {
        const row = requireOpen(token);
        const { slug } = libraries.requireById(row.libraryId);
        if (row.email !== person.email)
          throw new AppError('forbidden', 'This invitation is for another address; sign in with that one.');
        repo.update(row.id, { acceptedAt: clock() });
        const actor: Actor = { id: person.id, name: person.name };
        audit.record(actor, 'invitation accepted', row.libraryId, row.email, { role: row.role });
        deps.members.addAtLeast(actor, row.libraryId, person.id, row.role);
        return slug;
      });
    },
  };
}

export type InvitationsService = ReturnType<typeof createInvitationsService>;
