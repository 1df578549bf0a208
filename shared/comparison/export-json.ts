import type { AllowanceSet } from '../schemas/allowances.ts';
import { comparisonFile, comparisonFormat } from '../schemas/comparison-file.ts';
import type { Comparison } from './comparison.ts';

/**
 * A comparison as JSON text that `comparisonFile` reads back: everything but the paths, whose hashes are in it.
 * Throws ZodError where a figure is not finite, which no comparison of measured solves has.
 */
export function exportJson(comparison: Comparison, allowances: AllowanceSet): string {
  const file = comparisonFile.parse({ format: comparisonFormat, allowances, ...comparison });
  return `${JSON.stringify(file, null, 1)}\n`;
}
