import { z } from "zod";

/** RFC 9457 problem details; `errors` names each bad field by JSON Pointer. */
export const Problem = z
  .strictObject({
    type: z.string(),
    title: z.string(),
    status: z.int().min(400).max(599),
    detail: z.string().exactOptional(),
    instance: z.string().exactOptional(),
    requestId: z.string().exactOptional(),
    errors: z.array(z.strictObject({ pointer: z.string(), detail: z.string() })).exactOptional(),
  })
  .meta({ id: "Problem" });
export type Problem = z.infer<typeof Problem>;
