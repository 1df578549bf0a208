import type { Change } from '../../../shared/schemas/words.ts';
import { changeShapes } from './change-shapes.tsx';
import { changeColour } from './change-words.ts';
import { SvgMark } from './svg-mark.tsx';

export interface ChangeMarkProps {
  change: Change;
  size?: number;
  /** Said and shown on hover, e.g. "sqrt-three: costlier". Without it the mark is decoration beside its word. */
  title?: string;
  /** Take the colour of the text around. */
  isPlain?: boolean;
}

export function ChangeMark({ change, size = 14, title, isPlain = false }: ChangeMarkProps) {
  return (
    <SvgMark box={16} size={size} title={title} className={isPlain ? '' : changeColour[change]}>
      {changeShapes[change]}
    </SvgMark>
  );
}
