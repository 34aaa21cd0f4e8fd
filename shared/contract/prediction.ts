import { z } from "zod";
import { Caution } from "./caution.ts";
import { Dose, EliminationChange, RangeMgPerL } from "./dose.ts";
import { counts } from "./limits.ts";
import { Parameters } from "./parameters.ts";
import { AtH, quantity, SampleEveryH } from "./quantity.ts";

const Window = z
  .strictObject({ fromH: AtH, toH: AtH })
  .refine((window) => window.toH > window.fromH, { path: ["toH"], error: "must be later than fromH" });

/** Doses and what elimination does: the input of every stateless answer. */
export const PredictionRequest = z
  .strictObject({
    parameters: Parameters,
    eliminationChanges: z.array(EliminationChange).max(counts.eliminationChanges).default([]),
    startConcentrationMgPerL: quantity("concentrationMgPerL").default(0),
    doses: z.array(Dose).max(counts.doses, { error: `must hold at most ${counts.doses} doses` }),
    horizonH: quantity("horizonH"),
    sampleEveryH: SampleEveryH.exactOptional(),
    sampleTimesH: z.array(AtH).min(1).max(counts.sampleTimes).exactOptional(),
    window: Window.exactOptional(),
    rangeMgPerL: RangeMgPerL.exactOptional(),
    remainsAtH: AtH.exactOptional(),
  })
  .superRefine((request, context) => {
    const refuse = (path: (string | number)[], message: string) => context.addIssue({ code: "custom", path, message });
    const { horizonH } = request;
    if ((request.sampleEveryH === undefined) === (request.sampleTimesH === undefined))
      refuse(["sampleEveryH"], "give either sampleEveryH or sampleTimesH, not both");
    if (request.sampleEveryH !== undefined && horizonH / request.sampleEveryH > counts.sampleTimes)
      refuse(["sampleEveryH"], `gives more than ${counts.sampleTimes} points over ${horizonH} h`);
    const outside = request.sampleTimesH?.findIndex((timeH) => timeH > horizonH) ?? -1;
    if (outside >= 0) refuse(["sampleTimesH", outside], `must be at most horizonH (${horizonH} h)`);
    const backwards =
      request.sampleTimesH?.findIndex((timeH, index, all) => index > 0 && timeH < all[index - 1]!) ?? -1;
    if (backwards >= 0) refuse(["sampleTimesH", backwards], "must not be before the time in front of it");
    if (request.window !== undefined && request.window.toH > horizonH)
      refuse(["window", "toH"], `must be at most horizonH (${horizonH} h)`);
    if (request.remainsAtH !== undefined && request.remainsAtH > horizonH)
      refuse(["remainsAtH"], `must be at most horizonH (${horizonH} h)`);
    if (request.parameters.absorptionRatePerH === undefined && request.doses.some((dose) => dose.kind === "absorbed"))
      refuse(["parameters", "absorptionRatePerH"], "is needed because a dose is absorbed");
  })
  .meta({ id: "PredictionRequest" });
export type PredictionRequest = z.infer<typeof PredictionRequest>;

const Extreme = z.strictObject({ atH: z.number(), mgPerL: z.number() });

/** What one stretch of time amounts to. The three hours are absent without a range. */
export const Exposure = z
  .strictObject({
    aucMgHPerL: z.number(),
    averageMgPerL: z.number(),
    peak: Extreme,
    trough: Extreme,
    hoursAbove: z.number().exactOptional(),
    hoursWithin: z.number().exactOptional(),
    hoursBelow: z.number().exactOptional(),
  })
  .meta({ id: "Exposure" });
export type Exposure = z.infer<typeof Exposure>;

/** What one dose, or the concentration present at the start, still contributes to the level. */
export const Contribution = z
  .strictObject({
    dose: z.union([z.int().min(0), z.literal("start")]),
    mgPerL: z.number(),
    percent: z.number(),
  })
  .meta({ id: "Contribution" });
export type Contribution = z.infer<typeof Contribution>;

export const PredictionResponse = z
  .strictObject({
    timesH: z.array(z.number()),
    concentrationsMgPerL: z.array(z.number()),
    exposure: Exposure,
    remains: z.array(Contribution).exactOptional(),
    cautions: z.array(Caution).min(1),
  })
  .meta({ id: "PredictionResponse" });
export type PredictionResponse = z.infer<typeof PredictionResponse>;
