import { CartesianGrid, Label, Line, LineChart, ReferenceDot, ReferenceLine, XAxis, YAxis } from 'recharts';
import { formatDigits } from '../../lib/format.ts';
import { useWidth } from '../../lib/use-width.ts';
import type { SolveSide } from './solve-side.ts';

export interface ErrorPlotProps {
  reference: SolveSide | null;
  candidate: SolveSide;
  attainable: number | null;
}

interface Point {
  number: number;
  reference?: number;
  candidate?: number;
}

function pointsOf(side: SolveSide, key: 'reference' | 'candidate'): Point[] {
  return side.lines.flatMap((line) =>
    line.digits === null || line.again !== null || line.event.kind === 'df' || line.event.kind === 'd2f'
      ? []
      : [{ number: line.number, [key]: Math.min(16, line.digits) }],
  );
}

interface DotProps {
  cx?: number;
  cy?: number;
  value?: unknown;
}

function Ring({ cx, cy }: DotProps) {
  return <circle cx={cx} cy={cy} r={3} fill="var(--paper)" stroke="var(--ref)" strokeWidth={1.4} />;
}

function Square({ cx = 0, cy = 0 }: DotProps) {
  return <rect x={cx - 2.8} y={cy - 2.8} width={5.6} height={5.6} fill="var(--ink)" />;
}

/** Every fifth evaluation, or every tenth, twentieth … where there are many. */
function fives(most: number): number[] {
  const step = [5, 10, 20, 50, 100, 200, 500].find((size) => most / size <= 9) ?? 1000;
  return Array.from({ length: Math.floor(most / step) }, (_, index) => (index + 1) * step);
}

const axisText = { fill: 'var(--ink-3)', fontFamily: 'var(--mono)', fontSize: 11 };

/** Correct digits after each evaluation: reference as rings, candidate as squares, named at their ends. */
export function ErrorPlot({ reference, candidate, attainable }: ErrorPlotProps) {
  const [box, width] = useWidth<HTMLDivElement>(540);
  const before = reference === null ? [] : pointsOf(reference, 'reference');
  const after = pointsOf(candidate, 'candidate');
  const most = Math.max(2, ...before.map((point) => point.number), ...after.map((point) => point.number));
  const again = candidate.lines.filter((line) => line.again !== null).map((line) => line.number);
  const said = [
    reference === null
      ? ''
      : `Reference reaches ${formatDigits(before.at(-1)?.reference)} digits with ${before.at(-1)?.number ?? 0} evaluations. `,
    `${reference === null ? 'It' : 'Candidate'} reaches ${formatDigits(after.at(-1)?.candidate)} digits with ${after.at(-1)?.number ?? 0}.`,
  ].join('');
  // The one that needs more evaluations lies to the right, so its name stands there.
  const candidateSide = (after.at(-1)?.number ?? 0) >= (before.at(-1)?.number ?? 0) ? 'right' : 'left';
  const ticks = [1, ...fives(most)];
  const name = (text: string, points: Point[], key: 'reference' | 'candidate', side: 'left' | 'right') => {
    const point = points.find((one) => (one[key] ?? 0) >= 6) ?? points.at(-1);
    return (
      <ReferenceDot
        x={point?.number ?? 1}
        y={point?.[key] ?? 0}
        r={0}
        label={{
          value: text,
          position: side,
          offset: 10,
          fill: key === 'reference' ? 'var(--ref)' : 'var(--ink)',
          fontSize: 12,
        }}
      />
    );
  };
  return (
    <div ref={box} role="img" aria-label={`Correct digits after each evaluation. ${said}`}>
      <LineChart
        width={width}
        height={300}
        margin={{ top: 18, right: 36, bottom: 26, left: 0 }}
        accessibilityLayer={false}
      >
        <CartesianGrid vertical={false} syncWithTicks stroke="var(--rule)" />
        <XAxis
          dataKey="number"
          type="number"
          domain={[1, most]}
          ticks={ticks}
          allowDecimals={false}
          tickLine={false}
          axisLine={false}
          tick={axisText}
          height={34}
        >
          <Label value="evaluation" position="insideBottom" fill="var(--ink)" fontSize={12} offset={0} />
        </XAxis>
        <YAxis
          domain={[again.length > 0 ? -0.8 : 0, 16]}
          ticks={[0, 4, 8, 12, 16]}
          width={28}
          axisLine={false}
          tickLine={false}
          tick={axisText}
        />
        <ReferenceLine y={0} stroke="var(--rule-strong)" />
        {attainable !== null && (
          <ReferenceLine
            y={attainable}
            stroke="var(--rule-strong)"
            strokeDasharray="3 2"
            label={{
              value: `attainable ${formatDigits(attainable)}`,
              position: attainable > 13 ? 'insideTopLeft' : 'insideBottomLeft',
              ...axisText,
              dy: attainable > 13 ? -18 : 0,
            }}
          />
        )}
        {again.map((number) => (
          <ReferenceLine
            key={number}
            segment={[
              { x: number, y: -0.15 },
              { x: number, y: -0.7 },
            ]}
            stroke="var(--worse)"
            strokeWidth={1.9}
          />
        ))}
        <Line
          data={before}
          dataKey="reference"
          stroke="var(--ref)"
          strokeWidth={1.4}
          dot={<Ring />}
          activeDot={false}
          isAnimationActive={false}
        />
        <Line
          data={after}
          dataKey="candidate"
          stroke="var(--ink)"
          strokeWidth={1.6}
          dot={<Square />}
          activeDot={false}
          isAnimationActive={false}
        />
        {reference !== null &&
          name(
            `reference, ${reference.solve.evaluations}`,
            before,
            'reference',
            candidateSide === 'right' ? 'left' : 'right',
          )}
        {reference !== null &&
          name(`candidate, ${candidate.solve.evaluations}`, after, 'candidate', candidateSide)}
      </LineChart>
      {again.length > 0 && (
        <p className="text-note text-worse">
          Vermilion strokes below the axis: asked again, <span className="num">{again.length}</span> times.
        </p>
      )}
    </div>
  );
}
