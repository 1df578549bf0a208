import type { Action, Asker, Role, Standing, Visibility } from '../../../shared/permissions.ts';
import { mayDo } from '../../../shared/permissions.ts';
import type { MeView } from '../../../shared/schemas/people.ts';

/** A library as far as it decides what somebody may do there. */
export interface AskedLibrary {
  slug: string;
  visibility: Visibility;
}

export type Person = NonNullable<MeView['person']>;

export function askerOf(person: Person | null): Asker {
  if (person === null) return { kind: 'nobody' };
  const roles = person.memberships.map((membership) => membership.role);
  return { kind: 'person', isAdmin: person.isAdmin, roles };
}

export function roleIn(person: Person | null, library: string): Role | null {
  return person?.memberships.find((membership) => membership.library === library)?.role ?? null;
}

export function standingIn(person: Person | null, { slug, visibility }: AskedLibrary): Standing {
  return { visibility, role: roleIn(person, slug), isOwn: false };
}

/** By the same table as the server; the server decides, this only says it beforehand. */
export function personMay(person: Person | null, action: Action, library?: AskedLibrary): boolean {
  return mayDo(action, askerOf(person), library && standingIn(person, library));
}
