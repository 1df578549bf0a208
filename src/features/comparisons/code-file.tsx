import { useId, useState } from 'react';
import type { FileDiff } from '../../../shared/schemas/code-diff.ts';
import { formatCount } from '../../lib/format.ts';
import { fileWords, withoutLines } from './code-files.ts';
import { CodeLines } from './code-lines.tsx';

export interface CodeFileProps {
  file: FileDiff;
  isOpenAtFirst: boolean;
  /** The chosen pair is of the solver that has this file's name. */
  isChosen: boolean;
  /** What is known of the pairs of that solver, e.g. "10 pairs costlier". */
  said: string | null;
}

/** One changed file: its name opens and closes it. */
export function CodeFile({ file, isOpenAtFirst, isChosen, said }: CodeFileProps) {
  const [isOpen, setIsOpen] = useState(isOpenAtFirst);
  const id = useId();
  const why = withoutLines(file);
  return (
    <section className="pt-2.5 first:pt-1.5" aria-label={file.path}>
      <h4
        className={`flex flex-wrap items-baseline justify-between gap-x-3 pb-1 text-table font-normal ${isChosen ? 'border-b-2 border-ink' : 'border-b border-rule-strong'}`}
      >
        <button
          type="button"
          aria-expanded={isOpen}
          aria-controls={id}
          onClick={() => setIsOpen(!isOpen)}
          className="min-h-6 text-left font-mono text-figure font-medium wrap-anywhere underline decoration-transparent underline-offset-3 hover:decoration-current"
        >
          {file.path}
        </button>
        <span className="text-header text-ink-3">
          {fileWords(file)}
          {said === null ? '' : `; ${said}`}
        </span>
      </h4>
      <div id={id} hidden={!isOpen} className="pt-1">
        {why !== null ? (
          <p className="text-note text-ink-3">{why}</p>
        ) : (
          <>
            {file.isReplacement && (
              <p className="pb-1 text-note text-ink-3">
                The two differ too much to be compared line by line: first all of the one, then all of the
                other.
              </p>
            )}
            <CodeLines hunks={file.hunks} />
          </>
        )}
        {file.linesLeftOut > 0 && (
          <p className="pt-1 text-note text-ink-3">
            {formatCount(file.linesLeftOut, 'line')} more are left out.
          </p>
        )}
      </div>
      {!isOpen && <p className="text-note text-ink-3">Folded; its name opens it.</p>}
    </section>
  );
}
