import { z } from 'zod';
import { type Html, html } from './html.ts';

/** What of a JSON Schema the page puts in words. */
const jsonSchema = z.looseObject({
  $ref: z.string().optional(),
  type: z.union([z.string(), z.array(z.string())]).optional(),
  const: z.unknown().optional(),
  enum: z.array(z.unknown()).optional(),
  anyOf: z.array(z.unknown()).optional(),
  oneOf: z.array(z.unknown()).optional(),
  items: z.unknown().optional(),
  prefixItems: z.array(z.unknown()).optional(),
  properties: z.record(z.string(), z.unknown()).optional(),
  additionalProperties: z.unknown().optional(),
  required: z.array(z.string()).optional(),
  format: z.string().optional(),
  default: z.unknown().optional(),
  minimum: z.number().optional(),
  maximum: z.number().optional(),
  maxLength: z.number().optional(),
});
export type ReadSchema = z.infer<typeof jsonSchema>;

export const readSchema = (value: unknown): ReadSchema => jsonSchema.catch({}).parse(value);

function joined(parts: readonly Html[], between: string): Html {
  return html`${parts.map((part, index) => (index === 0 ? part : html`${between}${part}`))}`;
}

function limits({ minimum, maximum, maxLength, default: given }: ReadSchema): string {
  const words: string[] = [];
  if (minimum !== undefined && minimum > Number.MIN_SAFE_INTEGER) words.push(`from ${minimum}`);
  if (maximum !== undefined && maximum < Number.MAX_SAFE_INTEGER) words.push(`to ${maximum}`);
  if (maxLength !== undefined) words.push(`at most ${maxLength} characters`);
  if (given !== undefined) words.push(`${JSON.stringify(given)} where left out`);
  return words.length === 0 ? '' : `, ${words.join(', ')}`;
}

/** The type of a value in a few words, with links to what has a name. */
export function typeWords(value: unknown): Html {
  const schema = readSchema(value);
  if (schema.$ref !== undefined) {
    const name = schema.$ref.split('/').at(-1) ?? '';
    return html`<a href="#schema-${name}">${name}</a>`;
  }
  const choices = schema.anyOf ?? schema.oneOf;
  if (choices) return joined(choices.map(typeWords), ' or ');
  if (schema.const !== undefined) return html`${JSON.stringify(schema.const)}`;
  if (schema.enum)
    return html`${schema.enum.map((word) => JSON.stringify(word)).join(' | ')}${limits(schema)}`;
  if (schema.prefixItems) return html`(${joined(schema.prefixItems.map(typeWords), ', ')})`;
  if (schema.items !== undefined) return html`list of ${typeWords(schema.items)}`;
  if (schema.properties) {
    const fields = Object.entries(schema.properties).map(
      ([name, field]) => html`${name}: ${typeWords(field)}`,
    );
    return html`{ ${joined(fields, '; ')} }`;
  }
  if (typeof schema.additionalProperties === 'object' && schema.additionalProperties !== null)
    return html`by name: ${typeWords(schema.additionalProperties)}`;
  const type = Array.isArray(schema.type) ? schema.type.join(' or ') : (schema.type ?? 'anything');
  return html`${schema.format ? `${type}, ${schema.format}` : type}${limits(schema)}`;
}
