import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { Role } from '../../../shared/permissions.ts';
import { memberList, memberView } from '../../../shared/schemas/members.ts';
import { apiDo, apiGet, apiSend } from '../../lib/api.ts';

const of = (library: string): string => `/libraries/${encodeURIComponent(library)}`;

export const memberKeys = { ofLibrary: (library: string) => ['members', library] as const };

export const membersQuery = (library: string) =>
  queryOptions({
    queryKey: memberKeys.ofLibrary(library),
    queryFn: async ({ signal }) => (await apiGet(memberList, `${of(library)}/members`, signal)).items,
  });

export function useSetRole(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ person, role }: { person: string; role: Role }) =>
      apiSend('PUT', memberView, `${of(library)}/members/${encodeURIComponent(person)}`, { role }),
    onSettled: () => client.invalidateQueries({ queryKey: memberKeys.ofLibrary(library) }),
  });
}

export function useRemoveMember(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (person: string) => apiDo('DELETE', `${of(library)}/members/${encodeURIComponent(person)}`),
    onSuccess: () => client.invalidateQueries({ queryKey: memberKeys.ofLibrary(library) }),
  });
}

export function useLeaveLibrary(library: string) {
  return useMutation({ mutationFn: () => apiDo('POST', `${of(library)}/leave`) });
}
