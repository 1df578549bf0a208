import { z } from 'zod';
import { AppError } from '../../shared/errors.ts';
import { allowanceSet } from '../../shared/schemas/allowances.ts';
import { comparisonFile } from '../../shared/schemas/comparison-file.ts';
import { manifestJsonSchema } from '../../shared/schemas/manifest.ts';
import { measurementFile } from '../../shared/schemas/measurement.ts';
import { suiteFileJsonSchema } from '../../shared/schemas/suite-file.ts';
import { parseCommand } from './arguments.ts';
import { exitCodes } from './exit.ts';

export const schemaUsage = 'tallyroot schema allowances|comparison|manifest|measurement|suite';

const schemas = new Map<string, () => unknown>([
  ['allowances', () => z.toJSONSchema(allowanceSet, { io: 'input' })],
  ['comparison', () => z.toJSONSchema(comparisonFile)],
  ['manifest', () => manifestJsonSchema()],
  ['measurement', () => z.toJSONSchema(measurementFile)],
  ['suite', () => suiteFileJsonSchema()],
]);

/** `schema`: the JSON Schema of one of the product's files, generated from what it is checked with. */
export async function schemaCommand(words: readonly string[]): Promise<number> {
  const { positionals } = parseCommand(words, {}, schemaUsage);
  const generate = schemas.get(positionals[0] ?? '');
  if (generate === undefined || positionals.length > 1)
    throw new AppError('invalid', `Usage: ${schemaUsage}`);
  console.log(JSON.stringify(generate(), null, 2));
  return exitCodes.fine;
}
