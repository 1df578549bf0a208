import { useWidth } from '../../lib/use-width.ts';

export interface StepLine {
  name: string;
  isReference: boolean;
  /** x rises; the value holds from each point on. */
  points: readonly { x: number; share: number }[];
}

export interface StepPlotProps {
  lines: readonly StepLine[];
  /** Name of the horizontal axis, which is logarithmic to base two and begins at 1. */
  xName: string;
  yName: string;
  label: string;
}

const margin = { top: 12, right: 16, bottom: 40, left: 46 };
const height = 300;
const widest = 560;

/** Ticks from 1 to the edge: powers of two, or finer where the edge is near. */
export function doublings(edge: number): number[] {
  if (edge < 2.2) return [1, 1.25, 1.5, 1.75, 2].filter((tick) => tick <= edge);
  if (edge < 6) return [1, 1.5, 2, 3, 4, 5].filter((tick) => tick <= edge);
  return Array.from({ length: 20 }, (_, index) => 2 ** index).filter((tick) => tick <= edge);
}

/** Shares as steps: one line for the reference, one for the candidate, named at their right ends. */
export function StepPlot({ lines, xName, yName, label }: StepPlotProps) {
  const [box, measured] = useWidth<HTMLDivElement>(widest);
  const width = Math.min(widest, measured);
  const edge = Math.max(1.25, ...lines.flatMap((line) => line.points.map((point) => point.x)));
  const right = width - margin.right;
  const bottom = height - margin.bottom;
  const px = (x: number): number => margin.left + (Math.log2(x) / Math.log2(edge)) * (right - margin.left);
  const py = (share: number): number => bottom - share * (bottom - margin.top);
  const pathOf = (line: StepLine): string => {
    const [first, ...rest] = line.points;
    if (first === undefined) return '';
    const steps = rest.map((point) => `H${px(point.x).toFixed(1)}V${py(point.share).toFixed(1)}`);
    return `M${px(first.x).toFixed(1)} ${py(first.share).toFixed(1)}${steps.join('')}H${right}`;
  };
  const ends = lines.map((line) => ({ line, share: line.points.at(-1)?.share ?? 0 }));
  const isTie =
    ends.length > 1 && Math.abs((ends[0]?.share ?? 0) - (ends[1]?.share ?? 0)) * (bottom - margin.top) < 34;
  const lower = ends.toSorted((a, b) => a.share - b.share || (a.line.isReference ? 1 : -1))[0]?.line;
  return (
    <div ref={box}>
      <svg
        className="draw"
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={label}
      >
        {[0, 0.25, 0.5, 0.75, 1].map((share) => (
          <g key={share}>
            <path className="draw-guide" d={`M${margin.left} ${py(share)}H${right}`} />
            <text className="draw-small" x={margin.left - 6} y={py(share) + 4} textAnchor="end">
              {share}
            </text>
          </g>
        ))}
        <path className="draw-axis" d={`M${margin.left} ${bottom}H${right}`} />
        {doublings(edge).map((tick) => (
          <text key={tick} className="draw-small" x={px(tick)} y={bottom + 15} textAnchor="middle">
            {tick}
          </text>
        ))}
        {lines.map((line) => (
          <path
            key={line.name}
            d={pathOf(line)}
            fill="none"
            stroke={line.isReference ? 'var(--ref)' : 'var(--ink)'}
            strokeWidth={line.isReference ? 1.4 : 1.8}
          />
        ))}
        {ends.map(({ line, share }) => (
          <text
            key={line.name}
            className={`draw-label ${line.isReference ? 'text-ref' : 'text-ink'}`}
            x={right}
            y={isTie && line !== lower ? py(share) - 7 : py(share) + (line === lower ? 16 : -7)}
            textAnchor="end"
          >
            {line.name}
          </text>
        ))}
        <text className="draw-label" x={(margin.left + right) / 2} y={height - 6} textAnchor="middle">
          {xName}
        </text>
        <text
          className="draw-label"
          transform={`translate(11 ${(margin.top + bottom) / 2}) rotate(-90)`}
          textAnchor="middle"
        >
          {yName}
        </text>
      </svg>
    </div>
  );
}
