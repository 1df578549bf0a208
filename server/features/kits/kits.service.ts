import { createHash } from 'node:crypto';
import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { buffer } from 'node:stream/consumers';
import { create } from 'tar';
import { AppError } from '../../../shared/errors.ts';
import type { KitView } from '../../../shared/schemas/kits.ts';

export interface PackedKit extends KitView {
  archive: Buffer;
  /** Of the archive's contents. */
  tag: string;
}

const kitName = /^[a-z][a-z0-9-]{0,39}$/;
const leftOut = new Set(['node_modules', '__pycache__']);

/** Paths below a folder, parted by /; hidden files, what is installed and what is no plain file are left out. */
async function filesBelow(folder: string, below = ''): Promise<string[]> {
  const entries = await readdir(path.join(folder, below), { withFileTypes: true });
  const lists = await Promise.all(
    entries.map(async (entry): Promise<string[]> => {
      const name = path.posix.join(below, entry.name);
      if (entry.name.startsWith('.') || leftOut.has(entry.name)) return [];
      if (entry.isDirectory()) return filesBelow(folder, name);
      return entry.isFile() ? [name] : [];
    }),
  );
  return lists.flat().sort();
}

async function pack(folder: string, name: string): Promise<PackedKit> {
  const cwd = path.join(folder, name);
  const files = await filesBelow(cwd);
  const readme = files.includes('README.md') ? await readFile(path.join(cwd, 'README.md'), 'utf8') : '';
  // The same bytes for the same files: no times, owners or other traces of this machine.
  const archive = await buffer(
    create(
      { cwd, gzip: { level: 9 }, portable: true, mtime: new Date(0), prefix: `tallyroot-kit-${name}` },
      files,
    ),
  );
  return {
    name,
    title: /^# (.+)$/m.exec(readme)?.[1]?.trim() ?? name,
    files,
    bytes: archive.length,
    archive,
    tag: createHash('sha256').update(archive).digest('hex').slice(0, 32),
  };
}

/** The adapter kits that come with the product, each as one archive, packed when it is first asked for. */
export function createKitsService(folder: string) {
  const packed = new Map<string, Promise<PackedKit>>();

  function packOnce(name: string): Promise<PackedKit> {
    const known = packed.get(name);
    if (known) return known;
    const made = pack(folder, name);
    packed.set(name, made);
    made.catch(() => packed.delete(name));
    return made;
  }

  async function names(): Promise<string[]> {
    const entries = await readdir(folder, { withFileTypes: true });
    return entries
      .filter((entry) => entry.isDirectory() && kitName.test(entry.name))
      .map((entry) => entry.name)
      .sort();
  }

  return {
    async list(): Promise<KitView[]> {
      const kits = await Promise.all((await names()).map(packOnce));
      return kits.map(({ name, title, files, bytes }) => ({ name, title, files, bytes }));
    },
    async get(name: string): Promise<PackedKit> {
      if (!(await names()).includes(name)) throw new AppError('not_found', `There is no kit “${name}”.`);
      return packOnce(name);
    },
  };
}

export type KitsService = ReturnType<typeof createKitsService>;
