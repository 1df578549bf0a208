import { AppError } from '../../shared/errors.ts';
import { printable } from './table.ts';

/** What the command line answers: 0 within allowances or done, 1 beyond allowances, 2 anything that went wrong. */
export const exitCodes = { fine: 0, beyond: 1, wrong: 2 } as const;

/** The error as lines for a terminal: the sentence, then each issue with its place. */
export function explainError(error: unknown): string {
  if (error instanceof AppError) {
    const issues = error.issues.map((issue) => {
      const place =
        issue.line === undefined ? (issue.path ?? '') : `line ${issue.line}, column ${issue.column ?? 1}`;
      return `  ${place === '' ? '' : `${place}: `}${issue.message}`;
    });
    return [error.message, ...issues].map(printable).join('\n');
  }
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
