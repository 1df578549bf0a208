import { useState } from 'react';
import { useNavigate } from 'react-router';
import type { RunBase, RunDetail } from '../../../shared/schemas/runs.ts';
import { Ask } from '../../components/ui/ask.tsx';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { ExportList } from '../../features/comparisons/export-list.tsx';
import { SetReference } from '../../features/references/set-reference.tsx';
import { useLacksReference } from '../../features/references/use-lacks-reference.ts';
import { useRunAgain } from '../../features/runs/runs.queries.ts';
import { formatCommit, formatCount } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';
import { useMayIn } from '../use-may-in.ts';

export interface ComparisonActionsProps {
  run: RunDetail;
  base: RunBase;
}

/** What can be done with a comparison. Each opens below the buttons and asks before it changes anything. */
export function ComparisonActions({ run, base }: ComparisonActionsProps) {
  const navigate = useNavigate();
  const again = useRunAgain(run.id);
  const may = useMayIn(run.library);
  const canRun = may('run.start');
  const canBeReference = useLacksReference(run) && may('reference.accept');
  const [open, setOpen] = useState<'again' | 'export' | 'reference' | null>(null);
  const close = (): void => setOpen(null);
  const flip = (which: 'again' | 'export' | 'reference'): void => setOpen(open === which ? null : which);
  useKeys({
    r: () => {
      if (canRun) flip('again');
    },
    e: () => flip('export'),
    p: () => {
      if (canBeReference) flip('reference');
    },
    escape: () => void navigate(paths.run(run.id)),
  });
  return (
    <>
      {canRun && (
        <Button hotkey="r" aria-expanded={open === 'again'} onClick={() => flip('again')}>
          Run again
        </Button>
      )}
      <Button hotkey="e" aria-expanded={open === 'export'} onClick={() => flip('export')}>
        Export
      </Button>
      <ButtonLink to={paths.run(run.id)}>See the whole run</ButtonLink>
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
          onYes={() => again.mutate(undefined, { onSuccess: (next) => void navigate(paths.run(next.id)) })}
          onNo={close}
          isBusy={again.isPending}
          problem={again.error?.message ?? null}
        />
      )}
      {open === 'export' && <ExportList candidate={run.id} base={base} onClose={close} />}
      {open === 'reference' && <SetReference run={run} onDone={close} onClose={close} />}
    </>
  );
}
