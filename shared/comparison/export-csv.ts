import type { OrderEstimate, SolveRecord } from '../schemas/solve.ts';
import { isOrderKnown } from './change.ts';
import type { Comparison, Pair } from './comparison.ts';

type Cell = string | number | boolean | null;

interface Column {
  /** With the unit in brackets where there is one. */
  title: string;
  cell: (pair: Pair) => Cell;
}

/**
 * The pairs of a comparison as CSV (RFC 4180): a header, then one row a pair in the comparison's order; CR LF
 * after every row, UTF-8 without a byte order mark. What is unknown is an empty cell. Numbers are the shortest
 * decimals that read back to the same binary64. An order that is not to be shown leaves its three cells empty.
 *
 * Programs for tables take a cell that begins with = + - @, a tab or CR for a formula. Such a text gets a
 * leading apostrophe, and so does one that begins with an apostrophe; to undo it, take one leading apostrophe
 * off every cell that has one. A cell that is as a whole a decimal number, such as -3 or -1.5e-9, is left as it
 * is, be it a figure or a name: it can be nothing but that number. Control characters other than tab, CR and LF
 * and halves of surrogate pairs become U+FFFD.
 */
export function exportCsv(comparison: Comparison): string {
  const header = columns.map((column) => column.title);
  const rows = comparison.pairs.map((pair) => columns.map((column) => column.cell(pair)));
  return [header, ...rows].map((cells) => `${cells.map(cellText).join(',')}\r\n`).join('');
}

/** Both sides of one figure. */
function sides(title: string, unit: string, cell: (solve: SolveRecord) => Cell): Column[] {
  return (['reference', 'candidate'] as const).map((side) => ({
    title: `${title}, ${side}${unit === '' ? '' : ` [${unit}]`}`,
    cell: (pair) => {
      const solve = pair[side];
      return solve === null ? null : cell(solve);
    },
  }));
}

function orderFigure(order: OrderEstimate, key: 'value' | 'low' | 'high'): number | null {
  return isOrderKnown(order) ? order[key] : null;
}

const columns: readonly Column[] = [
  { title: 'solver', cell: (pair) => pair.solver },
  { title: 'solver was called', cell: (pair) => pair.formerly },
  { title: 'case', cell: (pair) => pair.case },
  { title: 'start [number from 1]', cell: (pair) => (pair.start === null ? null : pair.start + 1) },
  { title: 'family', cell: (pair) => pair.family },
  { title: 'traits', cell: (pair) => pair.traits.join('; ') },
  { title: 'change', cell: (pair) => pair.change },
  { title: 'other changes', cell: (pair) => pair.others.join('; ') },
  { title: 'difference [evaluations]', cell: (pair) => pair.difference },
  { title: 'difference [digits]', cell: (pair) => pair.digits },
  ...sides('outcome', '', (solve) => solve.outcome),
  ...sides('remarks', '', (solve) => solve.remarks.map((remark) => remark.code).join('; ')),
  ...sides('evaluations', 'count', (solve) => solve.evaluations),
  ...sides('f', 'count', (solve) => solve.f),
  ...sides('df', 'count', (solve) => solve.df),
  ...sides('d2f', 'count', (solve) => solve.d2f),
  ...sides('iterations', 'count', (solve) => solve.iterations),
  ...sides('root', 'unit of x', (solve) => solve.root),
  ...sides('error', 'unit of x', (solve) => solve.error),
  ...sides('correct digits', 'decimal digits', (solve) => solve.digits),
  ...sides('residual', 'unit of f', (solve) => solve.residual),
  ...sides('order status', '', (solve) => solve.order.status),
  ...sides('order', 'dimensionless', (solve) => orderFigure(solve.order, 'value')),
  ...sides('order from', 'dimensionless', (solve) => orderFigure(solve.order, 'low')),
  ...sides('order to', 'dimensionless', (solve) => orderFigure(solve.order, 'high')),
  ...sides('asked again at the same x', 'evaluations', (solve) => solve.queryCheck.repeated),
  ...sides('asked outside the bracket', 'evaluations', (solve) => solve.queryCheck.outside),
  ...sides('asked after the answer', 'evaluations', (solve) => solve.queryCheck.late),
  ...sides('derivative not used', 'evaluations', (solve) => solve.queryCheck.unused),
  ...sides('not finite', 'evaluations', (solve) => solve.queryCheck.nonFinite),
  ...sides('repeats itself', 'true or false', (solve) => solve.steady),
  ...sides('time', 'ms', (solve) => solve.elapsedMs),
];

const plainNumber = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const actsAsFormula = /^[=+\-@\t\r\n'＝＋－＠]/;
const cannotBeShown = /(?![\t\r\n])\p{Cc}|\p{Cs}/gu;

function cellText(cell: Cell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return numberText(cell);
  if (typeof cell === 'boolean') return String(cell);
  const clean = cell.replace(cannotBeShown, '\ufffd');
  const safe = actsAsFormula.test(clean) && !plainNumber.test(clean) ? `'${clean}` : clean;
  return /[",;\r\n\t]|^ | $/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** Measured numbers are finite or null; −0 keeps its sign. */
function numberText(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError('A finite number was expected in a comparison.');
  return Object.is(value, -0) ? '-0' : String(value);
}
