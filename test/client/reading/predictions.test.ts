import { describe, expect, test } from "vitest";
import { editDose } from "../../../client/reading/dose-edits.ts";
import { movedPrediction } from "../../../client/reading/moved-prediction.ts";
import { levelAt, predictionOf } from "../../../client/reading/predictions.ts";
import { gather, partsAt, sayGathered } from "../../../client/reading/remains-parts.ts";
import { sayAnswer } from "../../../client/reading/wait-words.ts";
import { instantAt } from "../../../shared/schedule/clock.ts";
import { spanOf } from "../../../shared/schedule/expand-orders.ts";
import { contentWith, everyTwelve, onceAtNoon } from "./contents.ts";

const typed = { kind: "typed", note: "" };
const pump = {
  id: "o3",
  give: {
    kind: "pump",
    steps: [
      { afterH: 0, rateMgPerH: 20 },
      { afterH: 5, rateMgPerH: 0 },
    ],
  },
  when: { kind: "once", at: "2026-03-03T00:00:00Z" },
};
const absorbed = {
  id: "o4",
  give: { kind: "absorbed", amountMg: 300 },
  when: { kind: "once", at: "2026-03-03T06:00:00Z" },
};
const records = [
  { orderId: "o1", occurrence: 0, outcome: { kind: "as-planned" } },
  { orderId: "o1", occurrence: 1, outcome: { kind: "changed", at: "2026-03-02T23:00:00Z" } },
];
const extras = [{ id: "x1", at: "2026-03-03T03:00:00Z", give: { kind: "bolus", amountMg: 100 } }];
const kinetics = {
  volumeL: { value: 40, origin: typed },
  clearanceLPerH: { value: 4, origin: typed },
  absorptionRatePerH: { value: 1, origin: typed },
  lagH: { value: 0.5, origin: typed },
};

describe("predictionOf", () => {
  test("says what is wrong instead of failing: an absorbed dose without ka", () => {
    const prediction = predictionOf(contentWith({ orders: [absorbed] }));
    expect(prediction).toMatchObject({ ok: false, problem: expect.stringContaining("because a dose is absorbed") });
  });

  test("computes a content once and has the plan beside what was given only where they differ", () => {
    const content = contentWith();
    expect(predictionOf(content)).toBe(predictionOf(content));
    expect(predictionOf(content)).not.toHaveProperty("planned");
    expect(predictionOf(contentWith({ orders: [everyTwelve], records }))).toHaveProperty("planned");
  });
});

describe("movedPrediction", () => {
  const content = contentWith({ orders: [everyTwelve, onceAtNoon, pump, absorbed], records, extras }, { kinetics });
  const before = predictionOf(content);
  const keys = ["o1#0", "o1#1", "o1#3", "o2#0", "o3#0", "o4#0", "extra:x1"];

  test.for(keys)("draws %s at another time just as the edited schedule is drawn", (doseKey) => {
    if (!before.ok) throw new Error("the content of this test can be computed");
    const dose = before.doses.find(({ key }) => key === doseKey)!;
    const at = instantAt(content.setting.plan.start, 14.25, content.timeZone);
    const quick = movedPrediction(before, { doseKey, at, atH: 14.25 });
    const edited = { ...content, schedule: editDose(content.schedule, dose, { at }, spanOf(content)) };
    const whole = predictionOf(edited);
    if (!quick.ok || !whole.ok) throw new Error("both can be computed");
    expect(quick.doses.map(({ key, atH, status, edited: other }) => ({ key, atH, status, other }))).toEqual(
      whole.doses.map(({ key, atH, status, edited: other }) => ({ key, atH, status, other })),
    );
    for (const atH of [0, 5, 13, 14.25, 15, 24, 40, 72]) {
      // The same sums in the same order: nothing is left to rounding.
      expect(levelAt(quick.given, atH)).toBe(levelAt(whole.given, atH));
      expect(levelAt(quick.planned!, atH)).toBe(levelAt(whole.planned!, atH));
    }
  });
});

describe("partsAt", () => {
  const content = contentWith({ orders: [everyTwelve] }, { startConcentration: { valueMgPerL: 8, origin: typed } });
  const prediction = predictionOf(content);
  if (!prediction.ok) throw new Error("the content of this test can be computed");
  const { given } = prediction;

  test("adds up to the level, with the start among the parts: 8 mg/L falls by e in 10 h (k = 4 / 40 per h)", () => {
    const { shown, sumMgPerL } = partsAt(given, 10);
    expect(shown[0]).toMatchObject({ source: "start" });
    expect(shown[0]!.mgPerL).toBeCloseTo(8 / Math.E, 12);
    expect(sumMgPerL).toBeCloseTo(levelAt(given, 10), 12);
  });

  test("gathers the smallest of many and names them", () => {
    const doses = Array.from({ length: 30 }, (_, index) => ({
      source: { ...given.doses[0]!, key: `d${index}`, atH: index },
      mgPerL: index + 1,
      percent: 1,
    }));
    const { shown, gathered } = gather(doses);
    expect(shown.length).toBe(10);
    expect(sayGathered(gathered, shown)).toBe("20 older doses");
    expect(sayGathered(shown, gathered)).toBe("10 smaller doses");
    expect(gather(doses.slice(0, 11)).gathered).toEqual([]);
  });
});

describe("sayAnswer", () => {
  // One bolus of 400 mg into 40 L: 10 mg/L, halved in ln 2 / 0.1 = 6.931 h.
  const content = contentWith({ orders: [{ ...onceAtNoon, give: { kind: "bolus", amountMg: 400 } }] });

  test("has the clock time, the wait and the hours into the plan: 10 to 5 mg/L in 6.931 h (ln 2 / k)", () => {
    const words = sayAnswer(content, { fromH: 4, mgPerL: 5, direction: "below", meanwhile: "nothing-begins" });
    expect(words).toBe("Mon 2 Mar 2026 18:55; 6.931\u00a0h to wait, 10.93\u00a0h into the plan");
  });

  test("says when it is so already, or never", () => {
    expect(sayAnswer(content, { fromH: 0, mgPerL: 5, direction: "below", meanwhile: "plan-goes-on" })).toContain(
      "already below",
    );
    expect(sayAnswer(content, { fromH: 5, mgPerL: 20, direction: "above", meanwhile: "nothing-begins" })).toContain(
      "never",
    );
    expect(sayAnswer(content, { fromH: 72, mgPerL: 5, direction: "below", meanwhile: "nothing-begins" })).toContain(
      "cannot be computed",
    );
  });
});
