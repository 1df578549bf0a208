import { createHash } from 'node:crypto';
import { readFile, realpath, stat } from 'node:fs/promises';
import path from 'node:path';
import { simpleGit } from 'simple-git';
import { AppError } from '../../../shared/errors.ts';
import type { Recipe } from '../../../shared/schemas/builds.ts';

export const manifestName = 'tallyroot.yaml';
const manifestBytes = 65_536;

/** Throws an AppError that lists every issue with its line. */
export type ReadManifest = (text: string) => Recipe;

export interface BuildFolder {
  /** Absolute, with symbolic links resolved. */
  folder: string;
  recipe: Recipe;
  manifestHash: string;
  /** HEAD where the folder is the top of a Git checkout without changes to tracked files, else null. */
  commit: string | null;
  /** True where it is a checkout whose tracked files have been changed. */
  hasChanges: boolean;
}

function refuse(message: string, cause?: unknown): AppError {
  return new AppError('unprocessable', message, { issues: [{ path: 'folder', message }], cause });
}

/** Untracked files do not count: preparing a build and running it leave some. */
async function readCheckout(folder: string): Promise<Pick<BuildFolder, 'commit' | 'hasChanges'>> {
  const git = simpleGit({ baseDir: folder, timeout: { block: 10_000 } });
  try {
    const top = (await git.revparse(['--show-toplevel'])).trim();
    if ((await realpath(top)) !== folder) return { commit: null, hasChanges: false };
    const commit = (await git.revparse(['HEAD'])).trim();
    const { files } = await git.status(['--untracked-files=no']);
    return files.length === 0 ? { commit, hasChanges: false } : { commit: null, hasChanges: true };
  } catch {
    // Not a repository, no commit yet, or no Git on this machine: then the folder has no commit to show.
    return { commit: null, hasChanges: false };
  }
}

/** Reads what there is to know about a folder before anything in it is run. */
export async function readBuildFolder(folder: string, readManifest: ReadManifest): Promise<BuildFolder> {
  if (!path.isAbsolute(folder)) throw refuse('Give the folder as an absolute path.');
  let resolved: string;
  let text: string;
  try {
    resolved = await realpath(folder);
    const file = path.join(resolved, manifestName);
    const { size } = await stat(file);
    if (size > manifestBytes) throw refuse(`${manifestName} is longer than 64 KiB.`);
    text = await readFile(file, 'utf8');
  } catch (error) {
    if (error instanceof AppError) throw error;
    throw refuse(`There is no readable ${manifestName} in ${folder}.`, error);
  }
  return {
    folder: resolved,
    recipe: readManifest(text),
    manifestHash: createHash('sha256').update(text).digest('hex'),
    ...(await readCheckout(resolved)),
  };
}
