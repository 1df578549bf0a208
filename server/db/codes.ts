import type { OrderEstimate, OrderStatus, SolveRecord } from '../../shared/schemas/solve.ts';
import type { Outcome } from '../../shared/schemas/words.ts';

/**
 * Words that are stored as small integers, because there are millions of solves. A code that was once
 * given is never given to another word; new words take the next free number.
 */
export const outcomeCode: Record<Outcome, number> = {
  solved: 1,
  'other root': 2,
  refused: 3,
  'false claim': 4,
  'over budget': 5,
  'timed out': 6,
  crashed: 7,
  garbled: 8,
  'not applicable': 9,
};

export const orderStatusCode: Record<OrderStatus, number> = {
  estimated: 1,
  linear: 2,
  'one ratio': 3,
  'superlinear of order 1': 4,
  'sublinear or very slow linear': 5,
  'superlinear, order not resolved': 6,
  undecided: 7,
  'not enough steps': 8,
  stagnation: 9,
  'stopped moving': 10,
  cycle: 11,
  diverged: 12,
  'left the domain': 13,
  'no root to measure against': 14,
};

export const orderKindCode: Record<NonNullable<OrderEstimate['kind']>, number> = {
  Q: 1,
  memory: 2,
  R: 3,
  'one ratio': 4,
};

export const iterationsFromCode: Record<NonNullable<SolveRecord['iterationsFrom']>, number> = {
  reported: 1,
  counted: 2,
};

/** Turns a table of codes round; the result throws on a code that no word has. */
export function wordOf<Word extends string>(codes: Record<Word, number>): (code: number) => Word {
  const words: (Word | undefined)[] = [];
  for (const word in codes) words[codes[word]] = word;
  return (code) => {
    const word = words[code];
    if (word === undefined) throw new RangeError(`No word has the stored code ${code}`);
    return word;
  };
}
