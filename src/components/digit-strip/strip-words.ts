import { formatDigits } from '../../lib/format.ts';
import { clipDigits, mostDigits, type StripInput } from './strip-layout.ts';

/** Counts that a strip says aloud. Where they are not given they are counted from the events. */
export interface StripCounts {
  evaluations: number;
  derivatives: number;
  repeated: number;
}

export function countEvents(input: StripInput): StripCounts {
  const asked = input.events.filter((event) => event.kind !== 'step');
  const isSystem = asked.every((event) => event.kind !== 'f');
  return {
    evaluations: isSystem ? input.events.length : asked.length,
    derivatives: asked.filter((event) => event.kind === 'df' || event.kind === 'd2f').length,
    repeated: input.events.filter((event) => event.repeatOf !== null).length,
  };
}

function lastDigits(input: StripInput): number {
  return clipDigits(input.events.at(-1)?.digits ?? null);
}

/** The text alternative of a strip, from counts only. */
export function describeStrip(input: StripInput, counts: StripCounts = countEvents(input)): string {
  if (input.outcome === 'not applicable') return 'not applicable';
  const parts = [`${counts.evaluations} evaluation${counts.evaluations === 1 ? '' : 's'}`];
  if (counts.derivatives > 0) parts.push(`${counts.derivatives} of them of the derivative`);
  if (counts.repeated > 0) parts.push(`${counts.repeated} at an x asked before`);
  if (input.outcome === 'solved') {
    const digits = input.exact ? mostDigits : clipDigits(input.digits ?? lastDigits(input));
    parts.push(`${formatDigits(digits)} digits`);
  } else {
    parts.push(input.outcome, `last at ${formatDigits(lastDigits(input))} digits`);
  }
  return parts.join(', ');
}

/** Reference and candidate in one sentence; a missing one is said. */
export function describePair(reference: StripInput | null, candidate: StripInput | null): string {
  const say = (input: StripInput | null): string => (input === null ? 'not there' : describeStrip(input));
  return `reference: ${say(reference)}; candidate: ${say(candidate)}`;
}
