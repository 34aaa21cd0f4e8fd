import { describe, expect, test } from "vitest";
import { SteadyStateRequest } from "../../../shared/contract/steady-state.ts";
import { complaints } from "./refused.ts";

const good = {
  parameters: { volumeL: 40, clearanceLPerH: 4 },
  cycleH: 12,
  doses: [{ kind: "bolus", atH: 0, amountMg: 500 }],
};

describe("SteadyStateRequest", () => {
  test("takes a cycle of anything, an infusion longer than it and a lag over its end among them", () => {
    const whole = {
      ...good,
      parameters: { ...good.parameters, absorptionRatePerH: 1 },
      doses: [
        { kind: "bolus", atH: 0, amountMg: 500 },
        { kind: "infusion", atH: 8, amountMg: 500, durationH: 30 },
        { kind: "absorbed", atH: 11.5, amountMg: 300, lagH: 2 },
      ],
      eliminationChanges: [{ fromH: 2, toH: 6, addedClearanceLPerH: 3.5 }],
      sampleEveryH: 0.1,
    };
    expect(complaints(SteadyStateRequest, whole)).toEqual([]);
  });

  test.for<[string, object, string | RegExp]>([
    ["no dose", { doses: [] }, /^doses: /],
    ["a cycle of no length", { cycleH: 0 }, "cycleH: must be from 0.25 to 2160 h"],
    ["a cycle that is not a number", { cycleH: Number.NaN }, "cycleH: must be a number from 0.25 to 2160 h"],
    ["a dose at the cycle's end", at(12), "doses/0/atH: must be before the end of the cycle (12 h), got 12 h"],
    [
      "a dose before the cycle",
      at(-1),
      "doses/0/atH: must be 0 h or later: nothing can be given before the plan starts",
    ],
    [
      "a pump left running",
      { doses: [{ kind: "pump", steps: [{ atH: 0, rateMgPerH: 5 }] }] },
      /^doses\/0\/steps: must end with a rate of 0 mg\/h/,
    ],
    // An empty log once threw a TypeError where its last step was looked at.
    ["an empty pump log", { doses: [{ kind: "pump", steps: [] }] }, "doses/0/steps: must hold at least one step"],
    // Changes past the end were once dropped without a word: 4 h of dialysis counted as 2 h.
    [
      "a change of elimination after the cycle",
      { eliminationChanges: [{ fromH: 12, eliminationRatePerH: 0.2 }] },
      "eliminationChanges/0/fromH: must be before the end of the cycle (12 h), got 12 h",
    ],
    [
      "added clearance over the cycle's end",
      { eliminationChanges: [{ fromH: 10, toH: 14, addedClearanceLPerH: 3.5 }] },
      "eliminationChanges/0/toH: must be at most the end of the cycle (12 h), got 14 h: state what runs on as a span from 0 h",
    ],
    [
      "an absorbed dose without ka",
      { doses: [{ kind: "absorbed", atH: 0, amountMg: 5 }] },
      "parameters/absorptionRatePerH: is needed because a dose is absorbed",
    ],
    [
      "too many points",
      { cycleH: 2160, sampleEveryH: 0.02 },
      "sampleEveryH: gives more than 100000 points over 2160 h",
    ],
  ])("refuses %s", ([, change, complaint]) => {
    const found = complaints(SteadyStateRequest, { ...good, ...change });
    expect(found.length).toBeGreaterThanOrEqual(1);
    if (typeof complaint === "string") expect(found).toContain(complaint);
    else expect(found[0]).toMatch(complaint);
  });
});

function at(atH: number): object {
  return { doses: [{ ...good.doses[0], atH }] };
}
