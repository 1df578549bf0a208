import { useId, useMemo } from 'react';
import { interpretDouble } from '../../../shared/equations/interpret.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { useWidth } from '../../lib/use-width.ts';
import { niceTicks, type Range, tickText, xRange, yRange } from './plot-ranges.ts';

/** An x that was asked for, with the answer. */
export interface AskedPoint {
  number: number;
  x: number;
  y: number;
}

export interface CurvePlotProps {
  equation: string;
  /** Values as text, by name. */
  parameters: Readonly<Record<string, string>>;
  bracket: readonly [number, number] | null;
  /** Roots on the axis as dots; with one of them its value is written. */
  roots: readonly number[];
  asked?: readonly AskedPoint[];
  /** x's that the range must hold besides: starts. */
  around?: readonly number[];
  /** Draw the chords between the first points. */
  hasChords?: boolean;
  /** Shows this stretch instead of the one that the points make. */
  range?: Range | null;
  /** One point set off from the others, with the line that the method goes along from it. */
  current?: CurrentPoint | null;
}

export interface CurrentPoint extends AskedPoint {
  /** Slope of the tangent, where f′ is known. */
  slope: number | null;
  /** The other end of the chord, where there is one. */
  from: AskedPoint | null;
}

const height = 300;
const margin = { top: 14, right: 12, bottom: 34, left: 52 };
const samples = 480;
const mostStrokes = 40;

interface Frame {
  px: (x: number) => number;
  py: (y: number) => number;
  isInside: (x: number, y: number) => boolean;
}

/** The curve in pieces: a jump or a pole is not bridged by a line. */
function curvePath(points: readonly { x: number; y: number }[]): string {
  let isDown = false;
  let before: number | null = null;
  const parts: string[] = [];
  for (const { x, y } of points) {
    const isNear = Number.isFinite(y) && y > -2 * height && y < 3 * height;
    if (!isNear || (before !== null && Math.abs(y - before) > 2 * height)) isDown = false;
    if (isNear) {
      parts.push(`${isDown ? 'L' : 'M'}${x.toFixed(1)} ${y.toFixed(1)}`);
      isDown = true;
    }
    before = isNear ? y : null;
  }
  return parts.join('');
}

function Chords({ asked, frame }: { asked: readonly AskedPoint[]; frame: Frame }) {
  return asked.slice(1, 4).map((point, index) => {
    const before = asked[index];
    if (before === undefined || ![before.x, before.y, point.x, point.y].every(Number.isFinite)) return null;
    return (
      <path
        key={point.number}
        d={`M${frame.px(before.x)} ${frame.py(before.y)}L${frame.px(point.x)} ${frame.py(point.y)}`}
        stroke="var(--ref)"
        strokeWidth={1.1}
      />
    );
  });
}

/** Strokes on the axis where f was asked for, numbered where there is room, and rings on the first values. */
function AskedMarks({ asked, frame, zero }: { asked: readonly AskedPoint[]; frame: Frame; zero: number }) {
  const shown = asked.filter((point) => frame.isInside(point.x, 0)).slice(0, mostStrokes);
  const named: AskedPoint[] = [];
  for (const point of shown) {
    if (named.every((other) => Math.abs(frame.px(other.x) - frame.px(point.x)) > 14)) named.push(point);
  }
  return (
    <>
      {shown.map((point) => (
        <path
          key={point.number}
          d={`M${frame.px(point.x)} ${zero - 5}v10`}
          stroke="var(--ink)"
          strokeWidth={1.25}
        />
      ))}
      {asked
        .slice(0, 4)
        .map((point) =>
          frame.isInside(point.x, point.y) ? (
            <circle
              key={point.number}
              cx={frame.px(point.x)}
              cy={frame.py(point.y)}
              r={3}
              fill="var(--paper)"
              stroke="var(--ref)"
              strokeWidth={1.4}
            />
          ) : null,
        )}
      {named.map((point) => (
        <text
          key={point.number}
          className="draw-index"
          x={frame.px(point.x)}
          y={zero - 9}
          textAnchor="middle"
        >
          {point.number}
        </text>
      ))}
    </>
  );
}

/** The point that is looked at: a square on the curve, its height, and the tangent or chord through it. */
function CurrentMark({
  current,
  across,
  frame,
  zero,
}: {
  current: CurrentPoint;
  across: Range;
  frame: Frame;
  zero: number;
}) {
  const { x, y, slope, from } = current;
  if (!Number.isFinite(x) || !Number.isFinite(y)) return null;
  const steepness =
    slope ?? (from !== null && Number.isFinite(from.y) && from.x !== x ? (y - from.y) / (x - from.x) : null);
  const lineAt = (at: number): number => frame.py(y + (steepness ?? 0) * (at - x));
  return (
    <>
      {steepness !== null && (
        <path
          d={`M${frame.px(across.low)} ${lineAt(across.low)}L${frame.px(across.high)} ${lineAt(across.high)}`}
          stroke="var(--ref)"
          strokeWidth={1.2}
          strokeDasharray={slope === null ? undefined : '6 3'}
        />
      )}
      <path className="draw-limit-long" d={`M${frame.px(x)} ${zero}V${frame.py(y)}`} />
      <rect x={frame.px(x) - 4} y={frame.py(y) - 4} width={8} height={8} fill="var(--ink)" />
    </>
  );
}

function Grid({ across, up, frame, right }: { across: Range; up: Range; frame: Frame; right: number }) {
  return (
    <>
      {niceTicks(up).map((y) => (
        <g key={y}>
          <path className="draw-guide" d={`M${margin.left} ${frame.py(y)}H${right}`} />
          <text className="draw-small" x={margin.left - 8} y={frame.py(y) + 4} textAnchor="end">
            {tickText(y)}
          </text>
        </g>
      ))}
      {niceTicks(across).map((x) => (
        <text key={x} className="draw-small" x={frame.px(x)} y={height - 14} textAnchor="middle">
          {tickText(x)}
        </text>
      ))}
    </>
  );
}

/** f over a range, evaluated here by the same arithmetic as the solver's answers. */
export function CurvePlot(props: CurvePlotProps) {
  const {
    equation,
    parameters,
    bracket,
    roots,
    asked = [],
    around = [],
    hasChords = false,
    range = null,
    current = null,
  } = props;
  const [box, width] = useWidth<HTMLDivElement>(540);
  const clip = useId();
  const f = useMemo(() => {
    const values = Object.fromEntries(Object.entries(parameters).map(([name, text]) => [name, Number(text)]));
    return interpretDouble(parseEquation(equation, Object.keys(parameters)), values).f;
  }, [equation, parameters]);
  const across = range ?? xRange(bracket, [...around, ...asked.map((point) => point.x)], roots);
  const curve = useMemo(
    () =>
      Array.from({ length: samples + 1 }, (_, index) => {
        const x = across.low + ((across.high - across.low) * index) / samples;
        return { x, y: f(x) };
      }),
    [f, across.low, across.high],
  );
  const up = yRange([
    ...curve.map((point) => point.y),
    ...(range === null ? asked.slice(0, 6).map((point) => point.y) : []),
  ]);
  const right = width - margin.right;
  const bottom = height - margin.bottom;
  const frame: Frame = {
    px: (x) => margin.left + ((x - across.low) / (across.high - across.low)) * (right - margin.left),
    py: (y) => bottom - ((y - up.low) / (up.high - up.low)) * (bottom - margin.top),
    isInside: (x, y) => x >= across.low && x <= across.high && y >= up.low && y <= up.high,
  };
  const zero = frame.py(0);
  const dots = roots.filter((root) => frame.isInside(root, 0));
  const [only] = dots;
  return (
    <div ref={box}>
      <svg
        className="draw"
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={`f from ${tickText(Number(across.low.toPrecision(3)))} to ${tickText(Number(across.high.toPrecision(3)))}${asked.length > 0 ? ', with the first x’s that were asked for; the table of the path has all of them' : ''}.`}
      >
        <clipPath id={clip}>
          <rect
            x={margin.left}
            y={margin.top}
            width={Math.max(0, right - margin.left)}
            height={bottom - margin.top}
          />
        </clipPath>
        <Grid across={across} up={up} frame={frame} right={right} />
        <path className="draw-axis" d={`M${margin.left} ${zero}H${right}`} />
        <g clipPath={`url(#${clip})`} fill="none">
          {hasChords && <Chords asked={asked} frame={frame} />}
          <path
            d={curvePath(curve.map((point) => ({ x: frame.px(point.x), y: frame.py(point.y) })))}
            stroke="var(--ink)"
            strokeWidth={1.6}
          />
          {current !== null && <CurrentMark current={current} across={across} frame={frame} zero={zero} />}
        </g>
        <AskedMarks asked={asked} frame={frame} zero={zero} />
        {dots.map((root) => (
          <circle key={root} cx={frame.px(root)} cy={zero} r={4.5} fill="var(--ink)" />
        ))}
        {dots.length === 1 && only !== undefined && (
          <text
            className="draw-label text-ink"
            x={Math.min(right - 40, Math.max(margin.left + 40, frame.px(only)))}
            y={Math.min(bottom + 14, zero + 22)}
            textAnchor="middle"
          >
            root {tickText(Number(only.toPrecision(5)))}
          </text>
        )}
      </svg>
    </div>
  );
}
