import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import {
  type InviteBody,
  invitationList,
  invitationView,
  openInvitationView,
} from '../../../shared/schemas/invitations.ts';
import { apiDo, apiGet, apiSend } from '../../lib/api.ts';

const of = (library: string): string => `/libraries/${encodeURIComponent(library)}/invitations`;

export const invitationKeys = {
  all: ['invitations'] as const,
  ofLibrary: (library: string) => ['invitations', 'library', library] as const,
};

export const invitationsQuery = (library: string) =>
  queryOptions({
    queryKey: invitationKeys.ofLibrary(library),
    queryFn: async ({ signal }) => (await apiGet(invitationList, of(library), signal)).items,
  });

/** What the holder of a link sees. It goes in a body: addresses are written into logs. */
export const openInvitationQuery = (token: string) =>
  queryOptions({
    queryKey: ['session', 'invitation', token] as const,
    queryFn: () => apiSend('POST', openInvitationView, '/invitations/look', { token }),
    retry: false,
  });

export const useAcceptInvitation = () =>
  useMutation({
    mutationFn: (token: string) =>
      apiSend('POST', z.strictObject({ library: z.string() }), '/invitations/accept', { token }),
  });

export function useInvite(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: InviteBody) => apiSend('POST', invitationView, of(library), body),
    onSuccess: () => client.invalidateQueries({ queryKey: invitationKeys.ofLibrary(library) }),
  });
}

export function useResendInvitation(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: number) => apiSend('POST', invitationView, `${of(library)}/${id}/resend`),
    onSuccess: () => client.invalidateQueries({ queryKey: invitationKeys.ofLibrary(library) }),
  });
}

export function useRevokeInvitation(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: number) => apiDo('DELETE', `${of(library)}/${id}`),
    onSuccess: () => client.invalidateQueries({ queryKey: invitationKeys.ofLibrary(library) }),
  });
}
