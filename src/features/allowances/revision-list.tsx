import type { AllowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import { allowanceLines, exceptionLines } from '../../lib/allowance-words.ts';
import { formatDateTime } from '../../lib/format.ts';

/** All that ever held, newest first; each opens. */
export function RevisionList({ revisions }: { revisions: readonly AllowanceRevisionView[] }) {
  return (
    <ul className="border-t border-rule-strong">
      {revisions.map((revision) => (
        <li key={revision.number} className="border-b border-rule py-[7px]">
          <details>
            <summary className="cursor-pointer">
              <span className="num">{revision.number}</span>{' '}
              <span className="text-ink-2">
                {revision.createdAt === null ? '' : formatDateTime(revision.createdAt)}, {revision.createdBy}:
              </span>{' '}
              {revision.reason}
            </summary>
            <ul className="finds mt-2 max-w-[46em]">
              {[...allowanceLines(revision.allowances.base), ...exceptionLines(revision.allowances)].map(
                (line) => (
                  <li key={line.term}>
                    <b className="font-medium">{line.term}</b>
                    <span>{line.text}</span>
                  </li>
                ),
              )}
            </ul>
          </details>
        </li>
      ))}
    </ul>
  );
}
