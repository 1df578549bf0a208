import { type ChildProcess, spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { mkdirSync, mkdtempSync } from 'node:fs';
import { Socket } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { searchPath } from '../config.ts';
import { GUARDIAN_SCRIPT } from './guardian-script.ts';
import { findLeftovers, isGroupAlive, signalGroup, signalProcess } from './leftovers.ts';

/** The process groups that Tallyroot has started, and the guardian that outlives it just long enough to end them. */

const ownMark = randomBytes(12).toString('hex');
let startCount = 0;
let scratchRoot: string | null = null;
let guardian: ChildProcess | null = null;
const groups = new Set<number>();

/** A folder for one process, with a `home` in it. */
export function scratchFolder(): string {
  scratchRoot ??= mkdtempSync(join(tmpdir(), 'tallyroot-'));
  startCount += 1;
  const folder = join(scratchRoot, String(startCount));
  mkdirSync(join(folder, 'home'), { recursive: true });
  return folder;
}

/** What a process has in its environment, so that all it starts can be recognised. */
export function newMark(): string {
  return `${ownMark}.${startCount}.${randomBytes(4).toString('hex')}`;
}

/** Told about each process group; ends them all when Tallyroot is gone, also after kill -9. */
function tellGuardian(line: string): void {
  if (!guardian) {
    const child = spawn('/bin/sh', ['-c', GUARDIAN_SCRIPT, 'guardian', ownMark, scratchRoot ?? ''], {
      stdio: ['pipe', 'ignore', 'ignore'],
      detached: true,
      cwd: '/',
      env: { PATH: searchPath },
    });
    child.on('exit', () => {
      if (guardian === child) guardian = null;
    });
    child.on('error', () => undefined);
    child.stdin.on('error', () => undefined);
    child.unref();
    const { stdin } = child;
    if (stdin instanceof Socket) stdin.unref();
    guardian = child;
    for (const group of groups) stdin.write(`add ${group}\n`);
  }
  guardian.stdin?.write(line);
}

/** 0, where a process could not be started, is no group. */
export function guardGroup(group: number): void {
  if (group <= 0) return;
  tellGuardian(`add ${group}\n`);
  groups.add(group);
}

export function releaseGroup(group: number): void {
  groups.delete(group);
  tellGuardian(`drop ${group}\n`);
}

/** SIGTERM to the group, SIGKILL when the time is over, then whatever else it left behind. */
export async function endGroup(group: number, mark: string, killAfterMs: number): Promise<void> {
  signalGroup(group, 'SIGTERM');
  const from = performance.now();
  for (let pauseMs = 1; isGroupAlive(group); pauseMs = Math.min(2 * pauseMs, 25)) {
    if (performance.now() - from > killAfterMs) break;
    await delay(pauseMs);
  }
  signalGroup(group, 'SIGKILL');
  // What is killed may just have started something else: look until nothing is found.
  for (let round = 0; round < 50; round += 1) {
    const left = findLeftovers(group, mark);
    if (left.length === 0) break;
    for (const pid of left) signalProcess(pid, 'SIGKILL');
    await delay(2);
  }
}
