import { correctDigits, nearestRoot } from '../../shared/numerics/digits.ts';
import { isSuccess } from '../../shared/numerics/judge-claim.ts';
import { checkQueries, type QueryEvent } from '../../shared/numerics/query-check.ts';
import { rootReference } from '../../shared/numerics/root-reference.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { Path, PathEvent } from '../../shared/schemas/path.ts';
import { numberToText } from '../../shared/schemas/path.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import { characterStrip } from './character-strip.ts';
import { formatDigits, formatShort } from './figures.ts';
import { formatTable, printable } from './table.ts';

interface TraceRow {
  number: string;
  event: PathEvent;
  digits: number | null;
  marks: string[];
}

const askedNames: Record<PathEvent['kind'], string> = {
  f: 'f',
  df: 'f′',
  d2f: 'f″',
  fdf: 'f, f′',
  step: 'step',
};

/** One solve as text: what it was given, its path with marks, its digit strip, and how it ended. */
export function traceSolve(
  solve: SolveRecord,
  path: Path,
  suiteCase: SuiteCase,
  solver: SolverDeclaration,
): string {
  const roots = suiteCase.roots.map((root) => ({
    ref: rootReference(root.value),
    attainable: root.attainable,
    root,
  }));
  const refs = roots.map(({ ref }) => ref);
  const digitsOf = (x: number): number | null => {
    const nearest = nearestRoot(x, refs);
    const ref = nearest === null ? undefined : refs[nearest.index];
    return ref === undefined ? null : correctDigits(x, ref).digits;
  };
  const { findings } = checkQueries(path, {
    bracket: suiteCase.bracket === null ? null : [Number(suiteCase.bracket[0]), Number(suiteCase.bracket[1])],
    takesBracket: solver.takes === 'bracket' || solver.takes === 'both',
    widens: solver.widens,
    roots,
    root: solve.root,
  });
  const rows = traceRows(path, findings, digitsOf);
  const table = formatTable<TraceRow>(
    [
      { title: '', align: 'right', text: (row) => row.number },
      { title: 'asks', text: (row) => askedNames[row.event.kind] },
      { title: 'at x', text: (row) => numberToText(row.event.x) },
      { title: 'answer', align: 'right', text: ({ event }) => answerText(event) },
      { title: 'digits', align: 'right', text: (row) => formatDigits(row.digits) },
      { title: '', text: (row) => row.marks.join(', ') },
    ],
    rows,
  );
  const head = [
    `${solver.name} on ${suiteCase.id}: ${printable(suiteCase.equation)} = 0`,
    ...givenLines(solve, suiteCase),
    ...suiteCase.roots.map((root) => `root ${root.value}${root.allowed ? '' : ' (not the one asked for)'}`),
  ];
  return [...head, '', table, ...cutLine(path), '', ...stripLines(solve, rows), endLine(solve)].join('\n');
}

function traceRows(path: Path, findings: QueryEvent[], digitsOf: (x: number) => number | null): TraceRow[] {
  const marksAt = new Map<number, string[]>();
  const numbers: string[] = [];
  let count = 0;
  for (const event of path.events) {
    if (event.kind !== 'step') count += event.kind === 'fdf' ? 2 : 1;
    numbers.push(event.kind === 'step' ? '' : String(count));
  }
  for (const found of findings) {
    const marks = marksAt.get(found.index) ?? [];
    marks.push(markText(found, numbers));
    marksAt.set(found.index, marks);
  }
  return path.events.map((event, index) => ({
    number: numbers[index] ?? '',
    event,
    digits: digitsOf(event.x),
    marks: marksAt.get(index) ?? [],
  }));
}

function markText(found: QueryEvent, numbers: readonly string[]): string {
  if (found.finding === 'repeated') return `again, as in ${numbers[found.earlier ?? 0] ?? '?'}`;
  if (found.finding === 'nonFinite') return 'not finite';
  if (found.finding === 'outside') return 'outside the bracket';
  return found.finding;
}

function answerText(event: PathEvent): string {
  if (event.kind === 'fdf') return `${formatShort(event.a)}, ${formatShort(event.b)}`;
  if (event.kind !== 'step') return formatShort(event.a);
  return Number.isNaN(event.a) ? '' : `[${formatShort(event.a)}, ${formatShort(event.b)}]`;
}

function givenLines(solve: SolveRecord, suiteCase: SuiteCase): string[] {
  const lines: string[] = [];
  const parameters = Object.entries(suiteCase.parameters).map(([name, value]) => `${name} = ${value}`);
  if (parameters.length > 0) lines.push(`with ${parameters.join(', ')}`);
  if (suiteCase.bracket !== null) lines.push(`bracket ${suiteCase.bracket.join(' ')}`);
  const starts = solve.start === null ? undefined : suiteCase.starts[solve.start];
  if (starts !== undefined) lines.push(`start ${starts.join(' ')}`);
  return lines;
}

function cutLine(path: Path): string[] {
  return path.cut > 0 ? [`${path.cut} more lines were not kept`] : [];
}

function stripLines(solve: SolveRecord, rows: readonly TraceRow[]): string[] {
  if (solve.nearest === null && rows.every((row) => row.digits === null))
    return ['no root to measure against', ''];
  const evaluations = rows.filter((row) => row.event.kind === 'f' || row.event.kind === 'fdf');
  const last = rows.at(-1)?.digits ?? 0;
  const strip = characterStrip(
    evaluations.map((row) => ({
      digits: row.digits ?? 0,
      isRepeat: row.marks.some((mark) => mark.startsWith('again')),
    })),
    { digits: solve.digits ?? last, isOpen: solve.root === null },
  );
  return [strip, ''];
}

function endLine(solve: SolveRecord): string {
  const counts = [`${solve.evaluations} evaluations`];
  if (solve.df > 0) counts.push(`${solve.df} of them of f′`);
  if (solve.d2f > 0) counts.push(`${solve.d2f} of them of f″`);
  if (solve.queryCheck.repeated > 0) counts.push(`${solve.queryCheck.repeated} at an x asked before`);
  if (solve.iterations !== null)
    counts.push(`${solve.iterations} iterations ${solve.iterationsFrom ?? ''}`.trim());
  const remarks = solve.remarks.map((remark) => `${remark.code}: ${printable(remark.text)}`);
  const root =
    solve.root === null ? '' : `, root ${numberToText(solve.root)}, ${formatDigits(solve.digits)} digits`;
  const order = orderText(solve);
  return [
    `${isSuccess(solve) ? '' : 'not solved: '}${solve.outcome}${root}`,
    counts.join(', '),
    `order of convergence: ${order}`,
    ...remarks,
  ].join('\n');
}

function orderText({ order }: SolveRecord): string {
  if (order.status === 'estimated' && order.value !== null && order.low !== null && order.high !== null) {
    return `${order.value.toFixed(2)} (between ${order.low.toFixed(2)} and ${order.high.toFixed(2)}, ${order.steps} gains)`;
  }
  if (order.status === 'linear' && order.rate !== null) {
    return `1, each step leaves ${order.rate.toFixed(3)} of the error (${order.steps} gains)`;
  }
  return order.status;
}
