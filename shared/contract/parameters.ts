import { z } from "zod";
import { resolveKinetics } from "../kinetics/disposition.ts";
import { wholeAmount } from "./limits.ts";
import { quantity } from "./quantity.ts";

const KineticValues = z.strictObject({
  volumeL: quantity("volumeL").exactOptional(),
  clearanceLPerH: quantity("clearanceLPerH").exactOptional(),
  eliminationRatePerH: quantity("eliminationRatePerH").exactOptional(),
  halfLifeH: quantity("halfLifeH").exactOptional(),
  absorptionRatePerH: quantity("absorptionRatePerH").exactOptional(),
  bioavailability: quantity("bioavailability").default(wholeAmount),
  saltFactor: quantity("saltFactor").default(wholeAmount),
});

/**
 * Kinetics of one person and one drug. Two independent values of volume, clearance, rate constant and
 * half-life fix the other two; more than two are accepted only where they agree.
 */
export const Parameters = KineticValues.superRefine((value, context) => {
  const resolved = resolveKinetics(value);
  if (!resolved.ok) context.addIssue({ code: "custom", path: [resolved.field], message: resolved.problem });
}).meta({ id: "Parameters" });
export type Parameters = z.infer<typeof Parameters>;
