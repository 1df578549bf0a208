import { certifyNear } from '../../shared/equations/certify-near.ts';
import { compileDouble } from '../../shared/equations/double.ts';
import type { Equation } from '../../shared/equations/tree.ts';
import { correctDigits, nearestRoot } from '../../shared/numerics/digits.ts';
import { emptyEstimate, estimateOrder, type OrderInput } from '../../shared/numerics/estimate-order.ts';
import { iteratesOf } from '../../shared/numerics/iterates.ts';
import { type JudgedRoot, judgeClaim } from '../../shared/numerics/judge-claim.ts';
import { checkQueries } from '../../shared/numerics/query-check.ts';
import { rootReference, signedError } from '../../shared/numerics/root-reference.ts';
import { ulpOf } from '../../shared/numerics/ulps.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { Path } from '../../shared/schemas/path.ts';
import type { OrderEstimate, Remark, SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import type { Outcome } from '../../shared/schemas/words.ts';
import type { LaneLimits } from './lane-messages.ts';
import { columnsToPath, type PathColumns } from './path-recorder.ts';
import type { PlannedSolve } from './plan-solves.ts';
import type { Evaluator, RawSolve } from './solve-session.ts';

/** A case made ready once: its equation compiled, its roots as references. */
export interface CaseTool {
  suiteCase: SuiteCase;
  equation: Equation;
  evaluator: Evaluator;
  roots: JudgedRoot[];
  /** Roots looked for on the spot, by where: builds of one library claim the same false ones again and again. */
  found: Map<string, string | null>;
}

/** Searches kept a case; past that they are made anew. */
const KEPT_SEARCHES = 500;

/** Tools outlive a run, since the next build meets the same suite; the oldest go first. */
const KEPT_TOOLS = 1000;
const keptTools = new Map<string, CaseTool>();

export class CaseTools {
  readonly #cases: readonly SuiteCase[];
  readonly #equations: readonly Equation[];
  readonly #tools: (CaseTool | undefined)[] = [];

  /** `equations`: those of the cases, read already. */
  constructor(cases: readonly SuiteCase[], equations: readonly Equation[]) {
    this.#cases = cases;
    this.#equations = equations;
  }

  of(index: number): CaseTool {
    const tool = this.#tools[index] ?? this.#find(index);
    this.#tools[index] = tool;
    return tool;
  }

  #find(index: number): CaseTool {
    const suiteCase = this.#cases[index];
    const equation = this.#equations[index];
    if (!suiteCase || !equation) throw new RangeError(`There is no case ${index}.`);
    const key = JSON.stringify([suiteCase.equation, suiteCase.parameters, suiteCase.roots]);
    const kept = keptTools.get(key);
    if (kept) return { ...kept, suiteCase };
    const tool = makeCaseTool(suiteCase, equation);
    const [oldest] = keptTools.keys();
    if (oldest !== undefined && keptTools.size >= KEPT_TOOLS) keptTools.delete(oldest);
    keptTools.set(key, tool);
    return tool;
  }
}

export function makeCaseTool(suiteCase: SuiteCase, equation: Equation): CaseTool {
  const entries = Object.entries(suiteCase.parameters);
  const parameters = Object.fromEntries(entries.map(([name, text]) => [name, Number(text)]));
  const roots = suiteCase.roots.map(({ value, attainable, allowed }) => {
    return { ref: rootReference(value), attainable, allowed };
  });
  return { suiteCase, equation, evaluator: compileDouble(equation, parameters), roots, found: new Map() };
}

export interface RecordInput {
  tool: CaseTool;
  planned: PlannedSolve;
  solver: SolverDeclaration;
  raw: RawSolve;
  path: PathColumns;
  hash: string;
  remarks: readonly Remark[];
  limits: Pick<LaneLimits, 'solveMs'>;
}

/** All that is recorded of one solve, from what went over the wire. */
export function recordSolve(input: RecordInput): SolveRecord {
  const { tool, planned, solver, raw } = input;
  const path = columnsToPath(input.path);
  const evaluations = raw.f + raw.df + raw.d2f;
  const claimed = raw.end.kind === 'root' ? raw.end.x : null;
  const root = claimed !== null && Number.isFinite(claimed) ? claimed : null;
  const residual = root === null ? null : finiteOrNull(tool.evaluator.f(root));
  const judged = judge(input, claimed, residual);
  const nearest = root === null ? null : judged.nearest;
  const near = nearest === null ? undefined : tool.roots[nearest];
  const digits = root === null || near === undefined ? null : correctDigits(root, near.ref);
  const iterations = countIterations(raw, evaluations);
  const cut: Remark[] = [];
  if (path.cut > 0) {
    cut.push({
      code: 'path cut',
      text: `${path.cut} lines of the path were not kept; counts and hash have them.`,
    });
  }
  const { counts } = checkQueries(path, {
    bracket: planned.bracket,
    takesBracket: planned.bracket !== null,
    widens: solver.widens,
    roots: tool.roots.filter((one) => one.allowed),
    root,
  });
  return {
    solver: solver.name,
    case: tool.suiteCase.id,
    start: planned.start,
    outcome: judged.outcome,
    remarks: [...judged.remarks, ...input.remarks, ...iterations.remarks, ...cut],
    iterations: iterations.count,
    iterationsFrom: iterations.from,
    evaluations,
    f: raw.f,
    df: raw.df,
    d2f: raw.d2f,
    root,
    nearest,
    error: digits && finiteOrNull(digits.error),
    digits: digits && finiteOrNull(digits.digits),
    exact: digits?.exact ?? false,
    ulps: digits && finiteOrNull(digits.ulps),
    residual,
    order: orderOf(path, tool.roots, solver, claimed),
    queryCheck: counts,
    pathHash: input.hash,
    steady: null,
    elapsedMs: raw.elapsedMs,
  };
}

/** A pair that was not run over the wire: it is not applicable, or it was not tried any more. */
export function recordWithoutRun(
  planned: PlannedSolve,
  solver: SolverDeclaration,
  suiteCase: SuiteCase,
  outcome: Outcome,
  remarks: Remark[],
): SolveRecord {
  return {
    solver: solver.name,
    case: suiteCase.id,
    start: planned.start,
    outcome,
    remarks,
    iterations: null,
    iterationsFrom: null,
    evaluations: 0,
    f: 0,
    df: 0,
    d2f: 0,
    root: null,
    nearest: null,
    error: null,
    digits: null,
    exact: false,
    ulps: null,
    residual: null,
    order: emptyEstimate(suiteCase.roots.length === 0 ? 'no root to measure against' : 'not enough steps'),
    queryCheck: { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 },
    pathHash: '',
    steady: null,
    elapsedMs: 0,
  };
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

/**
 * Whether there is plainly no root within `radius` of x, so that the search for one, which takes milliseconds,
 * can be spared: f has one sign at x and at both ends, and a Newton step from x leads ten radii away. Two roots
 * between the ends would show either in the sign at x, between them, or in a short step, beside them.
 */
function isFarFromRoots({ f, df }: Evaluator, x: number, radius: number): boolean {
  const y = f(x);
  const sign = Math.sign(y);
  const isOneSign = sign !== 0 && Math.sign(f(x - radius)) === sign && Math.sign(f(x + radius)) === sign;
  return isOneSign && Math.abs(y) > 10 * radius * Math.abs(df(x));
}

function searchNear(tool: CaseTool, x: number, radius: number): string | null {
  if (isFarFromRoots(tool.evaluator, x, radius)) return null;
  const where = `${x} ${radius}`;
  const known = tool.found.get(where);
  if (known !== undefined) return known;
  const root = certifyNear(tool.equation, tool.suiteCase.parameters, x, radius);
  if (tool.found.size < KEPT_SEARCHES) tool.found.set(where, root);
  return root;
}

interface Judged {
  outcome: Outcome;
  remarks: Remark[];
  nearest: number | null;
}

function judge(input: RecordInput, claimed: number | null, residual: number | null): Judged {
  const { tool, solver, raw, limits } = input;
  const { end } = raw;
  const { expectation } = tool.suiteCase;
  switch (end.kind) {
    case 'root':
      return judgeClaim({
        x: claimed ?? Number.NaN,
        roots: tool.roots,
        expectation,
        tolerance: solver.tolerance,
        residual,
        certifyNear: (x, radius) => searchNear(tool, x, radius),
      });
    case 'fail': {
      const remarks: Remark[] = [];
      if (expectation === 'none') remarks.push({ code: 'rightly refused', text: 'The case has no root.' });
      if (end.text !== '') remarks.push({ code: 'said', text: end.text });
      return { outcome: 'refused', remarks, nearest: null };
    }
    case 'garbled':
      return {
        outcome: 'garbled',
        remarks: [{ code: 'line', text: `${end.reason}: ${end.line}` }],
        nearest: null,
      };
    case 'timed out':
      return {
        outcome: 'timed out',
        remarks: [{ code: 'time', text: `${limits.solveMs / 1000} s` }],
        nearest: null,
      };
    default:
      return { outcome: end.kind, remarks: [], nearest: null };
  }
}

function countIterations(
  { iterations, steps }: RawSolve,
  evaluations: number,
): { count: number | null; from: SolveRecord['iterationsFrom']; remarks: Remark[] } {
  if (iterations === null)
    return { count: steps > 0 ? steps : null, from: steps > 0 ? 'counted' : null, remarks: [] };
  if (iterations >= 0 && iterations <= evaluations + 1)
    return { count: iterations, from: 'reported', remarks: [] };
  const text = `It reported ${iterations} iterations with ${evaluations} evaluations.`;
  return { count: null, from: 'reported', remarks: [{ code: 'iterations not credible', text }] };
}

function methodClassOf(solver: SolverDeclaration): OrderInput['methodClass'] {
  if (solver.onePoint) return 'one-point';
  if (solver.takes === 'bracket' || solver.takes === 'both') return 'bracketing';
  return solver.starts > 1 ? 'memory' : null;
}

/** Measured against the root nearest to what was returned or, without that, to where the iterates ended. */
function orderOf(
  path: Path,
  roots: readonly JudgedRoot[],
  solver: SolverDeclaration,
  claimed: number | null,
): OrderEstimate {
  const iterates = iteratesOf(path, solver.takes, solver.starts);
  const target = claimed !== null && Number.isFinite(claimed) ? claimed : iterates.findLast(Number.isFinite);
  const refs = roots.map((one) => one.ref);
  const near = roots[target === undefined ? -1 : (nearestRoot(target, refs)?.index ?? -1)] ?? roots[0];
  if (!near) return emptyEstimate('no root to measure against');
  const lnErrors = iterates.map((x) => {
    const error = Math.abs(signedError(x, near.ref));
    return error === 0 ? null : Math.log(error);
  });
  const lnFloor = Math.log(Math.max(near.attainable, ulpOf(near.ref.hi) / 2));
  return estimateOrder({ lnErrors, lnFloor, iterates, methodClass: methodClassOf(solver) });
}
