import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { RunDetail, SolveView } from '../../../shared/schemas/runs.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { runQuery, solvesQuery } from '../../features/runs/runs.queries.ts';
import { useLiveRun } from '../../features/runs/use-live-run.ts';
import { suiteRevisionQuery } from '../../features/suites/suites.queries.ts';
import { formatCommit } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';
import { RunHead } from './run-head.tsx';
import { RunSolves } from './run-solves.tsx';

const noCases: SuiteCase[] = [];
const noSolves: SolveView[] = [];

function RunSheet({ run }: { run: RunDetail }) {
  useLiveRun(run.id, run.status === 'queued' || run.status === 'running');
  const solves = useQuery(solvesQuery(run.id));
  const revision = useQuery(suiteRevisionQuery(run.suite.slug, run.suite.revision));
  const navigate = useNavigate();
  const label = formatCommit(run.build.commit ?? run.build.label);
  useKeys({ escape: () => void navigate(paths.build(run.build.id)) });
  return (
    <Page
      title={`Run ${run.id}`}
      trail={[
        { label: run.library, to: paths.library(run.library) },
        { label: `Build ${label}`, to: paths.build(run.build.id) },
        { label: `Run ${run.id}` },
      ]}
      keys={[
        { keys: ['h', 'j', 'k', 'l'], does: 'move in the table' },
        { keys: ['enter'], does: 'open the solve' },
        { keys: ['f'], does: 'narrow' },
        { keys: ['x'], does: 'clear the filter' },
        run.status === 'queued' || run.status === 'running'
          ? { keys: ['s'], does: 'stop the run' }
          : { keys: ['r'], does: 'run again' },
        { keys: ['esc'], does: 'back to the build' },
      ]}
    >
      <RunHead run={run} solves={solves.data ?? noSolves} cases={revision.data?.cases ?? noCases} />
      {run.status === 'failed' && solves.data?.length === 0 ? (
        <Entry title="Log" note="The last lines that the build wrote.">
          <StateNote isProblem title="Nothing was measured">
            <pre className="mt-2 whitespace-pre-wrap font-mono text-code">
              {run.log || 'It wrote nothing.'}
            </pre>
          </StateNote>
        </Entry>
      ) : (
        <QueryState query={solves} what="the solves">
          {(list) => (
            <QueryState query={revision} what="the suite">
              {(suite) => <RunSolves run={run} solves={list} cases={suite.cases} />}
            </QueryState>
          )}
        </QueryState>
      )}
    </Page>
  );
}

/** One build on one suite: progress while it goes on, then what each solver did on each case. */
export function RunPage() {
  const id = Number(useParams().run);
  const query = useQuery(runQuery(id));
  if (query.data !== undefined) return <RunSheet run={query.data} />;
  return (
    <Page title={`Run ${id}`} trail={[{ label: 'Libraries', to: paths.libraries() }, { label: `Run ${id}` }]}>
      <Entry title="Run">
        <QueryState query={query} what={`run ${id}`}>
          {() => null}
        </QueryState>
      </Entry>
    </Page>
  );
}
