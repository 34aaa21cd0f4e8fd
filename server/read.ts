import type { z } from "zod";
import { NotFoundError } from "../db/store-errors.ts";
import { fieldProblems } from "./field-problems.ts";
import { RequestError } from "./request-errors.ts";
import { sayIssue } from "./say-issue.ts";

/**
 * Something from outside, as its contract has it.
 *
 * @throws {RequestError} naming each bad field, its value and what is allowed
 */
export function read<Schema extends z.ZodType>(schema: Schema, value: unknown): z.output<Schema> {
  const parsed = schema.safeParse(value, { error: sayIssue });
  if (parsed.success) return parsed.data;
  const errors = fieldProblems(parsed.error, value);
  throw new RequestError(
    "validation",
    errors.length === 1 ? "one value is not usable" : `${errors.length} values are not usable`,
    { errors },
  );
}

/**
 * An id in an address. One that no id can look like belongs to nothing.
 *
 * @throws {NotFoundError}
 */
export function readId<Schema extends z.ZodType>(schema: Schema, value: unknown, noun: string): z.output<Schema> {
  const parsed = schema.safeParse(value);
  if (!parsed.success) throw new NotFoundError(noun);
  return parsed.data;
}
