import { execFileSync } from 'node:child_process';
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** Real repositories for tests, written with Git itself under fixed names and dates. */

const environment = {
  PATH: '/usr/local/bin:/usr/bin:/bin:/opt/homebrew/bin',
  HOME: '/nonexistent',
  GIT_CONFIG_NOSYSTEM: '1',
  GIT_CONFIG_GLOBAL: '/dev/null',
  GIT_AUTHOR_NAME: 'Maud Ferreday',
  GIT_AUTHOR_EMAIL: 'maud@larkmoor.example',
  GIT_COMMITTER_NAME: 'Maud Ferreday',
  GIT_COMMITTER_EMAIL: 'maud@larkmoor.example',
};

/** One day later for every commit, so that orders by date are plain. */
let day = 0;

export class TestRepository {
  readonly folder: string;

  constructor(folder: string) {
    this.folder = folder;
    mkdirSync(folder, { recursive: true });
    this.git('init', '--quiet', '--initial-branch=main');
  }

  git(...args: string[]): string {
    return this.gitWith('', ...args);
  }

  gitWith(input: string | Buffer, ...args: string[]): string {
    const at = new Date(Date.UTC(2026, 0, 1 + (day % 300))).toISOString();
    const dates = { GIT_AUTHOR_DATE: at, GIT_COMMITTER_DATE: at };
    return execFileSync('git', args, {
      cwd: this.folder,
      env: { ...environment, ...dates },
      input,
      encoding: 'utf8',
      stdio: ['pipe', 'pipe', 'ignore'],
    }).trim();
  }

  put(name: string, text: string | Buffer, mode = 0o644): void {
    mkdirSync(dirname(join(this.folder, name)), { recursive: true });
    writeFileSync(join(this.folder, name), text, { mode });
  }

  /** Commits the folder as it is; gives the hash. */
  commit(message: string): string {
    day += 1;
    this.git('add', '--all', '.');
    this.git('commit', '--quiet', '--allow-empty', '--message', message);
    return this.git('rev-parse', 'HEAD');
  }

  /** Commits a tree written entry by entry, names and modes as given, which `git add` would refuse. */
  commitTree(entries: { mode: string; name: string; body?: string; id?: string }[], message: string): string {
    day += 1;
    const lines = entries.map(({ mode, name, body, id }) => {
      const type = mode === '160000' ? 'commit' : mode === '040000' ? 'tree' : 'blob';
      const object = id ?? this.gitWith(body ?? '', 'hash-object', '-w', '--stdin');
      return `${mode} ${type} ${object}\t${name}\0`;
    });
    const tree = this.gitWith(lines.join(''), 'mktree', '-z', '--missing');
    const commit = this.git('commit-tree', tree, '-m', message);
    this.git('update-ref', 'refs/heads/main', commit);
    return commit;
  }
}
