import {
  type AllowanceSet,
  type Allowances,
  allowanceException,
  allowances,
} from '../../../shared/schemas/allowances.ts';

export type AllowanceName = keyof Allowances;

export interface LimitWords {
  name: AllowanceName;
  label: string;
  /** What its figure counts. */
  unit: string;
  isWhole: boolean;
}

/** Every limit, in the order of the schema, with the words of its field. */
export const limits: readonly LimitWords[] = [
  { name: 'broke', label: 'broke', unit: 'pairs', isWhole: true },
  { name: 'rootMoved', label: 'root moved', unit: 'pairs', isWhole: true },
  { name: 'unsteady', label: 'unsteady', unit: 'pairs', isWhole: true },
  { name: 'totalPercent', label: 'in total', unit: '% more', isWhole: false },
  { name: 'caseEvaluations', label: 'on one case', unit: 'evaluations more', isWhole: true },
  { name: 'orderUnder', label: 'order', unit: 'under the claim', isWhole: false },
  { name: 'digits', label: 'accuracy', unit: 'digits fewer', isWhole: false },
];

/** What is written in the field of a limit that does not hold. */
export const noLimit = 'no limit';

export type LimitTexts = Record<AllowanceName, string>;

export interface ExceptionDraft {
  kind: 'solver' | 'trait';
  name: string;
  /** An empty text: as for all. */
  texts: LimitTexts;
}

/** Allowances as they stand in the fields of a form. */
export interface AllowanceDraft {
  base: LimitTexts;
  exceptions: ExceptionDraft[];
}

const write = (limit: number | null | undefined): string =>
  limit === undefined ? '' : limit === null ? noLimit : String(limit);

export function writeLimits(given: Partial<Allowances>): LimitTexts {
  const { broke, rootMoved, unsteady, totalPercent, caseEvaluations, orderUnder, digits } = given;
  return {
    broke: write(broke),
    rootMoved: write(rootMoved),
    unsteady: write(unsteady),
    totalPercent: write(totalPercent),
    caseEvaluations: write(caseEvaluations),
    orderUnder: write(orderUnder),
    digits: write(digits),
  };
}

export function draftOf(set: AllowanceSet): AllowanceDraft {
  const exceptions = (kind: ExceptionDraft['kind'], given: AllowanceSet['solvers']): ExceptionDraft[] =>
    Object.entries(given).map(([name, part]) => ({ kind, name, texts: writeLimits(part) }));
  return {
    base: writeLimits(set.base),
    exceptions: [...exceptions('solver', set.solvers), ...exceptions('trait', set.traits)],
  };
}

type Read = { kind: 'limit'; limit: number | null } | { kind: 'empty' } | { kind: 'wrong'; why: string };

/** A figure from 0 on, with point or comma; `no limit`; or nothing. */
export function readLimit(text: string, isWhole: boolean): Read {
  const written = text.trim().toLowerCase();
  if (written === '') return { kind: 'empty' };
  if (written === noLimit) return { kind: 'limit', limit: null };
  const figure = written.replace(',', '.');
  if (!/^(\d+\.?\d*|\.\d+)$/.test(figure))
    return { kind: 'wrong', why: `A figure from 0 on, or “${noLimit}”.` };
  if (isWhole && !/^\d+$/.test(figure))
    return { kind: 'wrong', why: 'A whole number, since pairs or evaluations are counted.' };
  const limit = Number(figure);
  return Number.isFinite(limit) && limit <= Number.MAX_SAFE_INTEGER
    ? { kind: 'limit', limit }
    : { kind: 'wrong', why: 'That is too large to be a limit.' };
}

export type ReadDraft =
  | { set: AllowanceSet; problems: null }
  /** Sentences by field: `base.broke`, `exception.0.digits`, `exception.0`. */
  | { set: null; problems: Record<string, string> };

function readTexts(texts: LimitTexts, at: string, problems: Record<string, string>): Partial<Allowances> {
  const found: [AllowanceName, number | null][] = [];
  for (const { name, isWhole } of limits) {
    const read = readLimit(texts[name], isWhole);
    if (read.kind === 'limit') found.push([name, read.limit]);
    if (read.kind === 'wrong') problems[`${at}.${name}`] = read.why;
  }
  return allowanceException.parse(Object.fromEntries(found));
}

/** What the fields say, or what is wrong in which of them. */
export function readDraft(draft: AllowanceDraft): ReadDraft {
  const problems: Record<string, string> = {};
  const base = readTexts(draft.base, 'base', problems);
  for (const { name } of limits)
    if (draft.base[name].trim() === '') problems[`base.${name}`] = `A figure, or “${noLimit}”.`;
  const solvers: AllowanceSet['solvers'] = {};
  const traits: AllowanceSet['traits'] = {};
  draft.exceptions.forEach(({ kind, name, texts }, index) => {
    const part = readTexts(texts, `exception.${index}`, problems);
    const place = kind === 'solver' ? solvers : traits;
    if (Object.hasOwn(place, name))
      problems[`exception.${index}`] = `There are two exceptions for ${kind} ${name}.`;
    else if (texts && limits.every((limit) => texts[limit.name].trim() === ''))
      problems[`exception.${index}`] = 'It says nothing: write a limit or take it out.';
    place[name] = part;
  });
  if (Object.keys(problems).length > 0) return { set: null, problems };
  return { set: { base: allowances.parse(base), solvers, traits }, problems: null };
}
