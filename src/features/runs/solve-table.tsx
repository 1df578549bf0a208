import {
  type ColumnDef,
  getCoreRowModel,
  getSortedRowModel,
  type SortingState,
  useReactTable,
} from '@tanstack/react-table';
import { useMemo } from 'react';
import { Link } from 'react-router';
import { StripHeader } from '../../components/digit-strip/strip-header.tsx';
import { SortHeader } from '../../components/ui/sort-header.tsx';
import { formatFigure } from '../../lib/format.ts';
import { formatEquation } from '../../lib/format-equation.ts';
import { useVisibleRows } from '../../lib/use-visible-rows.ts';
import { useWidth } from '../../lib/use-width.ts';
import { type MatrixRow, outcomeWord } from './solve-matrix.ts';
import { SolvePictureCell } from './solve-picture.tsx';

export interface SolveTableProps {
  rows: MatrixRow[];
  /** Solvers shown, in order. */
  solvers: readonly string[];
  outcomes: readonly string[];
  sort: { by: string; direction: 'up' | 'down' };
  onSort: (by: string) => void;
  caseHref: (caseId: string) => string;
  solveHref: (solve: number) => string;
  /** Whether the run goes on: an empty place waits. */
  isRunning: boolean;
}

const countWidth = 34;

const stackedLabel = 86;
const stackedBelow = 720;

/** px a digit: as wide as the columns allow; where rows are stacked each strip has the whole width. */
export function pitchFor(width: number, columns: number): 10 | 8 | 7 {
  const column = width < stackedBelow ? width - stackedLabel : width / Math.max(1, columns);
  const room = column - countWidth;
  return room >= 196 ? 10 : room >= 164 ? 8 : 7;
}

/** How many solvers stand side by side in a width at the narrowest pitch; all of them where rows are stacked. */
export function solversThatFit(width: number): number {
  return width < stackedBelow
    ? Number.POSITIVE_INFINITY
    : Math.max(1, Math.floor(width / (148 + countWidth)));
}

function sortValue(row: MatrixRow, solver: string): number {
  return row.solves.get(solver)?.evaluations ?? -1;
}

function CaseName({ row, href }: { row: MatrixRow; href: string }) {
  if (row.part > 0) return <span className="text-ink-3">from start {row.part + 1}</span>;
  return (
    <>
      <Link to={href} className="font-medium text-ink">
        {row.caseId}
      </Link>
      {row.suiteCase !== undefined && (
        <span className="block truncate font-mono text-[12px] text-ink-3">
          {formatEquation(row.suiteCase.equation)}
        </span>
      )}
    </>
  );
}

/** Cases down, solvers across, a strip in each place: the table is a chart. */
export function SolveTable(props: SolveTableProps) {
  const { rows, solvers, sort } = props;
  const [box, width] = useWidth<HTMLDivElement>(1180);
  const pitch = pitchFor(width, solvers.length);
  const columns = useMemo(
    (): ColumnDef<MatrixRow>[] => [
      { id: 'case', accessorFn: (_, index) => index },
      ...solvers.map((solver) => ({ id: solver, accessorFn: (row: MatrixRow) => sortValue(row, solver) })),
    ],
    [solvers],
  );
  const sorting = useMemo((): SortingState => [{ id: sort.by, desc: sort.direction === 'down' }], [sort]);
  const table = useReactTable({
    data: rows,
    columns,
    state: { sorting: solvers.includes(sort.by) || sort.by === 'case' ? sorting : [] },
    getCoreRowModel: getCoreRowModel(),
    getSortedRowModel: getSortedRowModel(),
    getRowId: (row) => row.key,
  });
  const sorted = table.getRowModel().rows;
  const visible = useVisibleRows(sorted.length, 47);
  const directionOf = (id: string) => (sort.by === id ? sort.direction : null);
  const ariaSort = (id: string) =>
    sort.by === id ? (sort.direction === 'up' ? 'ascending' : 'descending') : undefined;
  return (
    <div ref={box}>
      <table className="table table-rows over stack solves-table table-fixed" ref={visible.ref}>
        <colgroup>
          <col className="over-column" />
          {solvers.map((solver) => (
            <col key={solver} />
          ))}
        </colgroup>
        <thead>
          <tr>
            <th scope="col" aria-sort={ariaSort('case')}>
              <SortHeader label="case" direction={directionOf('case')} onSort={() => props.onSort('case')} />
            </th>
            {solvers.map((solver) => (
              <th key={solver} scope="col" aria-sort={ariaSort(solver)}>
                <SortHeader
                  label={solver}
                  direction={directionOf(solver)}
                  onSort={() => props.onSort(solver)}
                />
                <div className="flex" style={{ paddingLeft: countWidth - 4 }}>
                  <StripHeader pitch={pitch} />
                </div>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {visible.before > 0 && <tr style={{ height: visible.before }} />}
          {sorted.slice(visible.from, visible.to).map((tableRow, offset) => {
            const row = tableRow.original;
            const index = visible.from + offset;
            return (
              <tr key={row.key} data-index={index} ref={visible.measure}>
                <th scope="row" className="aside">
                  <CaseName row={row} href={props.caseHref(row.caseId)} />
                </th>
                {solvers.map((solver, column) => {
                  const solve = row.solves.get(solver);
                  const isDim =
                    solve !== undefined &&
                    props.outcomes.length > 0 &&
                    !props.outcomes.includes(outcomeWord(solve));
                  return (
                    <td
                      key={solver}
                      data-label={solver}
                      className={solve === undefined && !props.isRunning ? 'not-narrow' : undefined}
                    >
                      {solve === undefined ? (
                        <span className="text-header text-ink-3">
                          {props.isRunning && row.part === 0 ? '· waiting' : ''}
                        </span>
                      ) : (
                        <Link
                          to={props.solveHref(solve.id)}
                          data-cell={`${index},${column}`}
                          className={`flex min-h-6 items-center gap-1 no-underline ${isDim ? 'opacity-35' : ''}`}
                        >
                          <span className="sr-only">
                            {solver} on {row.caseId}:
                          </span>
                          <span
                            className="w-[26px] flex-none text-right font-mono text-[12px] text-ink-2"
                            aria-hidden
                          >
                            {solve.outcome === 'not applicable' ? '' : formatFigure(solve.evaluations)}
                          </span>
                          <SolvePictureCell solve={solve} suiteCase={row.suiteCase} pitch={pitch} />
                          {solve.steady === false && <span className="text-header text-other">unsteady</span>}
                        </Link>
                      )}
                    </td>
                  );
                })}
              </tr>
            );
          })}
          {visible.after > 0 && <tr style={{ height: visible.after }} />}
        </tbody>
      </table>
    </div>
  );
}
