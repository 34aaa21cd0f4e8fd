import { RegimenContent } from "../../../shared/contract/case.ts";

const typed = { kind: "typed", note: "" };

/** Invented: 500 mg over 1 h every 12 h from 08:00 in London, V 40 L, CL 4 L/h. */
export function contentWith(schedule: object = { orders: [everyTwelve] }, setting: object = {}): RegimenContent {
  return RegimenContent.parse({
    formatVersion: 1,
    caseLabel: "Invented",
    regimenLabel: "First",
    timeZone: "Europe/London",
    setting: {
      plan: { start: "2026-03-02T08:00:00Z", horizonH: 72 },
      kinetics: { volumeL: { value: 40, origin: typed }, clearanceLPerH: { value: 4, origin: typed } },
      ...setting,
    },
    schedule,
  });
}

export const everyTwelve = {
  id: "o1",
  give: { kind: "infusion", amountMg: 500, durationH: 1 },
  when: { kind: "every", from: "2026-03-02T08:00:00Z", intervalH: 12, end: { kind: "open" } },
};

export const onceAtNoon = {
  id: "o2",
  give: { kind: "bolus", amountMg: 750 },
  when: { kind: "once", at: "2026-03-02T12:00:00Z" },
};
