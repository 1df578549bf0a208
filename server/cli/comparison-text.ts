import type { Comparison, Pair, SolverTotals } from '../../shared/comparison/comparison.ts';
import { firstDifference } from '../../shared/comparison/first-difference.ts';
import { describePair } from '../../shared/comparison/pair-sentence.ts';
import { plainText } from '../../shared/comparison/rich-text.ts';
import { describeComparison } from '../../shared/comparison/sentences.ts';

import type { Path } from '../../shared/schemas/path.ts';
import { numberToText } from '../../shared/schemas/path.ts';
import { changes } from '../../shared/schemas/words.ts';
import { formatDigits } from './figures.ts';
import { formatTable, printable } from './table.ts';

/** Paths of both sides, by key of the pair; null where one is not kept. */
export type PathsOf = (pair: Pair) => { reference: Path; candidate: Path } | null;

/** A comparison as text: what was found, totals per solver, then the changed pairs, gravest first. */
export function comparisonText(comparison: Comparison, pathsOf: PathsOf): string {
  const words = describeComparison(comparison);
  const changed = comparison.pairs.filter((pair) => pair.change !== 'same');
  const same = comparison.pairs.length - changed.length;
  const parts = [
    `${comparison.verdict}: ${comparison.reference} → ${comparison.candidate}`,
    '',
    printable(plainText(words.verdict)),
    ...words.lead.map((sentence) => printable(plainText(sentence))),
    '',
    totalsTable(comparison.totals),
  ];
  if (changed.length > 0) parts.push('', pairsTable(changed, pathsOf));
  parts.push('', `${same} of ${comparison.pairs.length} pairs are the same.`);
  if (comparison.notCompared.length > 0) {
    const cases = new Set(comparison.notCompared.map((one) => one.case));
    parts.push(
      `${comparison.notCompared.length} solves on ${cases.size} cases are not compared, as their case changed or was not run.`,
    );
  }
  return parts.join('\n');
}

function totalsTable(totals: readonly SolverTotals[]): string {
  return formatTable<SolverTotals>(
    [
      { title: 'solver', text: (row) => row.solver },
      {
        title: 'solved',
        align: 'right',
        text: ({ reference, candidate }) =>
          `${reference.solved} → ${candidate.solved} of ${Math.max(reference.of, candidate.of)}`,
      },
      {
        title: 'evaluations',
        align: 'right',
        text: ({ evaluations }) => `${evaluations.reference} → ${evaluations.candidate}`,
      },
      { title: 'change', align: 'right', text: ({ evaluations }) => percentText(evaluations.percent) },
      { title: 'a case', align: 'right', text: ({ perCase }) => percentText(perCase.percent) },
      { title: 'a family', align: 'right', text: ({ perFamily }) => percentText(perFamily.percent) },
      { title: 'over', align: 'right', text: (row) => `${row.pairs} pairs` },
      { title: 'order, median', align: 'right', text: ({ order }) => orderPair(order) },
      { title: 'changes', text: ({ changes }) => changesText(changes) },
    ],
    totals,
  );
}

function percentText(percent: number | null): string {
  if (percent === null) return '–';
  if (percent === 0) return '0 %';
  const digits = Math.abs(percent).toFixed(1);
  return `${percent > 0 ? '+' : '−'}${digits} %`;
}

function orderPair(order: SolverTotals['order']): string {
  const { reference, candidate } = order;
  if (reference.median === null && candidate.median === null) return 'not enough steps';
  return `${reference.median?.toFixed(2) ?? '–'} → ${candidate.median?.toFixed(2) ?? '–'}`;
}

function changesText(changes: SolverTotals['changes']): string {
  return Object.entries(changes)
    .filter(([change, count]) => change !== 'same' && count > 0)
    .map(([change, count]) => `${change} ${count}`)
    .join(', ');
}

function pairsTable(pairs: readonly Pair[], pathsOf: PathsOf): string {
  return formatTable<Pair>(
    [
      { title: 'change', text: (pair) => pair.change },
      { title: 'solver', text: (pair) => pair.solver },
      {
        title: 'case',
        text: (pair) =>
          pair.start === null || pair.start === 0 ? pair.case : `${pair.case} (start ${pair.start + 1})`,
      },
      {
        title: 'evaluations',
        align: 'right',
        text: (pair) => sides(pair, (solve) => String(solve.evaluations)),
      },
      { title: 'digits', align: 'right', text: (pair) => sides(pair, (solve) => formatDigits(solve.digits)) },
      { title: 'first differs', text: (pair) => differenceText(pathsOf(pair)) },
      { title: 'what', text: (pair) => plainText(describePair(pair)) },
    ],
    [...pairs].sort((a, b) => gravityOf(a) - gravityOf(b) || (b.difference ?? 0) - (a.difference ?? 0)),
  );
}

function gravityOf(pair: Pair): number {
  return changes.indexOf(pair.change);
}

function sides(pair: Pair, text: (solve: NonNullable<Pair['reference']>) => string): string {
  const side = (solve: Pair['reference']): string => (solve === null ? '–' : text(solve));
  return `${side(pair.reference)} → ${side(pair.candidate)}`;
}

function differenceText(paths: { reference: Path; candidate: Path } | null): string {
  if (paths === null) return '';
  const found = firstDifference(paths.reference, paths.candidate);
  if (found === null) return '';
  const event = paths.candidate.events[found.index];
  return event === undefined
    ? `line ${found.index + 1}`
    : `line ${found.index + 1}: ${event.kind} ${numberToText(event.x)}`;
}
