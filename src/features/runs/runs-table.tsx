import { Link } from 'react-router';
import type { RunView } from '../../../shared/schemas/runs.ts';
import { formatDateTime, formatElapsed, formatFigure } from '../../lib/format.ts';

export interface RunsTableProps {
  runs: readonly RunView[];
  runHref: (run: RunView) => string;
  comparisonHref: (run: RunView) => string;
}

const statusWords: Record<RunView['status'], string> = {
  queued: 'waits',
  running: 'in progress',
  finished: 'finished',
  stopped: 'stopped early',
  cancelled: 'cancelled',
  failed: 'failed',
};

/** Runs, newest first. */
export function RunsTable({ runs, runHref, comparisonHref }: RunsTableProps) {
  return (
    <table className="table table-rows stack">
      <thead>
        <tr>
          <th scope="col">run</th>
          <th scope="col">suite</th>
          <th scope="col">state</th>
          <th scope="col" className="r">
            solved
          </th>
          <th scope="col" className="r">
            evaluations
          </th>
          <th scope="col" className="r">
            took
          </th>
          <th scope="col">asked for</th>
          <th scope="col">
            <span className="sr-only">comparison</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {runs.map((run) => (
          <tr key={run.id}>
            <td className="lead-cell fig">
              <Link to={runHref(run)} data-row-link>
                run {run.id}
              </Link>
            </td>
            <td data-label="suite">
              {run.suite.slug}, revision <span className="num">{run.suite.revision}</span>
            </td>
            <td className={run.status === 'failed' || run.status === 'stopped' ? 'text-worse' : ''}>
              {statusWords[run.status]}
            </td>
            <td className="fig r max-wide:text-left" data-label="solved">
              {formatFigure(run.progress.solved)} <span className="font-sans text-ink-3">of</span>{' '}
              <span className="text-ink-3">{formatFigure(run.progress.planned)}</span>
            </td>
            <td className="fig r max-wide:text-left" data-label="evaluations">
              {formatFigure(run.progress.evaluations)}
            </td>
            <td className="fig r max-wide:text-left" data-label="took">
              {run.finishedAt === null ? '–' : formatElapsed(run.elapsedMs)}
            </td>
            <td className="whitespace-nowrap text-ink-2">{formatDateTime(run.createdAt)}</td>
            <td>
              {run.against !== null && run.status === 'finished' && (
                <Link to={comparisonHref(run)}>comparison</Link>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
