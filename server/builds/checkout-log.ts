import { AppError } from '../../shared/errors.ts';
import { commitHash } from '../../shared/schemas/builds.ts';
import { showName } from './archive-names.ts';
import { splitNul } from './checkout-objects.ts';
import { readGit } from './checkout-process.ts';

export interface CommitNote {
  commit: string;
  subject: string;
  author: string;
  /** When the author wrote it (ISO 8601, UTC); null where the commit bears no proper date. */
  at: string | null;
}

const TIME_LIMIT_MS = 30_000;
const FORMAT = '--format=%H%x00%an%x00%at%x00%s';
const LATEST_MS = 8.64e15; // the last time that a Date can hold (ECMA-262, Time Values)

function toNotes(bytes: Buffer): CommitNote[] {
  const fields = splitNul(bytes).map((piece) => piece.toString('utf8'));
  const notes: CommitNote[] = [];
  for (let at = 0; at + 3 < fields.length; at += 4) {
    const [commit = '', author = '', seconds = '', subject = ''] = fields.slice(at, at + 4);
    const atMs = /^-?\d+$/.test(seconds) ? Number(seconds) * 1000 : Number.NaN;
    const when = Math.abs(atMs) <= LATEST_MS ? new Date(atMs).toISOString() : null;
    notes.push({ commit, author: showName(author), at: when, subject: showName(subject) });
  }
  return notes;
}

/** Who wrote one commit, when, and its first line. */
export async function describeCommit(mirror: string, commit: string): Promise<CommitNote> {
  const bytes = await readGit(
    ['log', '-1', '-z', FORMAT, commit, '--'],
    { repository: mirror, timeLimitMs: TIME_LIMIT_MS },
    'The commit could not be read',
  );
  const [note] = toNotes(bytes);
  if (note === undefined) throw new AppError('unprocessable', `Commit ${commit} could not be read.`);
  return note;
}

export interface CommitRange {
  /** Those that lead to `after` and not to `before`, oldest first. */
  commits: CommitNote[];
  /** False where there are more; then the newest are listed. */
  isComplete: boolean;
}

/** The commits that `after` has and `before` has not. Both are full hashes. */
export async function commitsBetween(
  mirror: string,
  before: string,
  after: string,
  limit = 1000,
): Promise<CommitRange> {
  for (const hash of [before, after]) {
    if (!commitHash.safeParse(hash).success)
      throw new AppError('invalid', `${showName(hash)} is not a full commit hash.`);
  }
  const bytes = await readGit(
    [
      'log',
      '-z',
      '--topo-order',
      '--reverse',
      `--max-count=${limit + 1}`,
      FORMAT,
      `${before}..${after}`,
      '--',
    ],
    { repository: mirror, timeLimitMs: TIME_LIMIT_MS },
    'The commits between the two could not be listed',
  );
  const notes = toNotes(bytes);
  return { commits: notes.slice(-limit), isComplete: notes.length <= limit };
}
