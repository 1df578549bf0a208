import { AppError } from '../../shared/errors.ts';
import type { MeasurementFile } from '../../shared/schemas/measurement.ts';

type FiledSolve = MeasurementFile['solves'][number];

/** The one solve of a file that is named; an error that lists what there is where it is not to be found. */
export function findSolve(
  file: MeasurementFile,
  wanted: { solver: string; case: string; start: number | undefined },
): FiledSolve {
  const named = file.solves.filter((solve) => solve.solver === wanted.solver && solve.case === wanted.case);
  const found = wanted.start === undefined ? named : named.filter((solve) => solve.start === wanted.start);
  const [first] = found;
  if (first !== undefined) return first;
  const solvers = file.solvers.map((solver) => solver.name).join(', ');
  const cases = file.suite.cases.map((one) => one.id);
  if (!file.solvers.some((solver) => solver.name === wanted.solver)) {
    throw new AppError('not_found', `The file has no solver ${wanted.solver}. It has: ${solvers}.`);
  }
  if (!cases.includes(wanted.case)) {
    const close = cases.filter((id) => id.includes(wanted.case)).slice(0, 8);
    const hint = close.length > 0 ? `Close to it: ${close.join(', ')}.` : `It has ${cases.length} cases.`;
    throw new AppError('not_found', `The file has no case ${wanted.case}. ${hint}`);
  }
  throw new AppError(
    'not_found',
    `The file has no solve of ${wanted.solver} on ${wanted.case} from that start.`,
  );
}
