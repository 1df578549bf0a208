import type { BuildLog, BuildLogEvent, BuildLogPiece } from '../../../shared/schemas/builds.ts';

// biome-ignore lint/suspicious/noControlCharactersInRegex: what is taken out begins and ends with them
const sequences = /\u001b(?:\[[0-9;?]*[ -/]*[@-~]|\][^\u0007\u001b]*(?:\u0007|\u001b\\)|[@-Z\\-_])/g;

/** Output as a page shows it: without the sequences for terminals, and of a line that was overwritten the last. */
export function plainOutput(text: string): string {
  return text
    .replace(sequences, '')
    .replace(/\r\n/g, '\n')
    .replace(/[^\n]*\r(?=[^\n])/g, '')
    .replace(/\r/g, '');
}

/** A log with one more event in it; a piece that is there already changes nothing. */
export function withLogEvent(log: BuildLog, event: BuildLogEvent): BuildLog {
  if (event.kind === 'state') return { ...log, state: event.state, reason: event.reason };
  const last = log.pieces.at(-1);
  if (last !== undefined && event.id <= last.id) return log;
  const piece: BuildLogPiece = event;
  return { ...log, pieces: [...log.pieces, piece] };
}

export const isOver = (state: BuildLog['state']): boolean => state === 'ready' || state === 'failed';

export interface LogSegment {
  id: number;
  kind: BuildLogPiece['kind'];
  text: string;
}

/** The pieces as text to be set one behind the other: lines and notes begin and end on lines of their own. */
export function logSegments(pieces: readonly BuildLogPiece[]): LogSegment[] {
  let isAtStart = true;
  return pieces.map(({ id, kind, text }) => {
    const plain = kind === 'output' ? plainOutput(text) : `${kind === 'line' ? '› ' : ''}${text.trimEnd()}\n`;
    const whole = kind !== 'output' && !isAtStart ? `\n${plain}` : plain;
    if (whole !== '') isAtStart = whole.endsWith('\n');
    return { id, kind, text: whole };
  });
}
