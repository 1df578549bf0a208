import { deflateRawSync, inflateRawSync } from 'node:zlib';
import { type Path, pathKinds } from '../../shared/schemas/path.ts';
import { columnsToPath, pathToColumns } from './path-recorder.ts';

/**
 * A path as bytes for storage: a version byte, then, deflated, the counts of lines and of lines that were cut
 * (32 bits each), the kinds, and x, a, b as raw little-endian binary64, column by column. Only the bits count:
 * nothing is rounded, and infinities and NaN are kept.
 */
const VERSION = 1;
const HEAD_BYTES = 8;
const LEVEL = 1;

export function pathToBytes(path: Path): Buffer {
  const { kinds, values } = pathToColumns(path);
  const count = kinds.length;
  const raw = Buffer.alloc(HEAD_BYTES + count * 25);
  raw.writeUInt32LE(count, 0);
  raw.writeUInt32LE(Math.min(path.cut, 0xffffffff), 4);
  raw.set(kinds, HEAD_BYTES);
  for (let line = 0; line < count; line += 1) {
    for (let column = 0; column < 3; column += 1) {
      const at = HEAD_BYTES + count + 8 * (column * count + line);
      raw.writeDoubleLE(values[3 * line + column] ?? Number.NaN, at);
    }
  }
  return Buffer.concat([Buffer.of(VERSION), deflateRawSync(raw, { level: LEVEL })]);
}

/** Throws RangeError where the bytes are no path. */
export function pathFromBytes(bytes: Uint8Array): Path {
  if (bytes[0] !== VERSION) throw new RangeError('These bytes are no path of a known version.');
  const raw = inflateRawSync(bytes.subarray(1));
  const count = raw.length < HEAD_BYTES ? -1 : raw.readUInt32LE(0);
  if (raw.length !== HEAD_BYTES + count * 25) throw new RangeError('These bytes are no whole path.');
  const kinds = Uint8Array.from(raw.subarray(HEAD_BYTES, HEAD_BYTES + count));
  if (kinds.some((kind) => kind >= pathKinds.length)) throw new RangeError('A line of an unknown kind.');
  const values = new Float64Array(3 * count);
  for (let line = 0; line < count; line += 1) {
    for (let column = 0; column < 3; column += 1) {
      values[3 * line + column] = raw.readDoubleLE(HEAD_BYTES + count + 8 * (column * count + line));
    }
  }
  return columnsToPath({ kinds, values, cut: raw.readUInt32LE(4) });
}
