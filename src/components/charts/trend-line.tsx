import { layOutTrend, type TrendShape } from './trend-layout.ts';

export interface TrendLineProps {
  values: readonly (number | null)[];
  /** Names of the builds, for the text alternative. */
  labels: readonly string[];
  width: number;
  isMoreBetter: boolean;
  format: (value: number) => string;
}

const height = 52;

/** One solver over builds, left to right: diamond for the worse, large dot for the better. */
export function TrendLine({ values, labels, width, isMoreBetter, format }: TrendLineProps) {
  if (values.every((value) => value === null))
    return <span className="text-header text-ink-3">nothing to show</span>;
  const shape: TrendShape = { width, height, isMoreBetter, format };
  const { pieces, marks } = layOutTrend(values, shape);
  const said = values
    .map((value, index) => `${labels[index] ?? ''}: ${value === null ? 'none' : format(value)}`)
    .join(', ');
  const points = pieces.flat();
  return (
    <svg
      className="draw"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={said}
    >
      <path className="draw-guide" d={marks.map((x) => `M${x.toFixed(1)} 6V${height - 6}`).join('')} />
      {pieces.map((piece) => (
        <path
          key={piece[0]?.index}
          d={piece
            .map((point, index) => `${index === 0 ? 'M' : 'L'}${point.x.toFixed(1)} ${point.y.toFixed(1)}`)
            .join('')}
          fill="none"
          stroke="var(--ink)"
          strokeWidth={1.5}
        />
      ))}
      {points.map((point) => {
        if (point.turn === 'worse') {
          return (
            <path
              key={point.index}
              data-turn="worse"
              d={`M${point.x.toFixed(1)} ${(point.y - 5).toFixed(1)}l5 5-5 5-5-5z`}
              fill="var(--worse)"
            />
          );
        }
        return (
          <circle
            key={point.index}
            data-turn={point.turn ?? undefined}
            cx={point.x}
            cy={point.y}
            r={point.turn === 'better' ? 3.2 : 1.8}
            fill={point.turn === 'better' ? 'var(--better)' : 'var(--ink)'}
          />
        );
      })}
      {points.map((point) =>
        point.label === null ? null : (
          <text
            key={point.index}
            className="draw-index"
            x={point.x}
            y={point.isAbove ? point.y - 7 : point.y + 14}
            textAnchor="middle"
          >
            {point.label}
          </text>
        ),
      )}
    </svg>
  );
}
