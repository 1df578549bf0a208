import type { ReactNode } from 'react';
import { formatFigure } from '../../lib/format.ts';

export interface FilterWordProps {
  word: string;
  count?: number;
  isPressed: boolean;
  onPress: () => void;
  /** A mark before the word. */
  mark?: ReactNode;
  /** Tailwind text colour; the underline of a pressed word takes it. */
  colour?: string;
}

/** A word that switches a part of a list on or off; pressed it carries a line in its own colour. */
export function FilterWord({ word, count, isPressed, onPress, mark, colour = 'text-ink' }: FilterWordProps) {
  return (
    <button
      type="button"
      aria-pressed={isPressed}
      onClick={onPress}
      className={`inline-flex items-center gap-1.5 whitespace-nowrap border-b-2 pb-[3px] pt-1 text-table max-wide:pb-[5px] max-wide:pt-1.5 ${colour} ${isPressed ? 'border-current font-medium' : 'border-transparent font-normal'}`}
    >
      {mark}
      <span>{word}</span>
      {count !== undefined && <span className="num font-normal">{formatFigure(count)}</span>}
    </button>
  );
}
