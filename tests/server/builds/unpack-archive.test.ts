import { execFileSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import {
  appendFileSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { deflateRawSync, gzipSync } from 'node:zlib';
import { create } from 'tar';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { unpackArchive } from '../../../server/builds/unpack-archive.ts';
import { AppError } from '../../../shared/errors.ts';
import {
  paxRecord,
  type TarEntry,
  tarEnd,
  tarEntry,
  tarHeader,
  tarOf,
  withSum,
  type ZipEntry,
  zipOf,
} from '../../helpers/archives.ts';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'archives-'));
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

const limits = { entries: 500, bytes: 1024 * 1024 };

function put(bytes: Buffer): string {
  const file = join(folder, 'upload');
  writeFileSync(file, bytes);
  return file;
}

async function refusalOf(bytes: Buffer, under = limits): Promise<AppError> {
  const file = put(bytes);
  const refusal = await unpackArchive(file, join(folder, 'out'), under).then(
    () => null,
    (error: unknown) => error,
  );
  if (!(refusal instanceof AppError)) throw new Error(`was not refused: ${String(refusal)}`);
  expect(readdirSync(folder), 'nothing is left on disk').toEqual(['upload']);
  return refusal;
}

/** Entries that are at fault, each in a tar and in a zip archive. */
function inBoth(name: string): [string, Buffer][] {
  const good = { name: 'good.c', body: 'int x;' };
  return [
    ['tar', tarOf(good, { name, body: 'x' })],
    [
      'tar.gz',
      gzipSync(tarOf(good, { name: 'short', type: 'L', body: `${name}\0` }, { name: 'short', body: 'x' })),
    ],
    [
      'pax',
      tarOf(good, { name: 'p', type: 'x', body: paxRecord('path', name) }, { name: 'short', body: 'x' }),
    ],
    ['zip', zipOf([good, { name, body: 'x' }])],
  ];
}

describe('unpackArchive', () => {
  it('unpacks a tar, a gzipped tar and a zip archive alike, told by their content', async () => {
    const source = join(folder, 'source');
    mkdirSync(join(source, 'lib', 'deep'), { recursive: true });
    writeFileSync(join(source, 'lib', 'run.sh'), '#!/bin/sh\n', { mode: 0o755 });
    writeFileSync(join(source, 'lib', 'deep', 'größe.c'), 'x'.repeat(70_000), { mode: 0o644 });
    await create({ cwd: source, file: join(folder, 'a'), portable: true }, ['lib']);
    await create({ cwd: source, file: join(folder, 'b'), gzip: true }, ['lib']);
    execFileSync('tar', ['-C', source, '-czf', join(folder, 'c'), './lib']);
    writeFileSync(
      join(folder, 'd'),
      zipOf([
        { name: 'lib/', mode: 0o040755 },
        { name: 'lib/run.sh', body: '#!/bin/sh\n', mode: 0o100755 },
        { name: 'lib/deep/größe.c', body: 'x'.repeat(70_000), deflated: true },
      ]),
    );
    for (const name of ['a', 'b', 'c', 'd']) {
      const into = join(folder, `out-${name}`);
      expect(await unpackArchive(join(folder, name), into), name).toEqual({ files: 2, bytes: 70_010 });
      expect(readdirSync(into).sort(), name).toEqual(['deep', 'run.sh']);
      expect(readFileSync(join(into, 'deep', 'größe.c'), 'utf8')).toBe('x'.repeat(70_000));
      expect(statSync(join(into, 'run.sh')).mode & 0o7777).toBe(0o700);
      expect(statSync(join(into, 'deep', 'größe.c')).mode & 0o7777).toBe(0o600);
      expect(statSync(into).mode & 0o7777).toBe(0o700);
    }
  });

  it('unpacks what Git writes, its global header and comment included', async () => {
    const source = join(folder, 'repo');
    mkdirSync(source);
    writeFileSync(join(source, 'a.c'), 'int a;\n');
    const git = (...args: string[]) =>
      execFileSync('git', ['-c', 'user.name=M', '-c', 'user.email=m@x.example', ...args], { cwd: source });
    git('init', '-q');
    git('add', '.');
    git('commit', '-qm', 'first');
    for (const format of ['tar', 'tar.gz', 'zip']) {
      git('archive', '--prefix=lib-1/', `--format=${format}`, '-o', join(folder, format), 'HEAD');
      const into = join(folder, `out-${format}`);
      expect(await unpackArchive(join(folder, format), into)).toEqual({ files: 1, bytes: 7 });
      expect(readdirSync(into)).toEqual(['a.c']);
    }
  });

  it('streams large zip entries under the same checks as small ones', async () => {
    const body = randomBytes(150_000);
    const large: ZipEntry = { name: 'large', body, deflated: true };
    await unpackArchive(put(zipOf([large, { name: 'stored', body }])), join(folder, 'out'));
    for (const name of ['large', 'stored'])
      expect(readFileSync(join(folder, 'out', name)).equals(body)).toBe(true);
    rmSync(join(folder, 'out'), { recursive: true });
    expect((await refusalOf(zipOf([{ ...large, crc: 1 }]))).message).toMatch(/checksum/);
    const trailed = Buffer.concat([deflateRawSync(body), Buffer.from('more')]);
    expect((await refusalOf(zipOf([{ ...large, raw: trailed }]))).message).toMatch(/follows behind/);
    expect((await refusalOf(zipOf([{ ...large, raw: trailed.subarray(0, 100_000) }]))).message).toMatch(
      /damaged/,
    );
  });

  it('takes a folder off the top only where it is alone there', async () => {
    const file = put(tarOf({ name: 'lib/a.c', body: 'a' }, { name: 'README', body: 'b' }));
    await unpackArchive(file, join(folder, 'out'));
    expect(readdirSync(join(folder, 'out')).sort()).toEqual(['README', 'lib']);
  });

  it('keeps only what the owner may do; setuid, setgid and sticky bits are dropped', async () => {
    const file = put(
      tarOf(
        { name: 'a', body: 'a', mode: 0o7777 },
        { name: 'b', body: 'b', mode: 0 },
        { name: 'c/', type: '5', mode: 0 },
      ),
    );
    await unpackArchive(file, join(folder, 'out'));
    const modeOf = (name: string) => (statSync(join(folder, 'out', name)).mode & 0o7777).toString(8);
    expect(['a', 'b', 'c'].map(modeOf)).toEqual(['700', '600', '700']);
  });

  it('does not touch a folder that is there', async () => {
    mkdirSync(join(folder, 'out'));
    await expect(unpackArchive(put(tarOf({ name: 'a' })), join(folder, 'out'))).rejects.toMatchObject({
      code: 'conflict',
    });
  });

  const badNames: [string, RegExp][] = [
    ['/etc/passwd', /absolute path/],
    ['../up.c', /leads out of its folder/],
    ['a/../../up.c', /leads out of its folder/],
    ['a/..', /leads out of its folder/],
    ['C:/up.c', /drive letter/],
    ['C:up.c', /drive letter/],
    ['..\\up.c', /backslash/],
    ['a\\b.c', /backslash/],
    ['a\nb', /control character/],
    ['a\u001b[2Jb', /control character/],
    ['a\u007fb', /control character/],
    ['a\u202eb', /direction/],
    ['a//b', /empty part/],
    ['a/./b', /only a dot/],
    ['.git/config', /Git repository/],
    ['sub/.GIT/config', /Git repository/],
    ['.g\u200cit/config', /Git repository/],
    ['GIT~1/config', /Git repository/],
    [`${'d/'.repeat(70)}x`, /folders deep/],
  ];
  it.each(badNames)('refuses the name %j in every kind of archive', async (name, reason) => {
    for (const [kind, bytes] of inBoth(name)) {
      if (kind === 'tar' && Buffer.byteLength(name) > 100) continue;
      const refusal = await refusalOf(bytes);
      expect(refusal.code, kind).toBe('unprocessable');
      expect(refusal.message, kind).toMatch(reason);
      expect(refusal.message, `${kind}: printed without control characters`).not.toMatch(/[\p{Cc}\u202e]/u);
    }
  });

  it('refuses a NUL, a name longer than 255 bytes and a path longer than 1024 where they can be written', async () => {
    const long = ['a\0b', 'n'.repeat(256), `${'folder-of-20-letters/'.repeat(50)}x`];
    const reasons = [/NUL/, /longer than 255/, /longer than 1024/];
    for (const [index, name] of long.entries()) {
      for (const [kind, bytes] of inBoth(name).slice(1))
        expect((await refusalOf(bytes)).message, kind).toMatch(reasons[index] ?? /never/);
    }
  });

  it('accepts a name of 255 bytes', async () => {
    const name = `${'ä'.repeat(127)}x`;
    for (const [index, [, bytes]] of inBoth(name).slice(1).entries())
      expect(await unpackArchive(put(bytes), join(folder, `out-${index}`))).toEqual({ files: 2, bytes: 7 });
  });

  it('refuses names that are not UTF-8', async () => {
    const header = tarHeader({ name: 'a' });
    header[1] = 0xff;
    const tar = Buffer.concat([withSum(header), tarEnd]);
    const zip = zipOf([{ name: Buffer.from([0x61, 0xff]), flags: 0 }]);
    for (const bytes of [tar, zip]) expect((await refusalOf(bytes)).message).toMatch(/not UTF-8/);
  });

  const badKinds: [string, TarEntry, number, RegExp][] = [
    ['symbolic link', { name: 'l', type: '2', link: '/etc' }, 0o120777, /symbolic link/],
    ['hard link', { name: 'l', type: '1', link: 'good.c' }, 0, /hard link/],
    ['character device', { name: 'd', type: '3' }, 0o020644, /device/],
    ['block device', { name: 'd', type: '4' }, 0o060644, /device/],
    ['FIFO', { name: 'p', type: '6' }, 0o010644, /named pipe/],
    ['socket', { name: 's', type: 's' }, 0o140644, /socket|neither a file nor a folder/],
    ['sparse file', { name: 's', type: 'S' }, 0, /sparse/],
  ];
  it.each(badKinds)('refuses a %s', async (_, entry, mode, reason) => {
    const good = { name: 'good.c', body: 'int x;' };
    expect((await refusalOf(tarOf(good, entry))).message).toMatch(reason);
    if (mode !== 0)
      expect((await refusalOf(zipOf([good, { name: entry.name, body: '/etc', mode }]))).message).toMatch(
        reason,
      );
  });

  const badPairs: [string, [string, string], RegExp][] = [
    ['the same path twice', ['a.c', 'a.c'], /there twice/],
    ['the same path in two spellings', ['a.c', './a.c'], /there twice/],
    ['paths that differ in case', ['Makefile', 'makefile'], /capital letters/],
    ['folders that differ in case', ['Src/a.c', 'src/b.c'], /capital letters/],
    ['sharp s and ss', ['maß', 'MASS'], /capital letters/],
    ['composed and decomposed letters', ['\u00e4.c', 'a\u0308.c'], /encoded/],
    ['a file where another has a folder', ['a', 'a/b'], /file where another entry has a folder/],
    ['a folder where another has a file', ['a/b', 'a'], /file where another entry has a folder/],
    ['a folder twice', ['a/', 'a/'], /there twice/],
  ];
  it.each(badPairs)('refuses %s', async (_, names, reason) => {
    const entries = names.map((name) => ({ name, type: name.endsWith('/') ? '5' : '0' }));
    const zipped = names.map((name) => ({ name, mode: name.endsWith('/') ? 0o040755 : 0o100644 }));
    for (const bytes of [tarOf(...entries), zipOf(zipped)])
      expect((await refusalOf(bytes)).message).toMatch(reason);
  });

  it('refuses a folder that Git would take for a repository, whatever it is called', async () => {
    const layouts = [
      ['lib/HEAD', 'lib/config', 'lib/objects/x', 'lib/refs/x'],
      ['head', 'config', 'objects/x', 'refs/x'],
      ['a/HEAD', 'a/commondir', 'b/objects/x', 'b/refs/x'],
    ];
    for (const names of layouts) {
      const entries = names.map((name) => ({ name, body: 'x' }));
      for (const bytes of [tarOf(...entries), zipOf(entries)])
        expect((await refusalOf(bytes)).message).toMatch(/take for a repository/);
    }
    const file = put(tarOf({ name: 'HEAD', body: 'x' }, { name: 'refs/x', body: 'x' }));
    expect(await unpackArchive(file, join(folder, 'out'))).toEqual({ files: 2, bytes: 2 });
  });

  it('counts folders on the way to a file as entries', async () => {
    const entries = Array.from({ length: 20 }, (_, index) => ({ name: `${index}/${'d/'.repeat(40)}x` }));
    expect((await refusalOf(tarOf(...entries))).message).toMatch(/more than 500 files and folders/);
  });

  it('refuses a million entries', async () => {
    // The first 20,400 have names of their own; the rest need none, since the limit comes first.
    const first = Buffer.concat(
      Array.from({ length: 20_400 }, (_, index) => tarHeader({ name: `f${index}` })),
    );
    const packed = gzipSync(first, { level: 1 });
    const file = join(folder, 'upload');
    for (let round = 0; round < 50; round += 1) appendFileSync(file, packed);
    await expect(unpackArchive(file, join(folder, 'out'))).rejects.toThrow(
      /more than 20000 files and folders/,
    );
    expect(readdirSync(folder)).toEqual(['upload']);
    const zip = zipOf(Array.from({ length: 20_001 }, (_, index) => ({ name: `f${index}` })));
    await expect(unpackArchive(put(zip), join(folder, 'out'))).rejects.toThrow(/more than 20000/);
  });

  it('refuses many gigabytes packed small before it has written anything', async () => {
    const zeros = gzipSync(Buffer.alloc(64 * 1024 * 1024), { level: 9 });
    const header = tarHeader({ name: 'zeros', size: 0o77777777777 }); // 8 GiB − 1
    const bomb = Buffer.concat([gzipSync(header), ...Array<Buffer>(160).fill(zeros)]);
    expect(bomb.length).toBeLessThan(16 * 1024 * 1024);
    const file = put(bomb);
    await expect(unpackArchive(file, join(folder, 'out'))).rejects.toThrow(/larger than 209715200 bytes/);
    expect(readdirSync(folder)).toEqual(['upload']);
  });

  it('counts what a zip entry inflates to, whatever its header says', async () => {
    const body = Buffer.alloc(8 * 1024 * 1024);
    const lying: ZipEntry = { name: 'zeros', deflated: true, raw: deflateRawSync(body), size: 10 };
    expect((await refusalOf(zipOf([lying]))).message).toMatch(/larger than 1048576 bytes/);
    const short: ZipEntry = { name: 'a', body: 'abc', size: 2 };
    expect((await refusalOf(zipOf([{ ...short, deflated: true }]))).message).toMatch(/length/);
  });

  it('refuses zip entries that share bytes, so that one file cannot be counted many times', async () => {
    // The body of the first entry is the second with its own header; the directory points into it.
    const inner = zipOf([{ name: 'b', body: 'x' }]).subarray(0, 32);
    const zip = zipOf([
      { name: 'a', body: inner },
      { name: 'b', body: 'x' },
    ]);
    const second = zip.lastIndexOf(Buffer.from([0x50, 0x4b, 1, 2]));
    zip.writeUInt32LE(31, second + 42);
    expect((await refusalOf(zip)).message).toMatch(/shares its bytes/);
  });

  it('refuses endless headers without files', async () => {
    const pax = tarEntry({ name: 'p', type: 'x', body: paxRecord('comment', 'c'.repeat(60_000)) });
    const many = Buffer.concat([...Array<Buffer>(60).fill(pax), tarEnd]);
    expect((await refusalOf(gzipSync(many))).message).toMatch(/headers more than of files/);
  });

  const good = tarOf({ name: 'a.c', body: 'int a;' }, { name: 'b.c', body: 'b'.repeat(3000) });
  it('refuses an archive cut short, wherever it is cut', async () => {
    const packed = gzipSync(good);
    for (const cut of [600, 1024, 1536, 2000, good.length - 512, good.length - 1024]) {
      expect((await refusalOf(good.subarray(0, cut))).message, String(cut)).toMatch(/cut short|end mark/);
    }
    for (const cut of [20, packed.length - 12, packed.length - 4])
      expect((await refusalOf(packed.subarray(0, cut))).message).toMatch(/cut short/);
    const zip = zipOf([{ name: 'a', body: 'abc' }]);
    for (const cut of [20, 40, zip.length - 1]) await refusalOf(zip.subarray(0, cut));
  });

  it('refuses bytes that belong to nothing', async () => {
    const entry: ZipEntry = { name: 'a', body: 'abc' };
    const junk = Buffer.from('something else that nobody asked for');
    const archives: Buffer[] = [
      Buffer.concat([good, junk]),
      Buffer.concat([good, tarOf({ name: 'hidden' })]),
      Buffer.concat([gzipSync(good), junk]),
      gzipSync(Buffer.concat([good, junk])),
      Buffer.concat([zipOf([entry]), junk]),
      zipOf([entry], { afterData: junk }),
      zipOf([entry], { afterDirectory: junk }),
      zipOf([{ ...entry, deflated: true, raw: Buffer.concat([deflateRawSync(Buffer.from('abc')), junk]) }]),
      zipOf([entry, { name: 'b' }], { count: 1 }),
      zipOf([entry], { before: Buffer.concat([zipOf([{ name: 'other' }]).subarray(0, 35), junk]) }),
    ];
    for (const [index, bytes] of archives.entries())
      expect((await refusalOf(bytes)).message, String(index)).toMatch(
        /follows behind|belong|besides|directory|damaged/,
      );
  });

  it('refuses damage: checksums of tar headers, of gzip and of zip entries', async () => {
    const header = Buffer.from(good);
    header[1030] = 0x41 ^ (header[1030] ?? 0);
    expect((await refusalOf(header)).message).toMatch(/checksum/);
    const packed = gzipSync(good);
    packed.writeUInt32LE(1, packed.length - 8);
    expect((await refusalOf(packed)).message).toMatch(/damaged/);
    for (const deflated of [true, false])
      expect((await refusalOf(zipOf([{ name: 'a', body: 'abc', deflated, crc: 1 }]))).message).toMatch(
        /checksum/,
      );
  });

  it('refuses a zip entry that is encrypted, compressed in another way, or described twice differently', async () => {
    const entries: [ZipEntry, RegExp][] = [
      [{ name: 'a', body: 'abc', flags: 0x801 }, /encrypted/],
      [{ name: 'a', body: 'abc', flags: 0x841 }, /encrypt/],
      [{ name: 'a', body: 'abc', method: 12 }, /compressed in a way \(12\)/],
      [{ name: 'a', body: 'abc', localName: 'b' }, /another name/],
      [{ name: 'a/', body: 'abc', mode: 0o040755 }, /folder with contents/],
      [
        {
          name: 'a',
          extra: Buffer.concat([Buffer.from([0x75, 0x70, 9, 0, 1, 0, 0, 0, 0]), Buffer.from('../b')]),
        },
        /second name/,
      ],
    ];
    for (const [entry, reason] of entries) expect((await refusalOf(zipOf([entry]))).message).toMatch(reason);
  });

  it('refuses extension headers that say two things at once', async () => {
    const path = paxRecord('path', 'b');
    const archives = [
      tarOf({ name: 'p', type: 'x', body: path + path }, { name: 'a' }),
      tarOf({ name: 'p', type: 'x', body: path }, { name: 'l', type: 'L', body: 'c\0' }, { name: 'a' }),
      tarOf({ name: 'p', type: 'g', body: path }, { name: 'a' }),
      tarOf({ name: 'p', type: 'x', body: '99 path=b\n' }, { name: 'a' }),
      tarOf({ name: 'p', type: 'x', body: paxRecord('size', '-1') }, { name: 'a' }),
      tarOf({ name: 'p', type: 'x', body: paxRecord('GNU.sparse.major', '1') }, { name: 'a' }),
    ];
    for (const bytes of archives) expect((await refusalOf(bytes)).code).toBe('unprocessable');
  });

  it('refuses what is no archive, and one without a file', async () => {
    const others = [
      Buffer.alloc(0),
      Buffer.from('hello'),
      gzipSync('hello'),
      Buffer.alloc(2048),
      tarOf({ name: 'a/', type: '5' }),
      zipOf([]),
    ];
    for (const bytes of others) expect((await refusalOf(bytes)).code).toBe('unprocessable');
  });
});
