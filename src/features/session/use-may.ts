import { useQuery } from '@tanstack/react-query';
import type { Action } from '../../../shared/permissions.ts';
import { type AskedLibrary, type Person, personMay } from './asker.ts';
import { meQuery } from './session.queries.ts';

/** Who is signed in; null while that is not known, too. */
export function usePerson(): Person | null {
  return useQuery(meQuery).data?.person ?? null;
}

/** Whether the person who is signed in may do something, on the site or in a library. */
export function useMay(): (action: Action, library?: AskedLibrary) => boolean {
  const person = usePerson();
  return (action, library) => personMay(person, action, library);
}

/**
 * The same for a library of which only the name is known. For actions that only members may do, whoever else
 * sees the library does not matter.
 */
export function useMayAsMember(library: string): (action: Action) => boolean {
  const person = usePerson();
  return (action) => personMay(person, action, { slug: library, visibility: 'private' });
}
