import { useMemo } from 'react';
import { interpretDouble } from '../../../shared/equations/interpret.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { formatFigure } from '../../lib/format.ts';
import { useWidth } from '../../lib/use-width.ts';
import { niceTicks, xRange, yRange } from './plot-ranges.ts';
import type { SolveSide } from './solve-side.ts';

export interface FunctionPlotProps {
  suiteCase: SuiteCase;
  side: SolveSide;
}

const height = 300;
const margin = { top: 14, right: 12, bottom: 34, left: 44 };
const samples = 480;

/** The curve in pieces: a jump or a pole is not bridged by a line. */
function curvePath(points: readonly { x: number; y: number }[], top: number, bottom: number): string {
  let isDown = false;
  let before: { x: number; y: number } | null = null;
  const parts: string[] = [];
  for (const point of points) {
    const isInside = Number.isFinite(point.y) && point.y > top - height && point.y < bottom + height;
    const jumps = before !== null && Math.abs(point.y - before.y) > 2 * height;
    if (!isInside || jumps) isDown = false;
    if (isInside) {
      parts.push(`${isDown ? 'L' : 'M'}${point.x.toFixed(1)} ${point.y.toFixed(1)}`);
      isDown = true;
    }
    before = isInside ? point : null;
  }
  return parts.join('');
}

/** f over the bracket, the x's asked for as numbered strokes on the axis, the chords of the first steps. */
export function FunctionPlot({ suiteCase, side }: FunctionPlotProps) {
  const [box, width] = useWidth<HTMLDivElement>(540);
  const parameters = suiteCase.parameters;
  const f = useMemo(() => {
    const equation = parseEquation(suiteCase.equation, Object.keys(parameters));
    const values = Object.fromEntries(Object.entries(parameters).map(([name, text]) => [name, Number(text)]));
    return interpretDouble(equation, values).f;
  }, [suiteCase.equation, parameters]);
  const asked = side.lines.filter(
    (line) => line.again === null && (line.event.kind === 'f' || line.event.kind === 'fdf'),
  );
  const bracket =
    suiteCase.bracket === null
      ? null
      : ([Number(suiteCase.bracket[0]), Number(suiteCase.bracket[1])] as const);
  const { root } = side.solve;
  const across = xRange(
    bracket,
    asked.map((line) => line.event.x),
    root,
  );
  const curve = useMemo(
    () =>
      Array.from({ length: samples + 1 }, (_, index) => {
        const x = across.low + ((across.high - across.low) * index) / samples;
        return { x, y: f(x) };
      }),
    [f, across.low, across.high],
  );
  const up = yRange([...curve.map((point) => point.y), ...asked.slice(0, 6).map((line) => line.event.a)]);
  const right = width - margin.right;
  const bottom = height - margin.bottom;
  const px = (x: number): number =>
    margin.left + ((x - across.low) / (across.high - across.low)) * (right - margin.left);
  const py = (y: number): number => bottom - ((y - up.low) / (up.high - up.low)) * (bottom - margin.top);
  const isInside = (x: number): boolean => x >= across.low && x <= across.high;
  const named: { x: number; text: string }[] = [];
  for (const line of asked) {
    const x = px(line.event.x);
    if (isInside(line.event.x) && named.every((other) => Math.abs(other.x - x) > 14))
      named.push({ x, text: String(line.number) });
  }
  const chordPoints = asked.slice(0, 5).map((line) => line.event);
  const isChordMethod = side.solve.declaration.starts === 2 || side.solve.declaration.takes === 'bracket';
  return (
    <div ref={box}>
      <svg
        className="draw"
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={`f between ${formatFigure(Number(across.low.toPrecision(3)))} and ${formatFigure(Number(across.high.toPrecision(3)))}, with the first x's that were asked for; all of them stand in the table above.`}
      >
        <defs>
          <clipPath id="plot-area">
            <rect x={margin.left} y={margin.top} width={right - margin.left} height={bottom - margin.top} />
          </clipPath>
        </defs>
        {niceTicks(up).map((y) => (
          <g key={y}>
            <path className="draw-guide" d={`M${margin.left} ${py(y)}H${right}`} />
            <text className="draw-small" x={margin.left - 8} y={py(y) + 4} textAnchor="end">
              {tickText(y)}
            </text>
          </g>
        ))}
        {niceTicks(across).map((x) => (
          <text key={x} className="draw-small" x={px(x)} y={height - 14} textAnchor="middle">
            {tickText(x)}
          </text>
        ))}
        <path className="draw-axis" d={`M${margin.left} ${py(0)}H${right}`} />
        <g clipPath="url(#plot-area)" fill="none">
          {isChordMethod &&
            chordPoints.slice(1, 4).map((point, index) => {
              const before = chordPoints[index];
              if (before === undefined || !Number.isFinite(point.a) || !Number.isFinite(before.a))
                return null;
              return (
                <path
                  key={asked[index]?.number}
                  d={`M${px(before.x)} ${py(before.a)}L${px(point.x)} ${py(point.a)}`}
                  stroke="var(--ref)"
                  strokeWidth={1.1}
                />
              );
            })}
          <path
            d={curvePath(
              curve.map((point) => ({ x: px(point.x), y: py(point.y) })),
              margin.top,
              bottom,
            )}
            stroke="var(--ink)"
            strokeWidth={1.6}
          />
        </g>
        {asked
          .slice(0, 40)
          .map((line) =>
            isInside(line.event.x) ? (
              <path
                key={line.number}
                d={`M${px(line.event.x)} ${py(0) - 5}v10`}
                stroke="var(--ink)"
                strokeWidth={1.25}
              />
            ) : null,
          )}
        {chordPoints
          .slice(0, 4)
          .map((point, index) =>
            isInside(point.x) && point.a >= up.low && point.a <= up.high ? (
              <circle
                key={asked[index]?.number}
                cx={px(point.x)}
                cy={py(point.a)}
                r={3}
                fill="var(--paper)"
                stroke="var(--ref)"
                strokeWidth={1.4}
              />
            ) : null,
          )}
        {named.map((label) => (
          <text key={label.text} className="draw-index" x={label.x} y={py(0) - 9} textAnchor="middle">
            {label.text}
          </text>
        ))}
        {root !== null && isInside(root) && (
          <>
            <circle cx={px(root)} cy={py(0)} r={4.5} fill="var(--ink)" />
            <text
              className="draw-label text-ink"
              x={Math.min(right - 40, Math.max(margin.left + 40, px(root)))}
              y={Math.min(bottom + 14, py(0) + 22)}
              textAnchor="middle"
            >
              root {tickText(Number(root.toPrecision(5)))}
            </text>
          </>
        )}
      </svg>
    </div>
  );
}

function tickText(value: number): string {
  const size = Math.abs(value);
  const text =
    size !== 0 && (size >= 1e5 || size < 1e-4) ? value.toExponential().replace('e+', 'e') : String(value);
  return text.replaceAll('-', '−');
}
