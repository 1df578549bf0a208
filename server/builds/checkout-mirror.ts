import { lstatSync, readdirSync } from 'node:fs';
import { mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '../../shared/errors.ts';
import type { Address } from './checkout-address.ts';
import { readGit, runGit } from './checkout-process.ts';

/** A bare copy of one repository: a cache, made anew whenever something is wrong with it. */

export interface MirrorLimits {
  mirrorBytes: number;
  fetchMs: number;
}

const ADDRESS_FILE = 'tallyroot-address';
const QUICK_MS = 15_000;
const refspecs = ['+refs/heads/*:refs/heads/*', '+refs/tags/*:refs/tags/*'];

/** What lies below a folder, in bytes; files that vanish meanwhile do not count. */
export function folderBytes(folder: string): number {
  let total = 0;
  const walk = (here: string): void => {
    try {
      for (const entry of readdirSync(here, { withFileTypes: true })) {
        const name = path.join(here, entry.name);
        if (entry.isDirectory()) walk(name);
        else total += sizeOf(name);
      }
    } catch {
      // Git moves its temporary files while it works.
    }
  };
  walk(folder);
  return total;
}

function sizeOf(name: string): number {
  try {
    return lstatSync(name).size;
  } catch {
    return 0;
  }
}

const queues = new Map<string, Promise<unknown>>();

/** One at a time for each mirror: Git's own locks make the second one fail instead of wait. */
export async function withMirror<T>(mirror: string, work: () => Promise<T>): Promise<T> {
  const key = path.resolve(mirror);
  const before = queues.get(key) ?? Promise.resolve();
  const mine = before.then(work, work);
  const settled = mine.then(
    () => undefined,
    () => undefined,
  );
  queues.set(key, settled);
  try {
    return await mine;
  } finally {
    if (queues.get(key) === settled) queues.delete(key);
  }
}

async function hasMirror(mirror: string, address: Address): Promise<boolean> {
  let known: string;
  try {
    known = await readFile(path.join(mirror, ADDRESS_FILE), 'utf8');
  } catch {
    return false;
  }
  if (known !== address.text)
    throw new AppError('conflict', `The mirror at ${mirror} is that of another repository.`);
  return true;
}

/** Makes the mirror where there is none. An empty template: no hooks, no attributes, no excludes. */
export async function openMirror(mirror: string, address: Address): Promise<void> {
  if (await hasMirror(mirror, address)) return;
  await mkdir(mirror, { recursive: true });
  await readGit(
    ['init', '--bare', '--quiet', '--template=', '--initial-branch=main', '--', mirror],
    { repository: null, timeLimitMs: QUICK_MS },
    'No mirror could be made',
  );
  await writeFile(path.join(mirror, ADDRESS_FILE), address.text);
}

/** Fetches branches and tags, or one commit that none of them leads to. */
export async function fetchMirror(
  mirror: string,
  address: Address,
  limits: MirrorLimits,
  commit?: string,
): Promise<void> {
  const wanted = commit === undefined ? refspecs : [`+${commit}:refs/tallyroot/${commit}`];
  const prune = commit === undefined ? ['--prune'] : [];
  const tooLarge = `The repository is larger than ${limits.mirrorBytes} bytes`;
  try {
    const result = await runGit(
      [
        ...['fetch', '--quiet', '--no-tags', '--no-recurse-submodules', '--no-write-fetch-head'],
        ...[...prune, '--no-auto-maintenance', '--end-of-options', address.text, ...wanted],
      ],
      {
        repository: mirror,
        protocols: [address.protocol],
        timeLimitMs: limits.fetchMs,
        watch: () => (folderBytes(mirror) > limits.mirrorBytes ? tooLarge : null),
      },
    );
    if (result.status !== 0)
      throw new AppError(
        'unavailable',
        `The repository at ${address.text} could not be read: ${result.complaint || 'Git gave no reason'}.`,
      );
  } catch (error) {
    // Ended half-way it leaves locks and parts of packs; without it the next fetch starts clean.
    if (error instanceof AppError && error.code === 'unprocessable')
      await rm(mirror, { recursive: true, force: true });
    throw error;
  }
}

/** The full hash that a ref or hash stands for, where it leads to a commit. */
export async function commitOf(mirror: string, name: string): Promise<string | null> {
  const result = await runGit(['rev-parse', '--verify', '--quiet', `${name}^{commit}`], {
    repository: mirror,
    timeLimitMs: QUICK_MS,
  });
  const text = result.stdout.toString('latin1').trim();
  return result.status === 0 && /^[0-9a-f]{40,64}$/.test(text) ? text : null;
}

/** Short names of branches or tags in the mirror. */
export async function namesIn(mirror: string, prefix: 'refs/heads/' | 'refs/tags/'): Promise<string[]> {
  const listed = await readGit(
    ['for-each-ref', '--format=%(refname)', '--sort=-creatordate', '--count=10000', prefix],
    { repository: mirror, timeLimitMs: QUICK_MS },
    'The branches and tags could not be listed',
  );
  return listed
    .toString('utf8')
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => line.slice(prefix.length));
}
