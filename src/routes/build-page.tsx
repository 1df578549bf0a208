import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router';
import { Entry } from '../components/sheet/entry.tsx';
import { Page } from '../components/sheet/page.tsx';
import { QueryState } from '../components/ui/query-state.tsx';
import { buildQuery } from '../features/builds/builds.queries.ts';
import { paths } from '../paths.ts';
import { BuildSheet } from './build/build-sheet.tsx';

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
