import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { RunView, SolveView } from '../../../shared/schemas/runs.ts';
import type { OrderEstimate } from '../../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';

/** Small records for tests of the client; every field can be said otherwise. */
export const someOrder = (given: Partial<OrderEstimate> = {}): OrderEstimate => ({
  status: 'estimated',
  kind: 'memory',
  value: 1.62,
  low: 1.6,
  high: 1.64,
  steps: 5,
  rate: null,
  rateLow: null,
  rateHigh: null,
  constant: null,
  period: null,
  ...given,
});

let nextId = 1;

export function someSolve(given: Partial<SolveView> = {}): SolveView {
  nextId += 1;
  return {
    id: nextId,
    solver: 'secant',
    case: 'sqrt-three',
    start: 0,
    outcome: 'solved',
    remarks: [],
    iterations: 6,
    iterationsFrom: 'reported',
    evaluations: 8,
    f: 8,
    df: 0,
    d2f: 0,
    root: 1.7320508075688772,
    nearest: 0,
    error: 1e-16,
    digits: 15.9,
    exact: false,
    ulps: 0.4,
    residual: -4e-16,
    order: someOrder(),
    queryCheck: { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 },
    pathHash: `path ${nextId}`,
    steady: null,
    elapsedMs: 1,
    ...given,
  };
}

export const rightRefusal: Pick<SolveView, 'outcome' | 'remarks'> = {
  outcome: 'refused',
  remarks: [{ code: 'rightly refused', text: '' }],
};

export function someCase(given: Partial<SuiteCase> = {}): SuiteCase {
  return {
    id: 'sqrt-three',
    equation: 'x^2 - 3',
    parameters: {},
    bracket: ['1', '2'],
    starts: [['1', '2']],
    roots: [
      {
        value: '1.732050807568877293527446341505872366943',
        digits: 40,
        multiplicity: 1,
        allowed: true,
        certificate: 'sign change',
        attainable: 3.4e-16,
      },
    ],
    expectation: 'root',
    traits: ['polynomial'],
    source: 'constructed',
    note: '',
    hash: 'h',
    ...given,
  };
}

export function someSolver(given: Partial<SolverDeclaration> = {}): SolverDeclaration {
  return {
    name: 'secant',
    takes: 'start',
    starts: 2,
    uses: ['f'],
    order: 1.618,
    onePoint: false,
    widens: false,
    tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
    settings: {},
    aliases: [],
    digits: false,
    ...given,
  };
}

export function someRun(given: Partial<RunView> = {}): RunView {
  return {
    id: 1,
    library: 'larkroots',
    build: { id: 1, label: 'One chord step', commit: null },
    suite: { slug: 'traps', title: 'Traps', revision: 1, hash: 'h' },
    status: 'finished',
    phase: 'done',
    reason: null,
    settings: { evaluations: 1000, seconds: 10, runSeconds: null, lanes: 1, fresh: false, confirm: 'none' },
    against: null,
    progress: { planned: 4, stored: 4, solved: 2, toConfirm: 0, confirmed: 0, unsteady: 0, evaluations: 40 },
    createdAt: '2026-03-14T09:12:00.000Z',
    createdBy: 'ilse',
    startedAt: null,
    finishedAt: null,
    elapsedMs: 0,
    ...given,
  };
}

export function somePair(given: Partial<PairView> = {}): PairView {
  nextId += 1;
  return {
    key: `pair ${nextId}`,
    solver: 'secant',
    formerly: null,
    case: 'sqrt-three',
    start: 0,
    family: 'sqrt-three',
    traits: ['polynomial'],
    reference: someSolve(),
    candidate: someSolve(),
    change: 'same',
    others: [],
    difference: 0,
    digits: 0,
    repeatedMore: 0,
    ...given,
  };
}
