import type { Breach, Comparison, NotCompared, Pair } from './comparison.ts';
import { escapeXml } from './export-escape.ts';
import { breachesByPair, breachText, caseAndStart, scopeText } from './export-words.ts';
import { describePair } from './pair-sentence.ts';
import { plainText } from './rich-text.ts';
import { describeComparison } from './sentences.ts';

interface TestCase {
  name: string;
  seconds: number;
  result: { kind: 'failure' | 'error' | 'skipped'; message: string; type: string; text: string } | null;
}

/**
 * A comparison as JUnit XML: a testsuite for each solver, a testcase for each pair.
 *
 * `failure`: the pair is part of a breach (of a solver's total: where it became costlier). `error`: the candidate
 * has no result where the reference has one. `skipped`: the case has changed, or the pair is gone. Where the
 * verdict is `could not tell` and nothing above says so, a testsuite `comparison` has one error, so that no
 * reader takes a comparison of nothing for a good one. Time: of the candidate's solve, in seconds.
 */
export function exportJUnit(comparison: Comparison): string {
  const byPair = breachesByPair(comparison);
  const suites = new Map<string, TestCase[]>();
  const put = (solver: string, one: TestCase): void => {
    const own = suites.get(solver);
    if (own === undefined) suites.set(solver, [one]);
    else own.push(one);
  };
  for (const pair of comparison.pairs) put(pair.solver, testCase(pair, byPair.get(pair.key) ?? []));
  for (const one of comparison.notCompared) put(one.solver, setAside(one));
  const hasError = comparison.notCompared.some((one) => one.reason === 'not run');
  const list = [...suites].map(([solver, cases]) => ({ name: solver, cases }));
  if (comparison.verdict === 'could not tell' && !hasError) {
    list.unshift({ name: 'comparison', cases: [nothingTold(comparison)] });
  }
  const all = list.flatMap((suite) => suite.cases);
  const name = `${comparison.candidate} against ${comparison.reference}`;
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<testsuites name="${escapeXml(name)}"${counts(all)}>`,
    ...list.flatMap((suite) => suiteLines(suite.name, suite.cases)),
    '</testsuites>',
    '',
  ].join('\n');
}

function suiteLines(name: string, cases: readonly TestCase[]): string[] {
  const lines = cases.flatMap((one): string[] => {
    const names = `name="${escapeXml(one.name)}" classname="${escapeXml(name)}"`;
    const open = `    <testcase ${names} time="${seconds(one.seconds)}"`;
    if (one.result === null) return [`${open}/>`];
    const { kind, message, type, text } = one.result;
    const said = `message="${escapeXml(message)}"`;
    const inner =
      kind === 'skipped'
        ? `      <skipped ${said}/>`
        : `      <${kind} ${said} type="${escapeXml(type)}">${escapeXml(text)}</${kind}>`;
    return [`${open}>`, inner, '    </testcase>'];
  });
  return [`  <testsuite name="${escapeXml(name)}"${counts(cases)}>`, ...lines, '  </testsuite>'];
}

function testCase(pair: Pair, breaches: readonly Breach[]): TestCase {
  const name = caseAndStart(pair);
  const elapsed = (pair.candidate?.elapsedMs ?? 0) / 1000;
  const text = plainText(describePair(pair));
  if (breaches.length > 0) {
    const message = breaches.map(breachLine).join('; ');
    const type = [pair.change, ...pair.others].join(', ');
    return { name, seconds: elapsed, result: { kind: 'failure', message, type, text } };
  }
  if (pair.candidate === null) {
    return { name, seconds: 0, result: { kind: 'skipped', message: text, type: '', text: '' } };
  }
  return { name, seconds: elapsed, result: null };
}

function breachLine(breach: Breach): string {
  const scope = scopeText(breach.scope);
  return scope === null ? breachText(breach) : `${scope}: ${breachText(breach)}`;
}

function setAside(one: NotCompared): TestCase {
  const result: TestCase['result'] =
    one.reason === 'not run'
      ? {
          kind: 'error',
          message: 'The candidate has no result for this solve.',
          type: one.reason,
          text: 'The reference has one, so it could not be told whether the candidate is as good.',
        }
      : {
          kind: 'skipped',
          message: 'The case has changed in the suite since the reference.',
          type: '',
          text: '',
        };
  return { name: caseAndStart(one), seconds: 0, result };
}

function nothingTold(comparison: Comparison): TestCase {
  const { plain } = describeComparison(comparison);
  const message = comparison.reasons.at(-1) ?? 'There was nothing to compare.';
  return {
    name: 'verdict',
    seconds: 0,
    result: { kind: 'error', message, type: 'could not tell', text: plain },
  };
}

function counts(cases: readonly TestCase[]): string {
  const count = (kind: string): number => cases.filter((one) => one.result?.kind === kind).length;
  const time = cases.reduce((sum, one) => sum + one.seconds, 0);
  return ` tests="${cases.length}" failures="${count('failure')}" errors="${count('error')}" skipped="${count('skipped')}" time="${seconds(time)}"`;
}

function seconds(value: number): string {
  return value.toFixed(6);
}
