import { AppError, type Issue } from '../errors.ts';
import { fileCase, type SuiteFile, suiteFile, suiteLimits } from '../schemas/suite-file.ts';
import { checkCase, suiteProblems } from './check-cases.ts';
import { expectedText } from './expected-text.ts';
import { readYaml, type SourcePositions, type YamlPath } from './read-yaml.ts';
import type { CaseProblem, PlainCase } from './write-out.ts';

export interface SuiteReading {
  file: SuiteFile;
  /** The cases with sweeps written out. */
  cases: PlainCase[];
  positions: SourcePositions;
}

/** Below these keys numbers are kept digit by digit. */
const exactKeys = new Set(['equation', 'parameters', 'sweep', 'bracket', 'starts', 'value', 'simple']);
const deepest = 16;
const issueCap = 100;

function sentence(text: string): string {
  const capital = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(capital) ? capital : `${capital}.`;
}

function pathText(path: YamlPath): string {
  return path
    .map((part) => (typeof part === 'number' ? `[${part}]` : `.${part}`))
    .join('')
    .replace(/^\./, '');
}

function plainPath(path: readonly PropertyKey[]): YamlPath {
  return path.map((part) => (typeof part === 'symbol' ? String(part) : part));
}

/** Mistakes of shape: unknown keys, wrong types, missing parts. */
function shapeIssues(
  value: unknown,
  positions: SourcePositions,
): { file: SuiteFile | null; issues: Issue[] } {
  const parsed = suiteFile.safeParse(value);
  if (parsed.success) return { file: parsed.data, issues: [] };
  const issues = parsed.error.issues.map((issue): Issue => {
    const path = plainPath(issue.path);
    const isUnknownKey = issue.code === 'unrecognized_keys';
    const at = isUnknownKey ? positions.key([...path, issue.keys[0] ?? '']) : positions.value(path);
    return { path: pathText(path), ...at, message: sentence(expectedText(issue)) };
  });
  return { file: null, issues };
}

function problemIssue(problem: CaseProblem, positions: SourcePositions): Issue {
  const isInSweep = problem.path.at(-2) === 'sweep';
  const at = isInSweep ? positions.key(problem.path) : positions.within(problem.path, problem.offset);
  return { path: pathText(problem.path), ...at, message: sentence(problem.message) };
}

/** Cases of the right shape, even where others are not, so that all mistakes are told at once. */
function wellFormedCases(value: unknown): { source: ReturnType<typeof fileCase.parse>; index: number }[] {
  if (typeof value !== 'object' || value === null || !('cases' in value) || !Array.isArray(value.cases))
    return [];
  return value.cases.slice(0, suiteLimits.cases).flatMap((entry: unknown, index) => {
    const parsed = fileCase.safeParse(entry);
    return parsed.success ? [{ source: parsed.data, index }] : [];
  });
}

/**
 * Reads a suite file (YAML or JSON, format 1).
 * @throws AppError `invalid` (`too_large` beyond 1 MiB) with an issue for every mistake found, up to 100, each
 * with line and column and what was expected
 */
export function readSuiteText(text: string): SuiteReading {
  if (text.length > suiteLimits.bytes) {
    throw new AppError('too_large', `A suite file of at most ${suiteLimits.bytes} bytes was expected.`);
  }
  const { value, positions, issues } = readYaml(
    text,
    { bytes: suiteLimits.bytes, depth: deepest },
    exactKeys,
  );
  const cases: PlainCase[] = [];
  let file: SuiteFile | null = null;
  if (issues.length === 0) {
    const shape = shapeIssues(value, positions);
    file = shape.file;
    issues.push(...shape.issues);
    for (const { source, index } of wellFormedCases(value)) {
      const checked = checkCase(source, ['cases', index]);
      cases.push(...checked.cases);
      issues.push(...checked.problems.map((problem) => problemIssue(problem, positions)));
      if (cases.length > suiteLimits.cases || issues.length > issueCap) break;
    }
    issues.push(...suiteProblems(cases).map((problem) => problemIssue(problem, positions)));
  }
  if (file === null || issues.length > 0) throw suiteError(issues);
  return { file, cases, positions };
}

function suiteError(issues: Issue[]): AppError {
  const sorted = [...issues].sort(
    (a, b) => (a.line ?? 0) - (b.line ?? 0) || (a.column ?? 0) - (b.column ?? 0),
  );
  const kept = sorted.slice(0, issueCap);
  const first = kept[0];
  const where = first?.line === undefined ? '' : `line ${first.line}, column ${first.column}: `;
  const count = issues.length === 1 ? 'a mistake' : `${issues.length} mistakes`;
  const text = `The suite file has ${count}; the first, ${where}${first?.message ?? ''}`;
  return new AppError('invalid', text, { issues: kept });
}
