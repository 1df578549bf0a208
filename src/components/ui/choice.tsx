export interface ChoiceProps<Value extends string> {
  /** Names the group for screen readers. */
  legend: string;
  name: string;
  options: readonly { value: Value; label: string }[];
  value: Value | null;
  onChange: (value: Value) => void;
}

/** A few words in one border, the chosen one in ink. Radios inside, so arrow keys work. */
export function Choice<Value extends string>({ legend, name, options, value, onChange }: ChoiceProps<Value>) {
  return (
    <fieldset className="inline-flex rounded-control border border-rule-strong">
      <legend className="sr-only">{legend}</legend>
      {options.map((option, index) => (
        <label
          key={option.value}
          className={`inline-flex cursor-pointer items-center px-[9px] py-[3px] text-table text-ink-2 has-checked:bg-ink has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink ${index > 0 ? 'border-l border-rule-strong' : ''}`}
        >
          <input
            type="radio"
            className="sr-only"
            name={name}
            value={option.value}
            checked={option.value === value}
            onChange={() => onChange(option.value)}
          />
          {option.label}
        </label>
      ))}
    </fieldset>
  );
}
