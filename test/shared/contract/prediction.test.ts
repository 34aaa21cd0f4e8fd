import { describe, expect, test } from "vitest";
import { counts } from "../../../shared/contract/limits.ts";
import { PredictionRequest } from "../../../shared/contract/prediction.ts";
import { complaints } from "./refused.ts";

const good = {
  parameters: { volumeL: 40, clearanceLPerH: 4 },
  doses: [{ kind: "bolus", atH: 0, amountMg: 500 }],
  horizonH: 72,
  sampleEveryH: 0.1,
};

describe("PredictionRequest", () => {
  test("takes the smallest request and states its defaults", () => {
    expect(PredictionRequest.parse(good)).toEqual({
      ...good,
      parameters: { ...good.parameters, bioavailability: 1, saltFactor: 1 },
      eliminationChanges: [],
      startConcentrationMgPerL: 0,
    });
  });

  test("takes the example of the contract: every kind of dose, a change, a window and a range", () => {
    const whole = {
      ...good,
      parameters: { ...good.parameters, absorptionRatePerH: 1.2, bioavailability: 0.8, saltFactor: 0.9 },
      eliminationChanges: [
        { fromH: 24, eliminationRatePerH: 0.05 },
        { fromH: 30, clearanceLPerH: 2 },
        { fromH: 40, toH: 44, addedClearanceLPerH: 3.5 },
      ],
      doses: [
        { kind: "bolus", atH: 0, amountMg: 500 },
        { kind: "infusion", atH: 8, amountMg: 500, durationH: 1 },
        { kind: "absorbed", atH: 9, amountMg: 300, lagH: 0.25 },
        {
          kind: "pump",
          steps: [
            { atH: 0, rateMgPerH: 50 },
            { atH: 3.5, rateMgPerH: 0 },
          ],
        },
      ],
      window: { fromH: 24, toH: 48 },
      rangeMgPerL: { low: 5, high: 15 },
      remainsAtH: 20,
    };
    expect(complaints(PredictionRequest, whole)).toEqual([]);
  });

  // Each bad input: what is changed, and the one complaint that names the field and what is allowed.
  test.for<[string, object, string | RegExp]>([
    ["an amount of zero", dose({ amountMg: 0 }), "doses/0/amountMg: must be from 0.000001 to 1000000 mg"],
    ["a negative amount", dose({ amountMg: -500 }), "doses/0/amountMg: must be from 0.000001 to 1000000 mg"],
    [
      "an amount that is not a number",
      dose({ amountMg: Number.NaN }),
      "doses/0/amountMg: must be a number from 0.000001 to 1000000 mg",
    ],
    ["an infinite amount", dose({ amountMg: Number.POSITIVE_INFINITY }), /^doses\/0\/amountMg: must be/],
    ["an amount as text", dose({ amountMg: "500" }), /^doses\/0\/amountMg: must be a number/],
    ["a missing amount", { doses: [{ kind: "bolus", atH: 0 }] }, /^doses\/0\/amountMg: must be a number/],
    [
      "a dose before the start",
      dose({ atH: -1 }),
      "doses/0/atH: must be 0 h or later: nothing can be given before the plan starts",
    ],
    ["a dose at no time", dose({ atH: Number.NaN }), "doses/0/atH: must be a number of hours, 0 or more"],
    ["a dose after every plan", dose({ atH: 20_000 }), "doses/0/atH: must be at most 17568 h"],
    ["a dose of an unknown kind", { doses: [{ kind: "patch", atH: 0, amountMg: 1 }] }, /^doses\/0\/kind: /],
    ["a dose with an unknown field", dose({ amount: 5 }), /^doses\/0: Unrecognized key: "amount"/],
    [
      "an infusion of no duration",
      { doses: [{ kind: "infusion", atH: 0, amountMg: 5, durationH: 0 }] },
      "doses/0/durationH: must be from 0.001 to 8784 h",
    ],
    [
      "an endless infusion",
      { doses: [{ kind: "infusion", atH: 0, amountMg: 5, durationH: 9000 }] },
      "doses/0/durationH: must be from 0.001 to 8784 h",
    ],
    [
      "a negative lag",
      { ...absorbing, doses: [{ kind: "absorbed", atH: 0, amountMg: 5, lagH: -1 }] },
      "doses/0/lagH: must be from 0 to 48 h",
    ],
    [
      "an absorbed dose without ka",
      { doses: [{ kind: "absorbed", atH: 0, amountMg: 5 }] },
      "parameters/absorptionRatePerH: is needed because a dose is absorbed",
    ],
    [
      "a pump log out of order",
      pump([2, 10], [1, 0]),
      "doses/0/steps/1/atH: must be later than the step before it (2 h), got 1 h",
    ],
    [
      "a pump log with a time twice",
      pump([1, 10], [1, 0]),
      "doses/0/steps/1/atH: must be later than the step before it (1 h), got 1 h",
    ],
    [
      "a pump that runs backwards",
      pump([0, -10], [1, 0]),
      "doses/0/steps/0/rateMgPerH: must be from 0 to 1000000 mg/h",
    ],
    ["an empty pump log", pump(), /^doses\/0\/steps: /],
    [
      "10,001 doses",
      { doses: Array.from({ length: counts.doses + 1 }, () => good.doses[0]) },
      "doses: must hold at most 10000 doses",
    ],
    [
      "a volume of 0.001 L",
      { parameters: { volumeL: 0.001, clearanceLPerH: 4 } },
      "parameters/volumeL: must be from 0.01 to 50000 L",
    ],
    [
      "a half-life of 3 years",
      { parameters: { volumeL: 40, halfLifeH: 26_280 } },
      "parameters/halfLifeH: must be from 0.01 to 9900 h",
    ],
    [
      "a half-life of zero",
      { parameters: { volumeL: 40, halfLifeH: 0 } },
      "parameters/halfLifeH: must be from 0.01 to 9900 h",
    ],
    [
      "a clearance that is not a number",
      { parameters: { volumeL: 40, clearanceLPerH: Number.NaN } },
      /^parameters\/clearanceLPerH: must be a number/,
    ],
    [
      "one kinetic value",
      { parameters: { volumeL: 40 } },
      /^parameters\/clearanceLPerH: give two independent values .* got only volumeL$/,
    ],
    [
      "k and half-life, which are one value",
      { parameters: { halfLifeH: 6.93, eliminationRatePerH: 0.1 } },
      /^parameters\/volumeL: give two independent values/,
    ],
    [
      "three values that disagree",
      { parameters: { volumeL: 40, clearanceLPerH: 4, halfLifeH: 10 } },
      "parameters/halfLifeH: 10 disagrees with volumeL and clearanceLPerH, which give 6.93147: 44.3 percent apart",
    ],
    [
      "F above 1",
      { parameters: { ...good.parameters, bioavailability: 1.2 } },
      "parameters/bioavailability: must be from 0.0001 to 1",
    ],
    [
      "S of zero",
      { parameters: { ...good.parameters, saltFactor: 0 } },
      "parameters/saltFactor: must be from 0.01 to 1",
    ],
    [
      "ka of zero",
      { parameters: { ...good.parameters, absorptionRatePerH: 0 } },
      "parameters/absorptionRatePerH: must be from 0.001 to 200 1/h",
    ],
    ["a plan of 50 years", { horizonH: 438_300, sampleEveryH: 100 }, "horizonH: must be from 0.1 to 17568 h"],
    ["a plan of no length", { horizonH: 0 }, "horizonH: must be from 0.1 to 17568 h"],
    [
      "a negative starting level",
      { startConcentrationMgPerL: -1 },
      "startConcentrationMgPerL: must be from 0 to 100000 mg/L",
    ],
    ["both samplings", { sampleTimesH: [1] }, "sampleEveryH: give either sampleEveryH or sampleTimesH, not both"],
    ["no sampling", { sampleEveryH: undefined }, "sampleEveryH: give either sampleEveryH or sampleTimesH, not both"],
    ["a step below a minute", { sampleEveryH: 0.001 }, "sampleEveryH: must be at least 1 minute (0.0166667 h)"],
    [
      "too many points",
      { horizonH: 17_568, sampleEveryH: 0.1 },
      "sampleEveryH: gives more than 100000 points over 17568 h",
    ],
    ["sample times out of order", sampled([3, 2]), "sampleTimesH/1: must not be before the time in front of it"],
    ["a sample time after the plan", sampled([1, 73]), "sampleTimesH/1: must be at most horizonH (72 h)"],
    ["an empty window", { window: { fromH: 24, toH: 24 } }, "window/toH: must be later than fromH"],
    ["a window past the plan", { window: { fromH: 24, toH: 73 } }, "window/toH: must be at most horizonH (72 h)"],
    ["a range upside down", { rangeMgPerL: { low: 15, high: 5 } }, "rangeMgPerL/high: must be above low"],
    [
      "a range with a negative low",
      { rangeMgPerL: { low: -1, high: 5 } },
      "rangeMgPerL/low: must be from 0 to 100000 mg/L",
    ],
    [
      "a dialysis session that ends before it begins",
      { eliminationChanges: [{ fromH: 9, toH: 5, addedClearanceLPerH: 3 }] },
      /^eliminationChanges\/0/,
    ],
    [
      "a negative added clearance",
      { eliminationChanges: [{ fromH: 1, toH: 5, addedClearanceLPerH: -3 }] },
      /^eliminationChanges\/0/,
    ],
    ["what remains after the plan", { remainsAtH: 100 }, "remainsAtH: must be at most horizonH (72 h)"],
    ["an unknown field", { horizon: 5 }, /Unrecognized key: "horizon"/],
  ])("refuses %s", ([, change, complaint]) => {
    const found = complaints(PredictionRequest, withChange(change));
    expect(found).toHaveLength(1);
    if (typeof complaint === "string") expect(found[0]).toBe(complaint);
    else expect(found[0]).toMatch(complaint);
  });
});

const absorbing = { parameters: { volumeL: 40, clearanceLPerH: 4, absorptionRatePerH: 1 } };

function dose(change: object): object {
  return { doses: [{ ...good.doses[0], ...change }] };
}

function pump(...steps: [atH: number, rateMgPerH: number][]): object {
  return { doses: [{ kind: "pump", steps: steps.map(([atH, rateMgPerH]) => ({ atH, rateMgPerH })) }] };
}

function sampled(sampleTimesH: number[]): object {
  return { sampleEveryH: undefined, sampleTimesH };
}

/** The good request with some fields replaced; undefined takes a field away. */
function withChange(change: object): object {
  return Object.fromEntries(Object.entries({ ...good, ...change }).filter(([, value]) => value !== undefined));
}
