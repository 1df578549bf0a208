import { setImmediate as nextTurn } from 'node:timers/promises';
import { crc32 } from 'node:zlib';
import type { Entry, ZipFile } from 'yauzl';
import { AppError } from '../../shared/errors.ts';
import { decodeName, EntryTree, refuseEntry, refuseWhole } from './archive-names.ts';
import type { ArchiveBudget, ArchiveLimits, ArchiveSink } from './archive-sink.ts';
import { ZipReader } from './archive-zip-file.ts';

/**
 * Reads a zip archive by its central directory, and refuses it where the local headers or the space between
 * the entries tell another story: programs that read the file from its start would unpack something else.
 */

const STORED = 0;
const DEFLATED = 8;
const END_RECORD_BYTES = 22;
const ZIP64_END_BYTES = 56 + 20;
/** Behind an entry's data there may be a descriptor: its signature, CRC and two sizes of up to 8 bytes. */
const MAX_DESCRIPTOR_BYTES = 24;
const UNICODE_PATH_EXTRA = 0x7075;

/** The file types of POSIX, as they stand in a mode. */
const refusedTypes = new Map([
  [0o120000, 'is a symbolic link'],
  [0o020000, 'is a device'],
  [0o060000, 'is a device'],
  [0o010000, 'is a named pipe'],
  [0o140000, 'is a socket'],
]);

interface Span {
  name: string;
  from: number;
  to: number;
}

export async function readZip(
  file: string,
  limits: ArchiveLimits,
  budget: ArchiveBudget,
  sink: ArchiveSink,
): Promise<void> {
  const reader = new ZipReader(file);
  const zip = await openZip(reader);
  // What goes wrong while reading is thrown by the calls below; this is for the closing of the file.
  zip.on('error', () => undefined);
  try {
    if (zip.entryCount > limits.entries)
      throw refuseWhole('archive', `it has more than ${limits.entries} files and folders`);
    const tree = new EntryTree('archive', limits.entries);
    const spans: Span[] = [];
    const directoryStart = Number(zip.readEntryCursor);
    for await (const entry of zip.eachEntry()) {
      // Small entries are read without waiting; others get their turn between two handfuls.
      if (spans.length % 64 === 63) await nextTurn();
      spans.push(await readEntry({ reader, zip, entry, tree, budget, sink }));
    }
    tree.finish();
    checkSpans(spans, directoryStart);
    checkEnd(zip);
  } catch (error) {
    if (error instanceof AppError || isSystemError(error)) throw error;
    throw refuseWhole('archive', `it is damaged (${messageOf(error)})`, error);
  } finally {
    zip.close();
  }
}

function messageOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}

/** A fault of this machine, such as a full disk, and none of the archive. */
function isSystemError(error: unknown): boolean {
  return error instanceof Error && 'syscall' in error;
}

async function openZip(reader: ZipReader): Promise<ZipFile> {
  try {
    return await reader.open();
  } catch (error) {
    reader.close(() => undefined);
    if (isSystemError(error)) throw error;
    throw refuseWhole('archive', `its directory cannot be read (${messageOf(error)})`, error);
  }
}

/** The directory must end where the end record starts, or entries behind it would go unseen. */
function checkEnd(zip: ZipFile): void {
  const end = zip.fileSize - END_RECORD_BYTES - zip.comment.length;
  const cursor = Number(zip.readEntryCursor);
  if (cursor !== end && cursor !== end - ZIP64_END_BYTES)
    throw refuseWhole('archive', 'its directory holds something besides its entries');
}

function checkSpans(spans: Span[], directoryStart: number): void {
  let at = 0;
  for (const span of [...spans].sort((a, b) => a.from - b.from)) {
    if (span.from < at) throw refuseEntry('archive', span.name, 'shares its bytes with another entry');
    if (span.from > at + (at === 0 ? 0 : MAX_DESCRIPTOR_BYTES))
      throw refuseEntry('archive', span.name, 'comes after bytes that belong to no entry');
    at = span.to;
  }
  if (directoryStart < at || directoryStart > at + MAX_DESCRIPTOR_BYTES)
    throw refuseWhole('archive', 'bytes before its directory belong to no entry');
}

/** Names without the UTF-8 flag are taken as UTF-8 too, since common programs leave the flag out. */
function nameOf(entry: Entry): string {
  const name = decodeName(entry.fileNameRaw) ?? '\uFFFD';
  for (const extra of entry.extraFields) {
    if (extra.id === UNICODE_PATH_EXTRA && decodeName(extra.data.subarray(5)) !== name)
      throw refuseEntry('archive', name, 'has a second name in its extra field');
  }
  return name;
}

async function readEntry(context: {
  reader: ZipReader;
  zip: ZipFile;
  entry: Entry;
  tree: EntryTree;
  budget: ArchiveBudget;
  sink: ArchiveSink;
}): Promise<Span> {
  const { reader, zip, entry, tree, budget, sink } = context;
  const name = nameOf(entry);
  const mode = entry.externalFileAttributes >>> 16;
  const type = mode & 0o170000;
  const isFolder = name.endsWith('/');
  if (entry.isEncrypted()) throw refuseEntry('archive', name, 'is encrypted');
  const refusedType = refusedTypes.get(type);
  if (refusedType !== undefined) throw refuseEntry('archive', name, refusedType);
  if (type !== 0 && type !== (isFolder ? 0o040000 : 0o100000))
    throw refuseEntry('archive', name, 'is neither a file nor a folder');
  if (entry.compressionMethod !== STORED && entry.compressionMethod !== DEFLATED)
    throw refuseEntry(
      'archive',
      name,
      `is compressed in a way (${entry.compressionMethod}) that is not known here`,
    );
  const path = tree.add(name, isFolder ? 'folder' : 'file');
  budget.addOverhead(entry.fileNameLength + entry.extraFieldLength + entry.fileCommentLength);
  const local = await zip.readLocalFileHeaderPromise(entry, { minimal: false });
  if (!local.fileName.equals(entry.fileNameRaw))
    throw refuseEntry('archive', name, 'has another name in its own header than in the directory');
  const hasDescriptor = (local.generalPurposeBitFlag & 8) !== 0;
  const isLarge = local.compressedSize === 0xffffffff;
  if (
    local.compressionMethod !== entry.compressionMethod ||
    (!hasDescriptor && !isLarge && local.compressedSize !== entry.compressedSize)
  )
    throw refuseEntry('archive', name, 'is described differently in its own header and in the directory');
  const span = {
    name,
    from: entry.relativeOffsetOfLocalHeader,
    to: local.fileDataStart + entry.compressedSize,
  };
  if (isFolder) {
    if (entry.uncompressedSize > 0) throw refuseEntry('archive', name, 'is a folder with contents');
    sink.folder(path);
    return span;
  }
  budget.addFile();
  sink.startFile(path, type === 0 ? 0o600 : mode);
  try {
    await readBody(reader, entry, local.fileDataStart, (chunk) => {
      budget.addBytes(chunk.length, name);
      sink.write(chunk);
    });
  } catch (error) {
    if (error instanceof AppError || isSystemError(error)) throw error;
    throw refuseEntry('archive', name, `is damaged (${messageOf(error)})`, error);
  } finally {
    sink.endFile();
  }
  return span;
}

/** Inflates and checks the data: length, CRC, and that nothing follows behind the compressed stream. */
async function readBody(
  reader: ZipReader,
  entry: Entry,
  start: number,
  take: (chunk: Buffer) => void,
): Promise<void> {
  let length = 0;
  let sum = 0;
  const isDeflated = entry.compressionMethod === DEFLATED;
  for await (const chunk of reader.contents(start, entry.compressedSize, isDeflated)) {
    length += chunk.length;
    sum = crc32(chunk, sum);
    take(chunk);
  }
  if (length !== entry.uncompressedSize) throw new Error('its length is not the one that the directory says');
  if (sum !== entry.crc32) throw new Error('its checksum does not match');
}
