import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { ButtonLink } from '../../components/ui/button.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { comparisonQuery, pairsQuery, readBase } from '../../features/comparisons/comparisons.queries.ts';
import { allowancesQuery } from '../../features/libraries/libraries.queries.ts';
import { runQuery } from '../../features/runs/runs.queries.ts';
import { suiteRevisionQuery } from '../../features/suites/suites.queries.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';
import { ComparisonSheet } from './comparison-sheet.tsx';

const nothing = { kind: 'run', run: 0 } as const;

/** Reads the two sides of a comparison: what the address names, else what the run was made against. */
export function ComparisonPage() {
  const id = Number(useParams().run);
  const view = useViewState();
  const run = useQuery(runQuery(id));
  const base = readBase(view.get('against')) ?? run.data?.against ?? null;
  const isKnown = base !== null;
  const comparison = useQuery({ ...comparisonQuery(id, base ?? nothing), enabled: isKnown });
  const pairs = useQuery({ ...pairsQuery(id, base ?? nothing), enabled: isKnown });
  const suite = run.data?.suite;
  const revision = useQuery({
    ...suiteRevisionQuery(suite?.slug ?? '', suite?.revision ?? 0),
    enabled: suite !== undefined,
  });
  const allowances = useQuery({
    ...allowancesQuery(run.data?.library ?? ''),
    enabled: run.data !== undefined,
  });
  if (run.data && comparison.data && pairs.data && revision.data && allowances.data && base !== null) {
    return (
      <ComparisonSheet
        comparison={comparison.data}
        pairs={pairs.data}
        cases={revision.data.cases}
        run={run.data}
        base={base}
        allowances={allowances.data}
      />
    );
  }
  const waiting = [run, ...(isKnown ? [comparison, pairs] : []), revision, allowances];
  const shown = waiting.find((query) => query.isError) ?? waiting.find((query) => query.data === undefined);
  return (
    <Page
      title="Comparison"
      trail={[
        { label: 'Libraries', to: paths.libraries() },
        { label: `Run ${id}`, to: paths.run(id) },
        { label: 'Comparison' },
      ]}
    >
      <Entry title="Comparison">
        {shown === undefined ? (
          <StateNote
            title="Nothing to compare with"
            actions={
              run.data && <ButtonLink to={paths.library(run.data.library)}>Choose two builds</ButtonLink>
            }
          >
            This run was made before the library had reference results for the suite. Choose another run of
            the library to compare it with.
          </StateNote>
        ) : (
          <QueryState<unknown> query={shown} what="the comparison">
            {() => null}
          </QueryState>
        )}
      </Entry>
    </Page>
  );
}
