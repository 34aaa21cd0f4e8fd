import { readFileSync } from "node:fs";
import { z } from "zod";

const Quantities = z.record(z.string(), z.union([z.number(), z.array(z.number())]));

/** One example: `expected` is the exact answer at 50 digits, `published_as` what was printed, and by how much it may differ. */
export const WorkedExample = z.strictObject({
  id: z.string(),
  topic: z.string(),
  source: z.string(),
  /** Whether the printed numbers were read in the source, or are quoted from memory or derived. */
  seen: z.boolean(),
  inputs: z.record(z.string(), z.unknown()),
  expected: Quantities,
  published_as: Quantities.nullable(),
  tolerance: z.strictObject({ expected_rel: z.number(), published_abs: z.record(z.string(), z.number()).optional() }),
  note: z.string(),
});
export type WorkedExample = z.infer<typeof WorkedExample>;

export const workedExamples: readonly WorkedExample[] = z
  .array(WorkedExample)
  .parse(JSON.parse(readFileSync(`${import.meta.dirname}/../../reference/worked-examples.json`, "utf8")));
