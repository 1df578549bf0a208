import { AppError } from '../../../shared/errors.ts';
import { type Role, roles } from '../../../shared/permissions.ts';
import type { MemberView } from '../../../shared/schemas/members.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import type { PeopleService } from '../people/people.service.ts';
import { toIso } from '../present-time.ts';
import type { MembersRepo, NamedMember } from './members.repo.ts';

function present({ member, name, email, disabledAt }: NamedMember, showsEmail: boolean): MemberView {
  return {
    person: member.userId,
    name,
    email: showsEmail ? email : null,
    role: member.role,
    isDisabled: disabledAt !== null,
    since: toIso(member.since),
  };
}

/** Who has which role in a library. A library that has a maintainer never comes to be without one. */
export function createMembersService(deps: {
  client: DatabaseClient;
  clock: Clock;
  audit: AuditService;
  libraries: LibrariesService;
  people: PeopleService;
  members: MembersRepo;
}) {
  const { client, audit, libraries, members } = deps;

  function requireMember(libraryId: number, person: string): NamedMember {
    const found = members.find(libraryId, person);
    if (!found) throw new AppError('not_found', 'This person is no member of the library.');
    return found;
  }

  function keepMaintainer(libraryId: number, { member }: NamedMember): void {
    if (member.role === 'maintainer' && members.countOtherMaintainers(libraryId, member.userId) === 0)
      throw new AppError('conflict', 'This is the only maintainer of the library; make another one first.');
  }

  function remove(
    actor: Actor,
    slug: string,
    person: string,
    action: 'member removed' | 'member left',
  ): void {
    const { id } = libraries.require(slug);
    inTransaction(client, () => {
      const found = requireMember(id, person);
      keepMaintainer(id, found);
      members.remove(id, person);
      audit.record(actor, action, id, found.name, { person, role: found.member.role });
    });
  }

  /** For those who have a right to be members by other means: who made the library, or was invited. */
  function add(actor: Actor, libraryId: number, person: string, role: Role): void {
    inTransaction(client, () => {
      const { name } = deps.people.require(person);
      const known = members.find(libraryId, person);
      if (known?.member.role === role) return;
      if (known) keepMaintainer(libraryId, known);
      members.set({ libraryId, userId: person, role, since: deps.clock() });
      audit.record(actor, 'member role set', libraryId, name, {
        person,
        role,
        before: known?.member.role ?? null,
      });
    });
  }

  return {
    add,
    /** Leaves the role of one who has a higher one already. */
    addAtLeast(actor: Actor, libraryId: number, person: string, role: Role): void {
      const known = members.find(libraryId, person)?.member.role;
      if (known === undefined || roles.indexOf(known) < roles.indexOf(role))
        add(actor, libraryId, person, role);
    },
    list(slug: string, showsEmail: boolean): MemberView[] {
      return members.list(libraries.require(slug).id).map((row) => present(row, showsEmail));
    },
    /**
     * Changes a member's role. Only the site's admins add people who are none (`mayAdd`): others invite, so
     * that nobody finds out by trying who has an account.
     */
    setRole(actor: Actor, slug: string, person: string, role: Role, mayAdd: boolean): MemberView {
      const { id } = libraries.require(slug);
      if (!mayAdd) requireMember(id, person);
      add(actor, id, person, role);
      return present(requireMember(id, person), true);
    },
    remove: (actor: Actor, slug: string, person: string) => remove(actor, slug, person, 'member removed'),
    leave: (actor: Actor, slug: string, person: string) => remove(actor, slug, person, 'member left'),
  };
}

export type MembersService = ReturnType<typeof createMembersService>;
