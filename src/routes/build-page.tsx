import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router';
import type { BuildView } from '../../shared/schemas/builds.ts';
import type { RunView } from '../../shared/schemas/runs.ts';
import { Entry } from '../components/sheet/entry.tsx';
import { Facts } from '../components/sheet/facts.tsx';
import { Page } from '../components/sheet/page.tsx';
import { VerdictBlock } from '../components/sheet/verdict-block.tsx';
import { QueryState } from '../components/ui/query-state.tsx';
import { RichText, type TextPiece } from '../components/ui/rich-text.tsx';
import { StateNote } from '../components/ui/state-note.tsx';
import { buildQuery } from '../features/builds/builds.queries.ts';
import { DeclaredSolvers } from '../features/builds/declared-solvers.tsx';
import { RecipeList } from '../features/builds/recipe-list.tsx';
import { runsQuery } from '../features/runs/runs.queries.ts';
import { RunsTable } from '../features/runs/runs-table.tsx';
import { StartRunForm } from '../features/runs/start-run-form.tsx';
import { suitesQuery } from '../features/suites/suites.queries.ts';
import { formatCommit, formatCount, formatDateTime } from '../lib/format.ts';
import { moveRowFocus } from '../lib/row-focus.ts';
import { useKeys } from '../lib/use-keys.ts';
import { paths } from '../paths.ts';

function sentence(build: BuildView, runs: readonly RunView[] | undefined): TextPiece[] {
  const declares: TextPiece = { text: formatCount(build.recipe.solvers.length, 'solver'), figure: true };
  const head: TextPiece[] = [
    { text: formatCommit(build.commit ?? build.label), strong: true },
    { text: ' declares ' },
    declares,
  ];
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

function BuildSheet({ build }: { build: BuildView }) {
  const navigate = useNavigate();
  const runs = useQuery(runsQuery({ build: build.id }));
  const suites = useQuery(suitesQuery);
  const name = formatCommit(build.commit ?? build.label);
  useKeys({
    j: () => moveRowFocus(1),
    k: () => moveRowFocus(-1),
    escape: () => void navigate(paths.library(build.library)),
  });
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
        sign="build"
        note={
          <p>
            Registered on {formatDateTime(build.createdAt)} by {build.createdBy}.
          </p>
        }
        sentence={<RichText pieces={sentence(build, runs.data)} />}
        lead={build.label === name ? undefined : build.label}
        actions={
          suites.data !== undefined && suites.data.length > 0 ? (
            <StartRunForm
              build={build.id}
              suites={suites.data}
              onStarted={(run) => void navigate(paths.run(run.id))}
            />
          ) : undefined
        }
      >
        <Facts
          facts={[
            {
              term: 'commit',
              value: <span className="num">{build.commit ?? 'none: the folder is no clean checkout'}</span>,
              isLong: true,
            },
            { term: 'runs', value: <span className="num">{build.runCount}</span> },
          ]}
        />
      </VerdictBlock>
      <Entry title="Runs" note="Newest first.">
        <QueryState
          query={runs}
          what="the runs"
          isEmpty={(list) => list.length === 0}
          empty={<StateNote title="Not run yet">Choose a suite above and run it.</StateNote>}
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
      <Entry title="Solvers" note="As the manifest of this build declares them.">
        <DeclaredSolvers solvers={build.recipe.solvers} />
      </Entry>
      <Entry title="Recipe" note="What is run, and how, from tallyroot.yaml.">
        <RecipeList build={build} />
      </Entry>
    </Page>
  );
}

/** One build: its recipe, its solvers, its runs. */
export function BuildPage() {
  const id = Number(useParams().build);
  const query = useQuery(buildQuery(id));
  if (query.data !== undefined) return <BuildSheet build={query.data} />;
  return (
    <Page
      title={`Build ${id}`}
      trail={[{ label: 'Libraries', to: paths.libraries() }, { label: `Build ${id}` }]}
    >
      <Entry title="Build">
        <QueryState query={query} what="the build">
          {() => null}
        </QueryState>
      </Entry>
    </Page>
  );
}
