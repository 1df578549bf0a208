import { parseEquation } from '../../shared/equations/parse-equation.ts';
import type { Equation } from '../../shared/equations/tree.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';

/** Equations outlive a run, since the next build meets the same suite; the oldest go first. */
const KEPT_EQUATIONS = 2000;
const kept = new Map<string, Equation>();

/** The equation of a case, read once. */
export function equationOf(suiteCase: SuiteCase): Equation {
  const names = Object.keys(suiteCase.parameters);
  const key = JSON.stringify([suiteCase.equation, names]);
  const known = kept.get(key);
  if (known) return known;
  const equation = parseEquation(suiteCase.equation, names);
  const [oldest] = kept.keys();
  if (oldest !== undefined && kept.size >= KEPT_EQUATIONS) kept.delete(oldest);
  kept.set(key, equation);
  return equation;
}
