import { type ReactNode, useEffect, useRef } from 'react';
import { Button } from './button.tsx';
import { TextAction } from './text-action.tsx';

export interface AskProps {
  /** What is about to happen, as a question. */
  question: ReactNode;
  /** Word of the button that does it. */
  word: string;
  onYes: () => void;
  onNo: () => void;
  isBusy?: boolean;
  isPossible?: boolean;
  /** A sentence that says why it did not work. */
  problem?: string | null;
  /** Fields that belong to it. The first field takes the focus, else the button. */
  children?: ReactNode;
}

/** Asks once more before something is done; Escape leaves it. Stands in the sheet, over nothing. */
export function Ask({
  question,
  word,
  onYes,
  onNo,
  isBusy = false,
  isPossible = true,
  problem = null,
  children,
}: AskProps) {
  const form = useRef<HTMLFormElement>(null);
  useEffect(() => {
    const { activeElement: before } = document;
    const first = form.current?.querySelector<HTMLElement>('input, textarea, select, button');
    first?.focus();
    return () => {
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, []);
  return (
    <div className="basis-full">
      <form
        ref={form}
        aria-label={word}
        className="grid max-w-[46em] gap-3 border-t border-rule-strong pt-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (isPossible && !isBusy) onYes();
        }}
        onKeyDown={(event) => {
          if (event.key !== 'Escape') return;
          event.preventDefault();
          event.stopPropagation();
          onNo();
        }}
      >
        <p className="text-lead">{question}</p>
        {children}
        {problem !== null && (
          <p role="alert" className="text-worse">
            {problem}
          </p>
        )}
        <div className="flex flex-wrap items-center gap-x-5.5 gap-y-2">
          <Button type="submit" isMain disabled={isBusy || !isPossible}>
            {word}
          </Button>
          <TextAction onClick={onNo}>Leave it</TextAction>
        </div>
      </form>
    </div>
  );
}
