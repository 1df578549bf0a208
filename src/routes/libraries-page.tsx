import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import type { LibraryView } from '../../shared/schemas/libraries.ts';
import { Entry } from '../components/sheet/entry.tsx';
import { Page } from '../components/sheet/page.tsx';
import { VerdictBlock } from '../components/sheet/verdict-block.tsx';
import { ButtonLink } from '../components/ui/button.tsx';
import { QueryState } from '../components/ui/query-state.tsx';
import { StateNote } from '../components/ui/state-note.tsx';
import { librariesQuery } from '../features/libraries/libraries.queries.ts';
import { runsQuery } from '../features/runs/runs.queries.ts';
import { formatCommit, formatCount, formatFigure, formatShortDate } from '../lib/format.ts';
import { moveRowFocus } from '../lib/row-focus.ts';
import { useKeys } from '../lib/use-keys.ts';
import { paths } from '../paths.ts';

function sentence(libraries: readonly LibraryView[]): string {
  if (libraries.length === 0) return 'No library is under care here yet.';
  const runs = libraries.reduce((sum, library) => sum + library.runCount, 0);
  const builds = libraries.reduce((sum, library) => sum + library.buildCount, 0);
  const care = libraries.length === 1 ? 'One library is' : `${libraries.length} libraries are`;
  return `${care} under care, with ${formatCount(builds, 'build')} and ${formatCount(runs, 'run')}.`;
}

function RunsInHand() {
  const running = useQuery(runsQuery({ status: 'running' }));
  const queued = useQuery(runsQuery({ status: 'queued' }));
  const runs = [...(running.data ?? []), ...(queued.data ?? [])];
  if (runs.length === 0) return null;
  return (
    <Entry title="In progress">
      <ul className="finds">
        {runs.map((run) => (
          <li key={run.id}>
            <b className="font-medium">
              <Link to={paths.run(run.id)}>Run {run.id}</Link>
            </b>
            <span>
              {run.library} <span className="num">{formatCommit(run.build.commit ?? run.build.label)}</span>{' '}
              on {run.suite.slug}:{' '}
              {run.status === 'queued'
                ? 'waits for its turn'
                : `${run.progress.stored} of ${run.progress.planned} solves done`}
            </span>
          </li>
        ))}
      </ul>
    </Entry>
  );
}

/** Every library, and what is being run now. */
export function LibrariesPage() {
  const query = useQuery(librariesQuery);
  useKeys({ j: () => moveRowFocus(1), k: () => moveRowFocus(-1) });
  return (
    <Page
      title="Libraries"
      trail={[{ label: 'Libraries' }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous library' },
        { keys: ['enter'], does: 'open it' },
      ]}
    >
      {query.data !== undefined && (
        <VerdictBlock
          sign="Libraries"
          colour="text-ink"
          sentence={sentence(query.data)}
          actions={query.data.length > 0 && <ButtonLink to={paths.newLibrary()}>Create a library</ButtonLink>}
        />
      )}
      <RunsInHand />
      <Entry title="Under care" note="A library is a set of solvers that are built and run together.">
        <QueryState
          query={query}
          what="the libraries"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote
              title="No library yet"
              actions={
                <ButtonLink to={paths.newLibrary()} isMain>
                  Create a library
                </ButtonLink>
              }
            >
              Create one, then register a build of it; its runs appear here. Or ask a maintainer of an
              existing one for an invitation.
            </StateNote>
          }
        >
          {(list) => (
            <table className="table table-rows stack">
              <thead>
                <tr>
                  <th scope="col">library</th>
                  <th scope="col">what it is</th>
                  <th scope="col" className="r">
                    solvers
                  </th>
                  <th scope="col" className="r">
                    builds
                  </th>
                  <th scope="col" className="r">
                    runs
                  </th>
                  <th scope="col">since</th>
                </tr>
              </thead>
              <tbody>
                {list.map((library) => (
                  <tr key={library.slug}>
                    <th scope="row" className="lead-cell">
                      <Link to={paths.library(library.slug)} data-row-link>
                        {library.name}
                      </Link>
                    </th>
                    <td>
                      {library.description}
                      {library.visibility === 'private' && <span className="text-ink-3"> Private.</span>}
                    </td>
                    <td className="fig r max-wide:text-left" data-label="solvers">
                      {formatFigure(library.solverCount)}
                    </td>
                    <td className="fig r max-wide:text-left" data-label="builds">
                      {formatFigure(library.buildCount)}
                    </td>
                    <td className="fig r max-wide:text-left" data-label="runs">
                      {formatFigure(library.runCount)}
                    </td>
                    <td className="text-ink-2" data-label="since">
                      {formatShortDate(library.createdAt)}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          )}
        </QueryState>
      </Entry>
    </Page>
  );
}
