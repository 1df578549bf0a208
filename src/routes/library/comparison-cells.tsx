import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import { gravity } from '../../../shared/comparison/change.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { VerdictWord } from '../../components/marks/verdict-word.tsx';
import { comparisonQuery, writeBase } from '../../features/comparisons/comparisons.queries.ts';
import { formatFigure } from '../../lib/format.ts';
import { paths } from '../../paths.ts';

export interface ComparisonCellProps {
  /** Newest finished run of the build; null where there is none. */
  run: number | null;
  /** What it is compared with: what it ran against, else the run of the build before; null for neither. */
  base: RunBase | null;
}

/** Stands in where there is nothing to compare with; nothing is asked then. */
const noBase: RunBase = { kind: 'run', run: 0 };

function useCell({ run, base }: ComparisonCellProps) {
  return useQuery({
    ...comparisonQuery(run ?? 0, base ?? noBase),
    enabled: run !== null && base !== null,
  });
}

/** What changed against the base, in counts, gravest first. */
export function ChangesCell(props: ComparisonCellProps) {
  const query = useCell(props);
  const { run, base } = props;
  if (run === null) return <span className="text-ink-3">not run on this suite</span>;
  if (base === null) return <span className="text-ink-3">the first build</span>;
  if (query.isError) return <span className="text-worse">{query.error.message}</span>;
  if (query.data === undefined) return <span className="text-ink-3">…</span>;
  const { changes } = query.data;
  const isSame = Object.keys(changes).every((change) => change === 'same');
  return (
    <Link to={paths.comparison(run, writeBase(base))} className="flex flex-wrap gap-x-4 no-underline">
      {gravity
        .filter((change) => changes[change] !== undefined && (isSame || change !== 'same'))
        .map((change) => (
          <ChangeWord key={change} change={change} count={changes[change] ?? 0} />
        ))}
    </Link>
  );
}

export function VerdictCell(props: ComparisonCellProps) {
  const query = useCell(props);
  return query.data === undefined ? null : <VerdictWord verdict={query.data.verdict} isShort />;
}

export interface SolvedCellProps extends ComparisonCellProps {
  /** Shown where there is nothing to compare with: solved, without the rightly refused. */
  solved: number | null;
}

/** Solved or rightly refused, of what applies. */
export function SolvedCell({ run, base, solved }: SolvedCellProps) {
  const query = useCell({ run, base });
  const { candidate } = query.data?.overall ?? {};
  if (candidate === undefined) return formatFigure(solved);
  return (
    <>
      {formatFigure(candidate.solved)} <span className="font-sans text-ink-3">of</span>{' '}
      <span className="text-ink-3">{formatFigure(candidate.of)}</span>
    </>
  );
}
