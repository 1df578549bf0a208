import { askedAgain, badClauses, type Clause, goodClauses, repeatedCause } from './clauses.ts';
import type { Comparison, FindingCount, SolverTotals } from './comparison.ts';
import { list, name, paragraph, plainText, type RichText, say } from './rich-text.ts';

import { hasChange } from './verdict.ts';

export interface ComparisonText {
  /** One sentence that says what was found, gravest first. */
  verdict: RichText;
  /** What else there is to say, sentence by sentence. */
  lead: RichText[];
  /** Both as text without marks. */
  plain: string;
}

/** The most statements in the verdict sentence; the others go to the lead. */
const mostClauses = 2;

/** The head of a comparison in words. */
export function describeComparison(comparison: Comparison): ComparisonText {
  const bad = badClauses(comparison);
  const good = goodClauses(comparison);
  const { verdict, rest } = headOf(comparison, bad, good);
  const lead = [
    ...reasonsFor(comparison),
    ...rest.map(({ text }) => say`${text}.`),
    ...inReturn(bad.length > 0, good),
    ...repeatsToo(comparison),
    ...unchangedSolvers(comparison),
    ...comingAndGoing(comparison),
  ].filter((sentence) => plainText(sentence) !== plainText(verdict));
  return { verdict, lead, plain: plainText(paragraph([verdict, ...lead])) };
}

/** What to say where no comparison could be made at all: a build that failed, a run that never started. */
export function describeFailure(reason: string): ComparisonText {
  const verdict = say`Nothing was compared, and the reference stays as it is.`;
  const lead = [[{ text: reason }]];
  return { verdict, lead, plain: plainText(paragraph([verdict, ...lead])) };
}

/** The reasons that the verdict sentence has not given. */
function reasonsFor(comparison: Comparison): RichText[] {
  if (comparedCount(comparison) === 0) return comparison.reasons.slice(0, -1).map((text) => [{ text }]);
  const isSaid = (reason: string) => {
    return comparison.verdict === 'could not tell' && reason.startsWith('The candidate has no result');
  };
  return comparison.reasons.filter((reason) => !isSaid(reason)).map((text) => [{ text }]);
}

function headOf(
  comparison: Comparison,
  bad: readonly Clause[],
  good: readonly Clause[],
): { verdict: RichText; rest: Clause[] } {
  const compared = comparedCount(comparison);
  if (compared === 0 && comparison.verdict === 'could not tell') {
    const reason = comparison.reasons.at(-1) ?? 'There was nothing to compare.';
    return { verdict: say`Nothing could be compared. ${reason}`, rest: [] };
  }
  if (comparison.verdict === 'could not tell') return { verdict: openVerdict(comparison), rest: [...bad] };
  if (bad.length > 0) {
    const { text, rest } = join(bad);
    if (comparison.verdict === 'beyond allowances') return { verdict: say`${text}.`, rest };
    const what = bad.length === 1 ? 'it' : bad.length === 2 ? 'both' : 'all of it';
    return { verdict: say`${text}; the allowances permit ${what}.`, rest };
  }
  if (good.length > 0) return { verdict: say`${join(good).text}; nothing got worse.`, rest: [] };
  return { verdict: quietVerdict(comparison, compared), rest: [] };
}

/** Two statements in one sentence: the one with a colon in it last, and alone where both have one. */
function join(clauses: readonly Clause[]): { text: RichText; rest: Clause[] } {
  const [first, second] = clauses;
  if (first === undefined) return { text: [], rest: [] };
  if (second === undefined || first.isLong) return { text: first.text, rest: clauses.slice(1) };
  return { text: say`${first.text}, and ${after(first, second)}`, rest: clauses.slice(mostClauses) };
}

/** The second of two statements; its subject is `it` where the first has the same. */
function after(first: Clause, second: Clause): RichText {
  const [subject, ...rest] = second.text;
  const isSame = subject?.strong === true && subject.text === first.text[0]?.text;
  return isSame ? [{ text: 'it' }, ...rest] : second.text;
}

function openVerdict(comparison: Comparison): RichText {
  const missing = comparison.notCompared.filter((one) => one.reason === 'not run').length;
  const all = comparedCount(comparison) + missing;
  return say`The candidate has no result for ${missing} of ${all} solves, so it could not be told whether it is as good as the reference.`;
}

/** Nothing better and nothing worse. */
function quietVerdict(comparison: Comparison, compared: number): RichText {
  const drifted = comparison.changes.drifted ?? 0;
  if (drifted > 0) return driftedVerdict(comparison, drifted, compared);
  const isWhole = comparison.pairs.length === compared && comparison.notCompared.length === 0;
  const solves = compared === 1 ? say`the one solve` : say`all ${compared} solves`;
  const which = isWhole ? solves : say`${solves} that could be compared`;
  if (!comparison.exact) {
    return say`Outcome and cost are the same in ${which}; different arithmetic does not let them be compared to the last bit.`;
  }
  return compared === 1
    ? say`Nothing changed: ${which} is the same to the last bit.`
    : say`Nothing changed: ${which} are the same to the last bit.`;
}

function driftedVerdict({ totals, overall, pairs }: Comparison, drifted: number, compared: number): RichText {
  const own = totals.filter((one) => (one.changes.drifted ?? 0) > 0);
  const [only] = own;
  const isFree = pairs.every((pair) => pair.change !== 'drifted' || pair.difference === 0);
  const cost = isFree
    ? say` at the same cost`
    : overall.pairs > 0
      ? say`, at the same cost where it is compared`
      : say``;
  const rest = drifted === compared ? say`` : say`; everything else is the same to the last bit`;
  if (own.length === 1 && only !== undefined) {
    const of = only.candidate.of;
    const where =
      of === 1
        ? say`its one solve`
        : drifted === of
          ? say`all its ${of} solves`
          : say`${drifted} of its ${of} solves`;
    return say`${name(only.solver)} takes another path in ${where}${cost}${rest}.`;
  }
  return say`${own.length} solvers take another path in ${drifted} of ${compared} solves${cost}${rest}.`;
}

function inReturn(isBad: boolean, good: readonly Clause[]): RichText[] {
  if (!isBad) return good.slice(mostClauses).map(({ text }) => say`${text}.`);
  return good.map(({ text }, i) => (i === 0 ? say`In return, ${text}.` : say`${text}.`));
}

/** Solvers that ask again at an x they have in most solves, where no statement about cost has named it. */
function repeatsToo({ totals, pairs }: Comparison): RichText[] {
  const costlier = new Set(pairs.filter((pair) => hasChange(pair, 'costlier')).map((pair) => pair.solver));
  return totals.flatMap((one): RichText[] => {
    const { reference, candidate } = one.findings.repeated;
    const isNamed = costlier.has(one.solver) && repeatedCause(one) !== null;
    if (candidate.solves * 2 <= candidate.of || isNamed || one.presence === 'gone') return [];
    const count = candidate.solves === candidate.of ? say`all` : say`${candidate.solves} of`;
    const where = candidate.of === 1 ? say`` : say` in ${count} its ${candidate.of} solves`;
    return [
      say`${name(one.solver)} ${askedAgain(one.uses)}${where}${beside(one.presence, reference, candidate)}.`,
    ];
  });
}

function beside(
  presence: SolverTotals['presence'],
  reference: FindingCount,
  candidate: FindingCount,
): RichText {
  if (presence === 'new') return [];
  if (reference.evaluations === 0) return say`, which the reference never does`;
  if (reference.evaluations === candidate.evaluations) return say`, as the reference does`;
  return say`, ${candidate.evaluations} times in all (reference: ${reference.evaluations})`;
}

/** Which solvers did not change, where others did. */
function unchangedSolvers({ totals, exact, changes }: Comparison): RichText[] {
  const compared = totals.filter((one) => one.presence === 'both');
  const only = (one: SolverTotals, words: readonly string[]) =>
    Object.keys(one.changes).every((word) => words.includes(word));
  const same = compared.filter((one) => only(one, ['same']));
  const drifted = compared.filter((one) => only(one, ['same', 'drifted']) && !same.includes(one));
  // The verdict sentence has said it then.
  const loud = Object.keys(changes).filter((word) => !['same', 'drifted', 'new', 'gone'].includes(word));
  if (loud.length === 0) return [];
  const sentences: RichText[] = [];
  if (same.length > 0 && exact) {
    const names = list(same.map((one) => name(one.solver)));
    sentences.push(
      same.length === 1
        ? say`${names} is the same to the last bit.`
        : say`${names} are the same to the last bit.`,
    );
  }
  if (drifted.length > 0) {
    const names = list(drifted.map((one) => name(one.solver)));
    sentences.push(
      drifted.length === 1
        ? say`${names} takes another path in some solves, without a change in cost.`
        : say`${names} take other paths in some solves, without a change in cost.`,
    );
  }
  return sentences;
}

/** New and gone solvers and cases, and renamed ones. */
function comingAndGoing(comparison: Comparison): RichText[] {
  const { totals, pairs } = comparison;
  if (comparedCount(comparison) === 0) return [];
  const sentences: RichText[] = [];
  const fresh = totals.filter((one) => one.presence === 'new');
  const gone = totals.filter((one) => one.presence === 'gone');
  if (fresh.length > 0) {
    const names = list(fresh.map((one) => name(one.solver)));
    const solved = fresh.reduce((sum, one) => sum + one.candidate.solved, 0);
    const of = fresh.reduce((sum, one) => sum + one.candidate.of, 0);
    sentences.push(
      fresh.length === 1
        ? say`${names} is new and solves ${solved} of ${of}.`
        : say`${names} are new and solve ${solved} of ${of}.`,
    );
  }
  if (gone.length > 0) {
    const names = list(gone.map((one) => name(one.solver)));
    sentences.push(gone.length === 1 ? say`${names} is gone.` : say`${names} are gone.`);
  }
  for (const { solver, formerly } of totals) {
    if (formerly !== null) sentences.push(say`${name(solver)} was called ${name(formerly)}.`);
  }
  const apart = new Set([...fresh, ...gone].map((one) => one.solver));
  const alone = pairs.filter((pair) => !apart.has(pair.solver));
  const newOnes = alone.filter((pair) => pair.change === 'new').length;
  const goneOnes = alone.filter((pair) => pair.change === 'gone').length;
  if (newOnes > 0) sentences.push(newOnes === 1 ? say`One solve is new.` : say`${newOnes} solves are new.`);
  if (goneOnes > 0)
    sentences.push(goneOnes === 1 ? say`One solve is gone.` : say`${goneOnes} solves are gone.`);
  return sentences;
}

function comparedCount({ pairs }: Comparison): number {
  return pairs.filter((pair) => pair.reference !== null && pair.candidate !== null).length;
}
