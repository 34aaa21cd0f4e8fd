import { readFileSync } from "node:fs";
import { z } from "zod";
import type { CourseInput } from "../../../shared/kinetics/course.ts";

const Pair = z.tuple([z.number(), z.number()]);

const Stated = z.strictObject({
  id: z.string(),
  volume_l: z.number(),
  elimination: z.array(Pair).min(1),
  end_h: z.number(),
  ka_per_h: z.number().optional(),
  bioavailability: z.number().default(1),
  baseline_mg_per_l: z.number().default(0),
  doses: z.array(
    z.discriminatedUnion("kind", [
      z.strictObject({ kind: z.literal("bolus"), time_h: z.number(), amount_mg: z.number() }),
      z.strictObject({
        kind: z.literal("infusion"),
        time_h: z.number(),
        amount_mg: z.number(),
        duration_h: z.number(),
      }),
      z.strictObject({
        kind: z.literal("absorbed"),
        time_h: z.number(),
        amount_mg: z.number(),
        lag_h: z.number().default(0),
      }),
    ]),
  ),
  times_h: z.array(z.number()),
  window_h: Pair,
  threshold_mg_per_l: z.number(),
  answers: z.strictObject({
    conc_mg_per_l: z.array(z.number()),
    auc_mg_h_per_l: z.number(),
    time_above_h: z.number(),
    max: Pair,
    min: Pair,
  }),
});
type Stated = z.infer<typeof Stated>;

/** One course that scipy integrated, as the file states it, and the same course as this engine takes it. */
export type IntegratedCase = Stated & { readonly input: CourseInput };

/** The fifteen courses of test/reference/ode-cases.json. */
export const integratedCases: readonly IntegratedCase[] = z
  .strictObject({ source: z.string(), cases: z.array(Stated).length(15) })
  .parse(JSON.parse(readFileSync(`${import.meta.dirname}/../../reference/ode-cases.json`, "utf8")))
  .cases.map((stated) => ({ ...stated, input: inputOf(stated) }));

function inputOf(stated: Stated): CourseInput {
  const [first, ...later] = stated.elimination;
  return {
    parameters: {
      volumeL: stated.volume_l,
      eliminationRatePerH: first![1],
      ...(stated.ka_per_h !== undefined && { absorptionRatePerH: stated.ka_per_h }),
      bioavailability: stated.bioavailability,
      saltFactor: 1,
    },
    eliminationChanges: later.map(([fromH, eliminationRatePerH]) => ({ fromH, eliminationRatePerH })),
    startConcentrationMgPerL: stated.baseline_mg_per_l,
    doses: stated.doses.map(doseOf),
    horizonH: stated.end_h,
  };
}

function doseOf(dose: Stated["doses"][number]): CourseInput["doses"][number] {
  const given = { atH: dose.time_h, amountMg: dose.amount_mg };
  if (dose.kind === "infusion") return { kind: "infusion", ...given, durationH: dose.duration_h };
  if (dose.kind === "absorbed") return { kind: "absorbed", ...given, lagH: dose.lag_h };
  return { kind: "bolus", ...given };
}
