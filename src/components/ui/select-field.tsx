import { useId } from 'react';

export interface SelectFieldProps<Value extends string> {
  label: string;
  isLabelHidden?: boolean;
  options: readonly { value: Value; label: string }[];
  value: Value;
  onChange: (value: Value) => void;
  disabled?: boolean;
  className?: string;
}

/** One of a few, from a list of the browser's own. */
export function SelectField<Value extends string>(props: SelectFieldProps<Value>) {
  const { label, isLabelHidden = false, options, value, onChange, disabled = false, className } = props;
  const id = useId();
  return (
    <div className={className}>
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'mb-1 block text-table'}>
        {label}
      </label>
      <select
        id={id}
        value={value}
        disabled={disabled}
        onChange={(event) => {
          const chosen = options.find((option) => option.value === event.target.value);
          if (chosen !== undefined) onChange(chosen.value);
        }}
        className="min-h-7 rounded-control border border-rule-strong bg-sheet px-2 py-1 text-table text-ink disabled:border-dashed disabled:text-ink-3"
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </div>
  );
}
