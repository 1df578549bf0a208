import type { Change } from '../../../shared/schemas/words.ts';
import { formatFigure } from '../../lib/format.ts';
import { ChangeMark } from './change-mark.tsx';
import { changeColour } from './change-words.ts';

export interface ChangeWordProps {
  change: Change;
  count?: number;
}

/** Mark, word, count: a change in running order of word, shape, colour. */
export function ChangeWord({ change, count }: ChangeWordProps) {
  return (
    <span
      className={`inline-flex items-center gap-1.5 whitespace-nowrap font-medium ${changeColour[change]}`}
    >
      <ChangeMark change={change} />
      {change}
      {count !== undefined && <span className="num font-normal">{formatFigure(count)}</span>}
    </span>
  );
}
