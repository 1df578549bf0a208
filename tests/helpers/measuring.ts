import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type MeasureOptions, type MeasureResult, measure } from '../../server/runner/measure.ts';
import type { MeasureLimits } from '../../server/runner/run-work.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { Path } from '../../shared/schemas/path.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';

export const adapterFolder = fileURLToPath(new URL('../fixtures/adapters', import.meta.url));

/** A solver that takes one start and f alone, unless said otherwise. */
export function solverOf(name: string, changes: Partial<SolverDeclaration> = {}): SolverDeclaration {
  return {
    name,
    takes: 'start',
    starts: 1,
    uses: ['f'],
    order: null,
    onePoint: false,
    widens: false,
    tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
    settings: {},
    aliases: [],
    digits: false,
    ...changes,
  };
}

/** The case x − 1 = 0, unless said otherwise. */
export function caseOf(id: string, changes: Partial<SuiteCase> = {}): SuiteCase {
  return {
    id,
    equation: 'x - 1',
    parameters: {},
    bracket: ['0', '3'],
    starts: [['2']],
    roots: [
      {
        value: '1',
        digits: 45,
        multiplicity: 1,
        allowed: true,
        certificate: 'sign change',
        attainable: 1.2e-16,
      },
    ],
    expectation: 'root',
    traits: [],
    source: 'constructed',
    note: '',
    hash: id,
    ...changes,
  };
}

export interface Measured extends MeasureResult {
  solves: { record: SolveRecord; path: Path | null }[];
  /** Of the solves in the order of the plan. */
  records: SolveRecord[];
  outcomes: string[];
  /** Process ids of the adapters that were started, in order. */
  started: number[];
  /** Process ids of children that adapters told of. */
  children: number[];
}

/** Short limits, so that a test of a time rule takes a moment only. */
export const shortLimits = {
  evaluations: 5,
  seconds: 5,
  readyMs: 400,
  graceMs: 150,
  closeMs: 300,
  killAfterMs: 150,
} satisfies MeasureLimits;

export type Changes = Partial<Omit<MeasureOptions, 'limits'>> & { limits?: Partial<MeasureLimits> };

/** Measures with an adapter of the fixtures in a scratch folder. `command` may use the fixtures' folder as $A. */
export async function measureWith(
  command: string,
  solvers: SolverDeclaration[],
  cases: SuiteCase[],
  changes: Changes = {},
): Promise<Measured> {
  const folder = mkdtempSync(join(tmpdir(), 'measuring-'));
  const solves: Measured['solves'] = [];
  try {
    const result = await measure({
      folder,
      adapter: command.replaceAll('$A', adapterFolder),
      environment: {},
      solvers,
      cases,
      lanes: 1,
      fresh: false,
      confinement: 'unconfined',
      ...changes,
      limits: { ...shortLimits, ...changes.limits },
      onSolve: (record, path) => {
        solves.push({ record, path });
        changes.onSolve?.(record, path);
      },
    });
    const records = solves.map(({ record }) => record);
    return {
      ...result,
      solves,
      records,
      outcomes: records.map((record) => record.outcome),
      started: readNumbers(join(folder, 'started')),
      children: readNumbers(join(folder, 'children')),
    };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Measures solvers of the unruly adapter on so many cases of x − 1 = 0. */
export function measureUnruly(
  names: string[],
  caseCount = 1,
  changes: Changes = {},
  start = '',
): Promise<Measured> {
  const cases = Array.from({ length: caseCount }, (_, at) => caseOf(`case-${at + 1}`));
  const solvers = names.map((name) => solverOf(name));
  return measureWith(`sh $A/unruly.sh ${start}`, solvers, cases, changes);
}

export function remarkOf(record: SolveRecord | undefined, code: string): string | undefined {
  return record?.remarks.find((remark) => remark.code === code)?.text;
}

/** Whether a process runs; one that has ended and waits to be reaped does not. */
export function isRunning(pid: number): boolean {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'latin1');
    return !/^[ZX]/.test(stat.slice(stat.lastIndexOf(')') + 2));
  } catch {
    return false;
  }
}

function readNumbers(file: string): number[] {
  try {
    return readFileSync(file, 'utf8').split('\n').filter(Boolean).map(Number);
  } catch {
    return [];
  }
}
