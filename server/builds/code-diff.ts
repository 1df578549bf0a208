import { setImmediate as nextTurn } from 'node:timers/promises';
import { AppError } from '../../shared/errors.ts';
import { commitHash } from '../../shared/schemas/builds.ts';
import type { CodeDiff, DiffHunk, FileDiff } from '../../shared/schemas/code-diff.ts';
import { showName } from './archive-names.ts';
import { diffLines, markHidden, readText } from './code-diff-lines.ts';
import { byRank } from './code-diff-order.ts';
import { type CodeFile, type CodeSide, commitSide, folderSide } from './code-diff-sides.ts';

export interface CodeDiffLimits {
  /** Files that are listed. */
  files: number;
  /** Lines in all hunks together. */
  lines: number;
  /** A larger file is listed and not shown. */
  fileBytes: number;
  lineLength: number;
  /** Files on one side, before anything is compared. */
  entries: number;
}

export const codeDiffLimits: CodeDiffLimits = {
  files: 300,
  lines: 5000,
  fileBytes: 512 * 1024,
  lineLength: 500,
  entries: 20_000,
};

/** Files read at a time: bounds what is held in memory. */
const BATCH = 16;
const PATHS_LEFT_OUT = 50;

/** What changed between two folders; nothing in them is run, no link followed. */
export async function diffFolders(
  before: string,
  after: string,
  limits: CodeDiffLimits = codeDiffLimits,
): Promise<CodeDiff> {
  return diffSides(await folderSide(before, limits.entries), await folderSide(after, limits.entries), limits);
}

/** What changed between two commits of a mirror, given by their full hashes. */
export async function diffCommits(
  mirror: string,
  before: string,
  after: string,
  limits: CodeDiffLimits = codeDiffLimits,
): Promise<CodeDiff> {
  for (const hash of [before, after]) {
    if (!commitHash.safeParse(hash).success)
      throw new AppError('invalid', `${showName(hash)} is not a full commit hash.`);
  }
  return diffSides(
    await commitSide(mirror, before, limits.entries),
    await commitSide(mirror, after, limits.entries),
    limits,
  );
}

interface Pair {
  path: string;
  before: CodeFile | null;
  after: CodeFile | null;
  status: FileDiff['status'];
}

async function diffSides(before: CodeSide, after: CodeSide, limits: CodeDiffLimits): Promise<CodeDiff> {
  const pairs = await findPairs(before, after);
  pairs.sort((a, b) => byRank(a.path, b.path));
  const listed = pairs.slice(0, limits.files);
  const unlisted = pairs.slice(limits.files);
  const files: FileDiff[] = [];
  let room = limits.lines;
  for (let at = 0; at < listed.length; at += BATCH) {
    const batch = listed.slice(at, at + BATCH);
    const readable = batch.filter((pair) => isReadable(pair, limits) && room > 0);
    const was = await before.read(readable.flatMap((pair) => pair.before ?? []));
    const now = await after.read(readable.flatMap((pair) => pair.after ?? []));
    for (const pair of batch) {
      const file = diffPair(pair, was, now, limits, room);
      room -= file.hunks.reduce((total, hunk) => total + hunk.lines.length, 0);
      files.push(file);
      await nextTurn(); // a comparison may take long; others get their turn between two
    }
  }
  return {
    files,
    filesLeftOut: unlisted.length,
    pathsLeftOut: unlisted.slice(0, PATHS_LEFT_OUT).map((pair) => markHidden(pair.path).text),
    linesLeftOut: files.reduce((total, file) => total + file.linesLeftOut, 0),
  };
}

async function findPairs(before: CodeSide, after: CodeSide): Promise<Pair[]> {
  const pairs: Pair[] = [];
  const removed: CodeFile[] = [];
  for (const was of before.files.values()) {
    const now = after.files.get(was.path);
    if (now === undefined) removed.push(was);
    else if (!(await isSame(before, was, after, now)))
      pairs.push({ path: was.path, before: was, after: now, status: 'changed' });
  }
  const added = [...after.files.values()].filter((file) => !before.files.has(file.path));
  const renames = await findRenames(before, removed, after, added);
  const moved = new Set(renames.values());
  for (const file of removed) {
    if (!moved.has(file)) pairs.push({ path: file.path, before: file, after: null, status: 'removed' });
  }
  for (const file of added) {
    const was = renames.get(file) ?? null;
    pairs.push({ path: file.path, before: was, after: file, status: was ? 'renamed' : 'new' });
  }
  return pairs;
}

async function isSame(before: CodeSide, was: CodeFile, after: CodeSide, now: CodeFile): Promise<boolean> {
  if (was.kind !== now.kind || was.bytes !== now.bytes || was.isExecutable !== now.isExecutable) return false;
  return (await before.identify(was)) === (await after.identify(now));
}

/** The same contents under one other path, and no third: anything less plain is a file removed and one new. */
async function findRenames(
  before: CodeSide,
  removed: readonly CodeFile[],
  after: CodeSide,
  added: readonly CodeFile[],
): Promise<Map<CodeFile, CodeFile>> {
  const sizes = new Set(added.map((file) => file.bytes));
  const candidates = removed.filter((file) => file.bytes > 0 && sizes.has(file.bytes));
  const byId = new Map<string, CodeFile[]>();
  for (const file of candidates) {
    const id = await before.identify(file);
    byId.set(id, [...(byId.get(id) ?? []), file]);
  }
  const wanted = new Set(candidates.map((file) => file.bytes));
  const news = new Map<string, CodeFile[]>();
  for (const file of added.filter(({ bytes }) => wanted.has(bytes))) {
    const id = await after.identify(file);
    news.set(id, [...(news.get(id) ?? []), file]);
  }
  const renames = new Map<CodeFile, CodeFile>();
  for (const [id, [now, ...others]] of news) {
    const [was, ...more] = byId.get(id) ?? [];
    if (now && was && others.length === 0 && more.length === 0) renames.set(now, was);
  }
  return renames;
}

function isReadable(pair: Pair, limits: CodeDiffLimits): boolean {
  return (
    pair.status !== 'renamed' &&
    [pair.before, pair.after].every((file) => (file?.bytes ?? 0) <= limits.fileBytes)
  );
}

function sideOf(file: CodeFile | null): FileDiff['before'] {
  return file && { bytes: file.bytes, kind: file.kind, isExecutable: file.isExecutable };
}

function diffPair(
  pair: Pair,
  was: ReadonlyMap<string, Buffer>,
  now: ReadonlyMap<string, Buffer>,
  limits: CodeDiffLimits,
  room: number,
): FileDiff {
  const file: FileDiff = {
    path: markHidden(pair.path).text,
    pathBefore: pair.status === 'renamed' && pair.before ? markHidden(pair.before.path).text : null,
    status: pair.status,
    before: sideOf(pair.before),
    after: sideOf(pair.after),
    contents: 'lines',
    addedLines: null,
    removedLines: null,
    isReplacement: false,
    hunks: [],
    linesLeftOut: 0,
  };
  if (pair.status === 'renamed') return { ...file, addedLines: 0, removedLines: 0 };
  if (!isReadable(pair, limits)) return { ...file, contents: 'too large' };
  if (room <= 0) return { ...file, contents: 'left out' };
  const textBefore = pair.before ? readText(was.get(pair.before.path) ?? Buffer.alloc(0)) : '';
  const textAfter = pair.after ? readText(now.get(pair.after.path) ?? Buffer.alloc(0)) : '';
  if (textBefore === null || textAfter === null) return { ...file, contents: 'binary' };
  const lines = diffLines(textBefore, textAfter, limits.lineLength);
  return { ...file, ...lines, ...shorten(lines.hunks, room) };
}

/** As many lines as there is room for, from the top. */
function shorten(hunks: readonly DiffHunk[], room: number): { hunks: DiffHunk[]; linesLeftOut: number } {
  const kept: DiffHunk[] = [];
  let left = room;
  let linesLeftOut = 0;
  for (const { lines } of hunks) {
    const shown = lines.slice(0, left);
    if (shown.length > 0) kept.push({ lines: shown });
    left -= shown.length;
    linesLeftOut += lines.length - shown.length;
  }
  return { hunks: kept, linesLeftOut };
}
