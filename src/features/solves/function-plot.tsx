import { useState } from 'react';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { CurvePlot } from '../../components/charts/curve-plot.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { formatExact, formatPathDigits, formatValue } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { closeRange, type FunctionStep, functionSteps } from './function-steps.ts';
import type { SolveSide } from './solve-side.ts';

export interface FunctionPlotProps {
  suiteCase: SuiteCase;
  side: SolveSide;
}

function StepWords({ step, of }: { step: FunctionStep; of: number }) {
  return (
    <>
      evaluation <span className="num">{step.number}</span> of <span className="num">{of}</span>: x ={' '}
      <span className="num wrap-anywhere">{formatExact(step.x)}</span>, f ={' '}
      <span className="num">{formatValue(step.y)}</span>
      {step.digits !== null && (
        <>
          , <span className="num">{formatPathDigits(step.digits)}</span> digits
        </>
      )}
      {step.again !== null && (
        <span className="text-worse">
          ; asked again, as in <span className="num">{step.again}</span>
        </span>
      )}
    </>
  );
}

/** f with the x's asked for. At first all of them; then one after another, with the line that leads on from it. */
export function FunctionPlot({ suiteCase, side }: FunctionPlotProps) {
  const { declaration, root, evaluations } = side.solve;
  const steps = functionSteps(side.lines);
  const [at, setAt] = useState<number | null>(null);
  const [isClose, setIsClose] = useState(false);
  const { bracket } = suiteCase;
  const hasChords = declaration.starts === 2 || declaration.takes !== 'start';
  const step = at === null ? undefined : steps[at];
  const before = at === null ? undefined : steps.slice(0, at).findLast((one) => one.x !== step?.x);
  const move = (by: number): void => {
    if (steps.length === 0) return;
    setAt(Math.min(steps.length - 1, Math.max(0, at === null ? (by > 0 ? 0 : steps.length - 1) : at + by)));
  };
  useKeys({
    ']': () => move(1),
    '[': () => move(-1),
    z: () => setIsClose(!isClose),
  });
  const shown = steps.slice(0, at === null ? steps.length : at + 1).filter((one) => one.again === null);
  return (
    <>
      <CurvePlot
        equation={suiteCase.equation}
        parameters={suiteCase.parameters}
        bracket={
          bracket === null || declaration.takes === 'start' ? null : [Number(bracket[0]), Number(bracket[1])]
        }
        roots={root === null ? [] : [root]}
        asked={shown}
        around={steps.slice(0, 8).map((one) => one.x)}
        hasChords={hasChords && step === undefined}
        range={step !== undefined && at !== null && isClose ? closeRange(steps, at, root) : null}
        current={
          step === undefined
            ? null
            : { ...step, from: hasChords && step.slope === null ? (before ?? null) : null }
        }
      />
      <div className="no-print flex flex-wrap items-center gap-x-4 gap-y-1 pt-1.5 text-table">
        <TextAction hotkey="[" disabled={at === 0 || steps.length === 0} onClick={() => move(-1)}>
          back
        </TextAction>
        <TextAction
          hotkey="]"
          disabled={at === steps.length - 1 || steps.length === 0}
          onClick={() => move(1)}
        >
          {at === null ? 'walk through' : 'on'}
        </TextAction>
        {steps.length > 1 && (
          <label className="inline-flex min-h-6 items-center">
            <span className="sr-only">Evaluation that is looked at</span>
            <input
              type="range"
              min={1}
              max={steps.length}
              value={(at ?? steps.length - 1) + 1}
              aria-valuetext={step === undefined ? 'all of them' : `evaluation ${step.number}, x = ${step.x}`}
              onChange={(event) => setAt(Number(event.target.value) - 1)}
              className="h-6 w-40 accent-ink"
            />
          </label>
        )}
        <FilterWord word="close up" isPressed={isClose} onPress={() => setIsClose(!isClose)} />
        {at !== null && <TextAction onClick={() => setAt(null)}>all of them</TextAction>}
      </div>
      <p aria-live="polite" className="min-h-9 pt-1 text-note text-ink-2">
        {step === undefined ? '' : <StepWords step={step} of={evaluations} />}
        {step !== undefined && isClose && ' Close up: this x, the two before it and the root.'}
      </p>
    </>
  );
}
