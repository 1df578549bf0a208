import { CartesianGrid, Label, Line, LineChart, ReferenceLine, XAxis, YAxis } from 'recharts';
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
  const endLabel = (text: string, points: Point[], fill: string) => (
    <ReferenceLine
      x={points.at(-1)?.number ?? 0}
      stroke="none"
      label={<Label value={text} position="insideTopRight" fill={fill} fontSize={12} offset={8} />}
    />
  );
  return (
    <div ref={box} role="img" aria-label={`Correct digits after each evaluation. ${said}`}>
      <LineChart
        width={width}
        height={300}
        margin={{ top: 18, right: 30, bottom: 26, left: 0 }}
        accessibilityLayer={false}
      >
        <CartesianGrid vertical={false} stroke="var(--rule)" />
        <XAxis
          dataKey="number"
          type="number"
          domain={[1, most]}
          allowDecimals={false}
          tickLine={false}
          stroke="var(--rule-strong)"
          tick={axisText}
          height={34}
        >
          <Label value="evaluation" position="insideBottom" fill="var(--ink)" fontSize={12} offset={0} />
        </XAxis>
        <YAxis
          domain={[0, 16]}
          ticks={[0, 4, 8, 12, 16]}
          width={28}
          axisLine={false}
          tickLine={false}
          tick={axisText}
        />
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
              { x: number, y: 0 },
              { x: number, y: 0.5 },
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
        {reference !== null && endLabel(`reference, ${reference.solve.evaluations}`, before, 'var(--ref)')}
        {reference !== null && endLabel(`candidate, ${candidate.solve.evaluations}`, after, 'var(--ink)')}
      </LineChart>
      {again.length > 0 && (
        <p className="text-note text-worse">
          Vermilion strokes at the axis: asked again, <span className="num">{again.length}</span> times.
        </p>
      )}
    </div>
  );
}
