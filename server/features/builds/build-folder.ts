import { createHash } from 'node:crypto';
import { readFile, realpath, stat } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '../../../shared/errors.ts';
import type { Recipe } from '../../../shared/schemas/builds.ts';
import { type FolderCheckout, readFolderCheckout } from '../../builds/folder-checkout.ts';

export const manifestName = 'tallyroot.yaml';
const manifestBytes = 65_536;

/** Throws an AppError that lists every issue with its line. */
export type ReadManifest = (text: string) => Recipe;

export interface BuildFolder extends FolderCheckout {
  /** Absolute, with symbolic links resolved. */
  folder: string;
  recipe: Recipe;
  manifestHash: string;
}

function refuse(message: string, cause?: unknown): AppError {
  return new AppError('unprocessable', message, { issues: [{ path: 'folder', message }], cause });
}

/** Reads the manifest of a folder. Throws `unprocessable` where there is none, and what `readManifest` throws. */
export async function readManifestIn(
  folder: string,
  shown: string,
  readManifest: ReadManifest,
): Promise<{ recipe: Recipe; manifestHash: string }> {
  let text: string;
  try {
    const file = path.join(folder, manifestName);
    const { size } = await stat(file);
    if (size > manifestBytes) throw refuse(`${manifestName} is longer than 64 KiB.`);
    text = await readFile(file, 'utf8');
  } catch (error) {
    if (error instanceof AppError) throw error;
    throw refuse(`There is no readable ${manifestName} in ${shown}.`, error);
  }
  return { recipe: readManifest(text), manifestHash: createHash('sha256').update(text).digest('hex') };
}

/** The folder itself, behind symbolic links. */
export async function resolveFolder(folder: string): Promise<string> {
  if (!path.isAbsolute(folder)) throw refuse('Give the folder as an absolute path.');
  try {
    return await realpath(folder);
  } catch (error) {
    throw refuse(`There is no readable ${manifestName} in ${folder}.`, error);
  }
}

/** Reads what there is to know about a folder before anything in it is run. */
export async function readBuildFolder(folder: string, readManifest: ReadManifest): Promise<BuildFolder> {
  const resolved = await resolveFolder(folder);
  const manifest = await readManifestIn(resolved, folder, readManifest);
  return { folder: resolved, ...manifest, ...(await readFolderCheckout(resolved)) };
}
