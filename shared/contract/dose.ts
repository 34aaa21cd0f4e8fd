import { z } from "zod";
import { counts } from "./limits.ts";
import { AtH, quantity } from "./quantity.ts";

const Bolus = z.strictObject({ kind: z.literal("bolus"), atH: AtH, amountMg: quantity("amountMg") });

const Infusion = z.strictObject({
  kind: z.literal("infusion"),
  atH: AtH,
  amountMg: quantity("amountMg"),
  durationH: quantity("durationH"),
});

const Absorbed = z.strictObject({
  kind: z.literal("absorbed"),
  atH: AtH,
  amountMg: quantity("amountMg"),
  lagH: quantity("lagH").default(0),
});

const PumpStep = z.strictObject({ atH: AtH, rateMgPerH: quantity("rateMgPerH") });

/** A staircase of rates. Each rate holds until the next step; the last one holds to the end. */
const Pump = z.strictObject({
  kind: z.literal("pump"),
  steps: z
    .array(PumpStep)
    .min(1, { error: "must hold at least one step", abort: true })
    .max(counts.pumpSteps, { error: `must hold at most ${counts.pumpSteps} steps` })
    .superRefine((steps, context) => {
      const late = steps.findIndex((step, index) => index > 0 && !(step.atH > steps[index - 1]!.atH));
      if (late > 0)
        context.addIssue({
          code: "custom",
          path: [late, "atH"],
          message: `must be later than the step before it (${steps[late - 1]!.atH} h), got ${steps[late]!.atH} h`,
        });
    }),
});

/** One dose in elapsed hours from the plan's start. */
export const Dose = z.discriminatedUnion("kind", [Bolus, Infusion, Absorbed, Pump]).meta({ id: "Dose" });
export type Dose = z.infer<typeof Dose>;

/**
 * What elimination becomes from an hour on: a rate constant, a clearance, or a clearance added for a
 * span (a dialysis session). Added clearances may overlap; they add up on whatever holds at the time.
 */
export const EliminationChange = z
  .union(
    [
      z.strictObject({ fromH: AtH, eliminationRatePerH: quantity("changedRatePerH") }),
      z.strictObject({ fromH: AtH, clearanceLPerH: quantity("changedClearanceLPerH") }),
      z
        .strictObject({ fromH: AtH, toH: AtH, addedClearanceLPerH: quantity("addedClearanceLPerH") })
        .refine((span) => span.toH > span.fromH, { path: ["toH"], error: "must be later than fromH" }),
    ],
    {
      error:
        "must be an object of one kind: fromH with eliminationRatePerH, fromH with clearanceLPerH, or fromH and toH with addedClearanceLPerH",
    },
  )
  .meta({ id: "EliminationChange" });
export type EliminationChange = z.infer<typeof EliminationChange>;

/** Desired levels. */
export const RangeMgPerL = z
  .strictObject({ low: quantity("concentrationMgPerL"), high: quantity("concentrationMgPerL") })
  .refine((range) => range.high > range.low, { path: ["high"], error: "must be above low" })
  .meta({ id: "RangeMgPerL" });
export type RangeMgPerL = z.infer<typeof RangeMgPerL>;
