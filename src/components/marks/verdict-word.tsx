import type { Verdict } from '../../../shared/schemas/words.ts';
import { VerdictSign, verdictColour } from './verdict-sign.tsx';

export interface VerdictWordProps {
  verdict: Verdict;
  /** In a column: `beyond` instead of `beyond allowances`. */
  isShort?: boolean;
}

const short: Record<Verdict, string> = {
  'within allowances': 'within',
  'beyond allowances': 'beyond',
  'could not tell': 'could not tell',
};

export function VerdictWord({ verdict, isShort = false }: VerdictWordProps) {
  return (
    <span
      className={`inline-flex items-center gap-1.5 whitespace-nowrap font-medium ${verdictColour[verdict]}`}
    >
      <VerdictSign verdict={verdict} size={isShort ? 16 : 20} />
      {isShort ? short[verdict] : verdict}
    </span>
  );
}
