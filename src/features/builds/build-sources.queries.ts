import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  buildLog,
  buildPreviewView,
  buildView,
  gitRefs,
  type PreviewBuildBody,
  type RegisterPreviewBody,
} from '../../../shared/schemas/builds.ts';
import { apiGet, apiSend, toQuery } from '../../lib/api.ts';
import { uploadFile } from '../../lib/upload.ts';
import { buildKeys } from './builds.queries.ts';

const previewsOf = (library: string): string => `/libraries/${encodeURIComponent(library)}/build-previews`;
const hour = 3_600_000;

/** Branches and tags of a repository. */
export const gitRefsQuery = (address: string) =>
  queryOptions({
    queryKey: ['git-refs', address] as const,
    queryFn: ({ signal }) => apiGet(gitRefs, `/git-refs${toQuery({ address })}`, signal),
    staleTime: 60_000,
    retry: false,
  });

export const previewQuery = (library: string, preview: number) =>
  queryOptions({
    queryKey: ['build-previews', library, preview] as const,
    queryFn: ({ signal }) => apiGet(buildPreviewView, `${previewsOf(library)}/${preview}`, signal),
    staleTime: hour,
  });

/** Looks at a repository or a folder; nothing of it is run. */
export function usePreviewBuild(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: PreviewBuildBody) => apiSend('POST', buildPreviewView, previewsOf(library), body),
    onSuccess: (preview) => client.setQueryData(previewQuery(library, preview.id).queryKey, preview),
  });
}

export interface ArchiveUpload {
  file: File;
  onProgress: (share: number) => void;
  signal: AbortSignal;
}

/** Sends an archive and looks into it. */
export function usePreviewArchive(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (upload: ArchiveUpload) =>
      uploadFile(buildPreviewView, previewsOf(library), { field: 'archive', ...upload }),
    onSuccess: (preview) => client.setQueryData(previewQuery(library, preview.id).queryKey, preview),
  });
}

export function useRegisterPreview(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: RegisterPreviewBody) =>
      apiSend('POST', buildView, `/libraries/${encodeURIComponent(library)}/builds`, body),
    onSuccess: () => client.invalidateQueries({ queryKey: buildKeys.all }),
  });
}

export const buildLogQuery = (build: number) =>
  queryOptions({
    queryKey: ['build-log', build] as const,
    queryFn: ({ signal }) => apiGet(buildLog, `/builds/${build}/log`, signal),
  });
