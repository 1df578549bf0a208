import type { StripEnd, StripLayout } from './strip-layout.ts';

/** Vertical measures of a strip in px. */
export interface StripMeasures {
  top: number;
  base: number;
  crowdedTop: number;
  primeTop: number;
  primeHeight: number;
  footTop: number;
  footHeight: number;
  dot: number;
  ring: number;
  square: number;
  open: number;
}

export const rowMeasures: StripMeasures = {
  top: 5,
  base: 13.5,
  crowdedTop: 7,
  primeTop: 0.6,
  primeHeight: 2.6,
  footTop: 15,
  footHeight: 4.5,
  dot: 2.9,
  ring: 5,
  square: 5.6,
  open: 4.2,
};

export interface StripDrawingProps {
  layout: StripLayout;
  measures: StripMeasures;
}

const round = (value: number): number => Math.round(value * 100) / 100;

function bars(xs: readonly number[], from: number, to: number): string {
  return xs.map((x) => `M${round(x)} ${from}V${to}`).join('');
}

function End({ end, measures }: { end: StripEnd; measures: StripMeasures }) {
  const { base } = measures;
  const x = round(end.x);
  if (end.kind === 'open') {
    const r = measures.open;
    const centre = round(end.x + r + 0.3);
    return (
      <path
        data-part="open end"
        d={`M${centre} ${base - r}A${r} ${r} 0 0 0 ${centre} ${base + r}`}
        fill="none"
        stroke="var(--worse)"
        strokeWidth={2.2}
      />
    );
  }
  if (end.kind === 'square') {
    const side = measures.square;
    return (
      <rect
        data-part="open square"
        x={round(end.x - side / 2)}
        y={base - side / 2}
        width={side}
        height={side}
        fill="var(--paper)"
        stroke="var(--worse)"
        strokeWidth={1.6}
      />
    );
  }
  return (
    <>
      <circle data-part="end dot" cx={x} cy={base} r={measures.dot} fill="currentColor" />
      {end.kind === 'ring' && (
        <circle
          data-part="ring"
          cx={x}
          cy={base}
          r={measures.ring}
          fill="none"
          stroke="currentColor"
          strokeWidth={1.25}
        />
      )}
    </>
  );
}

/** Travel, strokes, primes, feet and end, in this order; guides, axis and limit are drawn beneath by the caller. */
export function StripDrawing({ layout, measures }: StripDrawingProps) {
  const { isCrowded } = layout;
  const { base, top } = measures;
  const thin = layout.strokes.filter((stroke) => !stroke.isWide && !(isCrowded && !stroke.isGutter));
  const crowd = layout.strokes.filter((stroke) => isCrowded && !stroke.isGutter);
  const wide = layout.strokes.filter((stroke) => stroke.isWide);
  const primes = layout.primes.flatMap((prime) =>
    prime.count === 2 ? [prime.x - 1.5, prime.x + 1.5] : [prime.x],
  );
  const feet = layout.feet.flatMap((foot) => (foot.drawn === 2 ? [foot.x, foot.x + 2.4] : [foot.x]));
  const at = (strokes: typeof thin): number[] => strokes.map((stroke) => stroke.x);
  return (
    <>
      {layout.travelEnd !== null && (
        <path
          data-part="travel"
          d={`M${layout.axisStart} ${base}H${round(layout.travelEnd)}`}
          stroke="currentColor"
          strokeWidth={1.5}
        />
      )}
      {layout.pile !== null && (
        <path data-part="pile" d={bars([layout.pile], top, base)} stroke="currentColor" strokeWidth={4} />
      )}
      {thin.length > 0 && (
        <path data-part="strokes" d={bars(at(thin), top, base)} stroke="currentColor" strokeWidth={1.25} />
      )}
      {crowd.length > 0 && (
        <path
          data-part="crowded strokes"
          d={bars(at(crowd), measures.crowdedTop, base)}
          stroke="currentColor"
          strokeWidth={0.7}
        />
      )}
      {wide.length > 0 && (
        <path
          data-part="wide strokes"
          d={bars(at(wide), top, base)}
          stroke="currentColor"
          strokeWidth={2.5}
        />
      )}
      {primes.length > 0 && (
        <path
          data-part="primes"
          d={bars(primes, measures.primeTop, round(measures.primeTop + measures.primeHeight))}
          stroke="currentColor"
          strokeWidth={isCrowded ? 0.7 : 1.5}
        />
      )}
      {feet.length > 0 && (
        <path
          data-part="feet"
          d={bars(feet, measures.footTop, measures.footTop + measures.footHeight)}
          stroke="var(--worse)"
          strokeWidth={isCrowded ? 0.9 : 1.9}
        />
      )}
      {layout.end !== null && <End end={layout.end} measures={measures} />}
    </>
  );
}
