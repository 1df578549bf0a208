import { AppError } from '../../shared/errors.ts';
import { BlockReader } from './archive-blocks.ts';
import { decodeName, refuseWhole } from './archive-names.ts';
import { readGit, streamGit } from './checkout-process.ts';

/** Reading a mirror by its objects: exact bytes, without index, attributes, filters or a work tree. */

const TIME_LIMIT_MS = 60_000;

export interface TreeFile {
  /** As it is in the tree; the rules for names have not been applied. Null where it is not UTF-8. */
  name: string | null;
  kind: 'file' | 'link' | 'submodule';
  isExecutable: boolean;
  id: string;
  bytes: number;
}

function kindOf(mode: string): TreeFile['kind'] | null {
  if (mode === '120000') return 'link';
  if (mode === '160000') return 'submodule';
  return mode.startsWith('100') ? 'file' : null;
}

/** The pieces of a list that Git ends with NUL. */
export function splitNul(bytes: Buffer): Buffer[] {
  const pieces: Buffer[] = [];
  let from = 0;
  for (let at = bytes.indexOf(0); at >= 0; at = bytes.indexOf(0, from)) {
    pieces.push(bytes.subarray(from, at));
    from = at + 1;
  }
  if (from < bytes.length) pieces.push(bytes.subarray(from));
  return pieces;
}

/** Every file of a commit. */
export async function listTree(mirror: string, commit: string): Promise<TreeFile[]> {
  const listed = await readGit(
    ['ls-tree', '-r', '-z', '-l', '--full-tree', commit],
    { repository: mirror, timeLimitMs: TIME_LIMIT_MS },
    'The files of the commit could not be listed',
  );
  return splitNul(listed).map((line) => {
    const tab = line.indexOf(0x09);
    const [mode = '', , id = '', size = ''] = line.toString('latin1', 0, tab).split(/ +/);
    const kind = kindOf(mode);
    if (kind === null)
      throw refuseWhole('commit', `it holds an entry of a kind (${mode}) that is not known here`);
    return {
      name: decodeName(line.subarray(tab + 1)),
      kind,
      isExecutable: kind === 'file' && (Number.parseInt(mode, 8) & 0o100) !== 0,
      id,
      bytes: kind === 'submodule' ? 0 : Number(size),
    };
  });
}

/** Reads objects one after another in the order given; `take` gets the pieces of each, `end` is called behind it. */
export async function readBlobs<T extends { id: string; bytes: number }>(
  mirror: string,
  blobs: readonly T[],
  into: { start?: (blob: T) => void; take: (blob: T, chunk: Buffer) => void; end?: (blob: T) => void },
): Promise<void> {
  if (blobs.length === 0) return;
  const stream = streamGit(['cat-file', '--batch'], {
    repository: mirror,
    timeLimitMs: TIME_LIMIT_MS,
    input: blobs.map((blob) => `${blob.id}\n`).join(''),
  });
  const reader = new BlockReader(stream, 'commit');
  try {
    for (const blob of blobs) {
      const head = `${blob.id} blob ${blob.bytes}\n`;
      if ((await reader.take(head.length))?.toString('latin1') !== head)
        throw new AppError('unprocessable', `Object ${blob.id} of the repository cannot be read.`);
      into.start?.(blob);
      for await (const chunk of reader.stretch(blob.bytes)) into.take(blob, chunk);
      into.end?.(blob);
      await reader.take(1);
    }
  } finally {
    await reader.close();
  }
}

/** Small objects, whole. */
export async function readWhole(
  mirror: string,
  blobs: readonly { id: string; bytes: number }[],
): Promise<Map<string, Buffer>> {
  const wanted = [...new Map(blobs.map((blob) => [blob.id, blob])).values()];
  const parts = new Map<string, Buffer[]>(wanted.map((blob) => [blob.id, []]));
  await readBlobs(mirror, wanted, { take: (blob, chunk) => parts.get(blob.id)?.push(chunk) });
  return new Map([...parts].map(([id, pieces]) => [id, Buffer.concat(pieces)]));
}
