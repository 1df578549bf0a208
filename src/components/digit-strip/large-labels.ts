import type { StripEvent } from '../../../shared/schemas/strips.ts';
import type { StripLayout } from './strip-layout.ts';

export interface StripLabel {
  x: number;
  text: string;
}

const charWidth = 6.1;
const roomForFoot = 22;

/** Number of each evaluation from 1; steps carry the number of the evaluation before them. */
export function numberEvaluations(events: readonly StripEvent[]): number[] {
  let count = 0;
  const isSystem = events.every((event) => event.kind === 'step' || event.kind === 'df');
  return events.map((event) => {
    if (event.kind !== 'step' || isSystem) count += 1;
    return count;
  });
}

/** Numbers above the strokes, as many as stand side by side without touching; the last one always. */
export function labelStrokes(layout: StripLayout, numbers: readonly number[]): StripLabel[] {
  const sorted = layout.strokes.toSorted((a, b) => a.x - b.x);
  const labels: StripLabel[] = [];
  const width = (text: string): number => text.length * charWidth;
  const isFree = (x: number, text: string): boolean =>
    labels.every((label) => Math.abs(label.x - x) >= (width(label.text) + width(text)) / 2 + 3);
  const last = layout.strokes.at(-1);
  for (const stroke of last === undefined ? sorted : [last, ...sorted.filter((other) => other !== last)]) {
    const first = stroke.events[0];
    const text = String(first === undefined ? '' : (numbers[first] ?? ''));
    if (text !== '' && isFree(stroke.x, text)) labels.push({ x: stroke.x, text });
  }
  return labels;
}

/** Numbers at the right of the feet, where 22 px are free before the next foot. */
export function labelFeet(layout: StripLayout, numbers: readonly number[], right: number): StripLabel[] {
  const sorted = layout.feet.toSorted((a, b) => a.x - b.x);
  return sorted.flatMap((foot, index) => {
    const start = foot.x + (foot.drawn === 2 ? 2.4 : 0);
    const next = sorted[index + 1]?.x ?? right + roomForFoot;
    if (next - start < roomForFoot) return [];
    const first = numbers[foot.events[0] ?? -1];
    if (first === undefined) return [];
    const more = foot.events.length > 1 ? '…' : '';
    return [{ x: start + 4, text: `${first}${more}` }];
  });
}
