import { useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router';
import type { BuildState, BuildView } from '../../../shared/schemas/builds.ts';
import type { Environment } from '../../../shared/schemas/measurement.ts';
import type { RunView } from '../../../shared/schemas/runs.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { RichText, type TextPiece } from '../../components/ui/rich-text.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { DeclaredSolvers } from '../../features/builds/declared-solvers.tsx';
import { LogView } from '../../features/builds/log-view.tsx';
import { SourceFacts } from '../../features/builds/preview-facts.tsx';
import { RecipeList } from '../../features/builds/recipe-list.tsx';
import { useBuildLog } from '../../features/builds/use-build-log.ts';
import { runQuery, runsQuery } from '../../features/runs/runs.queries.ts';
import { RunsTable } from '../../features/runs/runs-table.tsx';
import { StartRunForm } from '../../features/runs/start-run-form.tsx';
import { suitesQuery } from '../../features/suites/suites.queries.ts';
import { formatCommit, formatCount, formatDateTime } from '../../lib/format.ts';
import { moveRowFocus } from '../../lib/row-focus.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';
import { useMayIn } from '../use-may-in.ts';

export interface BuildSheetProps {
  build: BuildView;
}

const stateWords: Record<BuildState, string> = {
  waiting: 'waiting',
  preparing: 'preparing',
  ready: 'ready',
  failed: 'failed',
};

function Lead({ label, reason }: { label: string | null; reason: string | null }) {
  if (label === null && reason === null) return null;
  return (
    <>
      {label}
      {reason !== null && <span className="block text-ink">{reason}</span>}
    </>
  );
}

function environmentRows(environment: Environment): { term: string; text: string }[] {
  return [
    { term: 'machine', text: `${environment.platform} ${environment.arch}` },
    { term: 'Node.js', text: `${environment.node}, V8 ${environment.v8}` },
    { term: 'Tallyroot', text: environment.tallyroot },
    { term: 'arithmetic', text: environment.fingerprint },
    { term: 'adapters ran', text: environment.confinement },
  ];
}

function sentence(build: BuildView, runs: readonly RunView[] | undefined): TextPiece[] {
  const name: TextPiece = { text: formatCommit(build.commit ?? build.label), strong: true };
  if (build.state === 'waiting') return [name, { text: ' waits to be prepared.' }];
  if (build.state === 'preparing') return [name, { text: ' is being prepared.' }];
  if (build.state === 'failed') return [name, { text: ' could not be prepared.' }];
  const declares: TextPiece = { text: formatCount(build.recipe.solvers.length, 'solver'), figure: true };
  const head: TextPiece[] = [name, { text: ' declares ' }, declares];
  if (runs === undefined) return [...head, { text: '.' }];
  const [newest] = runs.filter((run) => run.status === 'finished');
  if (newest === undefined)
    return [
      ...head,
      { text: runs.length === 0 ? ' and has not been run yet.' : '; no run of it is finished.' },
    ];
  return [
    ...head,
    { text: '; on ' },
    { text: newest.suite.slug, strong: true },
    { text: ' it solved ' },
    { text: `${newest.progress.solved} of ${newest.progress.planned}`, figure: true },
    { text: '.' },
  ];
}

/** A build: how far it is, its runs, its log, where it comes from, its solvers and its recipe. */
export function BuildSheet({ build }: BuildSheetProps) {
  const navigate = useNavigate();
  const runs = useQuery(runsQuery({ build: build.id }));
  const suites = useQuery(suitesQuery);
  const may = useMayIn(build.library);
  const log = useBuildLog(build.id);
  const state = log.data?.state ?? build.state;
  const reason = log.data?.reason ?? build.reason;
  const newest = runs.data?.find((run) => run.startedAt !== null);
  const newestRun = useQuery({ ...runQuery(newest?.id ?? 0), enabled: newest !== undefined }).data;
  const name = formatCommit(build.commit ?? build.label);
  useKeys({
    j: () => moveRowFocus(1),
    k: () => moveRowFocus(-1),
    escape: () => void navigate(paths.library(build.library)),
  });
  const logEntry = (state !== 'ready' || (log.data?.pieces.length ?? 0) > 0) && (
    <Entry title="Log" note={build.recipe.prepare.length === 0 ? undefined : 'What its prepare lines wrote.'}>
      <QueryState
        query={log}
        what="the log"
        isEmpty={(data) => data.pieces.length === 0}
        empty={<StateNote title="Nothing written yet">It appears here line by line.</StateNote>}
      >
        {(data) => <LogView log={data} />}
      </QueryState>
    </Entry>
  );
  return (
    <Page
      title={`Build ${name}`}
      trail={[
        { label: 'Libraries', to: paths.libraries() },
        { label: build.library, to: paths.library(build.library) },
        { label: `Build ${name}` },
      ]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous run' },
        { keys: ['enter'], does: 'open the run' },
        { keys: ['esc'], does: 'back to the library' },
      ]}
    >
      <VerdictBlock
        sign={stateWords[state]}
        colour={state === 'failed' ? 'text-worse' : 'text-ink-2'}
        note={
          <p>
            Registered on {formatDateTime(build.createdAt)} by {build.createdBy}.
          </p>
        }
        sentence={<RichText pieces={sentence({ ...build, state }, runs.data)} />}
        lead={<Lead label={build.label === name ? null : build.label} reason={reason} />}
        actions={
          state === 'ready' && may('run.start') && suites.data !== undefined && suites.data.length > 0 ? (
            <StartRunForm
              build={build.id}
              suites={suites.data}
              onStarted={(run) => void navigate(paths.run(run.id))}
            />
          ) : undefined
        }
      >
        <SourceFacts
          source={build}
          more={[{ term: 'runs', value: <span className="num">{build.runCount}</span> }]}
        />
      </VerdictBlock>
      {state === 'ready' ? null : logEntry}
      <Entry title="Runs" note="Newest first.">
        <QueryState
          query={runs}
          what="the runs"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote title="Not run yet">
              {state === 'ready'
                ? may('run.start')
                  ? 'Choose a suite above and run it.'
                  : 'Members of the library can run it.'
                : state === 'failed'
                  ? 'It could not be prepared, so it cannot be run.'
                  : 'It can be run once it is prepared.'}
            </StateNote>
          }
        >
          {(list) => (
            <RunsTable
              runs={list}
              runHref={(run) => paths.run(run.id)}
              comparisonHref={(run) => paths.comparison(run.id)}
            />
          )}
        </QueryState>
      </Entry>
      {state === 'ready' ? logEntry : null}
      <Entry title="Solvers" note="As the manifest of this build declares them.">
        <DeclaredSolvers solvers={build.recipe.solvers} />
      </Entry>
      <Entry title="Recipe" note="What is run, and how, from tallyroot.yaml.">
        <RecipeList recipe={build.recipe} folder={build.folder} />
      </Entry>
      {newestRun?.environment != null && (
        <Entry title="Environment" note={`Of its newest run, run ${newestRun.id}.`}>
          <ul className="finds">
            {environmentRows(newestRun.environment).map((row) => (
              <li key={row.term}>
                <b className="font-medium">{row.term}</b>
                <span className="num wrap-anywhere">{row.text}</span>
              </li>
            ))}
          </ul>
        </Entry>
      )}
    </Page>
  );
}
