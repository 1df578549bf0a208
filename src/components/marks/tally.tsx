/** What one stroke of a tally stands for. */
export type TallyStroke = 'done' | 'failed' | 'now' | 'waiting';

export interface TallyProps {
  strokes: readonly TallyStroke[];
}

const bars = ['M6 7V27', 'M14 3V27', 'M22 2V27', 'M30 4V27', 'M0 21.5 36 6.5'];

const look: Record<TallyStroke, { stroke: string; strokeWidth: number; strokeDasharray?: string }> = {
  done: { stroke: 'var(--ink)', strokeWidth: 1.6 },
  failed: { stroke: 'var(--worse)', strokeWidth: 1.6 },
  now: { stroke: 'var(--ink)', strokeWidth: 3 },
  waiting: { stroke: 'var(--rule-strong)', strokeWidth: 1.2, strokeDasharray: '1.5 2.5' },
};

/** Five-bar tallies, the fifth stroke a secant across. Decoration beside its count in words. */
export function Tally({ strokes }: TallyProps) {
  const groups = Array.from({ length: Math.ceil(strokes.length / 5) }, (_, group) =>
    strokes.slice(group * 5, group * 5 + 5),
  );
  return (
    <span className="flex flex-wrap gap-[9px]">
      {groups.map((group, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: groups are told apart by place alone
        <svg key={index} className="draw" width={37} height={29} viewBox="0 0 37 29" aria-hidden="true">
          {group.map((stroke, bar) => (
            <path
              key={bars[bar]}
              d={bars[bar]}
              className={stroke === 'now' ? 'beat' : undefined}
              {...look[stroke]}
            />
          ))}
        </svg>
      ))}
    </span>
  );
}
