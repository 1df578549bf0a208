import { randomUUID } from 'node:crypto';
import { hashPassword } from 'better-auth/crypto';
import { AppError } from '../../../shared/errors.ts';
import type { Page } from '../../../shared/schemas/paging.ts';
import type {
  ChangePersonBody,
  MeView,
  PeopleQuery,
  PersonView,
  SessionView,
} from '../../../shared/schemas/people.ts';
import type { Actor } from '../../actor.ts';
import type { PersonCaller } from '../../auth/caller.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { decodeCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { AuditService } from '../audit/audit.service.ts';
import { presentPerson, presentSession } from './people.present.ts';
import { createPeopleRepo, type UserRow } from './people.repo.ts';

export interface NewPerson {
  name: string;
  email: string;
  password: string;
}

/** Accounts and where they are signed in. Passwords are checked elsewhere; here they are only set. */
export function createPeopleService(deps: { client: DatabaseClient; clock: Clock; audit: AuditService }) {
  const { client, audit } = deps;
  const repo = createPeopleRepo(client.db);
  const now = () => new Date(deps.clock());

  function require(id: string): UserRow {
    const user = repo.find(id);
    if (!user) throw new AppError('not_found', 'There is no such person.');
    return user;
  }

  function insert(given: { name: string; email: string }, more: Partial<UserRow> = {}): UserRow {
    const at = now();
    const row = { id: randomUUID(), ...given, emailVerified: true, createdAt: at, updatedAt: at, ...more };
    return repo.insert(row);
  }

  return {
    require,
    findByEmail: (email: string) => repo.findByEmail(email),
    isActive: (id: string): boolean => repo.find(id)?.disabledAt === null,
    hasRealPeople: repo.hasRealPeople,
    hash: hashPassword,

    /** The first admin of a site; `conflict` where somebody has been faster. */
    makeFirstAdmin({ name, email }: NewPerson, passwordHash: string): UserRow {
      return inTransaction(client, () => {
        if (repo.hasRealPeople()) throw new AppError('conflict', 'This site has been set up already.');
        const user = insert({ name, email }, { isAdmin: true });
        repo.setPassword(user.id, passwordHash, randomUUID(), now());
        audit.record({ id: user.id, name }, 'site set up', null, name);
        return user;
      });
    },
    /**
     * An account for an address that its owner has proved. One that somebody made before without proof is
     * taken over: its password and sessions are gone.
     */
    makeProved({ name, email }: NewPerson, passwordHash: string): UserRow {
      return inTransaction(client, () => {
        const known = repo.findByEmail(email);
        if (known?.emailVerified) throw new AppError('conflict', 'This address has an account; sign in.');
        if (known) repo.deleteSessions(known.id);
        const user =
          (known && repo.update(known.id, { name, emailVerified: true, updatedAt: now() })) ??
          insert({ name, email });
        repo.setPassword(user.id, passwordHash, randomUUID(), now());
        audit.record({ id: user.id, name }, 'account made', null, name);
        return user;
      });
    },
    /** An invented person, without a password; found again where it is there already. */
    ensureDemoPerson(given: { name: string; email: string; isAdmin: boolean }): UserRow {
      const known = repo.findByEmail(given.email);
      if (known && !known.isDemo)
        throw new AppError('conflict', `${given.email} is a real person's address.`);
      return known ?? insert(given, { isAdmin: given.isAdmin, isDemo: true });
    },
    listDemo: () => repo.listDemo().map((user) => ({ user, memberships: repo.membershipsOf(user.id) })),

    describe(caller: PersonCaller): MeView['person'] {
      const { id, name, email, isAdmin, isDemo } = caller;
      return { id, name, email, isAdmin, isDemo, memberships: repo.membershipsOf(id) };
    },
    rename(actor: Actor, id: string, name: string): void {
      inTransaction(client, () => {
        const before = require(id);
        repo.update(id, { name, updatedAt: now() });
        audit.record(actor, 'person renamed', null, name, { before: before.name });
      });
    },
    /** The mail's link has proved the address as well. */
    recordPasswordReset({ id, name }: { id: string; name: string }): void {
      inTransaction(client, () => {
        repo.update(id, { emailVerified: true, updatedAt: now() });
        audit.record({ id, name }, 'password reset', null, name);
      });
    },
    /** Once its address has been proved. */
    recordAccount: ({ id, name }: { id: string; name: string }) =>
      audit.record({ id, name }, 'account made', null, name),
    recordPasswordChange: (actor: Actor) => audit.record(actor, 'password changed', null, actor.name),

    list(query: PeopleQuery): Page<PersonView> {
      const cursor = decodeCursor(query.cursor, ['string', 'string']);
      const after: [string, string] | undefined = cursor && [String(cursor[0]), String(cursor[1])];
      const rows = repo.listQuery({ text: query.text, after, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, ({ user }) => [user.name, user.id], presentPerson);
    },
    /** Disables (and signs out everywhere at once), enables, makes an admin or no longer one. */
    change(actor: Actor, id: string, body: ChangePersonBody): PersonView {
      return inTransaction(client, () => {
        const user = require(id);
        const isAdmin = body.isAdmin ?? user.isAdmin;
        const isDisabled = body.isDisabled ?? user.disabledAt !== null;
        const wasActiveAdmin = user.isAdmin && user.disabledAt === null;
        if (wasActiveAdmin && !(isAdmin && !isDisabled) && repo.countOtherAdmins(id) === 0)
          throw new AppError('conflict', 'This is the only admin of the site; make another one first.');
        const disabledAt = isDisabled ? (user.disabledAt ?? now()) : null;
        const changed = repo.update(id, { isAdmin, disabledAt, updatedAt: now() }) ?? user;
        if (isDisabled) repo.deleteSessions(id);
        if (isDisabled !== (user.disabledAt !== null))
          audit.record(actor, isDisabled ? 'person disabled' : 'person enabled', null, user.name, {
            person: id,
          });
        if (isAdmin !== user.isAdmin)
          audit.record(actor, isAdmin ? 'admin made' : 'admin unmade', null, user.name, { person: id });
        return presentPerson({ user: changed, libraryCount: repo.membershipsOf(id).length });
      });
    },

    listSessions: (caller: PersonCaller): SessionView[] =>
      repo.listSessions(caller.id, now()).map((row) => presentSession(row, caller.sessionId)),
    endSession(caller: PersonCaller, id: string): void {
      if (repo.deleteSessions(caller.id, [id]) === 0)
        throw new AppError('not_found', 'You are not signed in there.');
    },
    endAllSessions(caller: PersonCaller): void {
      inTransaction(client, () => {
        repo.deleteSessions(caller.id);
        audit.record({ id: caller.id, name: caller.name }, 'signed out everywhere', null, caller.name);
      });
    },
    /** Whether a session that was good a while ago still is: its person could have been disabled meanwhile. */
    isSessionGood({ id, sessionId }: PersonCaller): boolean {
      const session = repo.findSession(sessionId);
      return session !== undefined && session.userId === id && session.expiresAt > now();
    },
  };
}

export type PeopleService = ReturnType<typeof createPeopleService>;
