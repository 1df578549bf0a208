import { spawn } from 'node:child_process';
import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { StringDecoder } from 'node:string_decoder';
import { searchPath } from '../config.ts';
import { adapterEnvironment, describeExit, type Exit, shellLine } from './adapter-environment.ts';
import { endGroup, guardGroup, newMark, releaseGroup, scratchFolder } from './guardian.ts';

/** Starts the lines that prepare a build. */

const KILL_AFTER_MS = 2000;

export interface PrepareLineOptions {
  /** One line for the shell. */
  command: string;
  folder: string;
  home: string;
  environment: Readonly<Record<string, string>>;
  timeLimitMs: number;
  /** What it writes, on either of its outputs, as it comes. */
  onOutput(text: string): void;
  /** Ends it early. */
  signal: AbortSignal;
}

export interface PrepareLineResult {
  /** How it ended, in words. */
  end: string;
  hasSucceeded: boolean;
  isOverTime: boolean;
  elapsedMs: number;
}

/** A home for all the lines of one build; `drop` takes it away. */
export function prepareHome(): { home: string; drop(): void } {
  const folder = scratchFolder();
  return { home: join(folder, 'home'), drop: () => rmSync(folder, { recursive: true, force: true }) };
}

/**
 * Runs one line to its end, in a process group of its own. Whatever of it is left when the line has ended, has
 * taken too long or is called off, is ended with it.
 */
export async function runPrepareLine(options: PrepareLineOptions): Promise<PrepareLineResult> {
  const from = performance.now();
  const mark = newMark();
  const { line, isPlain } = shellLine(options.command);
  const own = { path: searchPath, home: options.home, mark };
  const child = spawn('/bin/sh', ['-c', line], {
    cwd: options.folder,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: adapterEnvironment(own, options.environment),
  });
  const group = child.pid ?? 0;
  guardGroup(group);
  for (const stream of [child.stdout, child.stderr]) {
    const decoder = new StringDecoder('utf8');
    stream.on('data', (chunk: Buffer) => options.onOutput(decoder.write(chunk)));
    stream.on('error', () => undefined);
  }
  let isOverTime = false;
  let ending: Promise<void> | undefined;
  const end = (): void => {
    if (group > 0) ending ??= endGroup(group, mark, KILL_AFTER_MS);
  };
  const timer = setTimeout(() => {
    isOverTime = true;
    end();
  }, options.timeLimitMs);
  if (options.signal.aborted) end();
  options.signal.addEventListener('abort', end, { once: true });
  const hasClosed = new Promise<void>((resolve) => child.once('close', () => resolve()));
  const exit = await new Promise<Exit>((resolve) => {
    child.on('exit', (status, signal) => resolve({ status, signal }));
    child.on('error', (error) => {
      options.onOutput(`${error.message}\n`);
      resolve({ status: 127, signal: null });
    });
  });
  clearTimeout(timer);
  options.signal.removeEventListener('abort', end);
  // What has been written before the end may still be on its way.
  if (group > 0) await Promise.race([hasClosed, new Promise((resolve) => setTimeout(resolve, 200))]);
  end();
  await ending;
  child.stdout.destroy();
  child.stderr.destroy();
  if (group > 0) releaseGroup(group);
  return {
    end: describeExit(exit, !isPlain),
    hasSucceeded: exit.status === 0 && !isOverTime,
    isOverTime,
    elapsedMs: performance.now() - from,
  };
}
