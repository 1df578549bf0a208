import { createHash } from 'node:crypto';
import { constants } from 'node:fs';
import { lstat, open, readdir, readlink } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '../../shared/errors.ts';
import { listTree, readWhole } from './checkout-objects.ts';

export interface CodeFile {
  path: string;
  kind: 'file' | 'link' | 'submodule';
  bytes: number;
  isExecutable: boolean;
}

/** One state of the source, from a folder or from a commit. */
export interface CodeSide {
  files: Map<string, CodeFile>;
  /** Equal for equal contents, among sides of one make. */
  identify(file: CodeFile): Promise<string>;
  /** The contents of small files, by path. A link's contents are its target. */
  read(files: readonly CodeFile[]): Promise<Map<string, Buffer>>;
}

/** Made by tools, not by authors; comparing them would drown the rest. */
const skippedFolders = new Set(['.git', 'node_modules', '__pycache__', '.venv']);

export async function folderSide(root: string, maxFiles: number): Promise<CodeSide> {
  const files = new Map<string, CodeFile>();
  await walk(root, '', files, maxFiles);
  const read = async (file: CodeFile): Promise<Buffer> => {
    const name = path.join(root, file.path);
    if (file.kind === 'link') return Buffer.from(await readlink(name));
    const handle = await openFile(name);
    try {
      const { buffer, bytesRead } = await handle.read(Buffer.alloc(file.bytes), 0, file.bytes, 0);
      return buffer.subarray(0, bytesRead);
    } finally {
      await handle.close();
    }
  };
  return {
    files,
    async identify(file) {
      const hash = createHash('sha256').update(`${file.kind}\0`);
      if (file.kind === 'link') return hash.update(await read(file)).digest('hex');
      const handle = await openFile(path.join(root, file.path));
      for await (const chunk of handle.createReadStream()) hash.update(chunk);
      return hash.digest('hex');
    },
    async read(wanted) {
      const contents = new Map<string, Buffer>();
      for (const file of wanted) contents.set(file.path, await read(file));
      return contents;
    },
  };
}

function openFile(name: string) {
  return open(name, constants.O_RDONLY | constants.O_NOFOLLOW);
}

async function walk(
  root: string,
  inside: string,
  files: Map<string, CodeFile>,
  maxFiles: number,
): Promise<void> {
  for (const entry of await readdir(path.join(root, inside), { withFileTypes: true })) {
    const name = inside === '' ? entry.name : `${inside}/${entry.name}`;
    if (entry.isDirectory()) {
      if (!skippedFolders.has(entry.name)) await walk(root, name, files, maxFiles);
      continue;
    }
    if (!entry.isFile() && !entry.isSymbolicLink()) continue;
    if (files.size >= maxFiles) throw tooMany(maxFiles);
    const { size, mode } = await lstat(path.join(root, name));
    files.set(name, {
      path: name,
      kind: entry.isFile() ? 'file' : 'link',
      bytes: size,
      isExecutable: entry.isFile() && (mode & 0o100) !== 0,
    });
  }
}

function tooMany(maxFiles: number): AppError {
  return new AppError('unprocessable', `There are more than ${maxFiles} files to compare.`);
}

export async function commitSide(mirror: string, commit: string, maxFiles: number): Promise<CodeSide> {
  const listed = await listTree(mirror, commit);
  if (listed.length > maxFiles) throw tooMany(maxFiles);
  const files = new Map<string, CodeFile>();
  const ids = new Map<CodeFile, string>();
  for (const { name, kind, bytes, isExecutable, id } of listed) {
    const file = { path: name ?? '\uFFFD', kind, bytes, isExecutable };
    files.set(file.path, file);
    ids.set(file, id);
  }
  const idOf = (file: CodeFile): string => ids.get(file) ?? '';
  return {
    files,
    identify: async (file) => `${file.kind} ${idOf(file)}`,
    async read(wanted) {
      const blobs = wanted.filter((file) => file.kind !== 'submodule');
      const contents = await readWhole(
        mirror,
        blobs.map((file) => ({ id: idOf(file), bytes: file.bytes })),
      );
      return new Map(
        wanted.map((file) => [
          file.path,
          // A submodule's contents are the commit that it stands at.
          file.kind === 'submodule' ? Buffer.from(idOf(file)) : (contents.get(idOf(file)) ?? Buffer.alloc(0)),
        ]),
      );
    },
  };
}
