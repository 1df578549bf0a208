import { lazy, Suspense } from 'react';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import type { SolveSide } from '../../features/solves/solve-side.ts';

const ErrorPlot = lazy(async () => ({
  default: (await import('../../features/solves/error-plot.tsx')).ErrorPlot,
}));
const FunctionPlot = lazy(async () => ({
  default: (await import('../../features/solves/function-plot.tsx')).FunctionPlot,
}));

export interface SolvePlotsProps {
  reference: SolveSide | null;
  candidate: SolveSide;
  suiteCase: SuiteCase;
  attainable: number | null;
}

/** Both plots; the code that draws them is read only here. */
export function SolvePlots({ reference, candidate, suiteCase, attainable }: SolvePlotsProps) {
  return (
    <div className="grid grid-cols-1 gap-x-9 gap-y-6.5 beside:grid-cols-2">
      {candidate.picture.kind === 'strip' && (
        <figure className="min-w-0">
          <h3 className="pb-1.5 text-table font-medium">Correct digits after each evaluation</h3>
          <Suspense fallback={<LoadingStrokes label="Drawing" />}>
            <ErrorPlot reference={reference} candidate={candidate} attainable={attainable} />
          </Suspense>
          <figcaption className="max-w-[62ch] pt-1.5 text-note text-ink-3">
            {reference === null ? '' : 'Rings: reference. Squares: candidate. '}
            {attainable === null ? '' : 'The dashed line is the attainable accuracy of this case.'}
          </figcaption>
        </figure>
      )}
      <figure className="min-w-0">
        <h3 className="pb-1.5 text-table font-medium">f and the first steps</h3>
        <Suspense fallback={<LoadingStrokes label="Drawing" />}>
          <FunctionPlot suiteCase={suiteCase} side={candidate} />
        </Suspense>
        <figcaption className="max-w-[62ch] pt-1.5 text-note text-ink-3">
          Strokes on the axis are the x’s asked for, numbered in order
          {candidate.solve.declaration.starts === 2 || candidate.solve.declaration.takes === 'bracket'
            ? '; straight lines are chords between them.'
            : '.'}{' '}
          Walking through sets one off: its height, and dashed the tangent where f′ was asked for, else the
          chord to the x before it.
        </figcaption>
      </figure>
    </div>
  );
}
