import { useMemo } from 'react';
import { StripDrawing, type StripMeasures } from '../../components/digit-strip/strip-drawing.tsx';
import {
  layOutStrip,
  mostDigits,
  type StripInput,
  type StripScale,
} from '../../components/digit-strip/strip-layout.ts';
import { describeStrip } from '../../components/digit-strip/strip-words.ts';
import { useWidth } from '../../lib/use-width.ts';
import { shownSolvers } from './shown-solvers.ts';

const height = 36;
const measures: StripMeasures = {
  top: 7,
  base: 25,
  crowdedTop: 9,
  primeTop: 2.6,
  primeHeight: 2.6,
  footTop: 26.5,
  footHeight: 5.5,
  dot: 2.9,
  ring: 5,
  square: 5.6,
  open: 4.2,
};
const marked = [0, 4, 8, 12, 16];

function Strip({ strip, scale, width }: { strip: StripInput; scale: StripScale; width: number }) {
  const layout = layOutStrip(strip, scale);
  return (
    <svg
      className="draw text-ink"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={describeStrip(strip)}
    >
      <path
        className="draw-guide"
        d={marked.map((digits) => `M${scale.x0 + digits * scale.pitch} 0V${height}`).join('')}
      />
      <path className="draw-axis" d={`M${scale.x0 - 0.5} ${measures.base}H${layout.axisEnd}`} />
      <StripDrawing layout={layout} measures={measures} />
    </svg>
  );
}

/** Five solvers as this product draws them, as wide as their place. */
export function DoorStrips() {
  const [ref, width] = useWidth<HTMLDivElement>(572);
  const solvers = useMemo(shownSolvers, []);
  const x0 = width < 360 ? 26 : 46;
  const scale: StripScale = { x0, pitch: (width - x0 - 30) / mostDigits, leftStep: width < 360 ? 2.5 : 5 };
  const row =
    'grid grid-cols-[110px_minmax(0,1fr)] items-center gap-3.5 max-wide:grid-cols-[84px_minmax(0,1fr)]';
  return (
    <figure className="min-w-0 pt-1.5 max-wide:order-2">
      <figcaption className="pb-2 text-note text-ink-3">
        Five solvers, as Tallyroot writes them down: one stroke for every evaluation of f, at the correct
        digits it brought.
      </figcaption>
      <ul className="border-t border-rule-strong">
        {solvers.map((solver, index) => (
          <li key={solver.name} className={`${row} border-b border-rule py-[9px]`}>
            <span>
              {solver.name}
              {solver.note !== undefined && (
                <span className="block text-header text-ink-3">{solver.note}</span>
              )}
            </span>
            <div ref={index === 0 ? ref : undefined} className="min-w-0 overflow-hidden">
              <Strip strip={solver.strip} scale={scale} width={width} />
            </div>
          </li>
        ))}
      </ul>
      <div className={`${row} pt-1`} aria-hidden="true">
        <span className="text-header text-ink-3">correct digits</span>
        <svg className="draw" width={width} height={14} viewBox={`0 0 ${width} 14`} aria-hidden="true">
          {marked.map((digits) => (
            <text
              key={digits}
              className="draw-small"
              x={x0 + digits * scale.pitch}
              y={10}
              textAnchor="middle"
            >
              {digits}
            </text>
          ))}
        </svg>
      </div>
    </figure>
  );
}
