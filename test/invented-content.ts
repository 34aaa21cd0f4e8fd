import type { z } from "zod";
import { RegimenContent } from "../shared/contract/case.ts";

type Draft = z.input<typeof RegimenContent>;

const typed = { kind: "typed", note: "invented for a test" } as const;

/** A value as a case states it. */
export function stated(value: number) {
  return { value, origin: typed };
}

/**
 * An invented alternative, read by the contract as a real one would be: 40 L, 5 L/h, 500 mg over 1 h every
 * 8 h for two days in UTC, unless told otherwise.
 */
export function inventedContent(
  change: {
    readonly timeZone?: string;
    readonly setting?: Partial<Draft["setting"]>;
    readonly schedule?: Partial<Draft["schedule"]>;
    readonly cautionReasons?: Draft["cautionReasons"];
  } = {},
): RegimenContent {
  return RegimenContent.parse({
    formatVersion: 1,
    caseLabel: "Invented case",
    regimenLabel: "Every 8 h",
    timeZone: change.timeZone ?? "UTC",
    setting: {
      plan: { start: "2026-03-02T08:00:00Z", horizonH: 48 },
      kinetics: { volumeL: stated(40), clearanceLPerH: stated(5) },
      ...change.setting,
    },
    schedule: { orders: [everyEight], ...change.schedule },
    cautionReasons: change.cautionReasons ?? [],
  });
}

/** 500 mg over 1 h every 8 h from the plan's start. */
export const everyEight: Draft["schedule"]["orders"][number] = {
  id: "o1",
  give: { kind: "infusion", amountMg: 500, durationH: 1 },
  when: { kind: "every", from: "2026-03-02T08:00:00Z", intervalH: 8, end: { kind: "open" } },
};
