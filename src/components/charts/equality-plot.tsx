import { useWidth } from '../../lib/use-width.ts';
import { logAxis } from './log-axis.ts';

export interface EqualityDot {
  x: number;
  y: number;
  /** How many lie on this very place; the area of the dot grows with it. */
  count: number;
  /** Written beside the dot where there is room. */
  name: string | null;
}

export interface EqualityPlotProps {
  dots: readonly EqualityDot[];
  xName: string;
  yName: string;
  /** What the drawing shows, in a sentence. */
  label: string;
}

const margin = { top: 12, right: 16, bottom: 40, left: 46 };
const widest = 440;

function colourOf({ x, y }: EqualityDot): string {
  return y > x ? 'var(--worse)' : y < x ? 'var(--better)' : 'var(--same)';
}

/** The same quantity twice on logarithmic axes: on the line it is equal, above it has grown. */
export function EqualityPlot({ dots, xName, yName, label }: EqualityPlotProps) {
  const [box, measured] = useWidth<HTMLDivElement>(widest);
  const size = Math.min(widest, measured);
  const axis = logAxis(dots.flatMap((dot) => [dot.x, dot.y]));
  const right = size - margin.right;
  const bottom = size - margin.bottom;
  const px = (x: number): number => margin.left + axis.at(x) * (right - margin.left);
  const py = (y: number): number => bottom - axis.at(y) * (bottom - margin.top);
  const middle = (margin.top + bottom) / 2;
  return (
    <div ref={box}>
      <svg
        className="draw"
        width={size}
        height={size}
        viewBox={`0 0 ${size} ${size}`}
        role="img"
        aria-label={label}
      >
        {axis.ticks.map((tick) => (
          <g key={tick}>
            <path
              className="draw-guide"
              d={`M${margin.left} ${py(tick)}H${right}M${px(tick)} ${margin.top}V${bottom}`}
            />
            <text className="draw-small" x={margin.left - 6} y={py(tick) + 4} textAnchor="end">
              {tick}
            </text>
            <text className="draw-small" x={px(tick)} y={bottom + 15} textAnchor="middle">
              {tick}
            </text>
          </g>
        ))}
        <path
          className="draw-axis"
          d={`M${px(axis.low)} ${py(axis.low)}L${px(axis.high)} ${py(axis.high)}`}
        />
        <text
          className="draw-small"
          transform={`translate(${px(axis.high) - 8} ${py(axis.high) + 6}) rotate(-45)`}
          textAnchor="end"
          dy={16}
        >
          equal
        </text>
        {dots.map((dot) => (
          <circle
            key={`${dot.x} ${dot.y}`}
            cx={px(dot.x)}
            cy={py(dot.y)}
            r={Math.min(9, 2.8 * Math.sqrt(dot.count))}
            fill={colourOf(dot)}
            fillOpacity={0.8}
            stroke="var(--paper)"
            strokeWidth={0.75}
          />
        ))}
        {dots.map((dot) => {
          if (dot.name === null) return null;
          const isLeft = px(dot.x) > margin.left + (right - margin.left) * 0.55;
          return (
            <text
              key={`${dot.x} ${dot.y}`}
              className="draw-label"
              x={px(dot.x) + (isLeft ? -8 : 8)}
              y={py(dot.y) + (dot.y >= dot.x ? -3 : 11)}
              textAnchor={isLeft ? 'end' : 'start'}
            >
              {dot.name}
            </text>
          );
        })}
        <text className="draw-label" x={(margin.left + right) / 2} y={size - 6} textAnchor="middle">
          {xName}
        </text>
        <text className="draw-label" transform={`translate(11 ${middle}) rotate(-90)`} textAnchor="middle">
          {yName}
        </text>
      </svg>
    </div>
  );
}
