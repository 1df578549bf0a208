import { AppError, type Issue } from '../../../shared/errors.ts';

export interface ProblemLinesProps {
  error: unknown;
}

export interface IssueListProps {
  issues: readonly Issue[];
}

/** What is wrong, each at its line where it has one. */
export function IssueList({ issues }: IssueListProps) {
  return (
    <ul>
      {issues.map((issue) => (
        <li key={`${issue.line ?? ''} ${issue.path ?? ''} ${issue.message}`}>
          {issue.line !== undefined && (
            <span className="num">
              line {issue.line}
              {issue.column === undefined ? '' : `, column ${issue.column}`}:{' '}
            </span>
          )}
          {issue.line === undefined && issue.path !== undefined && issue.path !== '' && (
            <code className="text-figure">{issue.path}: </code>
          )}
          {issue.message}
        </li>
      ))}
    </ul>
  );
}

/** An error of the server with what it says about it. */
export function ProblemLines({ error }: ProblemLinesProps) {
  if (error === null || error === undefined) return null;
  const message = error instanceof Error ? error.message : 'Something went wrong here; nothing was lost.';
  const issues = error instanceof AppError ? error.issues.filter((issue) => issue.message !== message) : [];
  return (
    <div role="alert" className="border-l-3 border-worse pl-3 text-table">
      <p>{message}</p>
      <div className="text-ink-2">
        <IssueList issues={issues} />
      </div>
    </div>
  );
}
