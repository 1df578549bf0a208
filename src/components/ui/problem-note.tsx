import { AppError } from '../../../shared/errors.ts';
import { Button } from './button.tsx';
import { StateNote } from './state-note.tsx';

export interface ProblemNoteProps {
  /** What was being read, e.g. "The builds could not be read". */
  title: string;
  error: unknown;
  onRetry: () => void;
}

/** An error with its sentence and a way to try again. */
export function ProblemNote({ title, error, onRetry }: ProblemNoteProps) {
  const isMissing = error instanceof AppError && error.code === 'not_found';
  const message = error instanceof AppError ? error.message : 'Something went wrong here; nothing was lost.';
  return (
    <StateNote
      isProblem
      title={isMissing ? 'There is no such thing here' : title}
      actions={<Button onClick={onRetry}>Try again</Button>}
    >
      {message}
    </StateNote>
  );
}
