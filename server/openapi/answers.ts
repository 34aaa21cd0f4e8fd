import { z } from "zod";

export const Health = z.strictObject({ status: z.enum(["live", "ready"]) }).meta({ id: "Health" });
