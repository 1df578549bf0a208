import type { DiffLine, FileDiff } from '../../../shared/schemas/code-diff.ts';

/** Lines of code that stand open at first; files beyond are folded. */
const openLines = 160;

/** The solver whose name a file has, as `src/secant.mjs` has `secant`; − and _ count alike. */
export function solverOfFile(path: string, solvers: readonly string[]): string | null {
  const plain = (text: string): string => text.toLowerCase().replace(/[-_.]+/g, ' ');
  const name = path.slice(path.lastIndexOf('/') + 1).replace(/\.[^.]*$/, '');
  return solvers.find((solver) => plain(solver) === plain(name)) ?? null;
}

const lineCount = (file: FileDiff): number => file.hunks.reduce((sum, hunk) => sum + hunk.lines.length, 0);

/** Paths of the files that are shown open: the first ones, as far as the room goes, and one in any case. */
export function openFiles(files: readonly FileDiff[]): string[] {
  let used = 0;
  return files.flatMap((file, index) => {
    used += lineCount(file);
    return index === 0 || used <= openLines ? [file.path] : [];
  });
}

/** What became of a file, in words. */
export function fileWords(file: FileDiff): string {
  if (file.status === 'new') return 'new file';
  if (file.status === 'removed') return 'removed';
  const moved = file.status === 'renamed' ? `was ${file.pathBefore ?? 'elsewhere'}` : '';
  if (file.addedLines === null || file.removedLines === null) return moved || 'changed';
  if (file.addedLines + file.removedLines === 0) return moved || 'no line changed';
  const counts = `${file.addedLines} new, ${file.removedLines} removed`;
  return moved === '' ? counts : `${moved}; ${counts}`;
}

/** Why there are no lines to show, or null where there are. */
export function withoutLines(file: FileDiff): string | null {
  switch (file.contents) {
    case 'binary':
      return 'Not text: only that it changed can be said.';
    case 'too large':
      return 'Too large to be compared line by line.';
    case 'left out':
      return 'Left out: the files before it have used up the room.';
    default:
      return file.hunks.length === 0 && file.status !== 'renamed' ? 'No line to show.' : null;
  }
}

export interface LinePiece {
  text: string;
  /** Stands for a character that cannot be seen or that turns the direction of writing. */
  isHidden: boolean;
}

/** A line parted where hidden characters are written out. */
export function linePieces({ text, marks }: Pick<DiffLine, 'text' | 'marks'>): LinePiece[] {
  const pieces: LinePiece[] = [];
  let at = 0;
  for (const { from, to } of marks) {
    if (from > at) pieces.push({ text: text.slice(at, from), isHidden: false });
    pieces.push({ text: text.slice(from, to), isHidden: true });
    at = to;
  }
  if (at < text.length || pieces.length === 0) pieces.push({ text: text.slice(at), isHidden: false });
  return pieces;
}
