import { type ReactNode, useId } from 'react';

export interface EntryProps {
  /** Side-head: what the entry is called. */
  title: string;
  /** What it means and what to notice, in the margin. */
  note?: ReactNode;
  children: ReactNode;
  /** Less room above, for an entry that goes on with the one before. */
  isClose?: boolean;
}

/** One entry of the sheet: side-head and note in the margin, what was measured in the body. */
export function Entry({ title, note, children, isClose = false }: EntryProps) {
  const id = useId();
  return (
    <section className="ledger entry" style={isClose ? { paddingTop: 8 } : undefined} aria-labelledby={id}>
      <div className="entry-side">
        <h2 id={id}>{title}</h2>
        {typeof note === 'string' ? <p>{note}</p> : note}
      </div>
      <div className="min-w-0">{children}</div>
    </section>
  );
}
