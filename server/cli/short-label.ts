import { basename } from 'node:path';

/** What to call a build: the first seven digits of its commit, else the folder's name. */
export function shortLabel(build: { commit: string | null; folder: string }): string {
  return build.commit === null ? basename(build.folder) : build.commit.slice(0, 7);
}
