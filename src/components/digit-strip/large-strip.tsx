import { formatDigits } from '../../lib/format.ts';
import { useWidth } from '../../lib/use-width.ts';
import { labelFeet, labelStrokes, numberEvaluations } from './large-labels.ts';
import { StripDrawing, type StripMeasures } from './strip-drawing.tsx';
import { layOutStrip, mostDigits, type StripInput, type StripScale } from './strip-layout.ts';
import { countEvents, describeStrip } from './strip-words.ts';

export interface LargeStripRow {
  label: string;
  strip: StripInput;
  isReference: boolean;
  /** Evaluations on record, which may be more than the path keeps. */
  evaluations?: number | undefined;
}

export interface LargeStripProps {
  rows: readonly LargeStripRow[];
  attainable: number | null;
}

const rowHeight = 60;
const measures: StripMeasures = {
  top: 22,
  base: 46,
  crowdedTop: 26,
  primeTop: 15,
  primeHeight: 4.5,
  footTop: 47.5,
  footHeight: 8,
  dot: 4.5,
  ring: 7,
  square: 9,
  open: 5,
};

function Row({ row, scale, right }: { row: LargeStripRow; scale: StripScale; right: number }) {
  const layout = layOutStrip(row.strip, scale);
  const numbers = numberEvaluations(row.strip.events);
  const count = row.evaluations ?? countEvents(row.strip).evaluations;
  const { base } = measures;
  return (
    <g className={row.isReference ? 'text-ref' : 'text-ink'}>
      <text className="draw-label" x={0} y={base - 14}>
        {row.label}
      </text>
      <text className="draw-count" x={0} y={base + 2}>
        {count} ev.
      </text>
      <path className="draw-axis" d={`M${scale.x0} ${base}H${right}`} />
      <StripDrawing layout={layout} measures={measures} />
      {labelStrokes(layout, numbers).map((label) => (
        <text key={label.text} className="draw-index" x={label.x} y={11} textAnchor="middle">
          {label.text}
        </text>
      ))}
      {labelFeet(layout, numbers, right).map((label) => (
        <text key={label.text} className="draw-index-again" x={label.x} y={base + 10}>
          {label.text}
        </text>
      ))}
    </g>
  );
}

/** The strip large: axis, numbers of the evaluations, what the case can give. As wide as its place. */
export function LargeStrip({ rows, attainable }: LargeStripProps) {
  const [ref, width] = useWidth<HTMLDivElement>(1100);
  const isNarrow = width < 560;
  const x0 = isNarrow ? 92 : 112;
  const pitch = (width - x0 - (isNarrow ? 20 : 28)) / mostDigits;
  const scale: StripScale = { x0, pitch, leftStep: isNarrow ? 3.5 : 7 };
  const right = x0 + mostDigits * pitch;
  const bottom = rows.length * rowHeight;
  const height = bottom + 34;
  const every = isNarrow ? 4 : 2;
  const limit = attainable === null ? null : x0 + Math.min(mostDigits, attainable) * pitch;
  const said = rows.map((row) => `${row.label}: ${describeStrip(row.strip)}`).join('; ');
  return (
    <div ref={ref}>
      <svg
        className="draw"
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        role="img"
        aria-label={said}
      >
        {Array.from({ length: mostDigits + 1 }, (_, digits) => (
          <path
            // biome-ignore lint/suspicious/noArrayIndexKey: the place is the number of digits
            key={digits}
            className={digits % 4 === 0 ? 'draw-guide' : 'draw-guide-minor'}
            d={`M${x0 + digits * pitch} 4V${bottom}`}
          />
        ))}
        {Array.from({ length: mostDigits / every + 1 }, (_, index) => index * every).map((digits) => (
          <text
            key={digits}
            className="draw-small"
            x={x0 + digits * pitch}
            y={bottom + 14}
            textAnchor="middle"
          >
            {digits}
          </text>
        ))}
        <text className="draw-small" x={0} y={bottom + 14}>
          {isNarrow ? 'digits' : 'correct digits'}
        </text>
        {limit !== null && (
          <>
            <path className="draw-limit-long" d={`M${limit} 2V${bottom + 26}`} />
            <text
              className="draw-small"
              x={limit > width / 2 ? limit - 5 : limit + 5}
              y={bottom + 29}
              textAnchor={limit > width / 2 ? 'end' : 'start'}
            >
              attainable here {formatDigits(attainable)}
            </text>
          </>
        )}
        {rows.map((row, index) => (
          <g key={row.label} transform={`translate(0 ${index * rowHeight})`}>
            <Row row={row} scale={scale} right={right} />
          </g>
        ))}
      </svg>
    </div>
  );
}
