import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { allowancesQuery } from '../../features/libraries/libraries.queries.ts';
import { runQuery, solveQuery } from '../../features/runs/runs.queries.ts';
import { suiteRevisionQuery, suitesQuery } from '../../features/suites/suites.queries.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';
import { SolveSheet } from './solve-sheet.tsx';

/** Where the reader came from, if that is an address of this client; else the run. */
function backFrom(text: string, otherwise: string): string {
  return /^\/[a-z]/.test(text) ? text : otherwise;
}

/** Reads a solve, what it stands beside, its run and its case. */
export function SolvePage() {
  const id = Number(useParams().solve);
  const view = useViewState();
  const againstId = Number(view.get('against')) || null;
  const solve = useQuery(solveQuery(id));
  const reference = useQuery({ ...solveQuery(againstId ?? 0), enabled: againstId !== null });
  const run = useQuery({ ...runQuery(solve.data?.run ?? 0), enabled: solve.data !== undefined });
  const referenceRun = useQuery({
    ...runQuery(reference.data?.run ?? 0),
    enabled: reference.data !== undefined,
  });
  const allowances = useQuery({
    ...allowancesQuery(run.data?.library ?? ''),
    enabled: run.data !== undefined && againstId !== null,
  });
  const suites = useQuery(suitesQuery);
  const suite = run.data?.suite;
  const revision = useQuery({
    ...suiteRevisionQuery(suite?.slug ?? '', suite?.revision ?? 0),
    enabled: suite !== undefined,
  });
  const suiteCase = revision.data?.cases.find((one) => one.id === solve.data?.case);
  const isReferenceReady =
    againstId === null ||
    (reference.data !== undefined && referenceRun.data !== undefined && allowances.data !== undefined);
  if (solve.data && run.data && suiteCase && isReferenceReady) {
    return (
      <SolveSheet
        key={`${id} ${againstId ?? ''}`}
        solve={solve.data}
        reference={reference.data ?? null}
        run={run.data}
        suiteCase={suiteCase}
        referenceRun={referenceRun.data ?? null}
        allowances={allowances.data ?? null}
        isBuiltInSuite={suites.data?.find((one) => one.slug === suite?.slug)?.builtIn ?? true}
        backTo={backFrom(view.get('back'), paths.run(run.data.id))}
      />
    );
  }
  const waiting = [
    solve,
    ...(againstId === null ? [] : [reference, referenceRun, allowances]),
    run,
    revision,
  ];
  const shown = waiting.find((query) => query.isError) ?? waiting.find((query) => query.data === undefined);
  return (
    <Page
      title={`Solve ${id}`}
      trail={[{ label: 'Libraries', to: paths.libraries() }, { label: `Solve ${id}` }]}
    >
      <Entry title="Solve">
        {shown === undefined ? (
          <StateNote isProblem title="The case is not in the suite">
            The revision of the suite that this run names has no case with this name.
          </StateNote>
        ) : (
          <QueryState<unknown> query={shown} what="the solve">
            {() => null}
          </QueryState>
        )}
      </Entry>
    </Page>
  );
}
