import type { BuildLogPiece } from '../../../shared/schemas/builds.ts';
import type { BuildLogsRepo } from './build-logs.repo.ts';

/** Characters of a build's log that are kept: the last ones, since that is where the fault is told. */
export const logCharacters = 256 * 1024;
const pieceCharacters = 16 * 1024;
const flushMs = 100;
const leftOut = '\n[some lines are not kept]\n';

/**
 * Gathers what a line writes and stores it a few times a second, however much it is: of what comes between two
 * moments only the end is kept. `store` wraps each write, for a transaction and for whoever has to be told.
 */
export function createBuildLogWriter(
  logs: BuildLogsRepo,
  buildId: number,
  store: (write: () => void) => void,
) {
  let held = '';
  let timer: NodeJS.Timeout | undefined;
  /** What went wrong between two calls; thrown at the next. */
  let failure: { error: unknown } | undefined;

  function put(pieces: readonly Omit<BuildLogPiece, 'id'>[]): void {
    store(() => {
      for (const piece of pieces) logs.append(buildId, piece);
      logs.shorten(buildId, logCharacters);
    });
  }

  function heldPieces(): Omit<BuildLogPiece, 'id'>[] {
    clearTimeout(timer);
    timer = undefined;
    const text = held;
    held = '';
    const pieces: Omit<BuildLogPiece, 'id'>[] = [];
    for (let at = 0; at < text.length; at += pieceCharacters)
      pieces.push({ kind: 'output', text: text.slice(at, at + pieceCharacters) });
    return pieces;
  }

  return {
    output(text: string): void {
      if (text === '') return;
      held += text;
      if (held.length > logCharacters) held = leftOut + held.slice(-logCharacters / 2);
      timer ??= setTimeout(() => {
        try {
          put(heldPieces());
        } catch (error) {
          failure ??= { error };
        }
      }, flushMs);
    },
    /** A line that begins, or how it ended; what was written before comes before. */
    say(kind: 'line' | 'note', text: string): void {
      if (failure) throw failure.error;
      put([...heldPieces(), { kind, text }]);
    },
    /** Stores nothing more. */
    stop(): void {
      clearTimeout(timer);
      held = '';
    },
  };
}
