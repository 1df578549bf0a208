import { constants } from 'node:os';

/** Name of the variable by which processes that an adapter leaves behind are recognised. */
export const MARK_NAME = 'TALLYROOT_START';

/** Words that the shell itself must read: a line that begins with one is no plain command. */
const SHELL_WORDS = new Set(
  `! { } case do done elif else esac fi for if in then until while . : alias bg break cd command continue
  eval exec exit export fg getopts hash jobs local read readonly return set shift source times trap type
  ulimit umask unalias unset wait`.split(/\s+/),
);

/**
 * The line for `/bin/sh -c`: with `exec` in front where it is one plain command, so that the shell does not
 * stay as a parent that hides signals. When in doubt the line is left as it is, which is right as well.
 */
export function shellLine(line: string): { line: string; isPlain: boolean } {
  const trimmed = line.trim();
  const bare = trimmed
    .replace(/\\./gs, 'x')
    .replace(/'[^']*'|"[^"`]*"/g, 'x')
    .replace(/\d*[<>]&[\d-]+/g, ' ');
  const first = bare.split(/\s/, 1)[0] ?? '';
  const isPlain = !(
    first === '' ||
    /[;&|()`\n\r'"]|<</.test(bare) ||
    /^[A-Za-z_]\w*=/.test(first) ||
    /^[\d<>#]/.test(first) ||
    SHELL_WORDS.has(first)
  );
  return isPlain ? { line: `exec ${trimmed}`, isPlain } : { line: trimmed, isPlain };
}

/** All that an adapter finds in its environment; nothing of Tallyroot's own leaks into it. */
export function adapterEnvironment(
  own: { path: string; home: string; mark: string },
  manifest: Readonly<Record<string, string>>,
): Record<string, string> {
  return {
    PATH: own.path,
    HOME: own.home,
    LC_ALL: 'C.UTF-8',
    TZ: 'UTC',
    ...manifest,
    [MARK_NAME]: own.mark,
  };
}

/** How a process ended. */
export interface Exit {
  status: number | null;
  signal: string | null;
}

/** In words; a status above 128 from a shell stands for the signal that ended its command. */
export function describeExit(exit: Exit, isShell: boolean): string {
  if (exit.signal !== null) return `ended by signal ${exit.signal}`;
  const status = exit.status ?? 0;
  if (isShell && status > 128) {
    const found = Object.entries(constants.signals).find(([, number]) => number === status - 128);
    if (found) return `ended by signal ${found[0]}`;
  }
  return `exit status ${status}`;
}
