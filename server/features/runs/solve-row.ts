import type { Remark, SolveRecord } from '../../../shared/schemas/solve.ts';
import { iterationsFromCode, orderKindCode, orderStatusCode, outcomeCode, wordOf } from '../../db/codes.ts';

/**
 * How a solve lies in its table: the names of the columns after the key, and a tuple of values in that
 * order. Statements are prepared from the list, so that the two cannot part.
 */
export const solveColumns = [
  'outcome',
  'iterations',
  'iterations_from',
  'evaluations',
  'f',
  'df',
  'd2f',
  'root',
  'nearest',
  'error',
  'digits',
  'exact',
  'ulps',
  'residual',
  'order_status',
  'order_kind',
  'order_value',
  'order_low',
  'order_high',
  'order_steps',
  'rate',
  'rate_low',
  'rate_high',
  'constant',
  'period',
  'repeated',
  'outside',
  'late',
  'unused',
  'non_finite',
  'path_hash',
  'steady',
  'elapsed_ms',
  'remarks',
] as const;

type N = number | null;

/** The key columns: id, solver (position in the run), case_id, start. */
export type SolveKeyRow = [id: number, solver: number, caseId: number, start: number];

export type SolveValues = [
  outcome: number,
  iterations: N,
  iterationsFrom: N,
  evaluations: number,
  f: number,
  df: number,
  d2f: number,
  root: N,
  nearest: N,
  error: N,
  digits: N,
  exact: number,
  ulps: N,
  residual: N,
  orderStatus: number,
  orderKind: N,
  orderValue: N,
  orderLow: N,
  orderHigh: N,
  orderSteps: number,
  rate: N,
  rateLow: N,
  rateHigh: N,
  constant: N,
  period: N,
  repeated: number,
  outside: number,
  late: number,
  unused: number,
  nonFinite: number,
  pathHash: Buffer | string,
  steady: N,
  elapsedMs: number,
  remarks: string | null,
];

const outcomeOf = wordOf(outcomeCode);
const orderStatusOf = wordOf(orderStatusCode);
const orderKindOf = wordOf(orderKindCode);
const iterationsFromOf = wordOf(iterationsFromCode);

const evenHex = /^(?:[0-9a-f]{2})+$/;

/** Half the size of the text where the hash is lower-case hexadecimal; kept as it is otherwise. */
export function packHash(hash: string): Buffer | string {
  return evenHex.test(hash) ? Buffer.from(hash, 'hex') : hash;
}

function unpackHash(stored: Buffer | string): string {
  return typeof stored === 'string' ? stored : stored.toString('hex');
}

export function solveToValues(solve: SolveRecord): SolveValues {
  const { order, queryCheck } = solve;
  return [
    outcomeCode[solve.outcome],
    solve.iterations,
    solve.iterationsFrom && iterationsFromCode[solve.iterationsFrom],
    solve.evaluations,
    solve.f,
    solve.df,
    solve.d2f,
    solve.root,
    solve.nearest,
    solve.error,
    solve.digits,
    solve.exact ? 1 : 0,
    solve.ulps,
    solve.residual,
    orderStatusCode[order.status],
    order.kind && orderKindCode[order.kind],
    order.value,
    order.low,
    order.high,
    order.steps,
    order.rate,
    order.rateLow,
    order.rateHigh,
    order.constant,
    order.period,
    queryCheck.repeated,
    queryCheck.outside,
    queryCheck.late,
    queryCheck.unused,
    queryCheck.nonFinite,
    packHash(solve.pathHash),
    solve.steady === null ? null : solve.steady ? 1 : 0,
    solve.elapsedMs,
    solve.remarks.length === 0 ? null : JSON.stringify(solve.remarks),
  ];
}

/** Written by `solveToValues` alone, from remarks that were parsed when the solve came in. */
function readRemarks(text: string | null): Remark[] {
  return text === null ? [] : JSON.parse(text);
}

/** The inverse of `solveToValues`, given the names behind the key. */
export function valuesToSolve(
  names: { solver: string; case: string; start: number },
  values: SolveValues,
): SolveRecord {
  // By index: this runs for every row of a comparison, and unpacking a tuple of 34 is slower.
  const from = values[2];
  const kind = values[15];
  const steady = values[31];
  return {
    solver: names.solver,
    case: names.case,
    start: names.start < 0 ? null : names.start,
    outcome: outcomeOf(values[0]),
    remarks: readRemarks(values[33]),
    iterations: values[1],
    iterationsFrom: from === null ? null : iterationsFromOf(from),
    evaluations: values[3],
    f: values[4],
    df: values[5],
    d2f: values[6],
    root: values[7],
    nearest: values[8],
    error: values[9],
    digits: values[10],
    exact: values[11] === 1,
    ulps: values[12],
    residual: values[13],
    order: {
      status: orderStatusOf(values[14]),
      kind: kind === null ? null : orderKindOf(kind),
      value: values[16],
      low: values[17],
      high: values[18],
      steps: values[19],
      rate: values[20],
      rateLow: values[21],
      rateHigh: values[22],
      constant: values[23],
      period: values[24],
    },
    queryCheck: {
      repeated: values[25],
      outside: values[26],
      late: values[27],
      unused: values[28],
      nonFinite: values[29],
    },
    pathHash: unpackHash(values[30]),
    steady: steady === null ? null : steady === 1,
    elapsedMs: values[32],
  };
}
