import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { fetchMirror, openMirror } from '../../../server/builds/checkout-mirror.ts';
import { codeDiffLimits, diffCommits, diffFolders } from '../../../server/builds/code-diff.ts';
import { diffLines, markHidden, readText } from '../../../server/builds/code-diff-lines.ts';
import { byRank } from '../../../server/builds/code-diff-order.ts';
import { codeDiff, type FileDiff } from '../../../shared/schemas/code-diff.ts';
import { TestRepository } from '../../helpers/repositories.ts';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'code-diff-'));
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

type Tree = Record<string, string | Buffer>;

function write(name: string, tree: Tree): string {
  const root = join(folder, name);
  mkdirSync(root, { recursive: true });
  for (const [file, text] of Object.entries(tree)) {
    mkdirSync(dirname(join(root, file)), { recursive: true });
    writeFileSync(join(root, file), text);
  }
  return root;
}

async function diffTrees(before: Tree, after: Tree, limits = codeDiffLimits) {
  const diff = await diffFolders(write('before', before), write('after', after), limits);
  expect(codeDiff.parse(diff)).toEqual(diff);
  return diff;
}

/** Hunks in short: a sign and a number before each line. */
function short(file: FileDiff | undefined): string[][] {
  const signs = { same: ' ', was: '-', new: '+' };
  return (file?.hunks ?? []).map((hunk) =>
    hunk.lines.map((line) => `${signs[line.kind]}${line.number} ${line.text}`),
  );
}

const ten = Array.from({ length: 20 }, (_, index) => `line ${index + 1}`);

describe('diffFolders', () => {
  it('says what is new, removed, changed and renamed, and nothing of what is the same', async () => {
    const diff = await diffTrees(
      { 'a.c': 'int a;\n', 'b.c': 'int b;\n', 'old/c.c': 'int c = 17;\n', 'same.c': 's' },
      { 'a.c': 'int a2;\n', 'd.c': 'int d;\n', 'new/c.c': 'int c = 17;\n', 'same.c': 's' },
    );
    expect(diff.files.map(({ path, status, pathBefore }) => [path, status, pathBefore])).toEqual([
      ['a.c', 'changed', null],
      ['b.c', 'removed', null],
      ['d.c', 'new', null],
      ['new/c.c', 'renamed', 'old/c.c'],
    ]);
    expect(diff.files.map(short)).toEqual([
      [['-1 int a;', '+1 int a2;']],
      [['-1 int b;']],
      [['+1 int d;']],
      [],
    ]);
    expect(diff).toMatchObject({ filesLeftOut: 0, pathsLeftOut: [], linesLeftOut: 0 });
  });

  it('calls nothing renamed where two files have the same contents', async () => {
    const diff = await diffTrees({ 'a.c': 'same\n', 'b.c': 'same\n' }, { 'c.c': 'same\n' });
    expect(diff.files.map(({ status }) => status)).toEqual(['removed', 'removed', 'new']);
  });

  it('gives three lines of context and the numbers of both sides', async () => {
    const changed = ten.flatMap((line, index) =>
      index === 4 ? ['new one', line] : index === 15 ? [] : [line],
    );
    const diff = await diffTrees({ 'a.c': `${ten.join('\n')}\n` }, { 'a.c': `${changed.join('\n')}\n` });
    expect(short(diff.files[0])).toEqual([
      [' 2 line 2', ' 3 line 3', ' 4 line 4', '+5 new one', ' 6 line 5', ' 7 line 6', ' 8 line 7'],
      [
        ' 14 line 13',
        ' 15 line 14',
        ' 16 line 15',
        '-16 line 16',
        ' 17 line 17',
        ' 18 line 18',
        ' 19 line 19',
      ],
    ]);
    expect(diff.files[0]).toMatchObject({ addedLines: 1, removedLines: 1, isReplacement: false });
  });

  it('lists binary and very large files without showing them', async () => {
    const diff = await diffTrees(
      { 'data.bin': Buffer.from([1, 0, 2]), 'big.c': 'x\n' },
      { 'data.bin': Buffer.from([1, 0, 3]), 'big.c': 'y\n'.repeat(400_000) },
    );
    expect(
      diff.files.map(({ path, contents, hunks, addedLines }) => [path, contents, hunks, addedLines]),
    ).toEqual([
      ['big.c', 'too large', [], null],
      ['data.bin', 'binary', [], null],
    ]);
  });

  it('stops at the limits of files and lines and says what was left out', async () => {
    const after = Object.fromEntries(['a', 'b', 'c', 'd'].map((name) => [`${name}.c`, 'x\n'.repeat(10)]));
    const limits = { ...codeDiffLimits, files: 3, lines: 15 };
    const diff = await diffTrees({}, after, limits);
    expect(diff.files.map(({ contents, linesLeftOut }) => [contents, linesLeftOut])).toEqual([
      ['lines', 0],
      ['lines', 5],
      ['left out', 0],
    ]);
    expect(diff).toMatchObject({ filesLeftOut: 1, pathsLeftOut: ['d.c'], linesLeftOut: 5 });
    await expect(diffTrees({}, after, { ...codeDiffLimits, entries: 3 })).rejects.toThrow(
      /more than 3 files/,
    );
  });

  it('puts what solvers run through first', async () => {
    const names = [
      'README.md',
      'Makefile',
      'src/secant.c',
      'tests/secant.c',
      'data.csv',
      'package-lock.json',
    ];
    const diff = await diffTrees({}, Object.fromEntries(names.map((name) => [name, 'x\n'])));
    expect(diff.files.map(({ path }) => path)).toEqual([
      ...['src/secant.c', 'Makefile', 'tests/secant.c', 'data.csv', 'README.md', 'package-lock.json'],
    ]);
  });

  it('shows a link as its target and follows none, and leaves folders of tools out', async () => {
    const [before, after] = [
      write('before', { '.git/config': 'a', 'node_modules/x.js': 'a' }),
      write('after', {}),
    ];
    symlinkSync('/etc/hostname', join(before, 'link'));
    symlinkSync('/etc/passwd', join(after, 'link'));
    const diff = await diffFolders(before, after);
    expect(diff.files.map(short)).toEqual([[['-1 /etc/hostname', '+1 /etc/passwd']]]);
    expect(diff.files[0]?.before?.kind).toBe('link');
  });

  it('writes hidden characters of paths out', async () => {
    const diff = await diffTrees({}, { 'a\u202eb.c': 'x' });
    expect(diff.files[0]?.path).toBe('a⟨U+202E⟩b.c');
  });
});

describe('diffCommits', () => {
  it('says the same of two commits as of their folders, and sees modes and submodules', async () => {
    const source = new TestRepository(join(folder, 'source'));
    const trees: Tree[] = [
      { 'a.c': 'int a;\n', 'gone.c': 'g\n', 'was.c': 'moved as it is\n', 'x.bin': Buffer.from([0, 1]) },
      {
        'a.c': 'int a;\nint b;\n',
        'is.c': 'moved as it is\n',
        'x.bin': Buffer.from([0, 2]),
        'new.md': 'n\n',
      },
    ];
    const hashes = trees.map((tree, index) => {
      source.git('rm', '-rq', '--ignore-unmatch', '.');
      for (const [name, body] of Object.entries(tree)) source.put(name, body);
      return source.commit(`commit ${index}`);
    });
    const submodule = (id: string) => source.commitTree([{ mode: '160000', name: 's', id }], 'submodule');
    const run = source.commitTree([{ mode: '100755', name: 'run', body: 'r' }], 'run');
    const walk = source.commitTree([{ mode: '100644', name: 'run', body: 'r' }], 'walk');
    const [one = '', two = ''] = hashes;
    const tips = [one, two, run, walk, submodule(one), submodule(two)];
    for (const [index, hash] of tips.entries()) source.git('update-ref', `refs/heads/t${index}`, hash);
    const mirror = join(folder, 'mirror');
    const address = { text: source.folder, protocol: 'file' as const };
    await openMirror(mirror, address);
    await fetchMirror(mirror, address, { mirrorBytes: 1e8, fetchMs: 30_000 });
    const [byCommit, byFolder] = [
      await diffCommits(mirror, one, two),
      await diffTrees(trees[0] ?? {}, trees[1] ?? {}),
    ];
    expect(byCommit).toEqual(byFolder);
    expect(byCommit.files.map(({ status }) => status)).toEqual([
      'changed',
      'removed',
      'renamed',
      'changed',
      'new',
    ]);
    const [mode] = (await diffCommits(mirror, run, walk)).files;
    expect([mode?.before?.isExecutable, mode?.after?.isExecutable, mode?.hunks]).toEqual([true, false, []]);
    const [moved] = (await diffCommits(mirror, tips[4] ?? '', tips[5] ?? '')).files;
    expect(short(moved)).toEqual([[`-1 ${one}`, `+1 ${two}`]]);
    await expect(diffCommits(mirror, '--output=x', two)).rejects.toMatchObject({ code: 'invalid' });
  });
});

describe('diffLines', () => {
  it('says where the last line has no end', () => {
    const { hunks } = diffLines('a\nb', 'a\nb\n', 100);
    expect(hunks[0]?.lines.map(({ kind, text, isUnended }) => [kind, text, isUnended])).toEqual([
      ['same', 'a', false],
      ['was', 'b', true],
      ['new', 'b', false],
    ]);
  });

  it('takes CR LF for a line end where both sides have it, and shows it where they differ', () => {
    expect(diffLines('a\r\nb\r\n', 'a\r\nc\r\n', 100).hunks[0]?.lines.map(({ text }) => text)).toEqual([
      'a',
      'b',
      'c',
    ]);
    const mixed = diffLines('a\n', 'a\r\n', 100).hunks[0]?.lines.map(({ text }) => text);
    expect(mixed).toEqual(['a', 'a⟨U+000D⟩']);
  });

  it('shows the one after the other where two texts differ too much', () => {
    const text = (prefix: string) =>
      Array.from({ length: 1500 }, (_, index) => `${prefix}${index}\n`).join('');
    const diff = diffLines(text('a'), text('b'), 100);
    expect([diff.isReplacement, diff.addedLines, diff.removedLines]).toEqual([true, 1500, 1500]);
    expect(diff.hunks[0]?.lines.map(({ kind }) => kind)).toEqual([
      ...Array<string>(1500).fill('was'),
      ...Array<string>(1500).fill('new'),
    ]);
  });

  it('cuts very long lines and says by how much, never inside a character', () => {
    const [line] = diffLines('', `${'𝑥'.repeat(12)}\n`, 10).hunks[0]?.lines ?? [];
    expect([line?.text, line?.cut]).toEqual(['𝑥'.repeat(10), 2]);
  });
});

describe('markHidden', () => {
  it('writes control, direction, format and odd blank characters out and says where', () => {
    const { text, marks } = markHidden('if (x\u202e) {\u200b\t\u00a0// \u001b[2J');
    expect(text).toBe('if (x⟨U+202E⟩) {⟨U+200B⟩\t⟨U+00A0⟩// ⟨U+001B⟩[2J');
    expect(marks.map(({ from, to }) => text.slice(from, to))).toEqual([
      '⟨U+202E⟩',
      '⟨U+200B⟩',
      '⟨U+00A0⟩',
      '⟨U+001B⟩',
    ]);
  });

  it('leaves ordinary text alone, and what only looks like a mark is not marked', () => {
    for (const raw of ['double x = 1e-3; // größer ≤ 𝑥', '⟨U+202E⟩', ''])
      expect(markHidden(raw)).toEqual({ text: raw, marks: [] });
  });
});

describe('readText', () => {
  it('reads UTF-8, falls back on Latin-1, and calls bytes with a NUL no text', () => {
    expect(readText(Buffer.from('größe'))).toBe('größe');
    expect(readText(Buffer.from('größe', 'latin1'))).toBe('größe');
    expect(readText(Buffer.from('a\0b'))).toBeNull();
  });
});

describe('byRank', () => {
  it('orders source, build, tests, others, documents, generated', () => {
    const ordered = [
      'lib/brent.f90',
      'solver.py',
      'CMakeLists.txt',
      'test/brent.f90',
      'grid.dat',
      'docs/a.rst',
      'dist/a.js',
    ];
    expect([...ordered].reverse().sort(byRank)).toEqual(ordered);
  });
});
