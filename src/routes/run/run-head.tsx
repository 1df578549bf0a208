import { useNavigate } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { RunDetail, SolveView } from '../../../shared/schemas/runs.ts';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { RunFacts } from '../../features/runs/run-facts.tsx';
import { RunProgress } from '../../features/runs/run-progress.tsx';
import { runSentence } from '../../features/runs/run-sentence.ts';
import { useCancelRun, useRunAgain } from '../../features/runs/runs.queries.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';

export interface RunHeadProps {
  run: RunDetail;
  solves: SolveView[];
  cases: SuiteCase[];
}

const statusWords: Record<RunDetail['status'], string> = {
  queued: 'waiting for its turn',
  running: 'in progress',
  finished: 'finished',
  stopped: 'stopped early',
  cancelled: 'cancelled',
  failed: 'failed',
};

/** What a run found, or how far it is; its facts and what can be done with it. */
export function RunHead({ run, solves, cases }: RunHeadProps) {
  const navigate = useNavigate();
  const cancel = useCancelRun(run.id);
  const again = useRunAgain(run.id);
  const isLive = run.status === 'queued' || run.status === 'running';
  const runAgain = (): void =>
    again.mutate(undefined, { onSuccess: (next) => void navigate(paths.run(next.id)) });
  useKeys({
    s: () => {
      if (isLive) cancel.mutate();
    },
    r: () => {
      if (!isLive) runAgain();
    },
    c: () => {
      if (!isLive && run.against !== null) void navigate(paths.comparison(run.id));
    },
  });
  const hasFailed = run.status === 'failed' || run.status === 'stopped';
  const problem = cancel.error ?? again.error;
  return (
    <VerdictBlock
      sign={run.status === 'running' && run.phase === 'confirming' ? 'confirming' : statusWords[run.status]}
      colour={hasFailed ? 'text-worse' : 'text-ink-2'}
      note={
        <>
          <p>
            Asked for on {formatDateTime(run.createdAt)} by {run.createdBy}.
          </p>
          {run.progress.unsteady > 0 && <p>{formatCount(run.progress.unsteady, 'solve')} did not repeat.</p>}
        </>
      }
      sentence={<RichText pieces={runSentence(run, solves)} />}
      lead={run.reason ?? undefined}
      actions={
        isLive ? (
          <Button hotkey="s" onClick={() => cancel.mutate()} disabled={cancel.isPending}>
            Stop the run
          </Button>
        ) : (
          <>
            {run.against !== null && solves.length > 0 && (
              <ButtonLink isMain to={paths.comparison(run.id)} hotkey="c">
                Read the comparison
              </ButtonLink>
            )}
            <Button hotkey="r" onClick={runAgain} disabled={again.isPending}>
              Run again
            </Button>
          </>
        )
      }
    >
      {isLive && <RunProgress run={run} solves={solves} cases={cases} />}
      <RunFacts
        run={run}
        buildHref={paths.build(run.build.id)}
        suiteHref={paths.suite(run.suite.slug, run.suite.revision)}
      />
      {problem !== null && (
        <p role="alert" className="mt-3 text-worse">
          {problem.message}
        </p>
      )}
    </VerdictBlock>
  );
}
