import { useState } from 'react';
import { Button } from '../../components/ui/button.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { type AllowanceDraft, type ExceptionDraft, limits, noLimit, writeLimits } from './draft.ts';
import { LimitFields } from './limit-fields.tsx';

export interface AllowanceFieldsProps {
  draft: AllowanceDraft;
  problems: Record<string, string>;
  /** What there can be exceptions for. */
  solvers: readonly string[];
  traits: readonly string[];
  onChange: (draft: AllowanceDraft) => void;
}

function AddException({ draft, solvers, traits, onChange }: Omit<AllowanceFieldsProps, 'problems'>) {
  const has = (kind: ExceptionDraft['kind'], name: string): boolean =>
    draft.exceptions.some((exception) => exception.kind === kind && exception.name === name);
  const free = [
    ...solvers.filter((name) => !has('solver', name)).map((name) => ({ kind: 'solver' as const, name })),
    ...traits.filter((name) => !has('trait', name)).map((name) => ({ kind: 'trait' as const, name })),
  ];
  const [chosen, setChosen] = useState('');
  const exception = free.find(({ kind, name }) => `${kind} ${name}` === chosen) ?? free[0];
  if (exception === undefined) return null;
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-2 pt-3">
      <label className="inline-flex max-w-full flex-wrap items-center gap-2">
        <span className="text-table text-ink-2">an exception for</span>
        <select
          value={`${exception.kind} ${exception.name}`}
          onChange={(event) => setChosen(event.target.value)}
          className="min-h-7 max-w-full rounded-control border border-rule-strong bg-sheet px-2 py-1 text-table"
        >
          {free.map(({ kind, name }) => (
            <option key={`${kind} ${name}`} value={`${kind} ${name}`}>
              {kind === 'solver' ? `solver ${name}` : `cases with the trait ${name}`}
            </option>
          ))}
        </select>
      </label>
      <Button
        onClick={() => {
          const added = { ...exception, texts: writeLimits({}) };
          onChange({ ...draft, exceptions: [...draft.exceptions, added] });
          setChosen('');
        }}
      >
        Add it
      </Button>
    </div>
  );
}

/** Limits for all, and under them those that hold instead for a solver or for cases with a trait. */
export function AllowanceFields(props: AllowanceFieldsProps) {
  const { draft, problems, onChange } = props;
  const sentences = [...new Set(Object.values(problems))];
  const put = (index: number, change: Partial<ExceptionDraft>): void =>
    onChange({
      ...draft,
      exceptions: draft.exceptions.map((one, at) => (at === index ? { ...one, ...change } : one)),
    });
  return (
    <>
      <datalist id="limit-words">
        <option value={noLimit} />
      </datalist>
      <table className="table stack allowance-table">
        <thead>
          <tr>
            <th scope="col">holds for</th>
            {limits.map(({ name, label, unit }) => (
              <th key={name} scope="col">
                {label}
                <span className="block">{unit}</span>
              </th>
            ))}
            <th scope="col">
              <span className="sr-only">take out</span>
            </th>
          </tr>
        </thead>
        <tbody>
          <tr>
            <th scope="row">all solvers</th>
            <LimitFields
              whose="all solvers"
              texts={draft.base}
              problemOf={(name) => problems[`base.${name}`]}
              onChange={(base) => onChange({ ...draft, base })}
            />
            <td />
          </tr>
          {draft.exceptions.map((exception, index) => (
            <tr key={`${exception.kind} ${exception.name}`}>
              <th scope="row">
                <span className="font-normal text-ink-3">{exception.kind}</span> {exception.name}
              </th>
              <LimitFields
                whose={`${exception.kind} ${exception.name}`}
                texts={exception.texts}
                otherwise={draft.base}
                problemOf={(name) => problems[`exception.${index}.${name}`]}
                onChange={(texts) => put(index, { texts })}
              />
              <td className="r max-wide:text-left">
                <TextAction
                  aria-label={`Take out the exception for ${exception.kind} ${exception.name}`}
                  onClick={() =>
                    onChange({ ...draft, exceptions: draft.exceptions.filter((_one, at) => at !== index) })
                  }
                >
                  Take out
                </TextAction>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {sentences.length > 0 && (
        <ul role="alert" className="pt-2 text-note text-worse">
          {sentences.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      )}
      <AddException {...props} />
    </>
  );
}
