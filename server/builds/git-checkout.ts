import { symlinkSync } from 'node:fs';
import { lstat, mkdtemp, rename, rm } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '../../shared/errors.ts';
import { decodeName, EntryTree, refuseEntry, refuseWhole, showName } from './archive-names.ts';
import { FolderSink } from './archive-sink.ts';
import { type Address, isRefName, readAddress } from './checkout-address.ts';
import { checkLinks } from './checkout-links.ts';
import { type CommitNote, describeCommit } from './checkout-log.ts';
import {
  commitOf,
  fetchMirror,
  type MirrorLimits,
  namesIn,
  openMirror,
  withMirror,
} from './checkout-mirror.ts';
import { listTree, readBlobs, readWhole, type TreeFile } from './checkout-objects.ts';
import { readGit } from './checkout-process.ts';

export interface CheckoutLimits extends MirrorLimits {
  entries: number;
  bytes: number;
}

export const checkoutLimits: CheckoutLimits = {
  entries: 20_000,
  bytes: 200 * 1024 * 1024,
  mirrorBytes: 1024 * 1024 * 1024,
  fetchMs: 300_000,
};

export interface Checkout extends CommitNote {
  /** Paths of submodules: empty folders in the checkout, since they are not fetched. */
  submodules: string[];
}

const LINK_BYTES = 4096;

/**
 * Fetches a repository into its mirror where needed, and writes one commit of it into a folder that does not exist
 * yet, without running anything of the repository.
 *
 * The files are read from the object store (`ls-tree`, `cat-file`) and written here. `git checkout` would run hooks
 * and filters if a setting let it, and both it and `git archive` obey the attributes of the repository (line ends,
 * substitutions, files left out), so that the folder would not hold what the commit holds. Read as objects, nothing
 * applies but the rules for names that uploads have to keep, too.
 */
export async function checkOut(options: {
  address: string;
  /** A branch, a tag, a name below `refs/`, or a commit (at least 4 digits). */
  ref: string;
  /** The bare mirror of this repository; made where it is missing. */
  mirrorFolder: string;
  into: string;
  allowLocal: boolean;
  limits?: CheckoutLimits;
}): Promise<Checkout> {
  const { ref, mirrorFolder, into, limits = checkoutLimits } = options;
  const address = readAddress(options.address, options.allowLocal);
  if (!isRefName(ref)) throw refuseRef(`${showName(ref)} cannot be the name of a branch, tag or commit.`);
  if (await exists(into)) throw new AppError('conflict', `There is something at ${into} already.`);
  return withMirror(mirrorFolder, async () => {
    await openMirror(mirrorFolder, address);
    const commit = await findCommit(mirrorFolder, address, ref, limits);
    const note = await describeCommit(mirrorFolder, commit);
    const submodules = await writeCommit(mirrorFolder, commit, into, limits);
    return { ...note, submodules };
  });
}

async function exists(name: string): Promise<boolean> {
  try {
    await lstat(name);
    return true;
  } catch {
    return false;
  }
}

function refuseRef(message: string): AppError {
  return new AppError('unprocessable', message, { issues: [{ path: 'ref', message }] });
}

async function findCommit(
  mirror: string,
  address: Address,
  ref: string,
  limits: CheckoutLimits,
): Promise<string> {
  const isFull = /^(?:[0-9a-f]{40}|[0-9a-f]{64})$/.test(ref);
  // A commit never changes, so a known one needs no fetch; a branch or tag may have moved.
  const known = isFull ? await commitOf(mirror, ref) : null;
  if (known !== null) return known;
  await fetchMirror(mirror, address, limits);
  const found = isFull ? await commitOf(mirror, ref) : await findByName(mirror, ref);
  if (found !== null) return found;
  if (isFull) {
    try {
      await fetchMirror(mirror, address, limits, ref);
      const fetched = await commitOf(mirror, ref);
      if (fetched !== null) return fetched;
    } catch (error) {
      if (!(error instanceof AppError) || error.code !== 'unavailable') throw error;
    }
  }
  throw refuseRef(await unknownRef(mirror, address, ref));
}

async function findByName(mirror: string, ref: string): Promise<string | null> {
  if (ref.startsWith('refs/')) return commitOf(mirror, ref);
  const branch = await commitOf(mirror, `refs/heads/${ref}`);
  const tag = await commitOf(mirror, `refs/tags/${ref}`);
  if (branch !== null && tag !== null && branch !== tag)
    throw refuseRef(`${ref} is a branch and a tag; write refs/heads/${ref} or refs/tags/${ref}.`);
  if (branch !== null || tag !== null) return branch ?? tag;
  return /^[0-9a-f]{4,64}$/.test(ref) ? commitOf(mirror, ref) : null;
}

const NAMES_SHOWN = 8;

async function unknownRef(mirror: string, address: Address, ref: string): Promise<string> {
  const list = async (what: string, prefix: 'refs/heads/' | 'refs/tags/'): Promise<string> => {
    const names = await namesIn(mirror, prefix);
    if (names.length === 0) return `It has no ${what}.`;
    const more = names.length > NAMES_SHOWN ? ` and ${names.length - NAMES_SHOWN} more` : '';
    return `Its ${what}: ${names.slice(0, NAMES_SHOWN).map(showName).join(', ')}${more}.`;
  };
  const [branches, tags] = [await list('branches', 'refs/heads/'), await list('tags', 'refs/tags/')];
  return `There is no branch, tag or commit ${ref} in ${address.text}. ${branches} ${tags}`;
}

type NamedFile = TreeFile & { path: string };

/** Everything is checked before the first byte is written; links come last, so that none is written through. */
async function writeCommit(
  mirror: string,
  commit: string,
  into: string,
  limits: CheckoutLimits,
): Promise<string[]> {
  const entries = await readEntries(mirror, commit, limits);
  const links = await readLinks(mirror, entries);
  checkLinks(links);
  const partial = await mkdtemp(`${into}.part-`);
  try {
    const sink = new FolderSink(partial);
    const submodules = entries.filter((entry) => entry.kind === 'submodule').map((entry) => entry.path);
    for (const folder of submodules) sink.folder(folder);
    await readBlobs(
      mirror,
      entries.filter((entry) => entry.kind === 'file'),
      {
        start: (entry) => sink.startFile(entry.path, entry.isExecutable ? 0o700 : 0o600),
        take: (_, chunk) => sink.write(chunk),
        end: () => sink.endFile(),
      },
    );
    for (const [name, target] of links) {
      sink.folder(path.posix.dirname(name));
      symlinkSync(target, path.join(partial, name));
    }
    await rename(partial, into);
    return submodules;
  } finally {
    await rm(partial, { recursive: true, force: true });
  }
}

async function readEntries(mirror: string, commit: string, limits: CheckoutLimits): Promise<NamedFile[]> {
  const tree = new EntryTree('commit', limits.entries);
  let bytes = 0;
  const entries: NamedFile[] = [];
  for (const entry of await listTree(mirror, commit)) {
    const name = entry.name ?? '\uFFFD';
    entries.push({ ...entry, path: tree.add(name, entry.kind === 'submodule' ? 'folder' : 'file') });
    bytes += entry.bytes;
    if (bytes > limits.bytes) throw refuseWhole('commit', `it is larger than ${limits.bytes} bytes`);
  }
  tree.finish();
  return entries;
}

async function readLinks(mirror: string, entries: readonly NamedFile[]): Promise<Map<string, string>> {
  const links = entries.filter((entry) => entry.kind === 'link');
  for (const link of links) {
    if (link.bytes > LINK_BYTES)
      throw refuseEntry('commit', link.path, 'is a symbolic link without a proper target');
  }
  const targets = await readWhole(mirror, links);
  return new Map(links.map((link) => [link.path, decodeName(targets.get(link.id) ?? Buffer.alloc(0)) ?? '']));
}

export interface RefList {
  /** The branch that the repository shows first, where it says so. */
  defaultBranch: string | null;
  branches: { name: string; commit: string }[];
  tags: { name: string; commit: string }[];
}

/** Branches and tags of a repository with the commits they lead to, without fetching it. */
export async function listRefs(text: string, allowLocal: boolean): Promise<RefList> {
  const address = readAddress(text, allowLocal);
  const listed = await readGit(
    ['ls-remote', '--symref', '--end-of-options', address.text, 'HEAD', 'refs/heads/*', 'refs/tags/*'],
    { repository: null, protocols: [address.protocol], timeLimitMs: 60_000 },
    `The repository at ${address.text} could not be read`,
  );
  const list: RefList = { defaultBranch: null, branches: [], tags: [] };
  const tags = new Map<string, string>();
  for (const line of listed.toString('utf8').split('\n')) {
    const [value = '', name = ''] = line.split('\t');
    const head = /^ref: refs\/heads\/(.+)$/.exec(value);
    if (head && name === 'HEAD') list.defaultBranch = head[1] ?? null;
    else if (name.startsWith('refs/heads/')) list.branches.push({ name: name.slice(11), commit: value });
    // An annotated tag is listed twice; the second line, with ^{}, has the commit.
    else if (name.startsWith('refs/tags/')) tags.set(name.slice(10).replace(/\^\{\}$/, ''), value);
  }
  list.tags = [...tags].map(([name, commit]) => ({ name, commit }));
  return list;
}
