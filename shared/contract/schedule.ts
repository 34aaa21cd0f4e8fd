import { z } from "zod";
import { counts } from "./limits.ts";
import { quantity } from "./quantity.ts";

/** An instant: ISO 8601 with seconds and offset, such as 2026-03-29T08:00:00+01:00; in years whose clocks are known. */
export const Instant = z.iso
  .datetime({ offset: true, error: "must be a date and time with offset, such as 2026-03-29T08:00:00+01:00" })
  .refine((text) => text >= "1975" && text < "2200", { error: "must lie in the years 1975 to 2199" })
  .meta({ description: "ISO 8601 date and time with offset" });
export type Instant = z.infer<typeof Instant>;

/** A refinement of a list whose members are told apart by their ids: a record must mean one order, not two. */
export function eachIdOnce<Part extends { readonly id: string }>(
  parts: readonly Part[],
  context: z.RefinementCtx<readonly Part[]>,
): void {
  const seen = new Set<string>();
  parts.forEach(({ id }, index) => {
    if (seen.has(id)) context.addIssue({ code: "custom", path: [index, "id"], message: "must not be used twice" });
    seen.add(id);
  });
}

/** Ids that the client makes for the parts of one document. */
export const PartId = z.string().regex(/^[A-Za-z0-9-]{1,40}$/, { error: "must be 1 to 40 letters, digits or hyphens" });

const Occurrence = z.int().min(0).max(counts.doses);

const GivePump = z.strictObject({
  kind: z.literal("pump"),
  /** Hours after the order's time; the last rate must be 0, so that the log says when the pump stopped. */
  steps: z
    .array(z.strictObject({ afterH: z.number().min(0).max(17_568), rateMgPerH: quantity("rateMgPerH") }))
    .min(2, { error: "must hold at least two steps: a rate and a stop", abort: true })
    .max(counts.pumpSteps, { error: `must hold at most ${counts.pumpSteps} steps` })
    .superRefine((steps, context) => {
      const late = steps.findIndex((step, index) => index > 0 && !(step.afterH > steps[index - 1]!.afterH));
      if (late > 0)
        context.addIssue({ code: "custom", path: [late, "afterH"], message: "must be later than the step before it" });
      if (steps.at(-1)!.rateMgPerH !== 0)
        context.addIssue({
          code: "custom",
          path: [steps.length - 1, "rateMgPerH"],
          message: "must be 0 mg/h: the log must say when the pump stopped",
        });
    }),
});

/** What is given, without when. */
export const Give = z
  .discriminatedUnion("kind", [
    z.strictObject({ kind: z.literal("bolus"), amountMg: quantity("amountMg") }),
    z.strictObject({ kind: z.literal("infusion"), amountMg: quantity("amountMg"), durationH: quantity("durationH") }),
    z.strictObject({ kind: z.literal("absorbed"), amountMg: quantity("amountMg") }),
    GivePump,
  ])
  .meta({ id: "Give" });
export type Give = z.infer<typeof Give>;

/** When a repeating order stops. "until" is exclusive: nothing is given at that instant or later. */
export const End = z
  .discriminatedUnion("kind", [
    z.strictObject({ kind: z.literal("open") }),
    z.strictObject({ kind: z.literal("until"), at: Instant }),
    z.strictObject({ kind: z.literal("count"), doses: z.int().min(1).max(counts.doses) }),
  ])
  .meta({ id: "End" });
export type End = z.infer<typeof End>;

const ClockTime = z.strictObject({
  time: z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, { error: "must be a 24-hour time such as 08:00" }),
  /** Amount at this time of day, where it differs from the order's. */
  amountMg: quantity("amountMg").exactOptional(),
});

/** "every" counts elapsed hours; "clock-times" keeps the wall clock, whatever daylight saving does. */
export const When = z
  .discriminatedUnion("kind", [
    z.strictObject({ kind: z.literal("once"), at: Instant }),
    z.strictObject({ kind: z.literal("every"), from: Instant, intervalH: quantity("intervalH"), end: End }),
    z.strictObject({
      kind: z.literal("clock-times"),
      from: Instant,
      times: z
        .array(ClockTime)
        .min(1)
        .max(counts.clockTimesPerOrder)
        .refine((times) => new Set(times.map(({ time }) => time)).size === times.length, {
          error: "must not name a time twice",
        }),
      end: End,
    }),
  ])
  .refine(
    (when) => when.kind === "once" || when.end.kind !== "until" || Date.parse(when.end.at) > Date.parse(when.from),
    {
      path: ["end", "at"],
      error: "must be later than from: nothing would be given",
    },
  )
  .meta({ id: "When" });
export type When = z.infer<typeof When>;

/** One dose of an order that is planned otherwise than the rest. Occurrence 0 is the order's first dose. */
const Exception = z.union([
  z.strictObject({ occurrence: Occurrence, skip: z.literal(true) }),
  z.strictObject({
    occurrence: Occurrence,
    at: Instant.exactOptional(),
    amountMg: quantity("amountMg").exactOptional(),
    durationH: quantity("durationH").exactOptional(),
  }),
]);

export const Order = z
  .strictObject({
    id: PartId,
    give: Give,
    when: When,
    exceptions: z
      .array(Exception)
      .max(counts.exceptionsPerOrder)
      .default([])
      .superRefine((exceptions, context) => {
        const seen = new Set<number>();
        exceptions.forEach(({ occurrence }, index) => {
          if (seen.has(occurrence))
            context.addIssue({
              code: "custom",
              path: [index, "occurrence"],
              message: `dose ${occurrence + 1} of this order is edited twice`,
            });
          seen.add(occurrence);
        });
      }),
    note: z.string().max(counts.noteCharacters).default(""),
  })
  .meta({ id: "Order" });
export type Order = z.infer<typeof Order>;

/** What really happened to one scheduled dose. Without a record a dose counts as given as planned. */
export const DoseRecord = z
  .strictObject({
    orderId: PartId,
    occurrence: Occurrence,
    outcome: z.discriminatedUnion("kind", [
      z.strictObject({ kind: z.literal("as-planned") }),
      z.strictObject({
        kind: z.literal("changed"),
        at: Instant.exactOptional(),
        amountMg: quantity("amountMg").exactOptional(),
        durationH: quantity("durationH").exactOptional(),
      }),
      z.strictObject({ kind: z.literal("omitted") }),
    ]),
    note: z.string().max(counts.noteCharacters).default(""),
  })
  .meta({ id: "DoseRecord" });
export type DoseRecord = z.infer<typeof DoseRecord>;

/** A dose that nobody planned. */
export const ExtraDose = z
  .strictObject({ id: PartId, at: Instant, give: Give, note: z.string().max(counts.noteCharacters).default("") })
  .meta({ id: "ExtraDose" });
export type ExtraDose = z.infer<typeof ExtraDose>;
