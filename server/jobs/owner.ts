import { randomBytes } from 'node:crypto';
import { hostname } from 'node:os';

/**
 * The name under which this process claims jobs: host, process id and a random part, since process ids
 * are used again (in a container the first process has the same one after every start).
 */
export function createOwner(): string {
  return `${hostname()}/${process.pid}/${randomBytes(6).toString('hex')}`;
}

/**
 * Whether the process of another owner has certainly ended. Owners on other hosts cannot be looked at;
 * for them, and for a process id that was used again, the lease decides.
 */
export function hasEnded(owner: string, self: string): boolean {
  const [host, pidText, token] = owner.split('/');
  const [ownHost, ownPid, ownToken] = self.split('/');
  if (host !== ownHost) return false;
  if (pidText === ownPid) return token !== ownToken;
  try {
    process.kill(Number(pidText), 0);
    return false;
  } catch (error) {
    // EPERM: it lives and belongs to somebody else.
    return error instanceof Error && 'code' in error && error.code === 'ESRCH';
  }
}
