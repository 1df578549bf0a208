import { gravity } from './change.ts';
import type { AllowanceName, Breach, Comparison, Pair, Scope } from './comparison.ts';
import { hasChange } from './verdict.ts';

/** `secant on sqrt-2, start 2`: the start is named where a solver takes one. */
export function caseAndStart(pair: { case: string; start: number | null }): string {
  return pair.start === null ? pair.case : `${pair.case}, start ${pair.start + 1}`;
}

/** Changed pairs, gravest first, then by evaluations and digits; `same` left out. The order else stays. */
export function changedPairs(pairs: readonly Pair[]): Pair[] {
  const place = new Map(gravity.map((change, index) => [change, index]));
  const size = (value: number | null): number => Math.abs(value ?? 0);
  return pairs
    .filter((pair) => pair.change !== 'same')
    .toSorted(
      (a, b) =>
        (place.get(a.change) ?? 0) - (place.get(b.change) ?? 0) ||
        size(b.difference) - size(a.difference) ||
        size(b.digits) - size(a.digits),
    );
}

const few = (count: number | null, one: string, many: string): string =>
  count === 1 ? `1 ${one}` : `${figure(count)} ${many}`;

/** A figure to three decimals at most, with a true minus; a dash where it could not be told. */
function figure(value: number | null): string {
  return value === null ? '–' : String(Number(value.toFixed(3))).replace('-', '−');
}

const allowed = (limit: number): string => (limit === 0 ? 'none' : figure(limit));

const breachPatterns: Record<AllowanceName, (found: number | null, limit: number) => string> = {
  broke: (found, limit) => `${few(found, 'pair', 'pairs')} broke; ${allowed(limit)} may`,
  rootMoved: (found, limit) =>
    `${few(found, 'pair ends', 'pairs end')} at another root; ${allowed(limit)} may`,
  unsteady: (found, limit) =>
    `${few(found, 'pair does', 'pairs do')} not repeat to the last bit; ${allowed(limit)} may`,
  totalPercent: (found, limit) =>
    found === null
      ? `evaluations in total rose from 0; at most ${figure(limit)} % more is allowed`
      : `evaluations in total rose by ${figure(found)} %; at most ${figure(limit)} % is allowed`,
  caseEvaluations: (found, limit) =>
    `${few(found, 'evaluation', 'evaluations')} more on one case; at most ${figure(limit)} is allowed`,
  orderUnder: (found, limit) =>
    `the order lies ${figure(found)} under what is expected; at most ${figure(limit)} is allowed`,
  digits: (found, limit) =>
    `${few(found, 'correct digit', 'correct digits')} fewer; at most ${figure(limit)} is allowed`,
};

/** What a breach found and what is allowed, without what it holds for and without a full stop. */
export function breachText({ allowance, figure: found, limit }: Breach): string {
  return breachPatterns[allowance](found, limit);
}

/** `solver secant`, `cases with the trait flat`; null where the limit holds for everything. */
export function scopeText({ solver, trait }: Scope): string | null {
  if (solver !== null) return `solver ${solver}`;
  return trait === null ? null : `cases with the trait ${trait}`;
}

/**
 * The breaches that each pair is part of, by the pair's key. A breach of a solver's total names every pair that
 * both solved; part of it are those that became costlier, since the others did not add to it.
 */
export function breachesByPair({ breaches, pairs }: Comparison): Map<string, Breach[]> {
  const known = new Map(pairs.map((pair) => [pair.key, pair]));
  const byPair = new Map<string, Breach[]>();
  for (const breach of breaches) {
    for (const key of breach.pairs) {
      const pair = known.get(key);
      if (pair === undefined || (breach.allowance === 'totalPercent' && !isCostlier(pair))) continue;
      const own = byPair.get(key);
      if (own === undefined) byPair.set(key, [breach]);
      else own.push(breach);
    }
  }
  return byPair;
}

function isCostlier(pair: Pair): boolean {
  return hasChange(pair, 'costlier') || (pair.difference ?? 0) > 0;
}
