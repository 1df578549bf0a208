import { Link } from 'react-router';
import type { ComparisonView, PairView } from '../../../shared/schemas/comparisons.ts';
import { ChangeMark } from '../../components/marks/change-mark.tsx';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { Gauge } from '../../components/marks/gauge.tsx';
import { formatArrow, formatClaim, formatFigure, formatOrder, formatPercent } from '../../lib/format.ts';
import { countWords } from './pair-groups.ts';

export interface TotalsTableProps {
  comparison: ComparisonView;
  pairs: readonly PairView[];
  /** Allowance in percent by solver. */
  allowanceOf: (solver: string) => number | null;
  pairHref: (pair: PairView) => string;
}

type Totals = ComparisonView['totals'][number];

const mostMarks = 36;

function percentColour(percent: number | null, allowance: number | null): string {
  if (percent === null || percent === 0) return '';
  if (percent < 0) return 'text-better';
  return allowance !== null && percent > allowance ? 'text-worse' : '';
}

function Fingerprint({
  pairs,
  pairHref,
}: {
  pairs: readonly PairView[];
  pairHref: (pair: PairView) => string;
}) {
  if (pairs.length > mostMarks) {
    return (
      <span className="flex flex-wrap gap-x-3">
        {countWords(pairs).map(({ change, count }) => (
          <ChangeWord key={change} change={change} count={count} />
        ))}
      </span>
    );
  }
  const groups = Array.from({ length: Math.ceil(pairs.length / 5) }, (_, index) =>
    pairs.slice(index * 5, index * 5 + 5),
  );
  return (
    <span className="fingerprint">
      {groups.map((group) => (
        <span key={group[0]?.key} className="fingerprint-group">
          {group.map((pair) => (
            <Link key={pair.key} to={pairHref(pair)}>
              <ChangeMark change={pair.change} title={`${pair.case}: ${pair.change}`} />
            </Link>
          ))}
        </span>
      ))}
    </span>
  );
}

function OrderCell({ totals }: { totals: Totals }) {
  const { reference, candidate } = totals.order;
  const claim = <span className="text-ink-3">; {formatClaim(totals.claim)}</span>;
  if (reference.median === null && candidate.median === null) {
    return (
      <>
        <span className="font-sans text-[12px] text-ink-3">too few steps</span>
        {claim}
      </>
    );
  }
  return (
    <>
      {formatArrow(formatOrder(reference.median), formatOrder(candidate.median))}
      {claim}
    </>
  );
}

function SolvedCell({ reference, candidate }: Pick<Totals, 'reference' | 'candidate'>) {
  const isFewer = candidate.of === reference.of && candidate.solved < reference.solved;
  return (
    <>
      {formatFigure(reference.solved)} →{' '}
      <span className={isFewer ? 'text-worse' : ''}>{formatFigure(candidate.solved)}</span>{' '}
      <span className="font-sans text-ink-3">of</span>{' '}
      <span className="text-ink-3">{formatFigure(candidate.of || reference.of)}</span>
    </>
  );
}

/** One solver a row: solved, evaluations, the allowance to scale, order, and the fingerprint of its cases. */
export function TotalsTable({ comparison, pairs, allowanceOf, pairHref }: TotalsTableProps) {
  const percents = comparison.totals.flatMap((one) => one.evaluations.percent ?? []);
  const range = { least: Math.min(0, ...percents), most: Math.max(0, ...percents) };
  const { overall } = comparison;
  return (
    <table className="table stack totals-table">
      <thead>
        <tr>
          <th scope="col">solver</th>
          <th scope="col" className="r">
            solved
            <br />
            reference → candidate
          </th>
          <th scope="col" className="r">
            evaluations
            <br />
            reference → candidate
          </th>
          <th scope="col" className="r">
            change
          </th>
          <th scope="col">against the allowance</th>
          <th scope="col">
            order of convergence
            <br />
            found, reference → candidate; claimed
          </th>
          <th scope="col" className="whitespace-normal!">
            the cases, in the suite’s order
          </th>
        </tr>
      </thead>
      <tbody>
        {comparison.totals.map((totals) => {
          const allowance = allowanceOf(totals.solver);
          const { reference, candidate, percent } = totals.evaluations;
          return (
            <tr key={totals.solver}>
              <th scope="row">
                {totals.solver}
                {totals.formerly !== null && (
                  <span className="block text-header text-ink-3">was {totals.formerly}</span>
                )}
              </th>
              <td className="fig r max-wide:order-5 max-wide:text-left" data-label="solved">
                <SolvedCell reference={totals.reference} candidate={totals.candidate} />
              </td>
              <td className="fig r max-wide:order-3" data-label="evaluations">
                {totals.pairs === 0 ? '–' : formatArrow(formatFigure(reference), formatFigure(candidate))}
                {totals.pairs > 0 && totals.pairs < totals.candidate.of && totals.pairs < 6 && (
                  <span className="text-ink-3">
                    {' '}
                    <span className="font-sans">over</span> {totals.pairs}
                  </span>
                )}
              </td>
              <td className={`fig r max-wide:order-1 ${percentColour(percent, allowance)}`}>
                {totals.pairs === 0 ? '–' : formatPercent(percent)}
              </td>
              <td className="max-wide:order-2">
                <Gauge percent={totals.pairs === 0 ? null : percent} allowance={allowance} range={range} />
              </td>
              <td className="fig max-wide:order-4" data-label="order">
                <OrderCell totals={totals} />
              </td>
              <td className="all-columns max-wide:order-6">
                <Fingerprint
                  pairs={pairs.filter((pair) => pair.solver === totals.solver)}
                  pairHref={pairHref}
                />
              </td>
            </tr>
          );
        })}
        {comparison.totals.length > 1 && (
          <tr className="sum">
            <th scope="row">all {comparison.totals.length}</th>
            <td className="fig r max-wide:order-5 max-wide:text-left" data-label="solved">
              <SolvedCell reference={overall.reference} candidate={overall.candidate} />
            </td>
            <td className="fig r max-wide:order-3" data-label="evaluations">
              {formatArrow(
                formatFigure(overall.evaluations.reference),
                formatFigure(overall.evaluations.candidate),
              )}
            </td>
            <td className="fig r max-wide:order-1">{formatPercent(overall.evaluations.percent)}</td>
            <td className="max-wide:order-2">
              <Gauge percent={overall.evaluations.percent} allowance={null} range={range} />
            </td>
            <td className="not-narrow" />
            <td className="not-narrow" />
          </tr>
        )}
      </tbody>
    </table>
  );
}
