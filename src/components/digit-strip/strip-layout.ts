import type { StripEvent } from '../../../shared/schemas/strips.ts';
import type { Outcome } from '../../../shared/schemas/words.ts';

export interface StripInput {
  events: readonly StripEvent[];
  outcome: Outcome;
  /** Correct digits of the returned root; null where none was returned. */
  digits: number | null;
  /** Correct digits that the case can give in binary64; null where no root is certified. */
  attainable: number | null;
  /** The returned root is the true one rounded to binary64. */
  exact: boolean;
}

/** Where the scale lies. All in px: x of 0 digits, px a digit, step of the strokes in the left gutter. */
export interface StripScale {
  x0: number;
  pitch: number;
  leftStep: number;
}

export interface StripStroke {
  x: number;
  /** Two different x within 1.2 px share one wide stroke. */
  isWide: boolean;
  isGutter: boolean;
  /** Indices into the events, in order of asking. */
  events: number[];
}

export interface StripPrime {
  x: number;
  /** 1 for f′, 2 for f″. */
  count: 1 | 2;
}

export interface StripFoot {
  x: number;
  /** Events that asked again at this x, in order. */
  events: number[];
  /** Feet drawn: two at most. */
  drawn: 1 | 2;
}

export interface StripEnd {
  kind: 'dot' | 'ring' | 'square' | 'open';
  x: number;
}

export interface StripLayout {
  strokes: StripStroke[];
  primes: StripPrime[];
  feet: StripFoot[];
  /** Centre of the pile at the left of a full gutter. */
  pile: number | null;
  isCrowded: boolean;
  axisStart: number;
  axisEnd: number;
  /** Post at the attainable digits where they are below 15. */
  limit: number | null;
  /** Where the line of travel stops; null where no way was made. */
  travelEnd: number | null;
  end: StripEnd | null;
}

export const rowScale: StripScale = { x0: 22, pitch: 10, leftStep: 2.5 };
export const mostDigits = 16;

const noDigit = 0.02;
const alreadyThere = 15.95;
const rightStep = 2.5;
const mostAtRight = 5;
const mostAtLeft = 8;
const nearby = 1.2;
const crowdStrokes = 16;
const crowdGap = 2;
const limitBelow = 15;

export function clipDigits(digits: number | null): number {
  return digits === null ? 0 : Math.min(mostDigits, Math.max(0, digits));
}

/** A place on the line: one x that was asked for, whatever kind of evaluation was made there. */
interface Place {
  digits: number;
  hasStroke: boolean;
  primes: Set<'df' | 'd2f'>;
  events: number[];
  again: number[];
}

function findPlaces(events: readonly StripEvent[]): Place[] {
  const isSystem = !events.some((event) => event.kind === 'f');
  const places: Place[] = [];
  const placeOf = new Map<number, Place>();
  events.forEach((event, index) => {
    if (event.kind === 'step' && !isSystem) return;
    const first = event.repeatOf === null ? undefined : placeOf.get(event.repeatOf);
    if (first !== undefined) {
      first.again.push(index);
      placeOf.set(index, first);
      return;
    }
    const isStroke = event.kind === 'f' || event.kind === 'step';
    // The derivative belongs to the f at the same x: the latest place with the same digits that lacks it.
    const isOpen = (place: Place): boolean =>
      isStroke
        ? !place.hasStroke
        : event.kind === 'step' || !place.primes.has(event.kind === 'df' ? 'df' : 'd2f');
    const last = places.findLast((place) => place.digits === clipDigits(event.digits) && isOpen(place));
    const isFresh = last === undefined || (isStroke && last !== places.at(-1));
    const place: Place = isFresh
      ? { digits: clipDigits(event.digits), hasStroke: false, primes: new Set(), events: [], again: [] }
      : last;
    if (isFresh) places.push(place);
    if (isStroke) place.hasStroke = true;
    else if (event.kind === 'df' || event.kind === 'd2f') place.primes.add(event.kind);
    place.events.push(index);
    placeOf.set(index, place);
  });
  return places;
}

/** x of each place; places without a digit stand in the left gutter, those at 16 in the right one. */
function placeX(places: readonly Place[], scale: StripScale): { x: number[]; piled: Set<number> } {
  const left = places.flatMap((place, index) => (place.digits < noDigit ? [index] : []));
  const piled = new Set(left.slice(0, Math.max(0, left.length - mostAtLeft)));
  let atRight = 0;
  const x = places.map((place, index) => {
    if (place.digits < noDigit) {
      const fromLast = left.length - 1 - left.indexOf(index);
      return fromLast < mostAtLeft
        ? scale.x0 - fromLast * scale.leftStep
        : scale.x0 - mostAtLeft * scale.leftStep - 1;
    }
    if (place.digits >= alreadyThere) {
      const slot = Math.min(atRight, mostAtRight - 1);
      atRight += 1;
      return scale.x0 + mostDigits * scale.pitch + slot * rightStep;
    }
    return scale.x0 + place.digits * scale.pitch;
  });
  return { x, piled };
}

function median(values: number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  const upper = sorted[middle] ?? Number.POSITIVE_INFINITY;
  return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] ?? upper) + upper) / 2;
}

/** Slow linear convergence: more than 16 strokes with a median gap under 2 px. */
function isCrowd(xs: readonly number[]): boolean {
  if (xs.length <= crowdStrokes) return false;
  const sorted = xs.toSorted((a, b) => a - b);
  const gaps = sorted.slice(1).map((x, index) => x - (sorted[index] ?? x));
  return median(gaps) < crowdGap;
}

const openOutcomes: readonly Outcome[] = ['refused', 'over budget', 'timed out', 'crashed', 'garbled'];

function findEnd(input: StripInput, lastX: number, scale: StripScale): StripEnd | null {
  if (input.outcome === 'not applicable') return null;
  if (openOutcomes.includes(input.outcome)) return { kind: 'open', x: lastX };
  const digits = input.exact ? mostDigits : input.digits;
  const x = digits === null ? lastX : scale.x0 + clipDigits(digits) * scale.pitch;
  if (input.outcome === 'false claim') return { kind: 'square', x };
  return { kind: input.outcome === 'other root' ? 'ring' : 'dot', x };
}

/** Positions of everything in a strip, from the path and the scale. Pure; the same for both sizes. */
export function layOutStrip(input: StripInput, scale: StripScale = rowScale): StripLayout {
  const places = findPlaces(input.events);
  const { x: placed, piled } = placeX(places, scale);
  const between = places.flatMap((place, index) =>
    place.hasStroke && place.digits >= noDigit && place.digits < alreadyThere
      ? [placed[index] ?? scale.x0]
      : [],
  );
  const isCrowded = isCrowd(between);

  const strokes: StripStroke[] = [];
  const primes: StripPrime[] = [];
  const feet: StripFoot[] = [];
  let pile: number | null = null;
  places.forEach((place, index) => {
    const x = placed[index] ?? scale.x0;
    const isGutter = place.digits < noDigit || place.digits >= alreadyThere;
    if (piled.has(index)) pile = x;
    else if (place.hasStroke) {
      const neighbour = strokes.find(
        (stroke) => Math.abs(stroke.x - x) <= nearby && (!isCrowded || stroke.x === x),
      );
      if (neighbour === undefined) strokes.push({ x, isWide: false, isGutter, events: [...place.events] });
      else {
        neighbour.isWide = neighbour.isWide || (!isCrowded && !(isGutter && neighbour.isGutter));
        neighbour.events.push(...place.events);
      }
    }
    if (place.primes.size > 0) primes.push({ x, count: place.primes.has('d2f') ? 2 : 1 });
    if (place.again.length > 0) feet.push({ x, events: place.again, drawn: place.again.length > 1 ? 2 : 1 });
  });

  const lastEvent = input.events.findLastIndex((event) => event.kind !== 'step' || places.length > 0);
  const lastPlace = places.findLastIndex(
    (place) => place.events.includes(lastEvent) || place.again.includes(lastEvent),
  );
  const lastX = placed[lastPlace] ?? placed.at(-1) ?? scale.x0;
  const end = findEnd(input, lastX, scale);
  const travel = end === null ? null : end.kind === 'open' ? end.x - 3 : end.x;
  const attainable = input.attainable === null ? mostDigits : clipDigits(input.attainable);
  return {
    strokes,
    primes,
    feet,
    pile,
    isCrowded,
    axisStart: scale.x0,
    axisEnd: scale.x0 + attainable * scale.pitch,
    limit: attainable < limitBelow ? scale.x0 + attainable * scale.pitch : null,
    travelEnd: travel !== null && travel > scale.x0 ? travel : null,
    end,
  };
}
