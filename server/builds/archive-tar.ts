import { Header } from 'tar';
import { BLOCK_BYTES, BlockReader } from './archive-blocks.ts';
import { decodeName, EntryTree, refuseEntry, refuseWhole } from './archive-names.ts';
import { readPax } from './archive-pax.ts';
import type { ArchiveBudget, ArchiveLimits, ArchiveSink } from './archive-sink.ts';

/**
 * Reads a tar stream entry by entry. The headers are decoded by the tar package; the loop is our own, because
 * an archive from a stranger must be refused where an ordinary reader skips, repairs or cuts: a bad checksum,
 * an unknown kind, a missing end mark, bytes behind the end.
 */

const MAX_EXTENSION_BYTES = 64 * 1024;

const refusedKinds: Record<string, string> = {
  Link: 'is a hard link',
  SymbolicLink: 'is a symbolic link',
  CharacterDevice: 'is a device',
  BlockDevice: 'is a device',
  FIFO: 'is a named pipe',
  SparseFile: 'is a sparse file',
};

/** What extension headers say about the entry behind them. */
interface Extension {
  path: string | null;
  size: number | null;
}

/** True where these bytes are the first header of a tar archive. */
export function looksLikeTar(start: Buffer): boolean {
  return (
    start.length >= BLOCK_BYTES && !isZero(start) && decodeHeader(start.subarray(0, BLOCK_BYTES)) !== null
  );
}

export async function readTar(
  chunks: AsyncIterable<Buffer>,
  limits: ArchiveLimits,
  budget: ArchiveBudget,
  sink: ArchiveSink,
): Promise<void> {
  const reader = new BlockReader(chunks);
  const tree = new EntryTree('archive', limits.entries);
  try {
    let extension: Extension = { path: null, size: null };
    for (;;) {
      const block = await readBlock(reader, budget);
      if (isZero(block)) {
        tree.finish();
        return await readEnd(reader, budget);
      }
      const header = decodeHeader(block);
      if (header === null)
        throw refuseWhole('archive', 'a header in it is damaged (its checksum does not match)');
      if (isExtension(header)) {
        extension = await readExtension(reader, header, extension, budget);
        continue;
      }
      await readEntry({ reader, header, extension, tree, budget, sink });
      extension = { path: null, size: null };
    }
  } finally {
    await reader.close();
  }
}

function isZero(block: Buffer): boolean {
  return block.every((byte) => byte === 0);
}

/** Null where the checksum or a number in it is wrong. */
function decodeHeader(block: Buffer): Header | null {
  try {
    const header = new Header(block, 0);
    return header.cksumValid ? header : null;
  } catch {
    return null;
  }
}

async function readBlock(reader: BlockReader, budget: ArchiveBudget): Promise<Buffer> {
  const block = await reader.take(BLOCK_BYTES);
  if (block === null)
    throw refuseWhole('archive', 'it ends without its end mark, so a part of it is missing');
  budget.addOverhead(BLOCK_BYTES);
  return block;
}

/** The end is a second block of zeros and then, to the end of the file, zeros only. */
async function readEnd(reader: BlockReader, budget: ArchiveBudget): Promise<void> {
  if (!isZero(await readBlock(reader, budget)))
    throw refuseWhole('archive', 'something follows behind its end mark');
  for await (const chunk of reader.rest()) {
    budget.addOverhead(chunk.length);
    if (!isZero(chunk)) throw refuseWhole('archive', 'something follows behind its end mark');
  }
}

const extensionKinds = new Set([
  'ExtendedHeader',
  'GlobalExtendedHeader',
  'NextFileHasLongPath',
  'NextFileHasLongLinkpath',
]);

function isExtension(header: Header): boolean {
  return extensionKinds.has(header.type);
}

async function readExtension(
  reader: BlockReader,
  header: Header,
  known: Extension,
  budget: ArchiveBudget,
): Promise<Extension> {
  const size = header.size ?? -1;
  if (size < 0 || size > MAX_EXTENSION_BYTES)
    throw refuseWhole('archive', `an extended header in it is longer than ${MAX_EXTENSION_BYTES} bytes`);
  const parts: Buffer[] = [];
  for await (const chunk of reader.body(size)) {
    budget.addOverhead(chunk.length);
    parts.push(chunk);
  }
  const bytes = Buffer.concat(parts);
  if (header.type === 'NextFileHasLongLinkpath') return known;
  if (header.type === 'NextFileHasLongPath') {
    // The name ends with one NUL; a second one would hide what follows from some readers.
    const text = decodeName(bytes.at(-1) === 0 ? bytes.subarray(0, -1) : bytes);
    return withPath(known, text ?? '\uFFFD');
  }
  const fields = readPax(bytes);
  if (fields === null) throw refuseWhole('archive', 'an extended header in it is damaged');
  const sparse = [...fields.keys()].find((key) => key.startsWith('GNU.sparse'));
  if (sparse !== undefined) throw refuseWhole('archive', 'it holds a sparse file');
  const path = fields.get('path');
  const sizeText = fields.get('size');
  if (header.type === 'GlobalExtendedHeader') {
    if (path !== undefined || sizeText !== undefined)
      throw refuseWhole('archive', 'a global header in it renames or resizes every entry');
    return known;
  }
  const next = path === undefined ? known : withPath(known, decodeName(path) ?? '\uFFFD');
  if (sizeText === undefined) return next;
  const digits = decodeName(sizeText) ?? '';
  if (!/^\d{1,15}$/.test(digits)) throw refuseWhole('archive', 'an extended header in it has no proper size');
  return { ...next, size: Number(digits) };
}

function withPath(known: Extension, path: string): Extension {
  if (known.path !== null) throw refuseEntry('archive', path, 'is named twice in extended headers');
  return { ...known, path };
}

async function readEntry(context: {
  reader: BlockReader;
  header: Header;
  extension: Extension;
  tree: EntryTree;
  budget: ArchiveBudget;
  sink: ArchiveSink;
}): Promise<void> {
  const { reader, header, extension, tree, budget, sink } = context;
  const name = extension.path ?? header.path ?? '';
  const isFolder = header.type === 'Directory';
  const isFile = header.type === 'File' || header.type === 'OldFile' || header.type === 'ContiguousFile';
  if (!isFolder && !isFile)
    throw refuseEntry('archive', name, refusedKinds[header.type] ?? 'is neither a file nor a folder');
  const path = tree.add(name, isFolder ? 'folder' : 'file');
  if (isFolder) {
    if ((extension.size ?? 0) > 0) throw refuseEntry('archive', name, 'is a folder with contents');
    sink.folder(path);
    return;
  }
  const size = extension.size ?? header.size;
  if (size === undefined) throw refuseEntry('archive', name, 'has no proper size');
  budget.addFile();
  sink.startFile(path, header.mode ?? 0o600);
  try {
    for await (const chunk of reader.body(size)) {
      budget.addBytes(chunk.length, name);
      sink.write(chunk);
    }
  } finally {
    sink.endFile();
  }
}
