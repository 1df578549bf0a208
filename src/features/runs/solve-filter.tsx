import { type RefObject, useEffect, useState } from 'react';
import { Field } from '../../components/ui/field.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';

export interface SolveFilterProps {
  text: string;
  onText: (text: string) => void;
  textRef: RefObject<HTMLInputElement | null>;
  outcomes: readonly { word: string; count: number }[];
  chosenOutcomes: readonly string[];
  onOutcome: (word: string) => void;
  onAllOutcomes: () => void;
  traits: readonly string[];
  trait: string;
  onTrait: (trait: string) => void;
  solvers: readonly string[];
  shownSolvers: readonly string[];
  onSolver: (solver: string) => void;
}

const badOutcomes = [
  'other root',
  'false claim',
  'over budget',
  'timed out',
  'crashed',
  'garbled',
  'refused',
];

/** Narrows the table of a run: by text, outcome, trait and solver. All of it stands in the address. */
export function SolveFilter(props: SolveFilterProps) {
  const [text, setText] = useState(props.text);
  const { onText } = props;
  useEffect(() => setText(props.text), [props.text]);
  useEffect(() => {
    if (text === props.text) return;
    const timer = window.setTimeout(() => onText(text), 180);
    return () => window.clearTimeout(timer);
  }, [text, props.text, onText]);
  return (
    <div className="no-print grid gap-y-1.5 pb-3">
      <div className="flex flex-wrap items-center gap-x-4.5 gap-y-1.5">
        <Field
          ref={props.textRef}
          label="Narrow by case, equation or trait"
          isLabelHidden
          type="search"
          className="w-[232px] max-wide:w-full"
          placeholder="case or trait: e.g. multiple"
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
        <FilterWord
          word="all outcomes"
          isPressed={props.chosenOutcomes.length === 0}
          onPress={props.onAllOutcomes}
        />
        {props.outcomes.map(({ word, count }) => (
          <FilterWord
            key={word}
            word={word}
            count={count}
            colour={badOutcomes.includes(word) ? 'text-worse' : 'text-ink'}
            isPressed={props.chosenOutcomes.includes(word)}
            onPress={() => props.onOutcome(word)}
          />
        ))}
      </div>
      {props.traits.length > 0 && (
        <div className="flex flex-wrap items-center gap-x-3.5 gap-y-0.5">
          <span className="text-note text-ink-3">trait</span>
          {props.traits.map((trait) => (
            <FilterWord
              key={trait}
              word={trait}
              colour="text-ink-2"
              isPressed={props.trait === trait}
              onPress={() => props.onTrait(props.trait === trait ? '' : trait)}
            />
          ))}
        </div>
      )}
      {props.solvers.length > 1 && (
        <div className="flex flex-wrap items-center gap-x-3.5 gap-y-0.5">
          <span className="text-note text-ink-3">solver</span>
          {props.solvers.map((solver) => (
            <FilterWord
              key={solver}
              word={solver}
              colour="text-ink-2"
              isPressed={props.shownSolvers.includes(solver)}
              onPress={() => props.onSolver(solver)}
            />
          ))}
        </div>
      )}
    </div>
  );
}
