import { type InputHTMLAttributes, type ReactNode, useId } from 'react';

export interface DoorFieldProps extends InputHTMLAttributes<HTMLInputElement> {
  label: string;
  problem?: string | null | undefined;
  /** What helps before anything is wrong. */
  hint?: ReactNode;
}

/** A field of the size that one signs in with. */
export function DoorField({ label, problem = null, hint, ...rest }: DoorFieldProps) {
  const id = useId();
  const isWrong = problem !== null;
  const says = isWrong ? problem : hint;
  return (
    <div className="mb-4">
      <label htmlFor={id} className="mb-1 block text-table">
        {label}
      </label>
      <input
        id={id}
        aria-invalid={isWrong || undefined}
        aria-describedby={says === undefined ? undefined : `${id}-says`}
        className={`w-full rounded-control bg-sheet text-[15px] leading-[22px] text-ink ${isWrong ? 'border-2 border-worse px-[9px] py-1.5' : 'border border-rule-strong px-2.5 py-[7px]'}`}
        {...rest}
      />
      {says !== undefined && (
        <p id={`${id}-says`} className={`pt-[3px] text-note ${isWrong ? 'text-worse' : 'text-ink-3'}`}>
          {says}
        </p>
      )}
    </div>
  );
}
