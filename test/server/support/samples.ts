import type { z } from "zod";
import type { RegimenContent, RevisionDraft } from "../../../shared/contract/case.ts";
import type { PredictionRequest } from "../../../shared/contract/prediction.ts";
import type { CaseSetting } from "../../../shared/contract/setting.ts";

/** Invented values; nothing here comes from a patient. */
const origin = { kind: "typed", note: "invented" } as const;

export const setting: z.input<typeof CaseSetting> = {
  plan: { start: "2026-05-04T08:00:00+01:00", horizonH: 48 },
  kinetics: { volumeL: { value: 30, origin }, halfLifeH: { value: 6, origin } },
  rangeMgPerL: { low: 5, high: 40 },
};

export const content: z.input<typeof RegimenContent> = {
  formatVersion: 1,
  caseLabel: "Bed 4",
  regimenLabel: "Every 8 h",
  timeZone: "Europe/London",
  setting,
  schedule: {
    orders: [
      {
        id: "a",
        give: { kind: "infusion", amountMg: 400, durationH: 1 },
        when: { kind: "every", from: "2026-05-04T08:00:00+01:00", intervalH: 8, end: { kind: "open" } },
      },
    ],
    records: [{ orderId: "a", occurrence: 1, outcome: { kind: "changed", at: "2026-05-04T18:00:00+01:00" } }],
  },
};

export const draft: z.input<typeof RevisionDraft> = {
  basedOnNumber: 0,
  reason: "First plan",
  preparedBy: "A. Pharmacist",
  content,
};

export const caseDraft = { label: "Bed 4", timeZone: "Europe/London", notes: "", setting };

export const prediction: z.input<typeof PredictionRequest> = {
  parameters: { volumeL: 10, eliminationRatePerH: 0.1 },
  doses: [{ kind: "bolus", atH: 0, amountMg: 100 }],
  horizonH: 24,
  sampleTimesH: [0, 10],
};
