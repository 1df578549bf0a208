import type { ReactNode } from 'react';
import { Link } from 'react-router';
import { isSuccess } from '../../../shared/numerics/judge-claim.ts';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { formatDifference, formatDigits, formatFigure } from '../../lib/format.ts';
import { formatEquation } from '../../lib/format-equation.ts';
import { isOrderFigure, orderWords } from '../../lib/order-words.ts';

export interface PairRowProps {
  pair: PairView;
  equation: string;
  href: string;
  strips: ReactNode;
  /** Cell of the margin: on the first row of a group it carries the change. */
  aside: ReactNode;
}

function Two({ reference, candidate }: { reference: ReactNode; candidate: ReactNode }) {
  return (
    <span className="two">
      <span>{reference}</span>
      <span>{candidate}</span>
    </span>
  );
}

function Order({ solve }: { solve: SolveView | null }) {
  if (solve === null || solve.outcome !== 'solved') return <span className="num">–</span>;
  const words = orderWords(solve.order);
  return isOrderFigure(solve.order) ? (
    <span className="num">{words}</span>
  ) : (
    <span className="text-[12px]">{words}</span>
  );
}

const digitsOf = (solve: SolveView | null): string =>
  solve === null || !isSuccess(solve)
    ? '–'
    : formatDigits(solve.exact ? 16 : solve.digits === null ? null : Math.min(16, solve.digits));

/** Second line of the name: what stands beside the gravest change, how the candidate failed, or the equation. */
function SecondLine({ pair, equation }: { pair: PairView; equation: string }) {
  const { candidate } = pair;
  if (pair.others.length > 0) {
    return (
      <span className="flex gap-x-3 overflow-hidden text-[12px]">
        {pair.others.map((other) => (
          <ChangeWord key={other} change={other} />
        ))}
      </span>
    );
  }
  if (candidate !== null && !isSuccess(candidate)) {
    const said = candidate.remarks.find((remark) => remark.code === 'said')?.text;
    return (
      <span className="block truncate text-worse">
        {candidate.outcome}
        {said === undefined ? '' : `: “${said}”`}
      </span>
    );
  }
  return <span className="block truncate font-mono text-[12px] text-ink-3">{formatEquation(equation)}</span>;
}

function differenceColour(difference: number | null): string {
  if (difference === null || difference === 0) return 'text-ink-2';
  return difference > 0 ? 'text-worse' : 'text-better';
}

/** A pair in two lines, the reference above, the candidate below. */
export function PairRow({ pair, equation, href, strips, aside }: PairRowProps) {
  const { reference, candidate } = pair;
  return (
    <tr>
      {aside}
      <td className="lead-cell name-cell">
        <span className="two">
          <span className="truncate text-ink!">
            <Link to={href} data-row-link data-solver={pair.solver}>
              <b className="font-medium">{pair.solver}</b> on {pair.case}
              {pair.start !== null && pair.start > 0 ? `, start ${pair.start + 1}` : ''}
            </Link>
          </span>
          <span className="min-w-0">
            <SecondLine pair={pair} equation={equation} />
          </span>
        </span>
      </td>
      <td className="fig r evaluations-cell">
        <Two
          reference={formatFigure(reference?.evaluations)}
          candidate={formatFigure(candidate?.evaluations)}
        />
      </td>
      <td className={`r not-narrow font-mono text-figure font-medium ${differenceColour(pair.difference)}`}>
        {formatDifference(pair.difference)}
      </td>
      <td className="fig r digits-cell">
        <Two reference={digitsOf(reference)} candidate={digitsOf(candidate)} />
      </td>
      <td className="order-column not-narrow">
        <Two reference={<Order solve={reference} />} candidate={<Order solve={candidate} />} />
      </td>
      <td className="strip-cell">{strips}</td>
    </tr>
  );
}
