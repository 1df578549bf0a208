import { readFile, realpath, stat } from 'node:fs/promises';
import { basename, join } from 'node:path';
import { execa } from 'execa';
import { AppError } from '../../shared/errors.ts';
import type { Recipe } from '../../shared/schemas/builds.ts';
import { MANIFEST_NAME, readManifest } from './manifest.ts';

/** A folder on this machine that holds a prepared checkout. */
export interface BuildFolder {
  /** Without links in its path. */
  folder: string;
  manifest: Recipe;
  manifestText: string;
  /** Full hash where the folder is the top of a clean Git checkout, else null. */
  commit: string | null;
  /** The beginning of the commit, or the folder's name. */
  label: string;
}

/** Throws AppError where the folder or its manifest cannot be read, or the manifest is wrong. */
export async function openBuildFolder(dir: string): Promise<BuildFolder> {
  const folder = await realpath(dir).catch((cause: unknown) => {
    throw new AppError('not_found', `There is no folder ${dir}.`, { cause });
  });
  if (!(await stat(folder)).isDirectory()) throw new AppError('invalid', `${dir} is no folder.`);
  const manifestText = await readFile(join(folder, MANIFEST_NAME), 'utf8').catch((cause: unknown) => {
    throw new AppError('not_found', `There is no ${MANIFEST_NAME} in ${dir}.`, { cause });
  });
  const { manifest } = readManifest(manifestText);
  const commit = await cleanCommit(folder);
  return { folder, manifest, manifestText, commit, label: commit?.slice(0, 10) ?? basename(folder) };
}

/** The commit that is checked out, if the folder is the top of a checkout and nothing in it differs from it. */
async function cleanCommit(folder: string): Promise<string | null> {
  const top = await git(folder, ['rev-parse', '--show-toplevel']);
  if (top === null || (await realpath(top).catch(() => null)) !== folder) return null;
  const status = await git(folder, ['status', '--porcelain', '--untracked-files=normal']);
  if (status !== '') return null;
  const hash = await git(folder, ['rev-parse', '--verify', 'HEAD^{commit}']);
  return hash !== null && /^[0-9a-f]{40}([0-9a-f]{24})?$/.test(hash) ? hash : null;
}

/** Output of a Git command, null where it fails or where there is no Git. Nothing of the folder's own runs. */
async function git(folder: string, argv: string[]): Promise<string | null> {
  const safe = ['-c', 'core.fsmonitor=false', '-c', 'core.hooksPath=/dev/null', '--no-optional-locks'];
  const result = await execa('git', [...safe, ...argv], { cwd: folder, reject: false, timeout: 20_000 });
  return result.failed ? null : result.stdout.trim();
}
