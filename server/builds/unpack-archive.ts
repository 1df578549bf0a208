import { createReadStream } from 'node:fs';
import { chmod, lstat, mkdtemp, open, readdir, rename, rm, stat } from 'node:fs/promises';
import path from 'node:path';
import { pipeline } from 'node:stream';
import { createGunzip } from 'node:zlib';
import { AppError } from '../../shared/errors.ts';
import { refuseWhole } from './archive-names.ts';
import {
  ArchiveBudget,
  type ArchiveLimits,
  type ArchiveSink,
  type ArchiveTotals,
  archiveLimits,
  FolderSink,
  noSink,
} from './archive-sink.ts';
import { looksLikeTar, readTar } from './archive-tar.ts';
import { readZip } from './archive-zip.ts';

type Read = (sink: ArchiveSink) => Promise<ArchiveTotals>;

/**
 * Unpacks a .tar, .tar.gz or .zip (told by its content, not by its name) into a folder that does not exist yet.
 * The archive is read to its end twice: first without writing anything, so that a hostile one costs no disk and
 * leaves nothing behind; then, under the same rules, into a folder beside `into` that takes its place when all
 * is there. A single folder at the top is taken off. Throws AppError `unprocessable` with the entry and the
 * reason, and `conflict` where `into` exists.
 */
export async function unpackArchive(
  file: string,
  into: string,
  limits: ArchiveLimits = archiveLimits,
): Promise<ArchiveTotals> {
  if (await exists(into)) throw new AppError('conflict', `There is something at ${into} already.`);
  const read = await readerOf(file, limits);
  const seen = await read(noSink);
  if (seen.files === 0) throw refuseWhole('archive', 'there is no file in it');
  const partial = await mkdtemp(`${into}.part-`);
  try {
    const totals = await read(new FolderSink(partial));
    const top = await topOf(partial);
    await chmod(top, 0o700);
    await rename(top, into);
    return totals;
  } finally {
    await rm(partial, { recursive: true, force: true });
  }
}

async function exists(name: string): Promise<boolean> {
  try {
    await lstat(name);
    return true;
  } catch {
    return false;
  }
}

/** The one folder that holds everything, or the whole. */
async function topOf(folder: string): Promise<string> {
  const [first, ...others] = await readdir(folder, { withFileTypes: true });
  return first?.isDirectory() && others.length === 0 ? path.join(folder, first.name) : folder;
}

async function readerOf(file: string, limits: ArchiveLimits): Promise<Read> {
  const start = await readStart(file);
  const under = (read: (budget: ArchiveBudget, sink: ArchiveSink) => Promise<void>): Read => {
    return async (sink) => {
      const budget = new ArchiveBudget(limits);
      await read(budget, sink);
      return budget.totals;
    };
  };
  if (start.subarray(0, 2).equals(Buffer.from([0x1f, 0x8b])))
    return under((budget, sink) => readGzippedTar(file, limits, budget, sink));
  if (start.subarray(0, 4).equals(Buffer.from('PK\x03\x04', 'latin1')))
    return under((budget, sink) => readZip(file, limits, budget, sink));
  if (looksLikeTar(start))
    return under((budget, sink) => readTar(bytesOf(createReadStream(file)), limits, budget, sink));
  throw refuseWhole('archive', 'it is no tar, no gzipped tar and no zip archive');
}

async function readStart(file: string): Promise<Buffer> {
  const handle = await open(file, 'r');
  try {
    const { buffer, bytesRead } = await handle.read(Buffer.alloc(512), 0, 512, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await handle.close();
  }
}

async function* bytesOf(stream: AsyncIterable<unknown>): AsyncGenerator<Buffer> {
  for await (const chunk of stream) if (Buffer.isBuffer(chunk)) yield chunk;
}

const gzipFaults: Record<string, string> = {
  Z_BUF_ERROR: 'it is cut short',
  Z_DATA_ERROR: 'its compressed data is damaged',
};

async function readGzippedTar(
  file: string,
  limits: ArchiveLimits,
  budget: ArchiveBudget,
  sink: ArchiveSink,
): Promise<void> {
  const { size } = await stat(file);
  const gunzip = createGunzip();
  // Errors of the file reach the loop through the last stream of the pipeline.
  pipeline(createReadStream(file), gunzip, () => undefined);
  try {
    await readTar(bytesOf(gunzip), limits, budget, sink);
  } catch (error) {
    const fault = error instanceof Error && 'code' in error ? gzipFaults[String(error.code)] : undefined;
    throw fault === undefined ? error : refuseWhole('archive', fault, error);
  }
  // The decompressor passes over what follows the last gzip member; an honest file has nothing there.
  if (gunzip.bytesWritten !== size)
    throw refuseWhole('archive', 'something follows behind its compressed data');
}
