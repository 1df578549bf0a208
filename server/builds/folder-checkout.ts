import { realpath } from 'node:fs/promises';
import { runGit } from './checkout-process.ts';

export interface FolderCheckout {
  /** HEAD where the folder is the top of a Git checkout without changes to tracked files, else null. */
  commit: string | null;
  /** First line of that commit. */
  subject: string | null;
  /** True where it is a checkout whose tracked files have been changed. */
  hasChanges: boolean;
}

const none: FolderCheckout = { commit: null, subject: null, hasChanges: false };
const timeLimitMs = 10_000;

/**
 * Asks Git about a folder of this machine without running anything that the folder names. A folder laid out as a
 * bare repository is no checkout (`safe.bareRepository`); a monitor, hooks and a pager are overruled where Git is
 * started; filters, which `git status` runs on changed files, are named by the configuration and overruled by
 * name. Untracked files do not count as changes: preparing a build and running it leave some.
 */
export async function readFolderCheckout(folder: string): Promise<FolderCheckout> {
  const ask = async (args: readonly string[]): Promise<string | null> => {
    const before = ['-c', 'safe.bareRepository=explicit', '-C', folder];
    const result = await runGit([...before, ...args], { repository: null, timeLimitMs });
    return result.status === 0 ? result.stdout.toString('utf8') : null;
  };
  try {
    const top = (await ask(['rev-parse', '--show-toplevel']))?.replace(/\n$/, '');
    if (top === undefined || (await realpath(top)) !== folder) return none;
    const head = (await ask(['log', '-1', '--format=%H%x00%s', 'HEAD', '--']))?.trimEnd();
    const [commit = '', subject = ''] = head?.split('\0') ?? [];
    if (!/^[0-9a-f]{40,64}$/.test(commit)) return none;
    const listed = (await ask(['config', '--name-only', '-z', '--get-regexp', '^filter\\.'])) ?? '';
    const filters = listed.split('\0').filter((name) => name !== '');
    // A name with an equals sign cannot be overruled on the command line.
    if (filters.some((name) => name.includes('='))) return none;
    const status = await ask([
      ...withoutFilters(filters),
      ...['status', '--porcelain', '-z', '--untracked-files=no', '--ignore-submodules=all'],
    ]);
    if (status === null) return none;
    return status === '' ? { commit, subject, hasChanges: false } : { ...none, hasChanges: true };
  } catch {
    // No Git on this machine, or it took too long: then the folder has no commit to show.
    return none;
  }
}

/** An empty command is none, and a filter that is not required may be missing. */
function withoutFilters(names: readonly string[]): string[] {
  const drivers = new Set(names.map((name) => name.slice(0, name.lastIndexOf('.'))));
  return [...drivers].flatMap((driver) =>
    ['clean=', 'smudge=', 'process=', 'required=false'].flatMap((setting) => ['-c', `${driver}.${setting}`]),
  );
}
