import { z } from "zod";
import { Caution } from "./caution.ts";
import { Dose, EliminationChange, RangeMgPerL } from "./dose.ts";
import { counts } from "./limits.ts";
import { Parameters } from "./parameters.ts";
import { Exposure } from "./prediction.ts";
import { quantity, SampleEveryH } from "./quantity.ts";

/** Doses of one cycle, atH from 0 up to cycleH, repeated for ever. Anything may overlap the cycle's end. */
export const SteadyStateRequest = z
  .strictObject({
    parameters: Parameters,
    /** Changes of elimination inside the cycle, repeated with it (a dialysis session every 48 h). */
    eliminationChanges: z.array(EliminationChange).max(counts.eliminationChanges).default([]),
    cycleH: quantity("intervalH"),
    doses: z
      .array(Dose)
      .min(1, { error: "must hold at least one dose" })
      .max(counts.doses, { error: `must hold at most ${counts.doses} doses` }),
    rangeMgPerL: RangeMgPerL.exactOptional(),
    sampleEveryH: SampleEveryH.exactOptional(),
  })
  .superRefine((request, context) => {
    const refuse = (path: (string | number)[], message: string) => context.addIssue({ code: "custom", path, message });
    request.doses.forEach((dose, index) => {
      if (dose.kind === "pump") {
        if (dose.steps.at(-1)!.rateMgPerH !== 0)
          refuse(["doses", index, "steps"], "must end with a rate of 0 mg/h, so that the pump stops");
        if (dose.steps[0]!.atH >= request.cycleH)
          refuse(["doses", index, "steps", 0, "atH"], `must be before the end of the cycle (${request.cycleH} h)`);
      } else if (dose.atH >= request.cycleH)
        refuse(["doses", index, "atH"], `must be before the end of the cycle (${request.cycleH} h), got ${dose.atH} h`);
    });
    request.eliminationChanges.forEach((change, index) => {
      if (change.fromH >= request.cycleH)
        refuse(
          ["eliminationChanges", index, "fromH"],
          `must be before the end of the cycle (${request.cycleH} h), got ${change.fromH} h`,
        );
      if ("toH" in change && change.toH > request.cycleH)
        refuse(
          ["eliminationChanges", index, "toH"],
          `must be at most the end of the cycle (${request.cycleH} h), got ${change.toH} h: state what runs on as a span from 0 h`,
        );
    });
    if (request.parameters.absorptionRatePerH === undefined && request.doses.some((dose) => dose.kind === "absorbed"))
      refuse(["parameters", "absorptionRatePerH"], "is needed because a dose is absorbed");
    if (request.sampleEveryH !== undefined && request.cycleH / request.sampleEveryH > counts.sampleTimes)
      refuse(["sampleEveryH"], `gives more than ${counts.sampleTimes} points over ${request.cycleH} h`);
  })
  .meta({ id: "SteadyStateRequest" });
export type SteadyStateRequest = z.infer<typeof SteadyStateRequest>;

export const SteadyStateResponse = z
  .strictObject({
    cycleH: z.number(),
    /** Exact metrics of one cycle at steady state. */
    exposure: Exposure,
    auc24MgHPerL: z.number(),
    /** (peak - trough) / trough; absent where the trough is 0. */
    swing: z.number().exactOptional(),
    /** (peak - trough) / average. */
    fluctuation: z.number(),
    /** Steady-state area of a cycle over the area of the first cycle from nothing; absent where that leaves none. */
    accumulationRatio: z.number().exactOptional(),
    /** Level at the start of the cycle, just before anything given then. */
    startMgPerL: z.number(),
    timesH: z.array(z.number()).exactOptional(),
    concentrationsMgPerL: z.array(z.number()).exactOptional(),
    cautions: z.array(Caution).min(1),
  })
  .meta({ id: "SteadyStateResponse" });
export type SteadyStateResponse = z.infer<typeof SteadyStateResponse>;
