import { Link } from 'react-router';
import { gravity } from '../../../shared/comparison/change.ts';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { VerdictWord } from '../../components/marks/verdict-word.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { breachSentence, breachTerms } from '../../features/comparisons/breach-sentences.ts';
import { writeBase } from '../../features/comparisons/comparisons.queries.ts';
import { formatCommit, formatShortDate } from '../../lib/format.ts';
import { paths } from '../../paths.ts';
import type { JudgedBuild } from './use-overview.ts';

const mostBreaches = 3;

function Row({ judged }: { judged: JudgedBuild }) {
  const { build, run, base, library, comparison } = judged;
  if (comparison === undefined) return null;
  const { breaches, reasons, changes, verdict } = comparison;
  return (
    <tr>
      <td>
        <VerdictWord verdict={verdict} isShort />
      </td>
      <th scope="row" className="lead-cell">
        <Link to={paths.comparison(run.id, writeBase(base))} data-row-link className="inline-block py-[3px]">
          {build.subject ?? build.label}
        </Link>
        <span className="block text-note font-normal text-ink-3">
          {library.name}, build <span className="num">{formatCommit(build.commit ?? build.label)}</span>,{' '}
          {formatShortDate(build.createdAt)}, {build.createdBy}
        </span>
      </th>
      <td>
        <span className="flex flex-wrap gap-x-4">
          {gravity
            .filter((change) => change !== 'same' && changes[change] !== undefined)
            .map((change) => (
              <ChangeWord key={change} change={change} count={changes[change] ?? 0} />
            ))}
        </span>
        {breaches.slice(0, mostBreaches).map((breach) => (
          <p key={`${breach.allowance} ${breach.scope.solver} ${breach.scope.trait}`} className="text-ink-2">
            {breachTerms[breach.allowance]}: <RichText pieces={breachSentence(breach)} />
          </p>
        ))}
        {breaches.length > mostBreaches && (
          <p className="text-ink-3">and {breaches.length - mostBreaches} more</p>
        )}
        {reasons.map((reason) => (
          <p key={reason} className="text-ink-2">
            {reason}
          </p>
        ))}
      </td>
    </tr>
  );
}

/** Builds with their verdict, and what it rests on. */
export function VerdictRows({ judged }: { judged: readonly JudgedBuild[] }) {
  return (
    <table className="table table-rows stack">
      <thead>
        <tr>
          <th scope="col">verdict</th>
          <th scope="col">what</th>
          <th scope="col">what it did, and how far it went</th>
        </tr>
      </thead>
      <tbody>
        {judged.map((one) => (
          <Row key={one.run.id} judged={one} />
        ))}
      </tbody>
    </table>
  );
}
