import type { ReactNode } from 'react';
import { classNames } from '../../lib/class-names.ts';

export interface VerdictBlockProps {
  /** Sign and word, or a state in words. */
  sign: ReactNode;
  /** Tailwind text colour of the sign. */
  colour?: string;
  note?: ReactNode;
  /** The one sentence that says what was found. */
  sentence: ReactNode;
  lead?: ReactNode;
  children?: ReactNode;
  actions?: ReactNode;
}

/** Head of a sheet: one sentence that says what was found. */
export function VerdictBlock({ sign, colour, note, sentence, lead, children, actions }: VerdictBlockProps) {
  return (
    <section className="ledger entry verdict" aria-label="What was found">
      <div className="entry-side">
        <div
          className={classNames(
            'sign flex items-center gap-2 pt-[7px] max-wide:pt-0',
            colour ?? 'text-ink-2',
          )}
        >
          {sign}
        </div>
        {note !== undefined && <div className="pt-1.5">{note}</div>}
      </div>
      <div className="min-w-0">
        <h1>{sentence}</h1>
        {lead !== undefined && (
          <div className="mt-2 max-w-[78em] text-lead text-ink-2 max-wide:text-body">{lead}</div>
        )}
        {children}
        {actions !== undefined && (
          <div className="no-print mt-4 flex flex-wrap items-center gap-x-5.5 gap-y-2">{actions}</div>
        )}
      </div>
    </section>
  );
}
