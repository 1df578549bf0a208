import { useEffect, useRef } from 'react';
import type { BuildLog } from '../../../shared/schemas/builds.ts';
import { isOver, logSegments } from './log-text.ts';

export interface LogViewProps {
  log: BuildLog;
}

const pieceClass = { line: 'font-medium text-ink', output: 'text-ink-2', note: 'text-ink-3' } as const;

/** The log of preparing a build. It follows what is written while its end is in sight. */
export function LogView({ log }: LogViewProps) {
  const box = useRef<HTMLPreElement>(null);
  const isFollowing = useRef(true);
  const length = log.pieces.length;
  // biome-ignore lint/correctness/useExhaustiveDependencies: a new piece is what makes it longer
  useEffect(() => {
    const element = box.current;
    if (element !== null && isFollowing.current) element.scrollTop = element.scrollHeight;
  }, [length]);
  return (
    <pre
      ref={box}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by the keyboard
      tabIndex={0}
      role="log"
      aria-label="Log of the preparation"
      aria-busy={!isOver(log.state)}
      onScroll={({ currentTarget }) => {
        const left = currentTarget.scrollHeight - currentTarget.scrollTop - currentTarget.clientHeight;
        isFollowing.current = left < 24;
      }}
      className="max-h-[32em] overflow-auto whitespace-pre-wrap border-l-3 border-ink bg-sheet px-3 py-2 font-mono text-code wrap-anywhere print:max-h-none"
    >
      {log.isCut && <span className="text-ink-3">… what was written before is not kept{'\n'}</span>}
      {logSegments(log.pieces).map((segment) => (
        <span key={segment.id} className={pieceClass[segment.kind]}>
          {segment.text}
        </span>
      ))}
    </pre>
  );
}
