import { useQuery } from '@tanstack/react-query';
import type { Action } from '../../shared/permissions.ts';
import { libraryQuery } from '../features/libraries/libraries.queries.ts';
import { useMay } from '../features/session/use-may.ts';

/** Whether the person who is signed in may do something in a library; false until the library is known. */
export function useMayIn(slug: string): (action: Action) => boolean {
  const may = useMay();
  const library = useQuery(libraryQuery(slug)).data;
  return (action) => library !== undefined && may(action, library);
}
