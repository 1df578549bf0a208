import type { Verdict } from '../../../shared/schemas/words.ts';

export interface VerdictSignProps {
  verdict: Verdict;
  size?: number;
  /** Take the colour of the text around. */
  isPlain?: boolean;
}

export const verdictColour: Record<Verdict, string> = {
  'within allowances': 'text-better',
  'beyond allowances': 'text-worse',
  'could not tell': 'text-other',
};

/** Two posts and a dot: between them, outside them, or posts dashed and a ring. Stands beside its word. */
export function VerdictSign({ verdict, size = 20, isPlain = false }: VerdictSignProps) {
  return (
    <svg
      className={`inline-block flex-none ${isPlain ? '' : verdictColour[verdict]}`}
      width={size}
      height={size}
      viewBox="0 0 20 20"
      data-verdict={verdict}
      aria-hidden="true"
    >
      {verdict === 'within allowances' && (
        <>
          <path d="M3.5 2.5v15M16.5 2.5v15" stroke="currentColor" strokeWidth={1.8} />
          <circle cx={10} cy={10} r={3.4} fill="currentColor" />
        </>
      )}
      {verdict === 'beyond allowances' && (
        <>
          <path d="M2 2.5v15M10.5 2.5v15" stroke="currentColor" strokeWidth={1.8} />
          <circle cx={16.2} cy={10} r={3.4} fill="currentColor" />
        </>
      )}
      {verdict === 'could not tell' && (
        <>
          <path
            d="M3.5 2.5v15M16.5 2.5v15"
            stroke="currentColor"
            strokeWidth={1.8}
            strokeDasharray="2.5 2.5"
          />
          <circle cx={10} cy={10} r={2.9} fill="none" stroke="currentColor" strokeWidth={1.6} />
        </>
      )}
    </svg>
  );
}
