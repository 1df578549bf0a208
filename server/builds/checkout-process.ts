import { execa } from 'execa';
import { AppError } from '../../shared/errors.ts';
import { searchPath } from '../config.ts';
import { signalGroup } from '../runner/leftovers.ts';
import { showName } from './archive-names.ts';

/**
 * Runs Git where it can neither ask, nor run what a repository names, nor go on for ever. The simple-git package
 * is not used here: it cannot end a whole process group, and lets the caller's environment through.
 */

/** Overrules every configuration file; only Tallyroot writes the mirrors' own. */
const settings = [
  'core.hooksPath=/dev/null',
  'core.fsmonitor=false',
  'core.askPass=',
  'credential.helper=',
  'gc.auto=0',
  'maintenance.auto=false',
  'submodule.recurse=false',
  'fetch.recurseSubmodules=false',
  'log.showSignature=false',
  'http.lowSpeedLimit=1000',
  'http.lowSpeedTime=30',
];

const environment = {
  PATH: searchPath,
  // A home that does not exist: no configuration, no stored credentials, no attributes of a user.
  HOME: '/nonexistent',
  LC_ALL: 'C',
  GIT_CONFIG_NOSYSTEM: '1',
  GIT_CONFIG_SYSTEM: '/dev/null',
  GIT_CONFIG_GLOBAL: '/dev/null',
  GIT_ATTR_NOSYSTEM: '1',
  GIT_TERMINAL_PROMPT: '0',
  GIT_NO_REPLACE_OBJECTS: '1',
  GIT_NO_LAZY_FETCH: '1',
  GIT_OPTIONAL_LOCKS: '0',
  GIT_SSH_VARIANT: 'ssh',
  GIT_SSH_COMMAND: 'ssh -o BatchMode=yes -o ConnectTimeout=20 -o PermitLocalCommand=no -o ForwardAgent=no',
};

export interface GitOptions {
  /** The repository to work in, or null for a command that needs none. */
  repository: string | null;
  /** What may be spoken to; nothing where it is left out. */
  protocols?: readonly string[];
  timeLimitMs: number;
  input?: string;
  /** Looks after the command every now and then; a sentence ends it. */
  watch?: () => string | null;
}

export interface GitResult {
  status: number | null;
  stdout: Buffer;
  /** The last lines that it wrote about what went wrong, safe to print. */
  complaint: string;
}

const OUTPUT_BYTES = 32 * 1024 * 1024;
const WATCH_MS = 100;
const groups = new Set<number>();

process.once('exit', () => {
  for (const group of groups) signalGroup(group, 'SIGKILL');
});

function commandOf(args: readonly string[], repository: string | null): string[] {
  const place = repository === null ? [] : [`--git-dir=${repository}`];
  return [...settings.flatMap((setting) => ['-c', setting]), ...place, ...args];
}

function surroundings(options: GitOptions) {
  return {
    cwd: '/',
    env: { ...environment, GIT_ALLOW_PROTOCOL: (options.protocols ?? ['none']).join(':') },
    extendEnv: false,
    // A process group of its own, so that what Git starts ends with it.
    detached: true,
    reject: false,
    encoding: 'buffer',
    stripFinalNewline: false,
    input: options.input ?? '',
  } as const;
}

/** Ends the whole group when the time is over or the watch objects; says why, once it has. */
function guard(
  group: number | undefined,
  options: GitOptions,
): { reason: () => string | null; release: () => void } {
  let reason: string | null = null;
  const end = (why: string): void => {
    reason ??= why;
    if (group !== undefined) signalGroup(group, 'SIGKILL');
  };
  if (group !== undefined) groups.add(group);
  const seconds = Math.ceil(options.timeLimitMs / 1000);
  const timer = setTimeout(() => end(`Git took longer than ${seconds} s and was ended`), options.timeLimitMs);
  const watcher = setInterval(() => {
    const objection = options.watch?.() ?? null;
    if (objection !== null) end(objection);
  }, WATCH_MS);
  return {
    reason: () => reason ?? options.watch?.() ?? null,
    release() {
      clearTimeout(timer);
      clearInterval(watcher);
      if (group === undefined) return;
      signalGroup(group, 'SIGKILL');
      groups.delete(group);
    },
  };
}

function complaintOf(stderr: unknown): string {
  const text = stderr instanceof Uint8Array ? Buffer.from(stderr).toString('utf8') : '';
  const lines = text.split('\n').filter((line) => line.trim() !== '');
  const told = lines.filter((line) => /^(?:fatal|error|ERROR):/.test(line));
  return (told.length > 0 ? told : lines).slice(-2).map(showName).join(' · ');
}

/** Runs a command to its end. Throws AppError `unprocessable` where a limit ended it. */
export async function runGit(args: readonly string[], options: GitOptions): Promise<GitResult> {
  const child = execa('git', commandOf(args, options.repository), {
    ...surroundings(options),
    maxBuffer: OUTPUT_BYTES,
  });
  const guarded = guard(child.pid, options);
  try {
    const result = await child;
    const reason = guarded.reason();
    if (reason !== null) throw new AppError('unprocessable', `${reason}.`);
    if (result.isMaxBuffer) throw new AppError('unprocessable', `Git wrote more than ${OUTPUT_BYTES} bytes.`);
    if (result.code === 'ENOENT')
      throw new AppError('unavailable', 'There is no git program on this machine.');
    return {
      status: result.exitCode ?? null,
      stdout: Buffer.from(result.stdout),
      complaint: complaintOf(result.stderr),
    };
  } finally {
    guarded.release();
  }
}

/** Like `runGit`, and throws AppError `unprocessable` where Git says that it failed. */
export async function readGit(args: readonly string[], options: GitOptions, failed: string): Promise<Buffer> {
  const result = await runGit(args, options);
  if (result.status === 0) return result.stdout;
  throw new AppError('unprocessable', `${failed}: ${result.complaint || 'Git gave no reason'}.`);
}

/** Runs a command and hands its output on as it comes, to any length. */
export async function* streamGit(args: readonly string[], options: GitOptions): AsyncGenerator<Buffer> {
  const child = execa('git', commandOf(args, options.repository), {
    ...surroundings(options),
    buffer: false,
    stderr: 'ignore',
  });
  const guarded = guard(child.pid, options);
  try {
    for await (const chunk of child.stdout) if (Buffer.isBuffer(chunk)) yield chunk;
    const result = await child;
    const reason = guarded.reason();
    if (reason !== null) throw new AppError('unprocessable', `${reason}.`);
    if (result.exitCode !== 0) throw new AppError('unprocessable', 'Git could not read the repository.');
  } finally {
    guarded.release();
  }
}
