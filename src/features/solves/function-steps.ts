import type { AskedPoint } from '../../components/charts/curve-plot.tsx';
import type { Range } from '../../components/charts/plot-ranges.ts';
import type { PathLine } from './solve-side.ts';

/** One evaluation of f as the plot walks through them. */
export interface FunctionStep extends AskedPoint {
  digits: number | null;
  /** Number of the evaluation that asked first at this x, or null. */
  again: number | null;
  /** f′ at this x, where the solver has asked for it by then or right after. */
  slope: number | null;
}

/** Every evaluation of f in order; a derivative that was asked at the same x goes with it. */
export function functionSteps(lines: readonly PathLine[]): FunctionStep[] {
  return lines.flatMap((line, index): FunctionStep[] => {
    const { kind, x, a, b } = line.event;
    if (kind !== 'f' && kind !== 'fdf') return [];
    const next = lines[index + 1]?.event;
    const before = lines[index - 1]?.event;
    const beside = [next, before].find((event) => event?.kind === 'df' && Object.is(event.x, x));
    const slope = kind === 'fdf' ? b : (beside?.a ?? null);
    return [
      {
        number: line.number,
        x,
        y: a,
        digits: line.digits,
        again: line.again,
        slope: slope !== null && Number.isFinite(slope) ? slope : null,
      },
    ];
  });
}

/** Narrower than this share of x the numbers at the axis could not be told apart. */
const narrowest = 1e-5;

/** What a close look at a step shows: its x, the two before it and the root, with room around them. */
export function closeRange(steps: readonly FunctionStep[], index: number, root: number | null): Range | null {
  const near = steps.slice(Math.max(0, index - 2), index + 1).map((step) => step.x);
  const wanted = [...near, ...(root === null ? [] : [root])].filter(Number.isFinite);
  if (wanted.length === 0) return null;
  const [low, high] = [Math.min(...wanted), Math.max(...wanted)];
  const middle = (low + high) / 2;
  const half = Math.max((high - low) * 0.65, Math.max(Math.abs(middle), 1e-3) * narrowest);
  return { low: middle - half, high: middle + half };
}
