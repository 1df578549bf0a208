import { SvgMark } from './svg-mark.tsx';

export interface NotApplicableMarkProps {
  title?: string;
}

/** A short grey dash, no word: the solver does not take what the case gives. */
export function NotApplicableMark({ title }: NotApplicableMarkProps) {
  return (
    <SvgMark box={16} size={14} title={title} className="text-ink-3">
      <path d="M6 8h4" stroke="currentColor" strokeWidth={1.5} />
    </SvgMark>
  );
}
