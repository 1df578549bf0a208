import type { ReactNode } from 'react';

export interface Fact {
  term: string;
  value: ReactNode;
  /** Takes a whole line where the sheet is narrow. */
  isLong?: boolean;
}

export interface FactsProps {
  facts: readonly Fact[];
}

/** One line of term over value. */
export function Facts({ facts }: FactsProps) {
  return (
    <dl className="mt-4 flex flex-wrap gap-x-8.5 gap-y-1.5 border-t border-rule pt-2 text-table max-wide:grid max-wide:grid-cols-2 max-wide:gap-x-4 max-wide:gap-y-2">
      {facts.map((fact) => (
        <div key={fact.term} className={fact.isLong === true ? 'min-w-0 max-wide:col-span-2' : 'min-w-0'}>
          <dt className="text-header leading-[18px] text-ink-3">{fact.term}</dt>
          <dd className="wrap-anywhere">{fact.value}</dd>
        </div>
      ))}
    </dl>
  );
}
