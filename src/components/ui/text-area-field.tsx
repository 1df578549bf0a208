import { type TextareaHTMLAttributes, useId } from 'react';

export interface TextAreaFieldProps extends TextareaHTMLAttributes<HTMLTextAreaElement> {
  label: string;
  /** A sentence that says what is wrong. */
  problem?: string | null;
}

export function TextAreaField({ label, problem = null, className, ...rest }: TextAreaFieldProps) {
  const id = useId();
  const isWrong = problem !== null;
  return (
    <div className={className}>
      <label htmlFor={id} className="mb-1 block text-table">
        {label}
      </label>
      <textarea
        id={id}
        rows={2}
        aria-invalid={isWrong || undefined}
        aria-describedby={isWrong ? `${id}-problem` : undefined}
        className={`w-full rounded-control bg-sheet text-table text-ink ${isWrong ? 'border-2 border-worse px-[7px] py-[3px]' : 'border border-rule-strong px-2 py-1'}`}
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
