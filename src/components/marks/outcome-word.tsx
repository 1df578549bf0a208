import type { Outcome } from '../../../shared/schemas/words.ts';

export interface OutcomeWordProps {
  outcome: Outcome;
  /** The case has no root: refusing is right. */
  isRightlyRefused?: boolean;
}

/** An outcome in words; only what went wrong is vermilion. */
export function OutcomeWord({ outcome, isRightlyRefused = false }: OutcomeWordProps) {
  if (isRightlyRefused) return <span>rightly refused</span>;
  const isQuiet = outcome === 'solved' || outcome === 'not applicable';
  return <span className={isQuiet ? 'text-ink-2' : 'text-worse'}>{outcome}</span>;
}
