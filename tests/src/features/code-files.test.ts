import { describe, expect, it } from 'vitest';
import type { FileDiff } from '../../../shared/schemas/code-diff.ts';
import {
  fileWords,
  linePieces,
  openFiles,
  solverOfFile,
  withoutLines,
} from '../../../src/features/comparisons/code-files.ts';

function someFile(given: Partial<FileDiff> = {}, lines = 3): FileDiff {
  return {
    path: 'src/secant.mjs',
    pathBefore: null,
    status: 'changed',
    before: { bytes: 10, kind: 'file', isExecutable: false },
    after: { bytes: 12, kind: 'file', isExecutable: false },
    contents: 'lines',
    addedLines: 2,
    removedLines: 1,
    isReplacement: false,
    hunks: [
      {
        lines: Array.from({ length: lines }, (_, index) => ({
          kind: 'same',
          number: index + 1,
          text: 'let x;',
          marks: [],
          cut: 0,
          isUnended: false,
        })),
      },
    ],
    linesLeftOut: 0,
    ...given,
  };
}

describe('solverOfFile', () => {
  const solvers = ['secant', 'two-point', 'brent'];

  it('knows a solver by the name of its file, however that is written', () => {
    expect(solverOfFile('lib/Secant.mjs', solvers)).toBe('secant');
    expect(solverOfFile('two_point.c', solvers)).toBe('two-point');
    expect(solverOfFile('brent', solvers)).toBe('brent');
  });

  it('does not guess from a part of a name or from a folder', () => {
    expect(solverOfFile('secant/step.mjs', solvers)).toBeNull();
    expect(solverOfFile('secants.mjs', solvers)).toBeNull();
  });
});

describe('openFiles', () => {
  it('opens files in order as far as the room goes, and the first in any case', () => {
    const long = someFile({ path: 'a' }, 500);
    expect(openFiles([long, someFile({ path: 'b' })])).toEqual(['a']);
    expect(openFiles([someFile({ path: 'b' }), someFile({ path: 'c' }), long])).toEqual(['b', 'c']);
    expect(openFiles([])).toEqual([]);
  });
});

describe('words of a file', () => {
  it('say what became of it', () => {
    expect(fileWords(someFile({ status: 'new' }))).toBe('new file');
    expect(fileWords(someFile())).toBe('2 new, 1 removed');
    expect(
      fileWords(someFile({ status: 'renamed', pathBefore: 'old.mjs', addedLines: 0, removedLines: 0 })),
    ).toBe('was old.mjs');
    expect(fileWords(someFile({ contents: 'binary', addedLines: null, removedLines: null }))).toBe('changed');
  });

  it('say why there are no lines, and nothing where there are some', () => {
    expect(withoutLines(someFile())).toBeNull();
    expect(withoutLines(someFile({ contents: 'binary', hunks: [] }))).toMatch(/not text/i);
    expect(withoutLines(someFile({ contents: 'left out', hunks: [] }))).toMatch(/left out/i);
  });
});

describe('linePieces', () => {
  it('parts a line where hidden characters are written out, and loses nothing', () => {
    const text = 'a ⟨U+202E⟩b⟨U+200B⟩';
    const pieces = linePieces({
      text,
      marks: [
        { from: 2, to: 10 },
        { from: 11, to: 19 },
      ],
    });
    expect(pieces.map((piece) => piece.text).join('')).toBe(text);
    expect(pieces.filter((piece) => piece.isHidden).map((piece) => piece.text)).toEqual([
      '⟨U+202E⟩',
      '⟨U+200B⟩',
    ]);
    expect(linePieces({ text: '', marks: [] })).toEqual([{ text: '', isHidden: false }]);
  });
});
