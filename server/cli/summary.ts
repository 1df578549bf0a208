import { isSuccess } from '../../shared/numerics/judge-claim.ts';
import type { MeasurementFile } from '../../shared/schemas/measurement.ts';
import { formatDigits, median } from './figures.ts';
import { formatTable, printable } from './table.ts';

interface SolverRow {
  solver: string;
  solves: number;
  succeeded: number;
  evaluations: number;
  order: number | null;
  orders: number;
  repeated: number;
}

/** A table with a row a solver, then every solve that did not succeed, by outcome. */
export function summariseMeasurement(file: MeasurementFile): string {
  const rows = file.solvers.map((solver): SolverRow => {
    const solves = file.solves.filter(
      (solve) => solve.solver === solver.name && solve.outcome !== 'not applicable',
    );
    const succeeded = solves.filter(isSuccess);
    const orders = solves.flatMap((solve) => {
      const { status, value } = solve.order;
      return (status === 'estimated' || status === 'linear') && value !== null ? [value] : [];
    });
    return {
      solver: solver.name,
      solves: solves.length,
      succeeded: succeeded.length,
      evaluations: succeeded.reduce((sum, solve) => sum + solve.evaluations, 0),
      order: median(orders),
      orders: orders.length,
      repeated: solves.filter((solve) => solve.queryCheck.repeated > 0).length,
    };
  });
  const table = formatTable<SolverRow>(
    [
      { title: 'solver', text: (row) => row.solver },
      {
        title: 'solved or rightly refused',
        align: 'right',
        text: (row) => `${row.succeeded} of ${row.solves}`,
      },
      { title: 'evaluations over those', align: 'right', text: (row) => String(row.evaluations) },
      {
        title: 'median order (solves)',
        align: 'right',
        text: (row) => (row.order === null ? 'not enough steps' : `${row.order.toFixed(2)} (${row.orders})`),
      },
      { title: 'solves that repeat an x', align: 'right', text: (row) => String(row.repeated) },
    ],
    rows,
  );
  return [table, ...failures(file)].join('\n');
}

function failures(file: MeasurementFile): string[] {
  const failed = file.solves.filter((solve) => solve.outcome !== 'not applicable' && !isSuccess(solve));
  if (failed.length === 0) return [];
  const lines = formatTable(
    [
      { title: 'not solved', text: (solve) => solve.outcome },
      { title: 'solver', text: (solve) => solve.solver },
      {
        title: 'case',
        text: (solve) => (solve.start ? `${solve.case} (start ${solve.start + 1})` : solve.case),
      },
      { title: 'evaluations', align: 'right', text: (solve) => String(solve.evaluations) },
      { title: 'digits', align: 'right', text: (solve) => formatDigits(solve.digits) },
      {
        title: 'remark',
        text: (solve) => printable(solve.remarks.map((remark) => remark.text).join('; ')).slice(0, 60),
      },
    ],
    failed,
  );
  return ['', lines];
}
