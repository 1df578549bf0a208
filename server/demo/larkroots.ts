import { cpSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { simpleGit } from 'simple-git';

/**
 * The demo library: an invented one, whose versions hold the slips that its maintainers are there to find.
 * Each commit is a folder of `history/` laid over what was there before.
 */
export interface DemoCommit {
  folder: string;
  branch: string;
  author: { name: string; email: string };
  at: string;
  message: string;
}

const maud = { name: 'Maud Ferreday', email: 'maud@larkmoor.example' };
const tobin = { name: 'Tobin Askeland', email: 'tobin@larkmoor.example' };
const orla = { name: 'Orla Brandvik', email: 'orla@larkmoor.example' };
const ilse = { name: 'Ilse Varga-Holm', email: 'ilse@larkmoor.example' };

export const demoCommits: readonly DemoCommit[] = [
  {
    folder: '01-first',
    branch: 'main',
    author: maud,
    at: '2026-01-12T09:20:00Z',
    message: 'Four routines and their adapter',
  },
  {
    folder: '02-hybrid',
    branch: 'main',
    author: tobin,
    at: '2026-01-19T14:05:00Z',
    message: 'Hybrid: bisections first, then secant steps inside the bracket',
  },
  {
    folder: '03-newton-keeps-slope',
    branch: 'main',
    author: orla,
    at: '2026-01-26T10:41:00Z',
    message: 'Newton: keep the slope of the second step',
  },
  {
    folder: '04-newton-takes-slope',
    branch: 'main',
    author: orla,
    at: '2026-01-28T08:15:00Z',
    message: 'Newton: take the slope at every step again',
  },
  {
    folder: '05-bisection-width',
    branch: 'main',
    author: ilse,
    at: '2026-02-09T16:32:00Z',
    message: 'Bisection: stop at the width asked for',
  },
  {
    folder: '06-brent',
    branch: 'main',
    author: maud,
    at: '2026-02-16T11:00:00Z',
    message: 'Brent and Dekker: a sixth routine',
  },
  {
    folder: '07-hybrid-five',
    branch: 'main',
    author: tobin,
    at: '2026-02-23T13:27:00Z',
    message: 'Hybrid: five bisections are start enough',
  },
  {
    folder: '08-readme',
    branch: 'main',
    author: maud,
    at: '2026-03-02T09:48:00Z',
    message: 'Say in the README how a routine ends',
  },
  {
    folder: 'one-chord',
    branch: 'one-chord',
    author: tobin,
    at: '2026-03-14T09:12:00Z',
    message: 'One chord step for all solvers',
  },
  {
    folder: 'early-stop',
    branch: 'early-stop',
    author: ilse,
    at: '2026-03-17T15:50:00Z',
    message: 'Illinois: stop when the value is small',
  },
];

const history = fileURLToPath(new URL('./history/', import.meta.url));
const kit = fileURLToPath(new URL('../kits/node/adapter.mjs', import.meta.url));

/**
 * Writes the demo library as a git repository into `folder` (which must not exist yet), commit by commit;
 * names, dates and contents are fixed, so that the hashes are the same everywhere.
 * Branches other than main start from main's last commit.
 */
export async function writeLarkroots(folder: string): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const git = simpleGit(folder);
  await git.init(['--initial-branch=main']);
  await git.addConfig('core.autocrlf', 'false');
  await git.addConfig('commit.gpgsign', 'false');
  for (const commit of demoCommits) {
    if (commit.branch === 'main') await git.raw('symbolic-ref', 'HEAD', 'refs/heads/main');
    else await git.checkout(['-q', '-B', commit.branch, 'main']);
    cpSync(join(history, commit.folder), folder, { recursive: true });
    if (commit.folder === '01-first') cpSync(kit, join(folder, 'tally', 'kit.mjs'));
    await git.add('.');
    await commitAs(folder, commit);
    if (commit.branch !== 'main') await git.checkout(['-q', 'main']);
  }
}

/** The variables that fix who committed and when; simple-git lets none through that is not named. */
const identity = [
  'GIT_AUTHOR_NAME',
  'GIT_AUTHOR_EMAIL',
  'GIT_AUTHOR_DATE',
  'GIT_COMMITTER_NAME',
  'GIT_COMMITTER_EMAIL',
  'GIT_COMMITTER_DATE',
] as const;

async function commitAs(folder: string, commit: DemoCommit): Promise<void> {
  const { name, email } = commit.author;
  const git = simpleGit(folder, { allowEnvironment: [...identity] }).env({
    PATH: '/usr/local/bin:/usr/bin:/bin:/opt/homebrew/bin',
    GIT_AUTHOR_NAME: name,
    GIT_AUTHOR_EMAIL: email,
    GIT_AUTHOR_DATE: commit.at,
    GIT_COMMITTER_NAME: name,
    GIT_COMMITTER_EMAIL: email,
    GIT_COMMITTER_DATE: commit.at,
  });
  await git.commit(commit.message, undefined, { '--quiet': null });
}
