import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { readdir, readlink, stat } from 'node:fs/promises';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';

/**
 * sha-256, hex, over the files below a folder: their kind, name, whether they can be run, and contents, in the
 * order of their names. Equal for the same files however they were packed; empty folders do not count.
 */
export async function hashContents(root: string): Promise<string> {
  const lines: string[] = [];
  await walk(root, '', lines);
  lines.sort();
  return createHash('sha256').update(lines.join('')).digest('hex');
}

async function walk(root: string, inside: string, lines: string[]): Promise<void> {
  for (const entry of await readdir(path.join(root, inside), { withFileTypes: true })) {
    const name = inside === '' ? entry.name : `${inside}/${entry.name}`;
    const whole = path.join(root, name);
    if (entry.isDirectory()) await walk(root, name, lines);
    else if (entry.isSymbolicLink()) lines.push(`${name}\0link\0${await readlink(whole)}\0`);
    else if (entry.isFile()) {
      const hash = createHash('sha256');
      await pipeline(createReadStream(whole), hash);
      const { mode } = await stat(whole);
      lines.push(`${name}\0${(mode & 0o100) === 0 ? 'file' : 'program'}\0${hash.digest('hex')}\0`);
    }
  }
}
