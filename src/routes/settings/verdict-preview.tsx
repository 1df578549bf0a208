import { useMemo } from 'react';
import { Link } from 'react-router';
import type { AllowanceSet } from '../../../shared/schemas/allowances.ts';
import { VerdictWord } from '../../components/marks/verdict-word.tsx';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { rejudge } from '../../features/allowances/rejudge.ts';
import { breachSentence, breachTerms } from '../../features/comparisons/breach-sentences.ts';
import { paths } from '../../paths.ts';
import type { PreviewPair, PreviewPairs } from './use-preview-pairs.ts';

interface RowProps {
  pair: PreviewPair;
  now: AllowanceSet;
  proposed: AllowanceSet | null;
}

function Row({ pair, now, proposed }: RowProps) {
  const judged = useMemo(() => rejudge(pair, now, proposed ?? now), [pair, now, proposed]);
  const isOther = judged.now.verdict !== judged.proposed.verdict;
  return (
    <tr>
      <th scope="row">
        <Link to={paths.comparison(pair.candidateRun, `run:${pair.referenceRun}`)}>{pair.label}</Link>
        <span className="block text-note font-normal text-ink-3">
          build <span className="num">{pair.commit}</span>
        </span>
      </th>
      <td data-label="now" className="max-wide:flex max-wide:items-center max-wide:gap-2">
        <VerdictWord verdict={judged.now.verdict} isShort />
      </td>
      <td data-label="then" className="max-wide:flex max-wide:items-center max-wide:gap-2">
        {proposed === null ? '–' : <VerdictWord verdict={judged.proposed.verdict} isShort />}
        {isOther && <span className="ml-2 text-ink-3">another one</span>}
      </td>
      <td>
        {(proposed === null ? [] : judged.proposed.breaches).map((breach) => (
          <p key={`${breach.allowance} ${breach.scope.solver} ${breach.scope.trait}`} className="text-ink-2">
            {breachTerms[breach.allowance]}: <RichText pieces={breachSentence(breach)} />
          </p>
        ))}
        {proposed === null && <span className="text-ink-3">a field cannot be read</span>}
        {proposed !== null && judged.proposed.breaches.length === 0 && (
          <span className="text-ink-3">nothing is beyond them</span>
        )}
      </td>
    </tr>
  );
}

export interface VerdictPreviewProps {
  preview: PreviewPairs;
  now: AllowanceSet;
  /** Null while a field cannot be read. */
  proposed: AllowanceSet | null;
}

/** What the newest comparisons say by the allowances that hold, and what they would say. */
export function VerdictPreview({ preview, now, proposed }: VerdictPreviewProps) {
  const { pairs, isReading, error } = preview;
  if (error !== null && pairs.length === 0)
    return (
      <StateNote isProblem title="The newest comparisons could not be read">
        {error.message}
      </StateNote>
    );
  if (pairs.length === 0)
    return isReading ? (
      <LoadingStrokes label="Reading the newest builds" />
    ) : (
      <StateNote title="Nothing to judge yet">
        From the second build on that is run on the same suite, what these limits do is shown here.
      </StateNote>
    );
  return (
    <table className="table stack">
      <thead>
        <tr>
          <th scope="col">build, against the one before</th>
          <th scope="col">now</th>
          <th scope="col">then</th>
          <th scope="col">what would be beyond</th>
        </tr>
      </thead>
      <tbody>
        {pairs.map((pair) => (
          <Row key={pair.candidateRun} pair={pair} now={now} proposed={proposed} />
        ))}
      </tbody>
    </table>
  );
}
