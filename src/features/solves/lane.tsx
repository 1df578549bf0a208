export interface LaneProps {
  digits: number | null;
  isAgain: boolean;
  isReference: boolean;
}

export const laneWidth = 150;
const at = (digits: number): number => 8 + (Math.min(16, Math.max(0, digits)) / 16) * 132;

/** The digit strip turned on end: one stroke a row, from 0 to 16 digits. */
export function Lane({ digits, isAgain, isReference }: LaneProps) {
  return (
    <svg
      className={`draw ${isReference ? 'text-ref' : 'text-ink'}`}
      width={laneWidth}
      height={20}
      viewBox={`0 0 ${laneWidth} 20`}
      aria-hidden="true"
    >
      <path className="draw-guide" d="M8 0V20M74 0V20M140 0V20" />
      {digits !== null && !isAgain && (
        <>
          <path d={`M8 10H${at(digits)}`} stroke="currentColor" strokeWidth={1.5} strokeOpacity={0.35} />
          <path d={`M${at(digits)} 4V16`} stroke="currentColor" strokeWidth={1.5} />
        </>
      )}
      {digits !== null && isAgain && (
        <path d={`M${at(digits)} 9v7`} stroke="var(--worse)" strokeWidth={1.9} />
      )}
    </svg>
  );
}

/** The lane's scale, for the head of the column. */
export function LaneScale() {
  return (
    <svg className="draw" width={laneWidth} height={14} viewBox={`0 0 ${laneWidth} 14`} aria-hidden="true">
      {[0, 8, 16].map((digits) => (
        <text key={digits} className="draw-small" x={at(digits)} y={10} textAnchor="middle">
          {digits}
        </text>
      ))}
    </svg>
  );
}
