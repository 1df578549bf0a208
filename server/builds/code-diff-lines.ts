import { structuredPatch } from 'diff';
import type { DiffHunk, DiffLine } from '../../shared/schemas/code-diff.ts';

const CONTEXT_LINES = 3;
/** Bounds the work, which grows with its square; beyond it the two are shown one after the other. */
const MAX_EDITS = 1000;

/** Anything that is not seen as it is: control and format characters, odd blanks and line ends, lone surrogates. */
const hidden = /(?![ \t])[\p{Cc}\p{Cf}\p{Cs}\p{Co}\p{Zl}\p{Zp}\p{Zs}]/gu;

export interface MarkedText {
  text: string;
  marks: { from: number; to: number }[];
}

/** Writes hidden characters out as ⟨U+202E⟩ and says where it did. Tabs and blanks stay. */
export function markHidden(raw: string): MarkedText {
  const marks: MarkedText['marks'] = [];
  let text = '';
  let at = 0;
  for (const match of raw.matchAll(hidden)) {
    text += raw.slice(at, match.index);
    const code = (match[0].codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0');
    const shown = `⟨U+${code}⟩`;
    marks.push({ from: text.length, to: text.length + shown.length });
    text += shown;
    at = match.index + match[0].length;
  }
  return { text: text + raw.slice(at), marks };
}

/** Null where the bytes are no text. What is not UTF-8 is read as Latin-1, which older sources are written in. */
export function readText(bytes: Buffer): string | null {
  if (bytes.includes(0)) return null;
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return bytes.toString('latin1');
  }
}

function makeLine(kind: DiffLine['kind'], number: number, raw: string, maxLength: number): DiffLine {
  if (raw.length <= maxLength) return { kind, number, ...markHidden(raw), cut: 0, isUnended: false };
  const whole = Array.from(raw);
  const kept = whole.slice(0, maxLength);
  const cut = whole.length - kept.length;
  return { kind, number, ...markHidden(kept.join('')), cut, isUnended: false };
}

export interface LineDiff {
  hunks: DiffHunk[];
  addedLines: number;
  removedLines: number;
  isReplacement: boolean;
}

/** True where every line ends with CR LF. */
function isDosText(text: string): boolean {
  return text.includes('\n') && !/(?:^|[^\r])\n/.test(text);
}

/** Compares two texts line by line, with three lines of context. An absent file is an empty text. */
export function diffLines(before: string, after: string, maxLength: number): LineDiff {
  // Where both sides end their lines in the DOS way, the CR is part of the line end and no news.
  const isDos = [before, after].every((text) => text === '' || isDosText(text));
  const [was, now] = isDos
    ? [before.replaceAll('\r\n', '\n'), after.replaceAll('\r\n', '\n')]
    : [before, after];
  const patch = structuredPatch('', '', was, now, '', '', {
    context: CONTEXT_LINES,
    maxEditLength: MAX_EDITS,
  });
  if (patch === undefined) return replace(was, now, maxLength);
  const hunks = patch.hunks.map((hunk) => toHunk(hunk, maxLength));
  const lines = hunks.flatMap((hunk) => hunk.lines);
  return {
    hunks,
    addedLines: lines.filter((line) => line.kind === 'new').length,
    removedLines: lines.filter((line) => line.kind === 'was').length,
    isReplacement: false,
  };
}

const kinds: Record<string, DiffLine['kind']> = { ' ': 'same', '-': 'was', '+': 'new' };

function toHunk(hunk: { oldStart: number; newStart: number; lines: string[] }, maxLength: number): DiffHunk {
  let wasNumber = hunk.oldStart;
  let newNumber = hunk.newStart;
  const lines: DiffLine[] = [];
  for (const line of hunk.lines) {
    const kind = kinds[line.charAt(0)];
    if (kind === undefined) {
      // A note of the comparison on the line before: no line end behind it.
      const last = lines.at(-1);
      if (last) last.isUnended = true;
      continue;
    }
    lines.push(makeLine(kind, kind === 'was' ? wasNumber : newNumber, line.slice(1), maxLength));
    if (kind !== 'new') wasNumber += 1;
    if (kind !== 'was') newNumber += 1;
  }
  return { lines };
}

function linesOf(kind: 'was' | 'new', text: string, maxLength: number): DiffLine[] {
  if (text === '') return [];
  const lines = text.split('\n');
  const isUnended = lines.at(-1) !== '';
  if (!isUnended) lines.pop();
  const made = lines.map((line, index) => makeLine(kind, index + 1, line, maxLength));
  const last = made.at(-1);
  if (last) last.isUnended = isUnended;
  return made;
}

function replace(before: string, after: string, maxLength: number): LineDiff {
  const was = linesOf('was', before, maxLength);
  const now = linesOf('new', after, maxLength);
  return {
    hunks: [{ lines: [...was, ...now] }],
    addedLines: now.length,
    removedLines: was.length,
    isReplacement: true,
  };
}
