import type { AllowanceSet, Allowances } from '../../shared/schemas/allowances.ts';
import { formatFigure } from './format.ts';

export interface AllowanceLine {
  term: string;
  text: string;
}

const pairs = (limit: number | null, none: string): string =>
  limit === null
    ? 'no limit'
    : limit === 0
      ? none
      : `at most ${formatFigure(limit)} pair${limit === 1 ? '' : 's'}`;

/** What a team tolerates, one line a term. */
export function allowanceLines(base: Allowances): AllowanceLine[] {
  const total =
    base.totalPercent === null
      ? 'of a solver, no limit in total'
      : `of a solver, at most +${base.totalPercent}\u202f% in total`;
  const single =
    base.caseEvaluations === null ? 'on one case, no limit' : `on one case, at most +${base.caseEvaluations}`;
  return [
    { term: 'broke', text: pairs(base.broke, 'none') },
    { term: 'root moved', text: pairs(base.rootMoved, 'none') },
    { term: 'unsteady', text: pairs(base.unsteady, 'none') },
    { term: 'evaluations', text: `${total}; ${single}` },
    {
      term: 'order',
      text:
        base.orderUnder === null
          ? 'no limit'
          : `not more than ${base.orderUnder} under the claim, where it can be told`,
    },
    {
      term: 'accuracy',
      text:
        base.digits === null
          ? 'no limit'
          : `not more than ${base.digits} digits fewer, unless the case cannot give them`,
    },
  ];
}

/** Exceptions for solvers and traits, as lines under the others. */
export function exceptionLines(set: AllowanceSet): AllowanceLine[] {
  const say = (kind: string, entries: Record<string, Partial<Allowances>>): AllowanceLine[] =>
    Object.entries(entries).map(([name, limits]) => ({
      term: `${kind} ${name}`,
      text: Object.entries(limits)
        .map(([limit, value]) => `${exceptionNames[limit] ?? limit} ${value === null ? 'no limit' : value}`)
        .join('; '),
    }));
  return [...say('solver', set.solvers), ...say('trait', set.traits)];
}

const exceptionNames: Record<string, string> = {
  broke: 'broke',
  rootMoved: 'root moved',
  unsteady: 'unsteady',
  totalPercent: 'evaluations in total, percent',
  caseEvaluations: 'evaluations on one case',
  orderUnder: 'order under the claim',
  digits: 'digits fewer',
};

/** All of it in one sentence, for the margin. */
export function allowanceSummary(number: number, base: Allowances): string {
  const parts = [
    base.broke === null ? '' : base.broke === 0 ? 'no broke' : `broke at most ${base.broke}`,
    base.totalPercent === null ? '' : `evaluations of a solver +${base.totalPercent}\u202f%`,
    base.caseEvaluations === null ? '' : `one case +${base.caseEvaluations}`,
  ].filter((part) => part !== '');
  const name = number === 0 ? 'The product’s own allowances' : `Allowances ${number}`;
  return `${name}: ${parts.join('; ')}.`;
}
