import { describe, expect, test } from "vitest";
import type { Give } from "../../../shared/contract/schedule.ts";
import { workedArithmetic } from "../../../shared/figures/arithmetic/worked-arithmetic.ts";
import { handCalculator } from "../../hand-calculator.ts";
import { everyEight, inventedContent, stated } from "../../invented-content.ts";
import { findWritingFaults } from "../../writing-rules.ts";

type Change = NonNullable<Parameters<typeof inventedContent>[0]>;

const typed = { kind: "typed", note: "" } as const;
const plan = { start: "2026-03-02T08:00:00Z", horizonH: 48 };
const kinetics = { volumeL: stated(40), clearanceLPerH: stated(5) };
const open = { kind: "open" } as const;
const twice = (give: Give) => ({
  id: "o1",
  give,
  when: { kind: "every" as const, from: plan.start, intervalH: 12, end: open },
});
const session = {
  id: "c",
  kind: "added-clearance",
  from: "2026-03-03T08:00:00Z",
  until: "2026-03-03T12:00:00Z",
  addedClearanceLPerH: 3.5,
  origin: typed,
} as const;

const regimens: { name: string; change: Change }[] = [
  { name: "infusions", change: {} },
  {
    name: "boluses from k and V",
    change: {
      setting: { plan, kinetics: { volumeL: stated(33.3), eliminationRatePerH: stated(0.087) } },
      schedule: { orders: [twice({ kind: "bolus", amountMg: 320 })] },
    },
  },
  {
    name: "absorbed doses with F and S",
    change: {
      setting: {
        plan,
        kinetics: {
          clearanceLPerH: stated(2.7),
          halfLifeH: stated(8),
          absorptionRatePerH: stated(1.1),
          bioavailability: stated(0.8),
          saltFactor: stated(0.85),
          lagH: stated(0.5),
        },
      },
      schedule: { orders: [twice({ kind: "absorbed", amountMg: 300 })] },
    },
  },
  {
    name: "a late dose, an omitted one and a dialysis session",
    change: {
      setting: { plan, kinetics, eliminationChanges: [session], startConcentration: { valueMgPerL: 3, origin: typed } },
      schedule: {
        records: [
          { orderId: "o1", occurrence: 1, outcome: { kind: "changed", at: "2026-03-02T18:30:00Z" } },
          { orderId: "o1", occurrence: 3, outcome: { kind: "omitted" } },
        ],
      },
    },
  },
  {
    name: "elimination that becomes another and then none",
    change: {
      setting: {
        plan,
        kinetics,
        eliminationChanges: [
          { id: "a", kind: "rate", from: "2026-03-02T20:00:00Z", eliminationRatePerH: 0.05, origin: typed },
          { ...session, id: "b" },
          { id: "d", kind: "clearance", from: "2026-03-04T00:00:00Z", clearanceLPerH: 0, origin: typed },
        ],
      },
    },
  },
  {
    name: "a pump that runs into the next cycle, and a daily infusion",
    change: {
      schedule: {
        orders: [
          {
            id: "p",
            give: {
              kind: "pump",
              steps: [
                { afterH: 0, rateMgPerH: 20 },
                { afterH: 10, rateMgPerH: 5 },
                { afterH: 20, rateMgPerH: 0 },
              ],
            },
            when: { kind: "every", from: plan.start, intervalH: 12, end: open },
          },
          {
            ...everyEight,
            id: "q",
            when: {
              kind: "clock-times",
              from: plan.start,
              times: [{ time: "08:00" }, { time: "20:00", amountMg: 250 }],
              end: open,
            },
          },
        ],
      },
    },
  },
  {
    name: "an infusion longer than its interval",
    change: { schedule: { orders: [twice({ kind: "infusion", amountMg: 600, durationH: 18 })] } },
  },
];

describe("workedArithmetic", () => {
  test.for(regimens)("can be redone from the printed numbers alone: $name", ({ change }) => {
    const steps = workedArithmetic(inventedContent(change)).flatMap((section) => section.steps);
    expect(steps.length).toBeGreaterThan(5);
    for (const { substituted, result, title } of steps) {
      const redone = handCalculator(substituted);
      const printed = handCalculator(result);
      // Half a unit in the sixth digit, which is what the line was rounded to.
      expect(Math.abs(redone - printed), `${title}: ${substituted} = ${result}`).toBeLessThanOrEqual(
        5.01e-6 * Math.abs(redone) + 1e-12,
      );
    }
  });

  test.for(regimens)("agrees with the program's own figures: $name", ({ change }) => {
    const steps = workedArithmetic(inventedContent(change)).flatMap((section) => section.steps);
    const compared = steps.filter(({ program }) => program !== undefined);
    expect(compared.length).toBeGreaterThan(3);
    // Each line adds at most a few millionths by rounding; 40 lines in a chain stay far below the 0.5 percent the sheet allows.
    for (const { value, program, title } of compared)
      expect(Math.abs(value - program!), title).toBeLessThanOrEqual(1e-4 * Math.abs(program!) + 1e-9);
  });

  test("shows peak and trough of a settled cycle as the textbook does", () => {
    // 500 mg over 1 h every 8 h, CL 5 L/h, k 0.125 per h: R/CL (1 - e^(-k T)) / (1 - e^(-k P)), then e^(-k (P - T)). By hand.
    const steady = workedArithmetic(inventedContent())[1]!.steps;
    const valueIn = (title: string) => steps(title).value;
    const steps = (title: string) => steady.find((step) => step.title.startsWith(title))!;
    const peak = (100 * (1 - Math.exp(-0.125))) / (1 - Math.exp(-1));
    expect(valueIn("Peak at steady state")).toBeCloseTo(peak, 3);
    expect(valueIn("Trough at steady state")).toBeCloseTo(peak * Math.exp(-0.875), 3);
    expect(valueIn("Area over 24 h")).toBe(300);
    expect(valueIn("Accumulation factor")).toBeCloseTo(1 / (1 - Math.exp(-1)), 4);
    expect(valueIn("Loading dose that starts at steady state, with no drug present")).toBeCloseTo(
      500 / (1 - Math.exp(-1)),
      2,
    );
  });

  test("counts a level that is already there off the loading dose, and says what an amount is times", () => {
    const salted = { ...kinetics, saltFactor: stated(0.9) };
    const start = { valueMgPerL: 2, origin: typed };
    const sections = workedArithmetic(
      inventedContent({ setting: { plan, kinetics: salted, startConcentration: start } }),
    );
    const loading = sections.flatMap(({ steps }) => steps).filter(({ title }) => title.includes("gives the average"));
    // 500 mg every 8 h, S 0.9, CL 5 L/h: average 0.9 x 500 / 40 = 11.25 mg/L. By hand: 11.25 x 40 / 0.9, 9.25 x 40 / 0.9.
    expect(loading.map(({ title, value }) => [title, value])).toEqual([
      ["Loading dose that gives the average at once, as a bolus, with no drug present", 500],
      ["Loading dose that gives the average at once, as a bolus, with 2\u00a0mg/L present", 411.111],
    ]);
    expect(sections.at(-1)!.note).toContain("Amounts and rates are those ordered times S = 0.9.");
  });

  test("says why there is no steady state", () => {
    const [, section] = workedArithmetic(inventedContent({ schedule: { orders: [] } }));
    expect(section).toMatchObject({
      title: "Steady state",
      note: "There is no steady state: no order repeats.",
      steps: [],
    });
  });

  test("leaves out textbook lines that would lose their digits, and says so", () => {
    const close = {
      setting: { plan, kinetics: { ...kinetics, absorptionRatePerH: stated(0.125) } },
      schedule: { orders: [twice({ kind: "absorbed", amountMg: 300 })] },
    };
    const notes = workedArithmetic(inventedContent(close)).map(({ note }) => note);
    expect(notes.filter((note) => note?.includes("ka and k are so close"))).toHaveLength(2);
  });

  test("keeps the writing rules", () => {
    for (const { change } of regimens)
      for (const { title, note, steps } of workedArithmetic(inventedContent(change)))
        for (const text of [
          title,
          note ?? "",
          ...steps.flatMap((step) => [step.title, step.formula, step.substituted, step.result]),
        ])
          expect(findWritingFaults(text)).toEqual([]);
  });
});
