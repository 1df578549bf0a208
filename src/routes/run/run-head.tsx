import { useState } from 'react';
import { useNavigate } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { RunDetail, SolveView } from '../../../shared/schemas/runs.ts';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { Ask } from '../../components/ui/ask.tsx';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { SetReference } from '../../features/references/set-reference.tsx';
import { useLacksReference } from '../../features/references/use-lacks-reference.ts';
import { RunFacts } from '../../features/runs/run-facts.tsx';
import { RunProgress } from '../../features/runs/run-progress.tsx';
import { runSentence } from '../../features/runs/run-sentence.ts';
import { useCancelRun, useRunAgain } from '../../features/runs/runs.queries.ts';
import { formatCommit, formatCount, formatDateTime } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';
import { useMayIn } from '../use-may-in.ts';

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
  const may = useMayIn(run.library);
  const canRun = may('run.start');
  const canCancel = may('run.cancel');
  const canBeReference = useLacksReference(run) && may('reference.accept');
  const [open, setOpen] = useState<'again' | 'reference' | null>(null);
  const flip = (which: 'again' | 'reference'): void => setOpen(open === which ? null : which);
  useKeys({
    s: () => {
      if (isLive && canCancel) cancel.mutate();
    },
    r: () => {
      if (!isLive && canRun) flip('again');
    },
    p: () => {
      if (canBeReference) flip('reference');
    },
    c: () => {
      if (!isLive && run.against !== null) void navigate(paths.comparison(run.id));
    },
  });
  const hasFailed = run.status === 'failed' || run.status === 'stopped';
  const problem = cancel.error;
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
          canCancel && (
            <Button hotkey="s" onClick={() => cancel.mutate()} disabled={cancel.isPending}>
              Stop the run
            </Button>
          )
        ) : (
          <>
            {run.against !== null && solves.length > 0 && (
              <ButtonLink isMain to={paths.comparison(run.id)} hotkey="c">
                Read the comparison
              </ButtonLink>
            )}
            {canRun && (
              <Button hotkey="r" aria-expanded={open === 'again'} onClick={() => flip('again')}>
                Run again
              </Button>
            )}
            {canBeReference && (
              <TextAction hotkey="p" aria-expanded={open === 'reference'} onClick={() => flip('reference')}>
                Make these results the reference
              </TextAction>
            )}
            {open === 'again' && (
              <Ask
                question={
                  <>
                    Run <b>{formatCommit(run.build.commit ?? run.build.label)}</b> on {run.suite.slug} again,{' '}
                    {formatCount(run.progress.planned, 'solve')}? This run stays as it is.
                  </>
                }
                word="Run it again"
                onYes={() =>
                  again.mutate(undefined, { onSuccess: (next) => void navigate(paths.run(next.id)) })
                }
                onNo={() => setOpen(null)}
                isBusy={again.isPending}
                problem={again.error?.message ?? null}
              />
            )}
            {open === 'reference' && (
              <SetReference run={run} onDone={() => setOpen(null)} onClose={() => setOpen(null)} />
            )}
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
