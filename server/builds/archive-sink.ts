import { closeSync, constants, mkdirSync, openSync, writeSync } from 'node:fs';
import path from 'node:path';
import { refuseEntry, refuseWhole } from './archive-names.ts';

export interface ArchiveLimits {
  /** Files and folders together, folders on the way to a file included. */
  entries: number;
  /** Unpacked, counted as they stream. */
  bytes: number;
}

export const archiveLimits: ArchiveLimits = { entries: 20_000, bytes: 200 * 1024 * 1024 };

export interface ArchiveTotals {
  files: number;
  bytes: number;
}

/** Where the entries of an archive go. Paths have passed the rules for names. */
export interface ArchiveSink {
  folder(name: string): void;
  startFile(name: string, mode: number): void;
  write(chunk: Buffer): void;
  endFile(): void;
}

/** Takes everything and keeps nothing: for reading an archive to its end before anything is written. */
export const noSink: ArchiveSink = {
  folder: () => undefined,
  startFile: () => undefined,
  write: () => undefined,
  endFile: () => undefined,
};

/** Only what the owner may do is kept, and the owner may always read and write; setuid and its like are dropped. */
export function ownerMode(mode: number): number {
  return (mode & 0o700) | 0o600;
}

/**
 * Writes below one folder. Files are created anew and never through a link (O_EXCL, O_NOFOLLOW), so that a
 * name that slipped through the rules would fail rather than overwrite.
 */
export class FolderSink implements ArchiveSink {
  readonly #root: string;
  readonly #made = new Set<string>();
  #file: number | null = null;

  constructor(root: string) {
    this.#root = root;
  }

  folder(name: string): void {
    if (name === '.' || name === '' || this.#made.has(name)) return;
    mkdirSync(path.join(this.#root, name), { recursive: true, mode: 0o700 });
    this.#made.add(name);
  }

  startFile(name: string, mode: number): void {
    this.folder(path.posix.dirname(name));
    const flags = constants.O_WRONLY | constants.O_CREAT | constants.O_EXCL | constants.O_NOFOLLOW;
    this.#file = openSync(path.join(this.#root, name), flags, ownerMode(mode));
  }

  write(chunk: Buffer): void {
    if (this.#file === null) return;
    for (let done = 0; done < chunk.length; ) done += writeSync(this.#file, chunk, done);
  }

  endFile(): void {
    if (this.#file !== null) closeSync(this.#file);
    this.#file = null;
  }
}

/** Counts what really comes out, whatever the headers say. */
export class ArchiveBudget {
  readonly totals: ArchiveTotals = { files: 0, bytes: 0 };
  readonly #limits: ArchiveLimits;
  #overhead = 0;

  constructor(limits: ArchiveLimits) {
    this.#limits = limits;
  }

  addFile(): void {
    this.totals.files += 1;
  }

  addBytes(count: number, name: string): void {
    this.totals.bytes += count;
    if (this.totals.bytes > this.#limits.bytes)
      throw refuseEntry('archive', name, `makes it larger than ${this.#limits.bytes} bytes unpacked`);
  }

  /** Headers, padding and names: an archive may hold nothing else and still never end. */
  addOverhead(count: number): void {
    this.#overhead += count;
    if (this.#overhead > 65_536 + 4096 * this.#limits.entries)
      throw refuseWhole('archive', 'it consists of headers more than of files');
  }
}
