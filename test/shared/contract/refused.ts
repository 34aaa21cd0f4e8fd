import type { z } from "zod";

/** The fields that a schema complains about, as "path: message", in the order of the schema. */
export function complaints(schema: z.ZodType, value: unknown): string[] {
  const parsed = schema.safeParse(value);
  if (parsed.success) return [];
  return parsed.error.issues.map(({ path, message }) => `${path.join("/")}: ${message}`);
}
