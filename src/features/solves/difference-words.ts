import { formatExact } from '../../lib/format.ts';
import type { PathRow } from './path-rows.ts';

export interface MarginNote {
  title: string;
  text: string;
}

const askedWord = { f: 'f', df: 'f′', d2f: 'f″', fdf: 'f and f′', step: 'a step' } as const;

/** What happens at the first difference, for the margin of that very row. */
export function firstDifferenceNote(rows: readonly PathRow[], index: number): MarginNote {
  const row = rows[index];
  const { reference = null, candidate = null } = row ?? {};
  const number = candidate?.number ?? reference?.number ?? 0;
  const title = `First difference: evaluation ${number}.`;
  if (candidate !== null && reference === null) return { title, text: candidateAlone(rows, index) };
  if (candidate === null && reference !== null) {
    const isEnd = rows.slice(index).every((later) => later.candidate === null);
    if (isEnd) return { title, text: 'The candidate stops here; the reference goes on.' };
    if (reference.again !== null) {
      return {
        title,
        text: `The reference asks again at the x of its evaluation ${reference.again}; the candidate does not.`,
      };
    }
    return { title, text: `Only the reference asks for ${askedWord[reference.event.kind]} at this x.` };
  }
  if (candidate !== null && reference !== null) {
    if (Object.is(candidate.event.x, reference.event.x)) {
      return {
        title,
        text: 'The same question was answered differently: the arithmetic of the two runs differs.',
      };
    }
    return {
      title,
      text: 'The same step, but the last places of x differ: another arrangement of the formula, or other roundings.',
    };
  }
  return { title, text: '' };
}

function candidateAlone(rows: readonly PathRow[], index: number): string {
  const line = rows[index]?.candidate;
  if (line === null || line === undefined) return '';
  if (line.again !== null) {
    return `The reference goes on to a new x. The candidate asks at ${formatExact(line.event.x)} again, which it has had since evaluation ${line.again}.`;
  }
  const isEnd = rows.slice(index).every((later) => later.reference === null);
  if (isEnd) return 'The reference stops here; the candidate goes on.';
  return `Only the candidate asks for ${askedWord[line.event.kind]} at this x.`;
}
