import { useQuery } from '@tanstack/react-query';
import { AppError } from '../../../shared/errors.ts';
import type { CodeDiffView } from '../../../shared/schemas/code-diff.ts';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { formatCommit, formatCount } from '../../lib/format.ts';
import { CodeFile } from './code-file.tsx';
import { openFiles, solverOfFile } from './code-files.ts';
import { codeDiffQuery } from './comparisons.queries.ts';
import { countWords } from './pair-groups.ts';
import { useFocusedSolver } from './use-focused-solver.ts';

export interface CodeBesideProps {
  candidate: number;
  base: RunBase;
  pairs: readonly PairView[];
}

function saidOf(pairs: readonly PairView[], solver: string | null): string | null {
  if (solver === null) return null;
  const words = countWords(pairs.filter((pair) => pair.solver === solver && pair.change !== 'same'));
  const [gravest] = words;
  return gravest === undefined ? null : `${formatCount(gravest.count, 'pair')} ${gravest.change}`;
}

function Files({ diff, pairs }: { diff: CodeDiffView; pairs: readonly PairView[] }) {
  const chosen = useFocusedSolver();
  const solvers = [...new Set(pairs.map((pair) => pair.solver))];
  const open = openFiles(diff.files);
  const name = (build: CodeDiffView['candidate']): string => formatCommit(build.commit ?? build.label);
  if (diff.files.length === 0) {
    return (
      <StateNote title="No file differs">
        {diff.candidate.id === diff.reference.id
          ? 'Both runs are of the same build; what differs between them is not in its code.'
          : 'The two builds have the same files.'}
      </StateNote>
    );
  }
  return (
    <>
      <p className="text-note text-ink-3">
        What changed between <span className="num">{name(diff.reference)}</span> and{' '}
        <span className="num">{name(diff.candidate)}</span>
        {diff.isOfRecord ? '.' : ', as the folders are now; they may have changed since the builds were run.'}
      </p>
      {diff.files.map((file) => {
        const solver = solverOfFile(file.path, solvers);
        return (
          <CodeFile
            key={file.path}
            file={file}
            isOpenAtFirst={open.includes(file.path)}
            isChosen={solver !== null && solver === chosen}
            said={saidOf(pairs, solver)}
          />
        );
      })}
      {diff.filesLeftOut > 0 && (
        <p className="pt-3 text-note text-ink-3">
          {formatCount(diff.filesLeftOut, 'file')} more changed: {diff.pathsLeftOut.join(', ')}
          {diff.filesLeftOut > diff.pathsLeftOut.length ? ' …' : ''}
        </p>
      )}
    </>
  );
}

/** The code that changed, beside the pairs that it changed. */
export function CodeBeside({ candidate, base, pairs }: CodeBesideProps) {
  const query = useQuery(codeDiffQuery(candidate, base));
  const { error } = query;
  // These are no faults: there is nothing to put side by side, and the server says why.
  const isWithout =
    error instanceof AppError && ['unprocessable', 'gone', 'not_found', 'forbidden'].includes(error.code);
  if (isWithout) return <StateNote title="No code to show">{error.message}</StateNote>;
  return (
    <QueryState query={query} what="the code">
      {(diff) => <Files diff={diff} pairs={pairs} />}
    </QueryState>
  );
}
