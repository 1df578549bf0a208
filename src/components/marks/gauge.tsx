import { formatPercent } from '../../lib/format.ts';
import { layOutGauge } from './gauge-layout.ts';

export interface GaugeProps {
  /** Evaluations more or fewer, percent; null where nothing could be compared. */
  percent: number | null;
  /** Allowance in percent, or null where there is no limit. */
  allowance: number | null;
  width?: number;
  range?: { least: number; most: number };
}

function colourOf(percent: number, allowance: number | null): string {
  if (percent === 0) return 'text-ink-3';
  if (percent < 0) return 'text-better';
  return allowance !== null && percent > allowance ? 'text-worse' : 'text-ink-3';
}

/** Posts at the allowance, a dot at the change: the verdict sign drawn to scale. */
export function Gauge({ percent, allowance, width = 184, range }: GaugeProps) {
  const layout = layOutGauge(percent ?? 0, allowance, width, range);
  const said =
    percent === null
      ? 'nothing to compare'
      : `${formatPercent(percent)}${allowance === null ? '' : `, allowance ${formatPercent(allowance)}`}`;
  const from =
    layout.posts === null ? layout.zero : percent !== null && percent < 0 ? layout.posts[0] : layout.posts[1];
  const isOutside = percent !== null && (percent < 0 ? layout.dot < from : layout.dot > from);
  return (
    <svg className="draw" width={width} height={20} viewBox={`0 0 ${width} 20`} role="img" aria-label={said}>
      <path className="draw-axis" d={`M${layout.start} 10H${layout.end}`} />
      {layout.posts !== null && (
        <path
          data-part="posts"
          d={`M${layout.posts[0]} 3.5v13M${layout.posts[1]} 3.5v13`}
          stroke="var(--ink-2)"
          strokeWidth={1.5}
        />
      )}
      {percent !== null && (
        <g className={colourOf(percent, allowance)} stroke="currentColor" fill="currentColor">
          {isOutside && <path d={`M${from} 10H${layout.dot}`} strokeWidth={2.4} />}
          <circle cx={layout.dot} cy={10} r={3.6} stroke="none" />
          {layout.isCut !== null && (
            <path
              data-part="cut"
              d={layout.isCut === 'right' ? `M${layout.end} 5l5 5-5 5` : `M${layout.start} 5l-5 5 5 5`}
              fill="none"
              strokeWidth={1.6}
            />
          )}
        </g>
      )}
    </svg>
  );
}
