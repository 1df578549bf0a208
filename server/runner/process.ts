import { execFile, spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { closeSync, constants, openSync, readSync, rmSync, writeSync } from 'node:fs';
import { Socket } from 'node:net';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { searchPath } from '../config.ts';
import { adapterEnvironment, describeExit, type Exit, shellLine } from './adapter-environment.ts';
import { endGroup, guardGroup, newMark, releaseGroup, scratchFolder } from './guardian.ts';
import { LogTail } from './log-tail.ts';

/** Starts adapters. Besides the guardian and the lines that prepare a build, nothing else starts processes here. */

const LOG_LIMIT_BYTES = 64 * 1024;
const { O_NONBLOCK, O_RDONLY, O_RDWR, O_WRONLY } = constants;
const run = promisify(execFile);

export interface StartOptions {
  /** One line for the shell. */
  command: string;
  folder: string;
  environment: Readonly<Record<string, string>>;
  /** From SIGTERM to SIGKILL. */
  killAfterMs: number;
  onLog?: (text: string) => void;
}

/** Named pipes of one adapter, opened so that no open can block, and the ends that Tallyroot keeps. */
interface Pipes {
  childIn: number;
  childOut: number;
  childError: number;
  write: number;
  read: number;
  peek: number;
  error: number;
}

/**
 * Opening one end of a named pipe waits for the other, so each is first opened for both, which does not wait.
 * Named pipes rather than Node's own: those are sockets, and only a blocking read in a worker thread is quick.
 */
async function openPipes(folder: string): Promise<Pipes> {
  const names = ['in', 'out', 'error'].map((name) => join(folder, name));
  await run('mkfifo', names);
  const [inPath = '', outPath = '', errorPath = ''] = names;
  const opened: number[] = [];
  const open = (name: string, flags: number): number => {
    const end = openSync(name, flags);
    opened.push(end);
    return end;
  };
  try {
    const holders = names.map((name) => open(name, O_RDWR));
    const pipes = {
      childIn: open(inPath, O_RDONLY),
      childOut: open(outPath, O_WRONLY),
      childError: open(errorPath, O_WRONLY),
      write: open(inPath, O_WRONLY),
      read: open(outPath, O_RDONLY),
      peek: open(outPath, O_RDONLY | O_NONBLOCK),
      error: open(errorPath, O_RDONLY | O_NONBLOCK),
    };
    for (const holder of holders) closeSync(holder);
    return pipes;
  } catch (error) {
    for (const end of opened) closeSync(end);
    throw error;
  }
}

function delay(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms));
}

/** One adapter process with its group, its pipes and its log. */
export class AdapterProcess {
  readonly group: number;
  /** Ends of the pipes for the lane's worker: to write, to read and wait, to read without waiting. */
  readonly write: number;
  readonly read: number;
  readonly peek: number;
  readonly inPath: string;
  /** Bytes that no adapter can know; written into its output to wake a reader, see `wake`. */
  readonly wakeToken: Buffer;
  readonly exited: Promise<Exit>;
  readonly #folder: string;
  readonly #mark: string;
  readonly #isShell: boolean;
  readonly #killAfterMs: number;
  readonly #log = new LogTail(LOG_LIMIT_BYTES);
  readonly #logEnded: Promise<void>;
  readonly #logStream: Socket;
  #exit: Exit | null = null;
  #ending: Promise<void> | null = null;

  static async start(options: StartOptions): Promise<AdapterProcess> {
    const folder = scratchFolder();
    const pipes = await openPipes(folder);
    return new AdapterProcess(options, folder, pipes);
  }

  private constructor(options: StartOptions, folder: string, pipes: Pipes) {
    this.#folder = folder;
    this.#killAfterMs = options.killAfterMs;
    this.#mark = newMark();
    this.wakeToken = Buffer.from(`\0${randomBytes(12).toString('hex')}\0`);
    this.write = pipes.write;
    this.read = pipes.read;
    this.peek = pipes.peek;
    this.inPath = join(folder, 'in');
    const { line, isPlain } = shellLine(options.command);
    this.#isShell = !isPlain;
    const own = { path: searchPath, home: join(folder, 'home'), mark: this.#mark };
    const child = spawn('/bin/sh', ['-c', line], {
      cwd: options.folder,
      detached: true,
      stdio: [pipes.childIn, pipes.childOut, pipes.childError],
      env: adapterEnvironment(own, options.environment),
    });
    for (const end of [pipes.childIn, pipes.childOut, pipes.childError]) closeSync(end);
    this.group = child.pid ?? 0;
    guardGroup(this.group);
    this.exited = new Promise((resolve) => {
      const finish = (exit: Exit): void => {
        this.#exit ??= exit;
        resolve(this.#exit);
      };
      child.on('exit', (status, signal) => finish({ status, signal }));
      child.on('error', (error) => {
        this.#log.push(Buffer.from(`${error.message}\n`));
        finish({ status: 127, signal: null });
      });
    });
    this.#logStream = new Socket({ fd: pipes.error, readable: true, writable: false });
    this.#logStream.on('data', (chunk: Buffer) => {
      this.#log.push(chunk);
      options.onLog?.(chunk.toString('utf8'));
    });
    this.#logEnded = new Promise((resolve) => {
      this.#logStream.on('error', () => resolve());
      this.#logStream.on('close', () => resolve());
    });
  }

  /** How it ended, or null while it runs. */
  get exit(): Exit | null {
    return this.#exit;
  }

  describeExit(): string {
    return this.#exit ? describeExit(this.#exit, this.#isShell) : 'still running';
  }

  log(): string {
    return this.#log.text();
  }

  /** Waits for it to end by itself, at most so long; true if it did. */
  async waitForExit(limitMs: number): Promise<boolean> {
    if (this.#exit) return true;
    let timer: NodeJS.Timeout | undefined;
    const late = new Promise<void>((resolve) => {
      timer = setTimeout(resolve, limitMs);
    });
    await Promise.race([this.exited, late]);
    clearTimeout(timer);
    return this.#exit !== null;
  }

  /** SIGTERM to the group, SIGKILL when the time is over, then whatever else it left behind. */
  end(): Promise<void> {
    this.#ending ??= this.#end();
    return this.#ending;
  }

  async #end(): Promise<void> {
    if (this.group > 0) {
      await endGroup(this.group, this.#mark, this.#killAfterMs);
      await this.exited;
      releaseGroup(this.group);
    }
    await Promise.race([this.#logEnded, delay(200)]);
    this.#logStream.destroy();
  }

  /**
   * Wakes a reader or writer that waits although the adapter's process has ended, because something it left
   * behind holds the other end: puts the token into its output and empties its input.
   */
  wake(): void {
    this.#withPipe('out', O_WRONLY | O_NONBLOCK, (end) => writeSync(end, this.wakeToken));
    this.#withPipe('in', O_RDONLY | O_NONBLOCK, (end) => readSync(end, Buffer.alloc(65536)));
  }

  #withPipe(name: string, flags: number, use: (end: number) => void): void {
    let end: number | null = null;
    try {
      end = openSync(join(this.#folder, name), flags);
      use(end);
    } catch {
      // Nobody holds the other end, or the pipe is full or empty: then nobody waits either.
    } finally {
      if (end !== null) closeSync(end);
    }
  }

  /** Gives everything back. Only after `end`, and when no thread uses the pipes any more. */
  dispose(): void {
    for (const end of [this.write, this.read, this.peek]) closeSync(end);
    rmSync(this.#folder, { recursive: true, force: true });
  }
}
