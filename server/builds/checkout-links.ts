import { foldName, refuseEntry } from './archive-names.ts';

const MAX_HOPS = 40;

function keyOf(parts: readonly string[]): string {
  return parts.map(foldName).join('/');
}

/**
 * Refuses symbolic links that lead out of their checkout, directly or through other links. Links are followed in
 * memory as the system would follow them, since a path that looks harmless (`a/..`) is not where `a` is a link.
 */
export function checkLinks(links: ReadonlyMap<string, string>): void {
  const targets = new Map([...links].map(([name, target]) => [keyOf(name.split('/')), target]));
  for (const [name, target] of links) {
    const fault = follow(name, target, targets);
    if (fault !== null) throw refuseEntry('commit', name, fault);
  }
}

function follow(name: string, target: string, targets: ReadonlyMap<string, string>): string | null {
  const here = name.split('/').slice(0, -1);
  const ahead: string[] = [];
  const turn = (to: string): string | null => {
    if (to === '' || /\p{Cc}/u.test(to)) return 'is a symbolic link without a proper target';
    if (to.startsWith('/')) return 'is a symbolic link to an absolute path';
    ahead.push(...to.split('/').reverse());
    return null;
  };
  const fault = turn(target);
  if (fault !== null) return fault;
  let hops = 0;
  for (let part = ahead.pop(); part !== undefined; part = ahead.pop()) {
    if (part === '' || part === '.') continue;
    if (part === '..') {
      if (here.length === 0) return 'is a symbolic link that leads out of the checkout';
      here.pop();
      continue;
    }
    here.push(part);
    const next = targets.get(keyOf(here));
    if (next === undefined) continue;
    hops += 1;
    if (hops > MAX_HOPS) return 'is a symbolic link that leads in a circle';
    here.pop();
    const nextFault = turn(next);
    if (nextFault !== null) return nextFault;
  }
  return null;
}
