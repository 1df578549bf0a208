import { compareRuns } from '../../shared/comparison/compare.ts';
import type { ComparableRun, Pair } from '../../shared/comparison/comparison.ts';
import { exportJson } from '../../shared/comparison/export-json.ts';
import { AppError } from '../../shared/errors.ts';
import { type AllowanceSet, allowanceSet } from '../../shared/schemas/allowances.ts';
import { type MeasurementFile, measurementFile } from '../../shared/schemas/measurement.ts';
import { type Path, pathFromFile } from '../../shared/schemas/path.ts';
import { solveKey } from '../../shared/schemas/solve.ts';
import { parseCommand } from './arguments.ts';
import { comparisonText } from './comparison-text.ts';
import { exitCodes } from './exit.ts';
import { readJsonFile, writeTextFile } from './json-file.ts';
import { readYamlOrJson } from './yaml-file.ts';

export const compareUsage = 'tallyroot compare REFERENCE.json CANDIDATE.json [--allow FILE] [--json FILE]';

/** `compare`: what changed from one measurement to another, judged by allowances. */
export async function compareCommand(words: readonly string[]): Promise<number> {
  const { values, positionals } = parseCommand(
    words,
    { allow: { type: 'string' }, json: { type: 'string' } },
    compareUsage,
  );
  const [referencePath, candidatePath, ...rest] = positionals;
  if (referencePath === undefined || candidatePath === undefined || rest.length > 0) {
    throw new AppError('invalid', `Two files are needed.\n\nUsage: ${compareUsage}`);
  }
  const reference = readJsonFile(referencePath, measurementFile);
  const candidate = readJsonFile(candidatePath, measurementFile);
  const allowances: AllowanceSet =
    values.allow === undefined ? allowanceSet.parse({}) : readYamlOrJson(values.allow, allowanceSet);
  const comparison = compareRuns(comparableRun(reference), comparableRun(candidate), allowances);
  const referencePaths = pathsByKey(reference);
  const candidatePaths = pathsByKey(candidate);
  const pathsOf = (pair: Pair): { reference: Path; candidate: Path } | null => {
    if (pair.reference === null || pair.candidate === null) return null;
    const before = referencePaths(solveKey(pair.reference));
    const after = candidatePaths(solveKey(pair.candidate));
    return before === null || after === null ? null : { reference: before, candidate: after };
  };
  console.log(comparisonText(comparison, pathsOf));
  if (values.json !== undefined) {
    writeTextFile(values.json, exportJson(comparison, allowances));
    console.log(`\nWritten to ${values.json}`);
  }
  if (comparison.verdict === 'could not tell') return exitCodes.wrong;
  return comparison.verdict === 'within allowances' ? exitCodes.fine : exitCodes.beyond;
}

/** A measurement as one side of a comparison. */
export function comparableRun(file: MeasurementFile): ComparableRun {
  return {
    solves: file.solves,
    solvers: file.solvers,
    cases: file.suite.cases,
    fingerprint: file.environment.fingerprint,
    label: file.build.label,
  };
}

function pathsByKey(file: MeasurementFile): (key: string) => Path | null {
  const solves = new Map(file.solves.map((solve) => [solveKey(solve), solve]));
  return (key) => {
    const path = solves.get(key)?.path ?? null;
    return path === null ? null : pathFromFile(path);
  };
}
