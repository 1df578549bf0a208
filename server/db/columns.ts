import { customType, integer } from 'drizzle-orm/sqlite-core';
import type { z } from 'zod';

/** JSON text that is parsed by its schema on the way out, so that the type can be trusted. */
export function json<Schema extends z.ZodType>(name: string, schema: Schema) {
  return customType<{ data: z.output<Schema>; driverData: string }>({
    dataType: () => 'text',
    toDriver: (value) => JSON.stringify(value),
    fromDriver: (text) => schema.parse(JSON.parse(text)),
  })(name);
}

/** UTC, milliseconds since 1970. */
export const time = (name: string) => integer(name);
