import request from "supertest";
import { describe, expect, test } from "vitest";
import { answerWriter } from "../../server/grid-text.ts";
import { refuseNaN } from "../../server/refuse-nan.ts";
import type { FieldProblem } from "../../server/request-errors.ts";
import { PredictionRequest, PredictionResponse } from "../../shared/contract/prediction.ts";
import { SteadyStateResponse } from "../../shared/contract/steady-state.ts";
import { predict } from "../../shared/kinetics/predict.ts";
import { makeApp } from "./support/make-app.ts";
import { prediction } from "./support/samples.ts";

const post = (path: string, body: unknown) =>
  request(makeApp().app)
    .post(path)
    .send(body as object);

describe("POST /api/predictions", () => {
  test("answers its contract, and keeps nothing so needs no key", async () => {
    const { body } = await post("/api/predictions", prediction).expect(200);
    const answer = PredictionResponse.parse(body);
    // By hand: 100 mg in 10 L is 10 mg/L, and after 10 h at 0.1 per h it is 10/e. exp and one product: 2 ulp.
    expect(Math.abs(answer.concentrationsMgPerL[0]! - 10)).toBeLessThanOrEqual(2 * Number.EPSILON * 10);
    expect(Math.abs(answer.concentrationsMgPerL[1]! - 10 / Math.E)).toBeLessThanOrEqual(4 * Number.EPSILON * 10);
    expect(answer.cautions.map(({ code }) => code)).toContain("standing");
  });

  test("answers a grid, a window, a range and what remains", async () => {
    const { sampleTimesH: _, ...rest } = prediction;
    const asked = {
      ...rest,
      sampleEveryH: 0.5,
      window: { fromH: 0, toH: 12 },
      rangeMgPerL: { low: 5, high: 15 },
      remainsAtH: 6,
    };
    const { body } = await post("/api/predictions", asked).expect(200);
    const answer = PredictionResponse.parse(body);
    expect(answer.timesH).toHaveLength(49);
    expect(answer.exposure.hoursAbove! + answer.exposure.hoursWithin! + answer.exposure.hoursBelow!).toBeCloseTo(
      12,
      10,
    );
    expect(answer.remains).toMatchObject([{ dose: 0, percent: 100 }]);
  });

  test.for([
    {
      name: "a volume of 0",
      change: { parameters: { volumeL: 0, eliminationRatePerH: 0.1 } },
      pointer: "#/parameters/volumeL",
    },
    {
      name: "a volume of 0.001 L",
      change: { parameters: { volumeL: 0.001, eliminationRatePerH: 0.1 } },
      pointer: "#/parameters/volumeL",
    },
    {
      name: "a half-life of 3 years",
      change: { parameters: { volumeL: 10, halfLifeH: 26_280 } },
      pointer: "#/parameters/halfLifeH",
    },
    { name: "a horizon of 50 years", change: { horizonH: 438_000 }, pointer: "#/horizonH" },
    {
      name: "a negative amount",
      change: { doses: [{ kind: "bolus", atH: 0, amountMg: -1 }] },
      pointer: "#/doses/0/amountMg",
    },
    {
      name: "an amount in words",
      change: { doses: [{ kind: "bolus", atH: 0, amountMg: "100" }] },
      pointer: "#/doses/0/amountMg",
    },
    {
      name: "a dose before the start",
      change: { doses: [{ kind: "bolus", atH: -1, amountMg: 1 }] },
      pointer: "#/doses/0/atH",
    },
    {
      name: "an unknown kind of dose",
      change: { doses: [{ kind: "patch", atH: 0, amountMg: 1 }] },
      pointer: "#/doses/0/kind",
    },
    {
      name: "10,001 doses",
      change: { doses: Array.from({ length: 10_001 }, () => ({ kind: "bolus", atH: 0, amountMg: 1 })) },
      pointer: "#/doses",
    },
    { name: "an unknown field", change: { weight: 70 }, pointer: "#/weight" },
    {
      name: "a dose with a field of another kind",
      change: { doses: [{ kind: "bolus", atH: 0, amountMg: 1, durationH: 1 }] },
      pointer: "#/doses/0/durationH",
    },
    {
      name: "an added clearance that ends before it starts",
      change: { eliminationChanges: [{ fromH: 4, toH: 2, addedClearanceLPerH: 1 }] },
      pointer: "#/eliminationChanges/0/toH",
    },
  ])("refuses $name, naming the field", async ({ change, pointer }) => {
    const { body } = await post("/api/predictions", { ...prediction, ...change }).expect(422);
    expect(body.errors.map((error: { pointer: string }) => error.pointer)).toContain(pointer);
  });

  test("says what came and what is allowed", async () => {
    const { body } = await post("/api/predictions", { ...prediction, horizonH: 438_000 }).expect(422);
    expect(body.errors).toEqual([{ pointer: "#/horizonH", detail: "must be from 0.1 to 17568 h, got 438000" }]);
    const { horizonH: _, ...without } = prediction;
    const missing = await post("/api/predictions", without).expect(422);
    expect(missing.body.errors[0]).toEqual({
      pointer: "#/horizonH",
      detail: "is missing: must be a number from 0.1 to 17568 h",
    });
  });

  test.for([
    {
      change: { doses: [{ kind: "pump", steps: [] }] },
      said: "#/doses/0/steps: must hold at least one step, got 0",
    },
    {
      change: { doses: 7 },
      said: "#/doses: must be a list, got 7",
    },
    {
      change: { doses: [{ kind: "Bolus", atH: 0, amountMg: 1 }] },
      said: '#/doses/0/kind: must be "bolus", "infusion", "absorbed" or "pump", got "Bolus"',
    },
    {
      change: { window: "all" },
      said: '#/window: must be an object, got "all"',
    },
    {
      change: { sampleTimesH: undefined, sampleEveryH: "0.1" },
      said: '#/sampleEveryH: must be a number of hours, got "0.1"',
    },
    {
      change: { eliminationChanges: [{ fromH: 1 }] },
      said: "#/eliminationChanges/0: must be an object of one kind: fromH with eliminationRatePerH, fromH with clearanceLPerH, or fromH and toH with addedClearanceLPerH",
    },
    {
      change: { eliminationChanges: [{ fromH: 1, clearanceLPerH: "4" }] },
      said: '#/eliminationChanges/0/clearanceLPerH: must be a number from 0 to 5000 L/h, got "4"',
    },
    {
      change: { eliminationChanges: [{ fromH: 1, toH: 4 }] },
      said: "#/eliminationChanges/0/addedClearanceLPerH: is missing: must be a number from 0.00001 to 5000 L/h",
    },
  ])("says $said", async ({ change, said }) => {
    const { body } = await post("/api/predictions", { ...prediction, ...change }).expect(422);
    expect(body.errors.map(({ pointer, detail }: FieldProblem) => `${pointer}: ${detail}`)).toEqual([said]);
  });

  test("says of 1e999 that it is no number it can hold, not that it is null", async () => {
    const { body } = await request(makeApp().app)
      .post("/api/predictions")
      .set("Content-Type", "application/json")
      .send(JSON.stringify(prediction).replace('"horizonH":24', '"horizonH":1e999'))
      .expect(422);
    expect(body.errors[0].detail).toBe("must be a number from 0.1 to 17568 h, got a number too large to hold");
  });

  test.for(["1e999", "NaN", "-Infinity"])("refuses the number %s", async (text) => {
    const body = JSON.stringify(prediction).replace('"horizonH":24', `"horizonH":${text}`);
    const answer = await request(makeApp().app)
      .post("/api/predictions")
      .set("Content-Type", "application/json")
      .send(body);
    expect([400, 422]).toContain(answer.status);
    expect(answer.headers["content-type"]).toMatch(/^application\/problem\+json/);
  });

  test("names at most 50 faults of a body that has thousands", async () => {
    const doses = Array.from({ length: 5_000 }, () => ({ kind: "bolus", atH: -1, amountMg: -1 }));
    const { body } = await post("/api/predictions", { ...prediction, doses }).expect(422);
    expect(body.errors).toHaveLength(50);
  });
});

describe("POST /api/steady-states", () => {
  const cycle = {
    parameters: { volumeL: 10, eliminationRatePerH: 0.1 },
    cycleH: 8,
    doses: [{ kind: "bolus", atH: 0, amountMg: 100 }],
  };

  test("answers its contract", async () => {
    const { body } = await post("/api/steady-states", { ...cycle, sampleEveryH: 1 }).expect(200);
    const answer = SteadyStateResponse.parse(body);
    // By hand: peak = (dose/V) / (1 - e^-kT) = 10 / (1 - e^-0.8).
    expect(answer.exposure.peak.mgPerL).toBeCloseTo(10 / (1 - Math.exp(-0.8)), 10);
    expect(answer.timesH).toHaveLength(9);
    expect(answer.cautions.map(({ code }) => code)).toContain("standing");
  });

  test("refuses a dose after the end of the cycle and a cycle in which nothing is eliminated", async () => {
    const late = await post("/api/steady-states", {
      ...cycle,
      doses: [{ kind: "bolus", atH: 9, amountMg: 100 }],
    }).expect(422);
    expect(late.body.errors[0].pointer).toBe("#/doses/0/atH");
    const stopped = await post("/api/steady-states", {
      ...cycle,
      eliminationChanges: [{ fromH: 0, eliminationRatePerH: 0 }],
    }).expect(422);
    expect(stopped.body.errors[0].pointer).toBe("#/parameters/eliminationRatePerH");
  });
});

describe("a level that is no number", () => {
  test("is a fault of the server and is never sent as null", () => {
    const { answer } = predict(PredictionRequest.parse(prediction));
    const spoilt = { ...answer, concentrationsMgPerL: [10, Number.NaN] };
    const write = answerWriter();
    expect(write(spoilt, undefined).toString()).toContain("[10,null]");
    expect(() => refuseNaN(spoilt, write(spoilt, undefined))).toThrow();
    expect(() => refuseNaN(answer, write(answer, undefined))).not.toThrow();
  });
});
