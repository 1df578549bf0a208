import { AppError } from '../../shared/errors.ts';
import { measurementFile } from '../../shared/schemas/measurement.ts';
import { pathFromFile } from '../../shared/schemas/path.ts';
import { parseCommand, parseCount, requireOption } from './arguments.ts';
import { exitCodes } from './exit.ts';
import { findSolve } from './find-solve.ts';
import { readJsonFile } from './json-file.ts';
import { traceSolve } from './trace.ts';

export const traceUsage = 'tallyroot trace FILE.json --solver NAME --case ID [--start N]';

/** `trace`: the path of one solve as a table, with a digit strip in characters. */
export async function traceCommand(words: readonly string[]): Promise<number> {
  const { values, positionals } = parseCommand(
    words,
    { solver: { type: 'string' }, case: { type: 'string' }, start: { type: 'string' } },
    traceUsage,
  );
  const [path] = positionals;
  if (path === undefined) throw new AppError('invalid', `A file is missing.\n\nUsage: ${traceUsage}`);
  const file = readJsonFile(path, measurementFile);
  const start = parseCount(values.start, 'start', 1);
  const solve = findSolve(file, {
    solver: requireOption(values.solver, 'solver', traceUsage),
    case: requireOption(values.case, 'case', traceUsage),
    start: start === undefined ? undefined : start - 1,
  });
  const suiteCase = file.suite.cases.find((one) => one.id === solve.case);
  const solver = file.solvers.find((one) => one.name === solve.solver);
  if (suiteCase === undefined || solver === undefined) {
    throw new AppError('invalid', `${path} has the solve but not its case or solver.`);
  }
  if (solve.path === null) {
    const why = solve.remarks.map((remark) => remark.text).join(' ');
    throw new AppError(
      'unprocessable',
      `${solve.solver} on ${solve.case} has no path: ${solve.outcome}. ${why}`,
    );
  }
  console.log(traceSolve(solve, pathFromFile(solve.path), suiteCase, solver));
  return exitCodes.fine;
}
