import type { SuiteCase, SuiteRevision } from '../../shared/schemas/case.ts';
import type { Environment } from '../../shared/schemas/measurement.ts';
import type { Path } from '../../shared/schemas/path.ts';
import type { OrderEstimate, SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';

export const noOrder: OrderEstimate = {
  status: 'not enough steps',
  kind: null,
  value: null,
  low: null,
  high: null,
  steps: 0,
  rate: null,
  rateLow: null,
  rateHigh: null,
  constant: null,
  period: null,
};

export function buildSolve(given: Partial<SolveRecord> = {}): SolveRecord {
  return {
    solver: 'secant',
    case: 'cubic',
    start: 0,
    outcome: 'solved',
    remarks: [],
    iterations: 7,
    iterationsFrom: 'reported',
    evaluations: 9,
    f: 9,
    df: 0,
    d2f: 0,
    root: 1.5,
    nearest: 0,
    error: 1e-16,
    digits: 15.8,
    exact: false,
    ulps: 0.5,
    residual: 2e-16,
    order: noOrder,
    queryCheck: { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 },
    pathHash: 'ab'.repeat(32),
    steady: null,
    elapsedMs: 0.25,
    ...given,
  };
}

export function buildPath(length = 9): Path {
  const events = Array.from({ length }, (_, index) => ({
    kind: 'f' as const,
    x: 1.5 + 2 ** -index,
    a: 2 ** -index,
    b: Number.NaN,
  }));
  return { events, cut: 0 };
}

export function buildCase(given: Partial<SuiteCase> = {}): SuiteCase {
  const id = given.id ?? 'cubic';
  return {
    id,
    equation: 'x^3 - a',
    parameters: { a: '3.375' },
    bracket: ['1', '2'],
    starts: [['1', '2']],
    roots: [
      {
        value: '1.5',
        digits: 60,
        multiplicity: 1,
        allowed: true,
        certificate: 'by construction',
        attainable: 2.2e-16,
      },
    ],
    expectation: 'root',
    traits: ['polynomial'],
    source: 'made for the tests',
    note: '',
    hash: `hash of ${id}`,
    ...given,
  };
}

export function buildRevision(given: Partial<SuiteRevision> = {}): SuiteRevision {
  return {
    id: 'tests',
    title: 'A suite for the tests',
    revision: 'a1'.repeat(32),
    limits: { evaluations: 200, seconds: 10 },
    cases: [
      buildCase(),
      buildCase({ id: 'pole', traits: ['pole'], equation: '1/x' }),
      buildCase({ id: 'wave', traits: ['oscillating', 'many roots'], equation: 'sin(a x)' }),
    ],
    ...given,
  };
}

export function buildSolver(given: Partial<SolverDeclaration> = {}): SolverDeclaration {
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

export const testEnvironment: Environment = {
  platform: 'linux',
  arch: 'x64',
  node: '20.0.0',
  v8: '11.3',
  tallyroot: '0.1.0',
  fingerprint: 'f0'.repeat(16),
  confinement: 'unconfined',
};

/** A build whose file `salt` says `changed` asks once more on every case whose name ends in 7. */
export function changedShape(record: SolveRecord, salt: string): Partial<SolveRecord> {
  if (salt !== 'changed' || !record.case.endsWith('7')) return {};
  const more = { evaluations: record.evaluations + 1, f: record.f + 1 };
  const [first = ''] = record.pathHash;
  return { ...more, pathHash: `${first === '0' ? '1' : '0'}${record.pathHash.slice(1)}` };
}
