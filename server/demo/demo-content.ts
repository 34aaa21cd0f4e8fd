import type { z } from "zod";
import type { CaseDraft, RegimenContent, Schedule } from "../../shared/contract/case.ts";
import type { CaseSetting } from "../../shared/contract/setting.ts";

/**
 * An invented case: drug, patient and every number are made up for training and belong to nobody.
 *
 * The dates are fixed, so that the demo case has the same curves, hashes and sheets on every machine, and
 * lie over the night of Sun 29 Mar 2026, when clocks in London go forward: "every 8 h" and "at 08:00"
 * part ways there, which is worth seeing before it happens to a patient.
 */
const origin = { kind: "typed", note: "invented for training" } as const;

const setting: z.input<typeof CaseSetting> = {
  plan: { start: "2026-03-27T08:00:00+00:00", horizonH: 96 },
  kinetics: {
    volumeL: { value: 35, origin },
    clearanceLPerH: { value: 3.5, origin },
  },
  eliminationChanges: [
    {
      id: "session-1",
      kind: "added-clearance",
      from: "2026-03-28T14:00:00+00:00",
      until: "2026-03-28T18:00:00+00:00",
      addedClearanceLPerH: 3.5,
      origin: { kind: "typed", note: "invented dialysis session of 4 h" },
    },
  ],
  rangeMgPerL: { low: 8, high: 20 },
};

export const demoCase = {
  label: "Demo (invented): training drug",
  timeZone: "Europe/London",
  notes:
    "An invented case for training: drug, patient and numbers are made up and belong to nobody. It has three alternatives, a dose that was given late and a dialysis session.",
  setting,
} satisfies z.input<typeof CaseDraft>;

const everyEightHours: z.input<typeof Schedule> = {
  orders: [
    {
      id: "every-8-h",
      give: { kind: "infusion", amountMg: 400, durationH: 1 },
      when: { kind: "every", from: "2026-03-27T08:00:00+00:00", intervalH: 8, end: { kind: "open" } },
    },
  ],
};

const lateDose: NonNullable<z.input<typeof Schedule>["records"]> = [
  {
    orderId: "every-8-h",
    occurrence: 1,
    outcome: { kind: "changed", at: "2026-03-27T18:30:00+00:00" },
    note: "Invented: given 2 h 30 min late.",
  },
];

const loadingThenTwiceDaily: z.input<typeof Schedule> = {
  orders: [
    {
      id: "loading",
      give: { kind: "infusion", amountMg: 600, durationH: 1 },
      when: { kind: "once", at: "2026-03-27T08:00:00+00:00" },
    },
    {
      id: "morning-and-evening",
      give: { kind: "infusion", amountMg: 600, durationH: 1 },
      when: { kind: "every", from: "2026-03-27T20:00:00+00:00", intervalH: 12, end: { kind: "open" } },
    },
  ],
};

const byPump: z.input<typeof Schedule> = {
  orders: [
    {
      id: "pump",
      give: {
        kind: "pump",
        steps: [
          { afterH: 0, rateMgPerH: 200 },
          { afterH: 2, rateMgPerH: 50 },
          { afterH: 30, rateMgPerH: 100 },
          { afterH: 34, rateMgPerH: 50 },
          { afterH: 96, rateMgPerH: 0 },
        ],
      },
      when: { kind: "once", at: "2026-03-27T08:00:00+00:00" },
      note: "Invented: a fast start, and double the rate during dialysis.",
    },
  ],
};

/** What is saved, in this order, by the label of its alternative. */
export const demoRevisions: readonly {
  readonly label: string;
  readonly reason: string;
  readonly createdAt: string;
  readonly schedule: z.input<typeof Schedule>;
}[] = [
  {
    label: "Every 8 h",
    reason: "First plan (invented)",
    createdAt: "2026-03-27T07:30:00+00:00",
    schedule: everyEightHours,
  },
  {
    label: "Every 8 h",
    reason: "The second dose was given late (invented)",
    createdAt: "2026-03-27T18:45:00+00:00",
    schedule: { ...everyEightHours, records: lateDose },
  },
  {
    label: "Every 12 h after a loading dose",
    reason: "To compare (invented)",
    createdAt: "2026-03-27T18:50:00+00:00",
    schedule: loadingThenTwiceDaily,
  },
  {
    label: "Continuous by pump",
    reason: "To compare (invented)",
    createdAt: "2026-03-27T18:55:00+00:00",
    schedule: byPump,
  },
];

/** All that one revision of the demo says. */
export function demoContent(regimenLabel: string, schedule: z.input<typeof Schedule>): z.input<typeof RegimenContent> {
  const { label, timeZone } = demoCase;
  return { formatVersion: 1, caseLabel: label, regimenLabel, timeZone, setting, schedule };
}
