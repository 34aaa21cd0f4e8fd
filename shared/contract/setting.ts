import { z } from "zod";
import { resolveKinetics } from "../kinetics/disposition.ts";
import { RangeMgPerL } from "./dose.ts";
import { counts, type LimitName } from "./limits.ts";
import { quantity } from "./quantity.ts";
import { eachIdOnce, Instant, PartId } from "./schedule.ts";

/** Where a number came from. Later kinds: a formula, a drug model, measured levels. */
export const Origin = z
  .discriminatedUnion("kind", [
    z.strictObject({ kind: z.literal("typed"), note: z.string().max(counts.noteCharacters).default("") }),
  ])
  .meta({ id: "Origin" });
export type Origin = z.infer<typeof Origin>;

const stated = (name: LimitName) => z.strictObject({ value: quantity(name), origin: Origin });

/** Kinetics with the origin of each value. Any two independent of V, CL, k and half-life. */
export const StatedKinetics = z
  .strictObject({
    volumeL: stated("volumeL").exactOptional(),
    clearanceLPerH: stated("clearanceLPerH").exactOptional(),
    eliminationRatePerH: stated("eliminationRatePerH").exactOptional(),
    halfLifeH: stated("halfLifeH").exactOptional(),
    absorptionRatePerH: stated("absorptionRatePerH").exactOptional(),
    lagH: stated("lagH").exactOptional(),
    bioavailability: stated("bioavailability").exactOptional(),
    saltFactor: stated("saltFactor").exactOptional(),
  })
  .superRefine((kinetics, context) => {
    const values = Object.fromEntries(Object.entries(kinetics).map(([name, entry]) => [name, entry.value]));
    const resolved = resolveKinetics(values);
    if (!resolved.ok) context.addIssue({ code: "custom", path: [resolved.field], message: resolved.problem });
  })
  .meta({ id: "StatedKinetics" });
export type StatedKinetics = z.infer<typeof StatedKinetics>;

const changeCommon = { id: PartId, from: Instant, origin: Origin };

/** A change of elimination in clock time. */
export const DatedEliminationChange = z
  .discriminatedUnion("kind", [
    z.strictObject({ kind: z.literal("rate"), ...changeCommon, eliminationRatePerH: quantity("changedRatePerH") }),
    z.strictObject({
      kind: z.literal("clearance"),
      ...changeCommon,
      clearanceLPerH: quantity("changedClearanceLPerH"),
    }),
    z
      .strictObject({
        kind: z.literal("added-clearance"),
        ...changeCommon,
        until: Instant,
        addedClearanceLPerH: quantity("addedClearanceLPerH"),
      })
      .refine(({ from, until }) => Date.parse(until) > Date.parse(from), {
        path: ["until"],
        error: "must be later than from",
      }),
  ])
  .meta({ id: "DatedEliminationChange" });
export type DatedEliminationChange = z.infer<typeof DatedEliminationChange>;

/** Everything about the person and the drug that all alternatives of a case share. */
export const CaseSetting = z
  .strictObject({
    plan: z.strictObject({ start: Instant, horizonH: quantity("horizonH") }),
    kinetics: StatedKinetics,
    eliminationChanges: z
      .array(DatedEliminationChange)
      .max(counts.eliminationChanges)
      .default([])
      .superRefine(eachIdOnce),
    startConcentration: z
      .strictObject({ valueMgPerL: quantity("concentrationMgPerL"), origin: Origin })
      .exactOptional(),
    rangeMgPerL: RangeMgPerL.exactOptional(),
  })
  .meta({ id: "CaseSetting" });
export type CaseSetting = z.infer<typeof CaseSetting>;
