import type { Change } from '../schemas/words.ts';
import type { Comparison, Pair, SolverTotals } from './comparison.ts';
import { fixed, fromTo, list, name, percent, type RichText, type Span, say } from './rich-text.ts';
import { hasChange } from './verdict.ts';

/** A complete statement without its full stop; `isLong` where it holds a colon, and so must come last. */
export interface Clause {
  text: RichText;
  isLong: boolean;
}

/** Totals over fewer solves than this say over how many they run. */
const few = 6;
/** As many names as a sentence bears. */
const mostNames = 3;

/** The bad findings, gravest first, each a statement about one solver, or about several where there are many. */
export function badClauses(comparison: Comparison): Clause[] {
  return [
    ...perSolver(comparison, 'broke', broke, 'no longer solve what they solved'),
    ...perSolver(comparison, 'root moved', rootMoved, 'now end at other roots'),
    ...perSolver(comparison, 'order lost', orderLost, 'lost their order'),
    ...perSolver(comparison, 'less accurate', lessAccurate, 'are less accurate'),
    ...costlier(comparison),
    ...perSolver(comparison, 'unsteady', unsteady, 'do not repeat themselves'),
  ];
}

/** The good findings, in the mirrored order. */
export function goodClauses(comparison: Comparison): Clause[] {
  return [
    ...perSolver(comparison, 'mended', mended, 'solve what they did not solve before'),
    ...perSolver(comparison, 'order gained', orderGained, 'gained order'),
    ...perSolver(comparison, 'more accurate', moreAccurate, 'are more accurate'),
    ...perSolver(comparison, 'cheaper', cheaper, 'are cheaper'),
  ];
}

interface Finding {
  solver: Span;
  totals: SolverTotals;
  /** The pairs concerned, the worst first. */
  pairs: Pair[];
  first: Pair;
  where: RichText;
  /** The same in a list of several solvers. */
  briefly: RichText;
}

/** Pairs with a change, be it their gravest or not, by solver; from four solvers on one statement for all. */
function perSolver(
  comparison: Comparison,
  change: Change,
  clause: (finding: Finding) => RichText,
  plural: string,
): Clause[] {
  const findings = findingsOf(comparison, change);
  if (findings.length <= mostNames) return findings.map((one) => ({ text: clause(one), isLong: false }));
  const shown = findings.slice(0, mostNames).map(({ solver, briefly }) => say`${solver} on ${briefly}`);
  const rest = findings.length - mostNames;
  const text = say`${findings.length} solvers ${plural}: ${list([...shown, say`${rest} others`])}`;
  return [{ text, isLong: true }];
}

function findingsOf(comparison: Comparison, change: Change): Finding[] {
  const starts = new Map<string, number>();
  for (const { solver, case: id } of comparison.pairs) {
    const key = `${solver}\u0000${id}`;
    starts.set(key, (starts.get(key) ?? 0) + 1);
  }
  const found = new Map<string, Pair[]>();
  for (const pair of comparison.pairs) {
    if (!hasChange(pair, change)) continue;
    const own = found.get(pair.solver);
    if (own === undefined) found.set(pair.solver, [pair]);
    else own.push(pair);
  }
  return comparison.totals.flatMap((totals): Finding[] => {
    const pairs = found.get(totals.solver)?.toSorted(byWeight);
    const first = pairs?.[0];
    if (pairs === undefined || first === undefined) return [];
    const names = pairs.map((pair) => {
      const isOneOfMany = (starts.get(`${pair.solver}\u0000${pair.case}`) ?? 0) > 1 && pair.start !== null;
      return isOneOfMany
        ? say`${name(pair.case)} from its start ${(pair.start ?? 0) + 1}`
        : [name(pair.case)];
    });
    const where =
      names.length <= mostNames ? list(names) : say`${names.length} cases, among them ${names[0] ?? []}`;
    const briefly = names.length === 1 ? where : say`${names.length} cases`;
    return [{ solver: name(totals.solver), totals, pairs, first, where, briefly }];
  });
}

/** What weighs most first: by evaluations, then by digits; where nothing is compared the order stays. */
function byWeight(a: Pair, b: Pair): number {
  return (
    Math.abs(b.difference ?? 0) - Math.abs(a.difference ?? 0) ||
    Math.abs(b.digits ?? 0) - Math.abs(a.digits ?? 0)
  );
}

function broke({ solver, pairs, where }: Finding): RichText {
  const all = (outcome: string) => pairs.every((pair) => pair.candidate?.outcome === outcome);
  const hadNoRoot = pairs.every((pair) => pair.reference?.outcome === 'refused');
  if (hadNoRoot) return say`${solver} no longer refuses ${where}, where there is no root`;
  if (all('false claim')) return say`${solver} now claims a false root on ${where}`;
  if (all('crashed')) return say`${solver} now crashes on ${where}`;
  if (all('other root')) return say`${solver} now ends at a root that is not asked for on ${where}`;
  return say`${solver} no longer solves ${where}`;
}

function rootMoved({ solver, where }: Finding): RichText {
  return say`${solver} now ends at another root on ${where}`;
}

function orderLost({ solver, first, where, pairs }: Finding): RichText {
  return say`${solver} lost its order on ${where} (${orders(first, pairs)})`;
}

function orderGained({ solver, first, where, pairs }: Finding): RichText {
  return say`${solver} gained order on ${where} (${orders(first, pairs)})`;
}

function orders(first: Pair, pairs: readonly Pair[]): RichText {
  const [from, to] = [first.reference?.order.value ?? null, first.candidate?.order.value ?? null];
  if (from === null || to === null) return say`not known`;
  // One case, or many of which the first has just been named.
  const isClear = pairs.length === 1 || pairs.length > mostNames;
  return isClear ? fromTo(from, to, 2) : say`${fromTo(from, to, 2)} on ${name(first.case)}`;
}

function lessAccurate({ solver, where, pairs }: Finding): RichText {
  const most = fixed(Math.max(...pairs.map((pair) => -(pair.digits ?? 0))), 1);
  if (pairs.length === 1) return say`${solver} ends with ${most} digits fewer on ${where}`;
  return say`${solver} ends with up to ${most} digits fewer on ${where}`;
}

function moreAccurate({ solver, where, pairs }: Finding): RichText {
  const most = fixed(Math.max(...pairs.map((pair) => pair.digits ?? 0)), 1);
  if (pairs.length === 1) return say`${solver} ends with ${most} digits more on ${where}`;
  return say`${solver} ends with up to ${most} digits more on ${where}`;
}

function unsteady({ solver, where }: Finding): RichText {
  return say`${solver} does not repeat itself on ${where}`;
}

function mended({ solver, where, pairs }: Finding): RichText {
  const isRefusal = pairs.every((pair) => pair.candidate?.outcome === 'refused');
  return isRefusal
    ? say`${solver} now rightly refuses ${where}`
    : say`${solver} now solves ${where}, where the reference does not`;
}

function cheaper({ solver, totals, pairs, where }: Finding): RichText {
  const change = totals.evaluations.percent;
  if (change !== null && change < 0 && pairs.length > mostNames) {
    return say`${solver} needs ${percent(-change)} fewer evaluations${over(totals)}`;
  }
  const costs = pairs.slice(0, mostNames).map((pair) => {
    const [from, to] = [pair.reference?.evaluations ?? 0, pair.candidate?.evaluations ?? 0];
    return say`${name(pair.case)} ${fromTo(from, to)}`;
  });
  if (pairs.length === 1) {
    const [from, to] = [pairs[0]?.reference?.evaluations ?? 0, pairs[0]?.candidate?.evaluations ?? 0];
    return say`${solver} is cheaper on ${where} (${fromTo(from, to)})`;
  }
  const rest = pairs.length - costs.length;
  const shown = rest > 0 ? [...costs, say`${rest} more`] : costs;
  return say`${solver} is cheaper on ${pairs.length} cases (${list(shown)})`;
}

function costlier(comparison: Comparison): Clause[] {
  const findings = findingsOf(comparison, 'costlier');
  const total = (one: Finding) => one.totals.evaluations.percent ?? Number.POSITIVE_INFINITY;
  findings.sort((a, b) => total(b) - total(a));
  if (findings.length > mostNames) return [costlierTogether(findings)];
  return findings.map((one): Clause => {
    const cost = costlierOne(one);
    const cause = repeatedCause(one.totals);
    return cause === null ? { text: cost, isLong: false } : { text: say`${cost}: ${cause}`, isLong: true };
  });
}

function costlierOne({ solver, totals, pairs, first, where }: Finding): RichText {
  const change = totals.evaluations.percent;
  if (change !== null && change > 0 && (pairs.length > 1 || totals.pairs === 1)) {
    return say`${solver} needs ${percent(change)} more evaluations${over(totals)}`;
  }
  const more = first.difference ?? 0;
  if (pairs.length === 1) {
    return say`${solver} needs ${more} more ${more === 1 ? 'evaluation' : 'evaluations'} on ${where}`;
  }
  return say`${solver} needs more evaluations on ${where}, up to ${more} more`;
}

function costlierTogether(findings: readonly Finding[]): Clause {
  const shown = findings.slice(0, mostNames).map(({ solver, totals, pairs }) => {
    const change = totals.evaluations.percent;
    if (change !== null && change > 0) return say`${solver} ${percent(change)}`;
    return say`${solver} on ${pairs.length} of its solves`;
  });
  const rest = findings.length - mostNames;
  const repeating = findings.filter((one) => repeatedCause(one.totals) !== null).length;
  const who = repeating === findings.length ? say`all` : say`${repeating}`;
  const cause = repeating === 0 ? [] : say`; ${who} of them ask again at an x they already have`;
  return {
    text: say`${findings.length} solvers need more evaluations: ${list([...shown, say`${rest} others`])}${cause}`,
    isLong: true,
  };
}

function over(totals: SolverTotals): RichText {
  if (totals.pairs >= few) return [];
  return totals.pairs === 1
    ? say` on the one solve that both complete`
    : say` over the ${totals.pairs} solves that both complete`;
}

/**
 * The classic lost stored value, named where it is new: in more than half of the candidate's solves, and more
 * often than in the reference's. null else.
 */
export function repeatedCause({ findings: { repeated }, uses }: SolverTotals): RichText | null {
  const { reference, candidate } = repeated;
  if (candidate.solves * 2 <= candidate.of || candidate.evaluations <= reference.evaluations) return null;
  const what = askedAgain(uses);
  const where = inSolves(candidate);
  if (reference.solves === 0) return say`${where}it ${what}`;
  return say`${where}it ${what}, ${candidate.evaluations} times in all (reference: ${reference.evaluations})`;
}

/** `asks for f again at an x it already has`; more than f may be asked for: without saying what. */
export function askedAgain(uses: readonly string[]): RichText {
  return uses.length === 1 && uses[0] === 'f'
    ? say`asks for f again at an x it already has`
    : say`asks again at an x it already has`;
}

function inSolves({ solves, of }: { solves: number; of: number }): RichText {
  if (of === 1) return [];
  if (solves === of) return of === 2 ? say`in both of its solves ` : say`in all ${of} of its solves `;
  return say`in ${solves} of its ${of} solves `;
}
