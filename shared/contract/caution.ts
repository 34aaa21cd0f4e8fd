import { z } from "zod";

/**
 * One thing the reader must know about an answer. "stop" must be answered with a reason before a
 * revision is saved or a sheet printed; "warn" and "note" are shown with everything they touch.
 */
export const Caution = z
  .strictObject({
    code: z.string().regex(/^[a-z0-9-]+$/),
    severity: z.enum(["stop", "warn", "note"]),
    text: z.string().min(1),
    /** JSON Pointer or plain name of what it is about: "/setting/kinetics/volumeL", "answer". */
    about: z.string(),
  })
  .meta({ id: "Caution" });
export type Caution = z.infer<typeof Caution>;
