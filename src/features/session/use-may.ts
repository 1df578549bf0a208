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
