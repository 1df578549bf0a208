import { crc32, deflateRawSync } from 'node:zlib';

/** Archives written byte by byte, since libraries refuse to write the hostile ones. */

export interface TarEntry {
  name: string;
  /** '0' file, '5' folder, '1' hard link, '2' symbolic link, '3' and '4' devices, '6' FIFO, 'x', 'g', 'L'. */
  type?: string;
  body?: string | Buffer;
  mode?: number;
  link?: string;
  /** What the header says, where it lies. */
  size?: number;
}

export const tarEnd = Buffer.alloc(1024);

function octal(value: number, width: number): string {
  return `${value.toString(8).padStart(width - 1, '0')}\0`;
}

export function tarHeader(entry: TarEntry): Buffer {
  const block = Buffer.alloc(512);
  const length = Buffer.byteLength(entry.body ?? '');
  block.write(entry.name, 0, 100, 'utf8');
  block.write(octal(entry.mode ?? 0o644, 8), 100, 'latin1');
  block.write(octal(0, 8), 108, 'latin1');
  block.write(octal(0, 8), 116, 'latin1');
  block.write(octal(entry.size ?? length, 12), 124, 'latin1');
  block.write(octal(0, 12), 136, 'latin1');
  block.write(entry.type ?? '0', 156, 'latin1');
  block.write(entry.link ?? '', 157, 100, 'utf8');
  block.write('ustar\x0000', 257, 'latin1');
  return withSum(block);
}

/** Sets the checksum: the sum of the bytes with its own eight taken as blanks. */
export function withSum(block: Buffer): Buffer {
  block.fill(0x20, 148, 156);
  const sum = block.reduce((total, byte) => total + byte, 0);
  block.write(`${sum.toString(8).padStart(6, '0')}\0 `, 148, 'latin1');
  return block;
}

export function tarEntry(entry: TarEntry): Buffer {
  const body = Buffer.from(entry.body ?? '');
  return Buffer.concat([tarHeader(entry), body, Buffer.alloc((512 - (body.length % 512)) % 512)]);
}

export function tarOf(...entries: TarEntry[]): Buffer {
  return Buffer.concat([...entries.map(tarEntry), tarEnd]);
}

/** One record of a pax header; its length counts its own digits. */
export function paxRecord(key: string, value: string): string {
  const rest = Buffer.byteLength(` ${key}=${value}\n`);
  let length = rest;
  while (String(length).length + rest !== length) length = String(length).length + rest;
  return `${length} ${key}=${value}\n`;
}

export interface ZipEntry {
  name: string | Buffer;
  body?: string | Buffer;
  /** Deflated where true, else stored. */
  deflated?: boolean;
  /** File type and permissions in the upper half of the attributes. */
  mode?: number;
  flags?: number;
  method?: number;
  crc?: number;
  /** What the headers say, where they lie. */
  size?: number;
  localName?: string;
  /** Data as it is in the file, where it is not what the body compresses to. */
  raw?: Buffer;
  extra?: Buffer;
}

export interface ZipParts {
  before?: Buffer;
  afterData?: Buffer;
  afterDirectory?: Buffer;
  comment?: Buffer;
  count?: number;
}

export function zipOf(entries: ZipEntry[], parts: ZipParts = {}): Buffer {
  const pieces: Buffer[] = parts.before ? [parts.before] : [];
  const central: Buffer[] = [];
  let offset = parts.before?.length ?? 0;
  for (const entry of entries) {
    const local = localPart(entry);
    central.push(centralPart(entry, offset));
    pieces.push(local);
    offset += local.length;
  }
  if (parts.afterData) {
    pieces.push(parts.afterData);
    offset += parts.afterData.length;
  }
  const directory = Buffer.concat(central);
  const end = Buffer.alloc(22);
  const comment = parts.comment ?? Buffer.alloc(0);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(parts.count ?? entries.length, 8);
  end.writeUInt16LE(parts.count ?? entries.length, 10);
  end.writeUInt32LE(directory.length, 12);
  end.writeUInt32LE(offset, 16);
  end.writeUInt16LE(comment.length, 20);
  return Buffer.concat([...pieces, directory, parts.afterDirectory ?? Buffer.alloc(0), end, comment]);
}

function dataOf(entry: ZipEntry): Buffer {
  const body = Buffer.from(entry.body ?? '');
  return entry.raw ?? (entry.deflated ? deflateRawSync(body) : body);
}

/** Fields that the local and the central header share, from the flags to the length of the extra field. */
function sharedFields(entry: ZipEntry, name: Buffer): Buffer {
  const body = Buffer.from(entry.body ?? '');
  const fields = Buffer.alloc(24);
  fields.writeUInt16LE(entry.flags ?? 0x800, 0);
  fields.writeUInt16LE(entry.method ?? (entry.deflated ? 8 : 0), 2);
  fields.writeUInt32LE(entry.crc ?? crc32(body), 8);
  fields.writeUInt32LE(dataOf(entry).length, 12);
  fields.writeUInt32LE(entry.size ?? body.length, 16);
  fields.writeUInt16LE(name.length, 20);
  fields.writeUInt16LE(entry.extra?.length ?? 0, 22);
  return fields;
}

function localPart(entry: ZipEntry): Buffer {
  const name = Buffer.from(entry.localName ?? entry.name);
  const head = Buffer.from([0x50, 0x4b, 3, 4, 20, 0]);
  return Buffer.concat([
    head,
    sharedFields(entry, name),
    name,
    entry.extra ?? Buffer.alloc(0),
    dataOf(entry),
  ]);
}

function centralPart(entry: ZipEntry, offset: number): Buffer {
  const name = Buffer.from(entry.name);
  const head = Buffer.from([0x50, 0x4b, 1, 2, 20, 3, 20, 0]);
  const tail = Buffer.alloc(14);
  tail.writeUInt32LE(((entry.mode ?? 0o100644) << 16) >>> 0, 6);
  tail.writeUInt32LE(offset, 10);
  return Buffer.concat([head, sharedFields(entry, name), tail, name, entry.extra ?? Buffer.alloc(0)]);
}
