import { confirmSolves } from '../../runner/confirm.ts';
import { measure } from '../../runner/measure.ts';
import { pathFromBytes, pathToBytes } from '../../runner/path-bytes.ts';
import { planSolves } from '../../runner/plan-solves.ts';
import type { Measuring } from './measuring.ts';

/** The runner of this product. */
export const runnerMeasuring: Measuring = {
  measure,
  confirm: confirmSolves,
  countSolves: (solvers, cases) => planSolves(solvers, cases).length,
  encodePath: pathToBytes,
  decodePath: pathFromBytes,
};
