import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { buildsQuery } from '../../features/builds/builds.queries.ts';
import { allowancesQuery, libraryQuery, solversQuery } from '../../features/libraries/libraries.queries.ts';
import { runsQuery } from '../../features/runs/runs.queries.ts';
import { paths } from '../../paths.ts';
import { LibrarySheet } from './library-sheet.tsx';

/** Reads a library with its builds, runs, solvers and allowances. */
export function LibraryPage() {
  const slug = useParams().library ?? '';
  const library = useQuery(libraryQuery(slug));
  const builds = useQuery(buildsQuery(slug));
  const runs = useQuery(runsQuery({ library: slug }));
  const solvers = useQuery(solversQuery(slug));
  const allowances = useQuery(allowancesQuery(slug));
  if (library.data && builds.data && runs.data && solvers.data && allowances.data) {
    return (
      <LibrarySheet
        library={library.data}
        builds={builds.data}
        runs={runs.data}
        solvers={solvers.data}
        allowances={allowances.data}
      />
    );
  }
  const all = [library, builds, runs, solvers, allowances];
  const shown =
    all.find((query) => query.isError) ?? all.find((query) => query.data === undefined) ?? library;
  return (
    <Page title={slug} trail={[{ label: 'Libraries', to: paths.libraries() }, { label: slug }]}>
      <Entry title="Library">
        <QueryState<unknown> query={shown} what="the library">
          {() => null}
        </QueryState>
      </Entry>
    </Page>
  );
}
