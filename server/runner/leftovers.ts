import { readdirSync, readFileSync } from 'node:fs';
import { MARK_NAME } from './adapter-environment.ts';

/**
 * Processes that still run and belong to one adapter: of its process group, of its session, or with its mark in
 * the environment they were started with. Reads /proc; where there is none, only the group can be ended.
 */
export function findLeftovers(group: number, mark: string): number[] {
  const found: number[] = [];
  for (const name of listProcesses()) {
    const pid = Number(name);
    if (!Number.isInteger(pid) || pid === process.pid) continue;
    if (isOfGroup(name, group) || hasMark(name, mark)) found.push(pid);
  }
  return found;
}

/** Whether the group or session has a process that runs; one that has ended and waits to be reaped has not. */
export function isGroupAlive(group: number): boolean {
  const names = listProcesses();
  if (names.length === 0) return signalGroup(group, 0);
  return names.some((name) => isOfGroup(name, group));
}

/** Sends a signal to a process group; false where there is no such group any more. */
export function signalGroup(group: number, signal: NodeJS.Signals | 0): boolean {
  return signalProcess(-group, signal);
}

export function signalProcess(pid: number, signal: NodeJS.Signals | 0): boolean {
  try {
    return process.kill(pid, signal);
  } catch {
    return false; // gone already, or not ours
  }
}

function listProcesses(): string[] {
  try {
    return readdirSync('/proc').filter((name) => /^\d+$/.test(name));
  } catch {
    return [];
  }
}

/** Fields of /proc/PID/stat behind the command's name, which may hold anything: state, parent, group, session. */
function isOfGroup(name: string, group: number): boolean {
  const stat = readProcessFile(name, 'stat');
  const [state, , ownGroup, session] = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
  if (state === undefined || state === 'Z' || state === 'X') return false;
  return Number(ownGroup) === group || Number(session) === group;
}

function hasMark(name: string, mark: string): boolean {
  const environment = readProcessFile(name, 'environ');
  return environment.includes(`${MARK_NAME}=${mark}\0`);
}

function readProcessFile(name: string, file: string): string {
  try {
    return readFileSync(`/proc/${name}/${file}`, 'latin1');
  } catch {
    return ''; // it ended meanwhile, or belongs to another user
  }
}
