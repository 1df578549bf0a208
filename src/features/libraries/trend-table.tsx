import type { SolverView } from '../../../shared/schemas/libraries.ts';
import { TrendLine } from '../../components/charts/trend-line.tsx';
import { formatFigure, formatOrder } from '../../lib/format.ts';
import { useWidth } from '../../lib/use-width.ts';
import type { TrendSeries } from './trend.ts';

export interface TrendTableProps {
  series: readonly TrendSeries[];
  labels: readonly string[];
  solvers: readonly SolverView[];
}

const takesWords = { bracket: 'a bracket', both: 'a bracket and a start', point: 'a point' } as const;
const usesWords: Record<string, string> = { f: 'f', df: 'f′', d2f: 'f″', jac: 'the Jacobian' };

/** What a solver takes and uses, in a few words. */
export function solverWords({ declaration }: Pick<SolverView, 'declaration'>): string {
  const takes =
    declaration.takes === 'start'
      ? declaration.starts === 1
        ? 'one start'
        : `${declaration.starts === 2 ? 'two' : declaration.starts} starts`
      : takesWords[declaration.takes];
  return `takes ${takes}; uses ${declaration.uses.map((use) => usesWords[use] ?? use).join(', ')}`;
}

/** Evaluations, solved and order of each solver over the builds, left to right. */
export function TrendTable({ series, labels, solvers }: TrendTableProps) {
  const [box, width] = useWidth<HTMLDivElement>(1180);
  const isNarrow = width < 640;
  const wide = isNarrow ? width : Math.min(420, Math.max(200, width - 190 - 2 * 216 - 150));
  const small = isNarrow ? Math.floor(width / 2) - 10 : 190;
  return (
    <div ref={box}>
      <table className="table stack trend-table">
        <thead>
          <tr>
            <th scope="col">solver</th>
            <th scope="col">evaluations</th>
            <th scope="col">solved</th>
            <th scope="col">order found, median</th>
            <th scope="col" className="r">
              newest
            </th>
          </tr>
        </thead>
        <tbody>
          {series.map((one) => {
            const solver = solvers.find((candidate) => candidate.name === one.solver);
            const evaluations = one.evaluations.at(-1) ?? null;
            return (
              <tr key={one.solver}>
                <th scope="row" className="all-columns">
                  {one.solver}
                  {solver !== undefined && (
                    <span className="block text-header font-normal text-ink-3">{solverWords(solver)}</span>
                  )}
                </th>
                <td className="all-columns" data-label="evaluations">
                  <TrendLine
                    values={one.evaluations}
                    labels={labels}
                    width={wide}
                    isMoreBetter={false}
                    format={formatFigure}
                  />
                </td>
                <td data-label="solved">
                  <TrendLine
                    values={one.solved}
                    labels={labels}
                    width={small}
                    isMoreBetter
                    format={formatFigure}
                  />
                </td>
                <td data-label="order">
                  {one.order.every((value) => value === null) ? (
                    <span className="text-header text-ink-3">too few steps</span>
                  ) : (
                    <TrendLine
                      values={one.order}
                      labels={labels}
                      width={small}
                      isMoreBetter
                      format={formatOrder}
                    />
                  )}
                </td>
                <td className="fig r all-columns">
                  {formatFigure(evaluations)} <span className="font-sans text-ink-3">over</span>{' '}
                  <span className="text-ink-3">{formatFigure(one.over)}</span>
                  <br />
                  <span className="text-ink-3">
                    {formatFigure(one.solved.at(-1) ?? null)} <span className="font-sans">of</span>{' '}
                    {formatFigure(one.of)} <span className="font-sans">solved</span>
                  </span>
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
