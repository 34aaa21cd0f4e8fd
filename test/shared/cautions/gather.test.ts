import { describe, expect, test } from "vitest";
import { cautionsForContent, cautionsForCourse, unanswered } from "../../../shared/cautions/gather.ts";
import { Caution } from "../../../shared/contract/caution.ts";
import { PredictionRequest } from "../../../shared/contract/prediction.ts";
import { SteadyStateRequest } from "../../../shared/contract/steady-state.ts";
import { describeSteadyState, predict } from "../../../shared/kinetics/predict.ts";
import { everyEight, inventedContent, stated } from "../../invented-content.ts";
import { findWritingFaults } from "../../writing-rules.ts";

const typed = { kind: "typed", note: "" } as const;
const plan = { start: "2026-03-02T08:00:00Z", horizonH: 48 };
const kinetics = { volumeL: stated(40), clearanceLPerH: stated(5) };
const bolus = { kind: "bolus", amountMg: 500 } as const;
const once = (id: string, at: string, amountMg: number) => ({
  id,
  give: { kind: "bolus" as const, amountMg },
  when: { kind: "once" as const, at },
});

/** One content for each caution, and one near to it that must not raise it. */
const cases: {
  code: string;
  severity: string;
  raising: Parameters<typeof inventedContent>[0];
  quiet: Parameters<typeof inventedContent>[0];
}[] = [
  {
    code: "unusual-value",
    severity: "stop",
    raising: { setting: { plan, kinetics: { volumeL: stated(0.1), halfLifeH: stated(5) } } },
    quiet: { setting: { plan, kinetics: { volumeL: stated(0.2), halfLifeH: stated(5) } } },
  },
  {
    code: "record-without-dose",
    severity: "stop",
    raising: { schedule: { records: [{ orderId: "o1", occurrence: 6, outcome: { kind: "omitted" } }] } },
    quiet: { schedule: { records: [{ orderId: "o1", occurrence: 5, outcome: { kind: "omitted" } }] } },
  },
  {
    code: "edit-without-dose",
    severity: "warn",
    raising: { schedule: { orders: [{ ...everyEight, exceptions: [{ occurrence: 6, amountMg: 300 }] }] } },
    quiet: { schedule: { orders: [{ ...everyEight, exceptions: [{ occurrence: 5, amountMg: 300 }] }] } },
  },
  {
    code: "order-without-dose",
    severity: "warn",
    raising: { schedule: { orders: [everyEight, once("late", "2026-03-04T08:00:00Z", 500)] } },
    quiet: { schedule: { orders: [everyEight, once("late", "2026-03-04T07:59:00Z", 500)] } },
  },
  {
    code: "tenfold-doses",
    severity: "warn",
    raising: { schedule: { orders: [once("a", plan.start, 50), once("b", "2026-03-02T20:00:00Z", 500)] } },
    quiet: { schedule: { orders: [once("a", plan.start, 51), once("b", "2026-03-02T20:00:00Z", 500)] } },
  },
  {
    code: "doses-together",
    severity: "warn",
    raising: { schedule: { orders: [everyEight, once("a", "2026-03-02T16:00:30Z", 500)] } },
    quiet: { schedule: { orders: [everyEight, once("a", "2026-03-02T16:01:30Z", 500)] } },
  },
  {
    code: "clock-time-skipped",
    severity: "warn",
    raising: night("2026-03-28T08:00:00Z", "01:30"),
    quiet: night("2026-03-28T08:00:00Z", "02:30"),
  },
  {
    code: "clock-time-repeated",
    severity: "warn",
    raising: night("2026-10-24T08:00:00+01:00", "01:30"),
    quiet: night("2026-10-24T08:00:00+01:00", "02:30"),
  },
  {
    code: "clock-changes",
    severity: "note",
    raising: night("2026-03-28T08:00:00Z", "08:00"),
    quiet: night("2026-03-29T08:00:00+01:00", "08:00"),
  },
  {
    code: "above-range",
    severity: "warn",
    raising: { setting: { plan, kinetics, rangeMgPerL: { low: 2, high: 12 } } },
    quiet: { setting: { plan, kinetics, rangeMgPerL: { low: 2, high: 40 } } },
  },
  {
    // From nothing to 11.75 mg/L, then down to 4.9 mg/L before the second dose; a rise from nothing is no fall.
    code: "below-range",
    severity: "note",
    raising: { setting: { plan, kinetics, rangeMgPerL: { low: 5, high: 40 } } },
    quiet: { setting: { plan, kinetics, rangeMgPerL: { low: 4.8, high: 40 } } },
  },
  {
    code: "never-in-range",
    severity: "warn",
    raising: { setting: { plan, kinetics, rangeMgPerL: { low: 30, high: 40 } } },
    quiet: { setting: { plan, kinetics, rangeMgPerL: { low: 5, high: 40 } } },
  },
  {
    code: "elimination-stops",
    severity: "warn",
    raising: change({ kind: "clearance", clearanceLPerH: 0 }),
    quiet: change({ kind: "clearance", clearanceLPerH: 1 }),
  },
  {
    code: "assumed-elimination",
    severity: "note",
    raising: change({ kind: "clearance", clearanceLPerH: 1 }),
    quiet: {},
  },
  {
    code: "given-differs",
    severity: "note",
    raising: { schedule: { extras: [{ id: "x", at: "2026-03-03T09:00:00Z", give: bolus }] } },
    quiet: { schedule: { records: [{ orderId: "o1", occurrence: 0, outcome: { kind: "as-planned" } }] } },
  },
  {
    code: "not-settled",
    severity: "note",
    raising: { setting: { plan, kinetics: { volumeL: stated(40), halfLifeH: stated(15) } } },
    quiet: { setting: { plan, kinetics: { volumeL: stated(40), halfLifeH: stated(14) } } },
  },
];

function night(start: string, time: string) {
  const order = {
    ...everyEight,
    when: { kind: "clock-times" as const, from: start, times: [{ time }], end: { kind: "open" as const } },
  };
  return {
    timeZone: "Europe/London",
    setting: { plan: { start, horizonH: 48 }, kinetics },
    schedule: { orders: [order] },
  };
}

function change(to: { kind: "clearance"; clearanceLPerH: number }) {
  return {
    setting: { plan, kinetics, eliminationChanges: [{ id: "c", from: "2026-03-03T08:00:00Z", origin: typed, ...to }] },
  };
}

describe("cautionsForContent", () => {
  test.for(cases)("raises $code as a $severity, and only where it applies", ({ code, severity, raising, quiet }) => {
    const raised = cautionsForContent(inventedContent(raising)).filter((caution) => caution.code === code);
    expect(raised.length).toBeGreaterThan(0);
    for (const caution of raised) expect(Caution.parse(caution).severity).toBe(severity);
    expect(cautionsForContent(inventedContent(quiet)).map((caution) => caution.code)).not.toContain(code);
  });

  test("always holds the standing caution, and the gravest come first", () => {
    for (const { raising } of cases) {
      const severities = cautionsForContent(inventedContent(raising)).map(({ severity }) =>
        ["stop", "warn", "note"].indexOf(severity),
      );
      expect(severities).toEqual([...severities].sort());
      expect(cautionsForContent(inventedContent(raising)).map(({ code }) => code)).toContain("standing");
    }
  });

  test("keeps the writing rules", () => {
    for (const { raising } of cases)
      for (const { text } of cautionsForContent(inventedContent(raising))) expect(findWritingFaults(text)).toEqual([]);
  });

  test.for([
    { about: "/setting/plan/horizonH", setting: { plan: { ...plan, horizonH: 2_000 }, kinetics } },
    {
      about: "/setting/kinetics/clearanceLPerH",
      setting: { plan, kinetics: { volumeL: stated(1_000), clearanceLPerH: stated(300) } },
    },
    {
      about: "/setting/kinetics/eliminationRatePerH",
      setting: { plan, kinetics: { volumeL: stated(1), eliminationRatePerH: stated(8) } },
    },
    {
      about: "/setting/kinetics/halfLifeH",
      setting: { plan, kinetics: { volumeL: stated(1), halfLifeH: stated(2_000) } },
    },
    { about: "/setting/kinetics/lagH", setting: { plan, kinetics: { ...kinetics, lagH: stated(7) } } },
    {
      about: "/setting/kinetics/bioavailability",
      setting: { plan, kinetics: { ...kinetics, bioavailability: stated(0.01) } },
    },
    {
      about: "/setting/startConcentration",
      setting: { plan, kinetics, startConcentration: { valueMgPerL: 2_000, origin: typed } },
    },
    {
      about: "/schedule/orders/0",
      setting: { plan, kinetics },
      schedule: {
        orders: [
          {
            ...everyEight,
            give: {
              kind: "pump" as const,
              steps: [
                { afterH: 0, rateMgPerH: 30_000 },
                { afterH: 1, rateMgPerH: 0 },
              ],
            },
          },
        ],
      },
    },
  ])("asks for a reason at $about", ({ about, ...change }) => {
    const stops = cautionsForContent(inventedContent(change)).filter(({ severity }) => severity === "stop");
    expect(stops.map((stop) => stop.about)).toContain(about);
    for (const { text } of stops) expect(findWritingFaults(text)).toEqual([]);
  });
});

describe("unanswered", () => {
  const content = inventedContent(cases[0]!.raising);
  const stops = cautionsForContent(content).filter(({ severity }) => severity === "stop");

  test("asks for an answer to every stop", () => {
    expect(unanswered(cautionsForContent(content), [])).toEqual(stops);
    const reasons = stops.map(({ code, about, text }) => ({
      code,
      about,
      text,
      reason: "checked with the laboratory",
    }));
    expect(unanswered(cautionsForContent(content), reasons)).toEqual([]);
  });

  test("does not take a reason given for one value as an answer for the next", () => {
    const reasons = stops.map(({ code, about, text }) => ({ code, about, text, reason: "checked" }));
    const slipped = inventedContent({ setting: { plan, kinetics: { volumeL: stated(0.02), halfLifeH: stated(5) } } });
    expect(unanswered(cautionsForContent(slipped), reasons).map(({ about }) => about)).toContain(
      "/setting/kinetics/volumeL",
    );
  });
});

describe("cautions of stateless answers", () => {
  test("name an unusual dose where it stands in the request", () => {
    const request = PredictionRequest.parse({
      parameters: { volumeL: 40, clearanceLPerH: 5 },
      doses: [{ kind: "bolus", atH: 0, amountMg: 50_000 }],
      horizonH: 24,
      sampleEveryH: 1,
    });
    expect(cautionsForCourse(predict(request))).toMatchObject([
      { code: "unusual-value", severity: "stop", about: "/doses/0" },
      { code: "standing" },
    ]);
  });

  test("are never empty for a cycle", () => {
    const request = SteadyStateRequest.parse({
      parameters: { volumeL: 40, clearanceLPerH: 5 },
      cycleH: 8,
      doses: [{ kind: "bolus", atH: 0, amountMg: 500 }],
    });
    expect(cautionsForCourse(describeSteadyState(request))).toMatchObject([{ code: "standing" }]);
  });
});
