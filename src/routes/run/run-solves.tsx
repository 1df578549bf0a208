import { useMemo, useRef } from 'react';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { RunDetail, SolveView } from '../../../shared/schemas/runs.ts';
import { outcomes } from '../../../shared/schemas/words.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { SolveFilter } from '../../features/runs/solve-filter.tsx';
import { buildMatrix, filterMatrix, outcomeWord } from '../../features/runs/solve-matrix.ts';
import { SolveTable, solversThatFit } from '../../features/runs/solve-table.tsx';
import { useStripsAhead } from '../../features/runs/use-strips-ahead.ts';
import { moveCellFocus } from '../../lib/cell-focus.ts';
import { formatCount } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { useWidth } from '../../lib/use-width.ts';
import { paths } from '../../paths.ts';

export interface RunSolvesProps {
  run: RunDetail;
  solves: SolveView[];
  cases: SuiteCase[];
}

/** The table of solves with its filters; what is shown stands in the address. */
export function RunSolves({ run, solves, cases }: RunSolvesProps) {
  const view = useViewState();
  useStripsAhead(solves, run.status === 'queued' || run.status === 'running');
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
              solveHref={(solve) => paths.solve(solve)}
              isRunning={run.status === 'running' || run.status === 'queued'}
            />
          )}
        </div>
      </section>
    </>
  );
}
