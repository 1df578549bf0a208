import { careSentence } from '../guide/care.ts';
import type { SolveRecord } from '../schemas/solve.ts';
import type { Comparison, CostPair, Pair, SolverTotals } from './comparison.ts';
import { escapeMarkdown } from './export-escape.ts';
import { breachText, caseAndStart, changedPairs, scopeText } from './export-words.ts';
import { describePair } from './pair-sentence.ts';
import { plainText, type RichText } from './rich-text.ts';
import { describeComparison } from './sentences.ts';

/** As many changed pairs as a comment bears. */
export const mostChanges = 10;
const cellLength = 200;

/**
 * A comparison as Markdown with tables, for a comment: verdict sentence, breaches, totals of each solver, the
 * ten gravest changes, and the sentence about what results are. Whatever comes from outside is escaped; a line
 * never begins with it.
 */
export function exportMarkdown(comparison: Comparison): string {
  const words = describeComparison(comparison);
  const sides = `${escapeMarkdown(comparison.candidate)} against ${escapeMarkdown(comparison.reference)}`;
  const changed = changedPairs(comparison.pairs);
  const blocks = [
    `**${capital(comparison.verdict)}:** ${richText(words.verdict)}`,
    [`Compared: ${sides}.`, ...words.lead.map(richText)].join(' '),
    breachList(comparison),
    comparison.totals.length === 0 ? '' : totalsTable(comparison.totals),
    changed.length === 0 ? '' : changesTable(changed.slice(0, mostChanges)),
    restSentence(comparison, changed.length),
    `*${careSentence}*`,
  ];
  return `${blocks.filter((block) => block !== '').join('\n\n')}\n`;
}

/** Names strong, the rest as it is. */
function richText(rich: RichText): string {
  return rich
    .map(({ text, strong }) => {
      const safe = escapeMarkdown(text);
      // A name with blanks at its ends, or nothing but them, would leave the stars standing.
      return strong === true && safe !== '' && text.trim() === text ? `**${safe}**` : safe;
    })
    .join('');
}

function breachList({ breaches }: Comparison): string {
  if (breaches.length === 0) return '';
  const lines = breaches.map((breach) => {
    const scope = scopeText(breach.scope);
    return `- ${scope === null ? 'all' : escapeMarkdown(scope)}: ${breachText(breach)}`;
  });
  return ['Beyond the allowances:', '', ...lines].join('\n');
}

function totalsTable(totals: readonly SolverTotals[]): string {
  return table(
    ['solver', 'solved', 'evaluations, where both solved', 'more', 'a case', 'a family', 'order, median'],
    'lrrrrrr',
    totals.map((one) => [
      one.formerly === null ? one.solver : `${one.solver} (was ${one.formerly})`,
      solvedText(one),
      one.pairs === 0 ? '–' : `${one.evaluations.reference} → ${one.evaluations.candidate}`,
      percentText(one.evaluations),
      percentText(one.perCase),
      percentText(one.perFamily),
      orderText(one.order),
    ]),
  );
}

function changesTable(pairs: readonly Pair[]): string {
  return table(
    ['change', 'solver', 'case', 'evaluations', 'correct digits', 'what'],
    'lllrrl',
    pairs.map((pair) => [
      [pair.change, ...pair.others].join(', '),
      pair.solver,
      caseAndStart(pair),
      bothSides(pair, (solve) => String(solve.evaluations)),
      bothSides(pair, (solve) => solve.digits?.toFixed(1) ?? '–'),
      plainText(describePair(pair)),
    ]),
  );
}

function restSentence({ pairs }: Comparison, changed: number): string {
  const same = pairs.length - changed;
  const counted = same === 0 ? 'none is the same' : same === 1 ? '1 is the same' : `${same} are the same`;
  const rest = changed - mostChanges;
  if (rest <= 0) return `Of ${pairs.length} pairs in all, ${counted}.`;
  const others = rest === 1 ? 'one more changed' : `${rest} more changed`;
  return `Listed are the ${mostChanges} gravest changes; ${others}, and ${counted}.`;
}

function table(titles: readonly string[], sides: string, rows: readonly (readonly string[])[]): string {
  const line = (cells: readonly string[]): string => `| ${cells.join(' | ')} |`;
  const rule = [...sides].map((side) => (side === 'r' ? '---:' : ':---'));
  const body = rows.map((cells) => line(cells.map((cell) => escapeMarkdown(shortened(cell)))));
  return [line(titles), line(rule), ...body].join('\n');
}

function shortened(text: string): string {
  const characters = [...text];
  return characters.length <= cellLength ? text : `${characters.slice(0, cellLength - 1).join('')}…`;
}

function bothSides(pair: Pair, text: (solve: SolveRecord) => string): string {
  const side = (solve: SolveRecord | null): string => (solve === null ? '–' : text(solve));
  return `${side(pair.reference)} → ${side(pair.candidate)}`;
}

function solvedText({ presence, reference, candidate }: SolverTotals): string {
  const side = ({ solved, of }: SolverTotals['reference']): string => `${solved} of ${of}`;
  if (presence === 'new') return `– → ${side(candidate)}`;
  if (presence === 'gone') return `${side(reference)} → –`;
  return `${side(reference)} → ${side(candidate)}`;
}

function percentText({ percent }: CostPair): string {
  if (percent === null) return '–';
  const digits = Math.abs(percent).toFixed(1);
  if (percent === 0) return '0\u202f%';
  return `${percent > 0 ? '+' : '−'}${digits}\u202f%`;
}

function orderText({ reference, candidate }: SolverTotals['order']): string {
  if (reference.median === null && candidate.median === null) return 'too few steps';
  return `${reference.median?.toFixed(2) ?? '–'} → ${candidate.median?.toFixed(2) ?? '–'}`;
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
