import { useQuery } from '@tanstack/react-query';
import { useMemo, useRef, useState } from 'react';
import { useNavigate, useParams } from 'react-router';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { RunDetail, SolveView } from '../../shared/schemas/runs.ts';
import { outcomes } from '../../shared/schemas/words.ts';
import { Entry } from '../components/sheet/entry.tsx';
import { Page } from '../components/sheet/page.tsx';
import { VerdictBlock } from '../components/sheet/verdict-block.tsx';
import { Button, ButtonLink } from '../components/ui/button.tsx';
import { QueryState } from '../components/ui/query-state.tsx';
import { RichText } from '../components/ui/rich-text.tsx';
import { StateNote } from '../components/ui/state-note.tsx';
import { RunFacts } from '../features/runs/run-facts.tsx';
import { RunProgress } from '../features/runs/run-progress.tsx';
import { runSentence } from '../features/runs/run-sentence.ts';
import { runQuery, solvesQuery, useCancelRun, useRunAgain } from '../features/runs/runs.queries.ts';
import { SolveFilter } from '../features/runs/solve-filter.tsx';
import { buildMatrix, filterMatrix, outcomeWord } from '../features/runs/solve-matrix.ts';
import { SolveTable, solversThatFit } from '../features/runs/solve-table.tsx';
import { useLiveRun } from '../features/runs/use-live-run.ts';
import { suiteRevisionQuery } from '../features/suites/suites.queries.ts';
import { moveCellFocus } from '../lib/cell-focus.ts';
import { formatCommit, formatCount, formatDateTime } from '../lib/format.ts';
import { useKeys } from '../lib/use-keys.ts';
import { useViewState } from '../lib/use-view-state.ts';
import { useWidth } from '../lib/use-width.ts';
import { paths } from '../paths.ts';

const statusWords: Record<RunDetail['status'], string> = {
  queued: 'waiting for its turn',
  running: 'in progress',
  finished: 'finished',
  stopped: 'stopped early',
  cancelled: 'cancelled',
  failed: 'failed',
};

function RunHead({ run, solves, cases }: { run: RunDetail; solves: SolveView[]; cases: SuiteCase[] }) {
  const navigate = useNavigate();
  const cancel = useCancelRun(run.id);
  const again = useRunAgain(run.id);
  const isLive = run.status === 'queued' || run.status === 'running';
  const runAgain = (): void =>
    again.mutate(undefined, { onSuccess: (next) => void navigate(paths.run(next.id)) });
  useKeys({
    s: () => {
      if (isLive) cancel.mutate();
    },
    r: () => {
      if (!isLive) runAgain();
    },
  });
  const hasFailed = run.status === 'failed' || run.status === 'stopped';
  const problem = cancel.error ?? again.error;
  return (
    <VerdictBlock
      sign={run.status === 'running' && run.phase === 'confirming' ? 'confirming' : statusWords[run.status]}
      colour={hasFailed ? 'text-worse' : 'text-ink-2'}
      note={
        <>
          <p>
            Asked for on {formatDateTime(run.createdAt)} by {run.createdBy}.
          </p>
          {run.progress.unsteady > 0 && <p>{formatCount(run.progress.unsteady, 'solve')} did not repeat.</p>}
        </>
      }
      sentence={<RichText pieces={runSentence(run, solves)} />}
      lead={run.reason ?? undefined}
      actions={
        isLive ? (
          <Button hotkey="s" onClick={() => cancel.mutate()} disabled={cancel.isPending}>
            Stop the run
          </Button>
        ) : (
          <>
            {run.against !== null && solves.length > 0 && (
              <ButtonLink isMain to={paths.comparison(run.id)} hotkey="c">
                Read the comparison
              </ButtonLink>
            )}
            <Button hotkey="r" onClick={runAgain} disabled={again.isPending}>
              Run again
            </Button>
          </>
        )
      }
    >
      {isLive && <RunProgress run={run} solves={solves} cases={cases} />}
      <RunFacts
        run={run}
        buildHref={paths.build(run.build.id)}
        suiteHref={paths.suite(run.suite.slug, run.suite.revision)}
      />
      {problem !== null && (
        <p role="alert" className="mt-3 text-worse">
          {problem.message}
        </p>
      )}
    </VerdictBlock>
  );
}

function RunSolves({ run, solves, cases }: { run: RunDetail; solves: SolveView[]; cases: SuiteCase[] }) {
  const view = useViewState();
  const textField = useRef<HTMLInputElement>(null);
  const [box, width] = useWidth<HTMLDivElement>(1180);
  const names = run.solvers.map((solver) => solver.declaration.name);
  const asked = view.list('solvers').filter((name) => names.includes(name));
  const shown =
    asked.length > 0 ? names.filter((name) => asked.includes(name)) : names.slice(0, solversThatFit(width));
  const chosen = view.list('outcome');
  const sort = {
    by: view.get('sort') || 'case',
    direction: view.get('direction') === 'down' ? ('down' as const) : ('up' as const),
  };
  const rows = useMemo(() => buildMatrix(cases, solves), [cases, solves]);
  const filter = { text: view.get('text'), trait: view.get('trait'), outcomes: chosen, solvers: shown };
  const left = filterMatrix(rows, filter);
  const counts = new Map<string, number>();
  for (const solve of solves) counts.set(outcomeWord(solve), (counts.get(outcomeWord(solve)) ?? 0) + 1);
  const words = [...outcomes.slice(0, 3), 'rightly refused', ...outcomes.slice(3)].flatMap((word) => {
    const count = counts.get(word) ?? 0;
    return count === 0 ? [] : [{ word, count }];
  });
  const traits = [...new Set(cases.flatMap((suiteCase) => suiteCase.traits))];
  const clear = (): void => view.clear('text', 'trait', 'outcome', 'solvers');
  useKeys({
    j: () => moveCellFocus(1, 0),
    k: () => moveCellFocus(-1, 0),
    l: () => moveCellFocus(0, 1),
    h: () => moveCellFocus(0, -1),
    f: () => textField.current?.focus(),
    x: clear,
  });
  return (
    <>
      <Entry
        title="Solves"
        note={
          <>
            <p>
              {formatCount(cases.length, 'case')}, {formatCount(names.length, 'solver')}
              {shown.length < names.length ? `, ${shown.length} of them shown` : ''}.
            </p>
            {left.length < rows.length && (
              <p>
                {left.length} of {formatCount(rows.length, 'row')} match.
              </p>
            )}
          </>
        }
      >
        <div ref={box}>
          <SolveFilter
            text={filter.text}
            onText={(text) => view.set({ text })}
            textRef={textField}
            outcomes={words}
            chosenOutcomes={chosen}
            onOutcome={(word) => view.toggle('outcome', word)}
            onAllOutcomes={() => view.clear('outcome')}
            traits={traits}
            trait={filter.trait}
            onTrait={(trait) => view.set({ trait })}
            solvers={names}
            shownSolvers={shown}
            onSolver={(solver) => {
              const next = shown.includes(solver)
                ? shown.filter((name) => name !== solver)
                : [...shown, solver];
              view.set({ solvers: next.length === names.length ? [] : next });
            }}
          />
          <p className="pb-2.5 text-note text-ink-3">
            A stroke is an evaluation, the figure their number. Short stroke above: f′ as well. Foot below:
            asked again at the same x. Dot: the root returned. Open end: none.
          </p>
        </div>
      </Entry>
      <section className="ledger" aria-label="Table of solves">
        <div className="max-wide:hidden" />
        <div className="min-w-0">
          {left.length === 0 ? (
            <StateNote
              title={rows.length === 0 ? 'No solve yet' : 'No solve matches'}
              actions={
                rows.length === 0 ? undefined : (
                  <Button hotkey="x" onClick={clear}>
                    Clear the filter
                  </Button>
                )
              }
            >
              {rows.length === 0
                ? 'The solves appear here one by one as they are done.'
                : 'No case has the text, trait and outcome asked for together. Nothing is lost; they are only hidden.'}
            </StateNote>
          ) : (
            <SolveTable
              rows={left}
              solvers={shown}
              outcomes={chosen}
              sort={sort}
              onSort={(by) =>
                view.set({ sort: by, direction: sort.by === by && sort.direction === 'up' ? 'down' : 'up' })
              }
              caseHref={(caseId) => paths.suiteCase(run.suite.slug, caseId, run.suite.revision)}
              solveHref={paths.solve}
              isRunning={run.status === 'running' || run.status === 'queued'}
            />
          )}
        </div>
      </section>
    </>
  );
}

const noCases: SuiteCase[] = [];
const noSolves: SolveView[] = [];

function RunSheet({ run }: { run: RunDetail }) {
  useLiveRun(run.id, run.status === 'queued' || run.status === 'running');
  const solves = useQuery(solvesQuery(run.id));
  const revision = useQuery(suiteRevisionQuery(run.suite.slug, run.suite.revision));
  const navigate = useNavigate();
  const label = formatCommit(run.build.commit ?? run.build.label);
  useKeys({ Escape: () => void navigate(paths.build(run.build.id)) });
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
  const id = Number(useParams()['run']);
  const query = useQuery(runQuery(id));
  const [isAsked] = useState(() => Number.isInteger(id));
  if (query.data !== undefined) return <RunSheet run={query.data} />;
  return (
    <Page title={`Run ${id}`} trail={[{ label: 'Libraries', to: paths.libraries() }, { label: `Run ${id}` }]}>
      <Entry title="Run">
        {isAsked ? (
          <QueryState query={query} what={`run ${id}`}>
            {() => null}
          </QueryState>
        ) : (
          <StateNote isProblem title="That is no number of a run" />
        )}
      </Entry>
    </Page>
  );
}
