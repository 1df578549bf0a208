import { classNames } from '../../lib/class-names.ts';
import { type LimitTexts, limits } from './draft.ts';

export interface LimitFieldsProps {
  /** What the limits hold for, for screen readers: "all solvers", "solver hybrid". */
  whose: string;
  texts: LimitTexts;
  /** Shown where a field is empty: what holds then. */
  otherwise?: LimitTexts;
  problemOf: (name: keyof LimitTexts) => string | undefined;
  onChange: (texts: LimitTexts) => void;
}

/** One row of fields, one for each limit, as cells of a table. */
export function LimitFields({ whose, texts, otherwise, problemOf, onChange }: LimitFieldsProps) {
  return limits.map(({ name, label, unit, isWhole }) => {
    const problem = problemOf(name);
    return (
      <td
        key={name}
        className="align-top! max-wide:grid max-wide:grid-cols-[minmax(0,12em)_7em] max-wide:items-center"
        data-label={`${label}, ${unit}`}
      >
        <input
          aria-label={`${label}, ${unit}, ${whose}`}
          aria-invalid={problem !== undefined || undefined}
          title={problem}
          inputMode={isWhole ? 'numeric' : 'decimal'}
          list="limit-words"
          autoComplete="off"
          value={texts[name]}
          placeholder={otherwise?.[name]}
          onChange={(event) => onChange({ ...texts, [name]: event.target.value })}
          className={classNames(
            'w-full min-w-[5em] max-w-[8em] rounded-control bg-sheet text-right font-mono text-figure text-ink placeholder:text-ink-3 placeholder:opacity-100',
            problem === undefined
              ? 'border border-rule-strong px-2 py-1'
              : 'border-2 border-worse px-[7px] py-[3px]',
          )}
        />
      </td>
    );
  });
}
