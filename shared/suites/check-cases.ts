import { Decimal } from 'decimal.js';
import { EquationError } from '../equations/equation-error.ts';
import { parseEquation } from '../equations/parse-equation.ts';
import { type FileCase, suiteLimits } from '../schemas/suite-file.ts';
import { offsetOf } from './constant.ts';
import type { YamlPath } from './read-yaml.ts';
import { sweepNames } from './sweep.ts';
import { type CaseProblem, type PlainCase, writeOutCase } from './write-out.ts';

/** Mistakes in one equation's text, at its path. */
function equationProblems(text: string, names: string[], path: YamlPath, casePath: YamlPath): CaseProblem[] {
  try {
    parseEquation(text.trim(), names);
    return [];
  } catch (error) {
    if (!(error instanceof EquationError)) throw error;
    const issue = error.issues[0];
    const message = issue?.message ?? error.message;
    if (issue?.path === 'parameters') return [{ path: [...casePath, 'parameters'], offset: 0, message }];
    const lead = text.length - text.trimStart().length;
    const offset = lead + offsetOf(text.trim(), issue?.line ?? 1, issue?.column ?? 1);
    return [{ path, offset, message }];
  }
}

function bracketProblems(plain: PlainCase): CaseProblem[] {
  if (plain.bracket === null) return [];
  const [low, high] = plain.bracket;
  if (Number(low) < Number(high)) return [];
  const message = `the low end of the bracket of ${plain.id} is not below the high end (in binary64)`;
  return [{ path: [...plain.path, 'bracket'], offset: 0, message }];
}

function rootProblems(plain: PlainCase): CaseProblem[] {
  const problems: CaseProblem[] = [];
  const at = (path: YamlPath, message: string) =>
    problems.push({ path: [...plain.path, ...path], offset: 0, message });
  const allowed = plain.roots.filter((root) => root.allowed).length;
  if (plain.expectation === 'root' && allowed === 0)
    at([], 'at least one allowed root was expected, or expectation: none');
  if (plain.expectation === 'none' && allowed > 0)
    at(['roots'], 'a case that expects no root has no allowed root');
  const isNoRoot = plain.traits.includes('no root');
  if (isNoRoot !== (plain.expectation === 'none')) {
    at(['traits'], 'the trait "no root" and "expectation: none" belong together');
  }
  plain.roots.forEach((root, index) => {
    const twin = plain.roots.findIndex((other) => new Decimal(other.value).eq(root.value));
    if (twin < index) at(['roots', index], 'this root stands here twice');
    if (root.digits !== null && root.digits < 40 && plain.note === '') {
      at(['roots', index, 'digits'], 'fewer than 40 digits need a note that says why');
    }
  });
  return problems;
}

/** Everything that can be wrong with a case that has the right shape, and the plain cases it stands for. */
export function checkCase(source: FileCase, path: YamlPath): { cases: PlainCase[]; problems: CaseProblem[] } {
  const sweepKeys = Object.keys(source.sweep ?? {});
  const names = [...Object.keys(source.parameters), ...sweepKeys.flatMap(sweepNames)];
  const unique = [...new Set(names)];
  const problems = equationProblems(source.equation, unique, [...path, 'equation'], path);
  source.roots.forEach((root, index) => {
    if (root.simple === undefined) return;
    problems.push(...equationProblems(root.simple, unique, [...path, 'roots', index, 'simple'], path));
  });
  const written = writeOutCase(source, path);
  problems.push(...written.problems);
  for (const plain of written.cases) {
    if (plain.id.length > 120 || !/^[a-z0-9][a-z0-9.-]*$/.test(plain.id)) {
      problems.push({
        path: [...path, 'id'],
        offset: 0,
        message: `the id ${plain.id} is longer than 120 characters`,
      });
    }
    for (const problem of [...bracketProblems(plain), ...rootProblems(plain)]) {
      const isKnown = problems.some(
        (known) => known.message === problem.message && known.path.join() === problem.path.join(),
      );
      if (!isKnown) problems.push(problem);
    }
  }
  return { cases: written.cases, problems };
}

/** Ids that stand for more than one case, and more cases than a suite may have. */
export function suiteProblems(cases: readonly PlainCase[]): CaseProblem[] {
  const seen = new Set<string>();
  const problems: CaseProblem[] = [];
  for (const plain of cases) {
    if (seen.has(plain.id)) {
      problems.push({ path: [...plain.path, 'id'], offset: 0, message: `the id ${plain.id} is used twice` });
    }
    seen.add(plain.id);
  }
  if (cases.length > suiteLimits.cases) {
    const message = `a suite has at most ${suiteLimits.cases} cases once sweeps are written out; here are ${cases.length}`;
    problems.push({ path: ['cases'], offset: 0, message });
  }
  return problems;
}
