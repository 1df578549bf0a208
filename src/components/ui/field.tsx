import { type InputHTMLAttributes, type Ref, useId } from 'react';
import { classNames } from '../../lib/class-names.ts';

export interface FieldProps extends InputHTMLAttributes<HTMLInputElement> {
  label: string;
  /** The label is read aloud only; the placeholder shows what to write. */
  isLabelHidden?: boolean;
  /** A sentence that says what is wrong. */
  problem?: string | null;
  ref?: Ref<HTMLInputElement>;
}

export function Field({ label, isLabelHidden = false, problem = null, className, ref, ...rest }: FieldProps) {
  const id = useId();
  const isWrong = problem !== null;
  return (
    <div className={className}>
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'mb-1 block text-table'}>
        {label}
      </label>
      <input
        id={id}
        ref={ref}
        aria-invalid={isWrong || undefined}
        aria-describedby={isWrong ? `${id}-problem` : undefined}
        className={classNames(
          'w-full rounded-control bg-sheet text-table text-ink placeholder:text-ink-3 placeholder:opacity-100',
          isWrong ? 'border-2 border-worse px-[7px] py-[3px]' : 'border border-rule-strong px-2 py-1',
        )}
        {...rest}
      />
      {isWrong && (
        <p id={`${id}-problem`} className="pt-[3px] text-note text-worse">
          {problem}
        </p>
      )}
    </div>
  );
}
