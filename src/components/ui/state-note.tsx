import type { ReactNode } from 'react';

export interface StateNoteProps {
  title: string;
  children?: ReactNode;
  /** Buttons: what to do next. */
  actions?: ReactNode;
  isProblem?: boolean;
}

/** What is so, what is kept, what to do: a rule above, a plain sentence, no box. */
export function StateNote({ title, children, actions, isProblem = false }: StateNoteProps) {
  return (
    <div
      role={isProblem ? 'alert' : undefined}
      className={`max-w-[60em] pb-4 pt-3 ${isProblem ? 'border-t-2 border-worse' : 'border-t border-rule-strong'}`}
    >
      <h3 className="text-body font-medium">{title}</h3>
      {children !== undefined && <div className="text-ink-2">{children}</div>}
      {actions !== undefined && (
        <div className="no-print mt-2.5 flex flex-wrap items-center gap-x-5.5 gap-y-2">{actions}</div>
      )}
    </div>
  );
}
