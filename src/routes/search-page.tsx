import { useQueries, useQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import { Entry } from '../components/sheet/entry.tsx';
import { Page } from '../components/sheet/page.tsx';
import { VerdictBlock } from '../components/sheet/verdict-block.tsx';
import { LoadingStrokes } from '../components/ui/loading-strokes.tsx';
import { StateNote } from '../components/ui/state-note.tsx';
import { buildsQuery } from '../features/builds/builds.queries.ts';
import { librariesQuery, solversQuery } from '../features/libraries/libraries.queries.ts';
import { suiteRevisionQuery, suitesQuery } from '../features/suites/suites.queries.ts';
import { formatCommit, formatCount } from '../lib/format.ts';
import { formatEquation } from '../lib/format-equation.ts';
import { moveRowFocus } from '../lib/row-focus.ts';
import { useKeys } from '../lib/use-keys.ts';
import { useViewState } from '../lib/use-view-state.ts';
import { paths } from '../paths.ts';

interface Hit {
  kind: string;
  name: string;
  about: string;
  to: string;
}

const mostShown = 60;

/** Looks through libraries, solvers, builds and the cases of the newest revisions, in the browser. */
export function SearchPage() {
  const text = useViewState().get('q');
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  const libraries = useQuery(librariesQuery);
  const suites = useQuery(suitesQuery);
  const solvers = useQueries({ queries: (libraries.data ?? []).map((one) => solversQuery(one.slug)) });
  const builds = useQueries({ queries: (libraries.data ?? []).map((one) => buildsQuery(one.slug)) });
  const revisions = useQueries({
    queries: (suites.data ?? []).map((suite) => suiteRevisionQuery(suite.slug, suite.revision)),
  });
  useKeys({ j: () => moveRowFocus(1), k: () => moveRowFocus(-1) });
  const all: Hit[] = [
    ...(libraries.data ?? []).map((one) => ({
      kind: 'library',
      name: one.name,
      about: one.description,
      to: paths.library(one.slug),
    })),
    ...(libraries.data ?? []).flatMap((library, index) =>
      (solvers[index]?.data ?? []).map((solver) => ({
        kind: 'solver',
        name: solver.name,
        about: `in ${library.name}`,
        to: paths.library(library.slug),
      })),
    ),
    ...builds.flatMap((query) =>
      (query.data ?? []).map((build) => ({
        kind: 'build',
        name: formatCommit(build.commit ?? build.label),
        about: `${build.label} ${build.commit ?? ''}`,
        to: paths.build(build.id),
      })),
    ),
    ...revisions.flatMap((query) =>
      (query.data?.cases ?? []).map((suiteCase) => ({
        kind: 'case',
        name: suiteCase.id,
        about: formatEquation(suiteCase.equation),
        to: paths.suiteCase(query.data?.suite ?? '', suiteCase.id, query.data?.number),
      })),
    ),
  ];
  const hits =
    words.length === 0
      ? []
      : all.filter((hit) =>
          words.every((word) => `${hit.kind} ${hit.name} ${hit.about}`.toLowerCase().includes(word)),
        );
  const isReading = [libraries, suites, ...solvers, ...builds, ...revisions].some((query) => query.isPending);
  const failed = [libraries, suites, ...solvers, ...builds, ...revisions].filter(
    (query) => query.isError,
  ).length;
  return (
    <Page
      title="Search"
      trail={[{ label: `Search: ${text}` }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous' },
        { keys: ['enter'], does: 'open it' },
      ]}
    >
      <VerdictBlock
        sign="search"
        sentence={
          <>
            {formatCount(hits.length, 'thing')} {hits.length === 1 ? 'has' : 'have'} “{text}” in{' '}
            {hits.length === 1 ? 'its' : 'their'} name.
          </>
        }
      />
      <Entry title="Found" note={hits.length > mostShown ? `The first ${mostShown}.` : undefined}>
        {failed > 0 && (
          <StateNote isProblem title="Not everything could be looked through">
            {formatCount(failed, 'list')} could not be read.
          </StateNote>
        )}
        {isReading && <LoadingStrokes label="Looking" />}
        {!isReading && hits.length === 0 && (
          <StateNote title="Nothing found">
            Look for a case, a solver, a library, or the beginning of a commit.
          </StateNote>
        )}
        <ul className="finds">
          {hits.slice(0, mostShown).map((hit) => (
            <li key={`${hit.kind} ${hit.to} ${hit.name}`}>
              <span className="text-ink-3">{hit.kind}</span>
              <span className="min-w-0">
                <Link to={hit.to} data-row-link className="font-medium">
                  {hit.name}
                </Link>{' '}
                <span className="wrap-anywhere text-ink-3">{hit.about}</span>
              </span>
            </li>
          ))}
        </ul>
      </Entry>
    </Page>
  );
}
