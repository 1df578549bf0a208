import { lazy, Suspense } from 'react';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import { useSeen } from '../../lib/use-seen.ts';
import { useViewState } from '../../lib/use-view-state.ts';

const CostPlots = lazy(async () => ({
  default: (await import('../../features/comparisons/cost-plots.tsx')).CostPlots,
}));

export interface ComparisonCostsProps {
  pairs: PairView[];
  candidate: number;
  base: RunBase;
}

/** The totals as pictures, of all solvers or of one; read and drawn when they come near the window. */
export function ComparisonCosts({ pairs, candidate, base }: ComparisonCostsProps) {
  const view = useViewState();
  const [box, isSeen] = useSeen<HTMLDivElement>();
  const solvers = [...new Set(pairs.map((pair) => pair.solver))];
  const asked = view.get('drawn');
  const solver = solvers.includes(asked) ? asked : '';
  return (
    <Entry
      title="Cost, drawn"
      note={
        <>
          <p>Left, each dot a pair: on the line it costs the same, above it the candidate costs more.</p>
          <p>
            Right, the profile of Dolan and Moré (2002): for each τ the share of all pairs that a build solves
            with at most τ times the evaluations of the cheaper of the two. At 1: where it is the cheapest,
            ties included. At the right end: all that it solves.
          </p>
        </>
      }
    >
      <div ref={box}>
        {solvers.length > 1 && (
          <div className="no-print flex flex-wrap items-center gap-x-3.5 pb-2">
            {['', ...solvers].map((name) => (
              <FilterWord
                key={name}
                word={name === '' ? 'all solvers' : name}
                isPressed={name === solver}
                onPress={() => view.set({ drawn: name })}
              />
            ))}
          </div>
        )}
        {isSeen ? (
          <Suspense fallback={<LoadingStrokes label="Drawing" />}>
            <CostPlots candidate={candidate} base={base} pairs={pairs} solver={solver} />
          </Suspense>
        ) : (
          <div style={{ minHeight: 460 }} />
        )}
      </div>
    </Entry>
  );
}
