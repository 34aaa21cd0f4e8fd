import { describe, expect, test } from "vitest";
import { isValue } from "../../../shared/figures/figure.ts";
import { figureGroups } from "../../../shared/figures/figure-rows.ts";
import { type FigureName, figuresOf } from "../../../shared/figures/figures.ts";
import { judge } from "../../../shared/figures/judge.ts";
import { sayFigure, sayMoment } from "../../../shared/figures/say-figure.ts";
import { everyEight, inventedContent, stated } from "../../invented-content.ts";
import { findWritingFaults } from "../../writing-rules.ts";

const plan = { start: "2026-03-02T08:00:00Z", horizonH: 48 };
const kinetics = { volumeL: stated(40), clearanceLPerH: stated(5) };
const range = { low: 5, high: 15 };
const content = inventedContent({ setting: { plan, kinetics, rangeMgPerL: range } });
const figures = figuresOf(content);
const k = 0.125;
/** Relative rounding of a few dozen exponentials. */
const digits = 1e-12;

function numberOf(name: FigureName, of = figures): number {
  const figure = of[name];
  if (!isValue(figure)) throw new Error(`${name}: ${figure.absent}`);
  return figure.value;
}

/** By hand from the textbook formulas of a repeated infusion: 500 mg over 1 h every 8 h, CL 5 L/h, V 40 L. */
const firstPeak = 100 * (1 - Math.exp(-k));
const accumulation = 1 / (1 - Math.exp(-8 * k));
const byHand: [FigureName, number][] = [
  ["firstPeak", firstPeak],
  ["firstTrough", firstPeak * Math.exp(-7 * k)],
  ["lastPeak", firstPeak * ((1 - Math.exp(-48 * k)) / (1 - Math.exp(-8 * k)))],
  ["lastTrough", firstPeak * ((1 - Math.exp(-48 * k)) / (1 - Math.exp(-8 * k))) * Math.exp(-7 * k)],
  ["steadyPeak", firstPeak * accumulation],
  ["steadyTrough", firstPeak * accumulation * Math.exp(-7 * k)],
  ["steadyAverage", 500 / (5 * 8)],
  ["steadyArea24", (3 * 500) / 5],
  ["timeTo90Percent", Math.LN10 / k],
  ["swing", 100 * (Math.exp(7 * k) - 1)],
  ["fluctuation", (100 * firstPeak * accumulation * (1 - Math.exp(-7 * k))) / 12.5],
  ["amountPerDay", 1_500],
  ["totalAmount", 3_000],
  ["highestAmount", 500],
  ["highestRate", 500],
];

describe("figuresOf", () => {
  test.for(byHand)("gives %s as worked out by hand", ([name, value]) => {
    expect(Math.abs(numberOf(name) - value)).toBeLessThanOrEqual(digits * Math.abs(value));
  });

  test("dates peaks, troughs and the first entry", () => {
    expect(figures.firstPeak).toMatchObject({ atH: 1, at: "2026-03-02T09:00:00Z" });
    expect(figures.firstTrough).toMatchObject({ atH: 8, at: "2026-03-02T16:00:00Z" });
    expect(figures.lastPeak).toMatchObject({ atH: 41, at: "2026-03-04T01:00:00Z" });
    // The level reaches 5 mg/L while the first infusion runs: 100 (1 - e^(-k t)) = 5.
    expect(numberOf("firstInRange")).toBeCloseTo(-Math.log(0.95) / k, 12);
  });

  test("splits the plan into above, within and below without a rest", () => {
    expect(numberOf("hoursAbove") + numberOf("hoursWithin") + numberOf("hoursBelow")).toBeCloseTo(48, 10);
    expect(numberOf("percentAbove") + numberOf("percentWithin") + numberOf("percentBelow")).toBeCloseTo(100, 10);
  });

  test("takes the area over any 24 hours, and refuses those the plan does not hold", () => {
    const first = numberOf("area24");
    const second = figuresOf(content, { areaFromH: 24 });
    expect(first + numberOf("area24", second)).toBeCloseTo(48 * numberOf("average"), 9);
    expect(figuresOf(content, { areaFromH: 24.5 }).area24).toEqual({ absent: "the plan ends before the stretch does" });
  });

  test("tells what was given from what was planned", () => {
    const late = inventedContent({
      setting: { plan, kinetics },
      schedule: {
        records: [{ orderId: "o1", occurrence: 0, outcome: { kind: "changed", at: "2026-03-02T12:00:00Z" } }],
      },
    });
    expect(figuresOf(late).firstPeak).toMatchObject({ atH: 5 });
    expect(figuresOf(late, { which: "planned" }).firstPeak).toMatchObject({ atH: 1 });
  });

  test("finds the highest and lowest level of the plan where neither the first nor the last interval has it", () => {
    const omitted = (occurrence: number) => ({ orderId: "o1", occurrence, outcome: { kind: "omitted" } }) as const;
    const extra = { id: "x", at: "2026-03-03T08:00:00Z", give: { kind: "bolus", amountMg: 800 } } as const;
    const found = figuresOf(
      inventedContent({
        setting: { plan, kinetics },
        schedule: { records: [omitted(1), omitted(2)], extras: [extra] },
      }),
    );
    const before = firstPeak * Math.exp(-23 * k);
    expect(found.lowest).toMatchObject({ atH: 24 });
    expect(numberOf("lowest", found)).toBeCloseTo(before, 9);
    // 800 mg at once, then 500 mg over the hour that begins with it.
    expect(found.highest).toMatchObject({ atH: 25 });
    expect(numberOf("highest", found)).toBeCloseTo((before + 20) * Math.exp(-k) + firstPeak, 9);
  });

  test("lets the last interval run to the end of a plan without a cycle, from the first rate of a pump log", () => {
    const steps = [
      { afterH: 0, rateMgPerH: 0 },
      { afterH: 10, rateMgPerH: 50 },
      { afterH: 20, rateMgPerH: 0 },
    ];
    const orders = [
      { id: "o1", give: { kind: "bolus" as const, amountMg: 100 }, when: { kind: "once" as const, at: plan.start } },
      { id: "o2", give: { kind: "pump" as const, steps }, when: { kind: "once" as const, at: "2026-03-02T10:00:00Z" } },
    ];
    const found = figuresOf(inventedContent({ setting: { plan, kinetics }, schedule: { orders } }));
    expect(found.firstTrough).toMatchObject({ atH: 12 });
    expect(found.lastPeak).toMatchObject({ atH: 22, note: "to the end of the plan, as no dose follows" });
    expect(numberOf("lastPeak", found)).toBeCloseTo(2.5 * Math.exp(-22 * k) + 10 * (1 - Math.exp(-10 * k)), 9);
    expect(found.lastTrough).toMatchObject({ atH: 48 });
    expect(found.highestRate).toMatchObject({ value: 50, atH: 12 });
  });

  test("says where in a settled cycle its peak and trough lie, not a date at which they are not reached", () => {
    expect(figures.steadyPeak).not.toHaveProperty("at");
    expect(figures.steadyPeak).toMatchObject({
      note: "1\u00a0h into a settled cycle of 8\u00a0h, by the clock at 01:00, 09:00 and 17:00",
    });
    expect(figures.steadyTrough).toMatchObject({
      note: "8\u00a0h into a settled cycle of 8\u00a0h, by the clock at 00:00, 08:00 and 16:00",
    });
  });

  test.for([
    { night: "spring", start: "2026-03-28T08:00:00Z", firstDose: "2026-03-28T13:30:00Z", settledH: 28.5 },
    { night: "autumn", start: "2026-10-24T08:00:00+01:00", firstDose: "2026-10-24T13:30:00+01:00", settledH: 54.5 },
  ])("keeps clock times over a night in $night, when the clock changes", ({ start, firstDose, settledH }) => {
    const times = [{ time: "01:30" }, { time: "13:30", amountMg: 100 }];
    const order = {
      id: "o1",
      give: { kind: "bolus" as const, amountMg: 500 },
      when: { kind: "clock-times" as const, from: firstDose, times, end: { kind: "open" as const } },
    };
    const slower = { volumeL: stated(40), clearanceLPerH: stated(3.2) };
    const found = figuresOf(
      inventedContent({
        timeZone: "Europe/London",
        setting: { plan: { start, horizonH: 72 }, kinetics: slower },
        schedule: { orders: [order] },
      }),
    );
    expect(found.steadyPeak).toMatchObject({
      note: "12\u00a0h into a settled cycle of 24\u00a0h, by the clock at 01:30",
    });
    // By hand: 12.5 e^(-0.08 x 11) + 2.5 e^(-0.08 x 23) = 5.58 of 6.04 mg/L after the short night; 4.76 after the long one.
    expect(found.settledFrom).toMatchObject({ atH: settledH });
  });

  test("says why a figure is absent instead of giving a number", () => {
    const nothing = figuresOf(inventedContent({ schedule: { orders: [] } }));
    expect(nothing.firstPeak).toEqual({ absent: "no dose is given" });
    expect(nothing.steadyPeak).toEqual({ absent: "no order repeats" });
    expect(nothing.hoursWithin).toEqual({ absent: "no desired range is given" });
    expect(nothing.highestRate).toEqual({ absent: "nothing is given at a rate" });
  });
});

describe("figureGroups", () => {
  test("names every figure once", () => {
    const named = figureGroups.flatMap(({ rows }) => rows.map(({ name }) => name));
    expect([...named].sort()).toEqual(Object.keys(figures).sort());
    expect(new Set(named).size).toBe(named.length);
  });

  test("can be said by the writing rules, each with its unit", () => {
    for (const { rows } of figureGroups)
      for (const { name, label } of rows) {
        const said = sayFigure(figures[name]);
        expect(findWritingFaults(`${label} ${said} ${sayMoment(figures[name], "UTC") ?? ""}`)).toEqual([]);
        if (isValue(figures[name])) expect(said).toMatch(/\u00a0/);
      }
  });
});

describe("judge", () => {
  const slower = {
    ...everyEight,
    when: { kind: "every", from: plan.start, intervalH: 24, end: { kind: "open" } },
  } as const;
  const other = figuresOf(
    inventedContent({ setting: { plan, kinetics, rangeMgPerL: range }, schedule: { orders: [slower] } }),
  );
  const marks = judge([figures, other], range);

  test("marks the best where alternatives differ, in words", () => {
    const better = numberOf("hoursWithin") > numberOf("hoursWithin", other) ? 0 : 1;
    expect(marks[better]!.hoursWithin).toEqual([{ kind: "best", words: "best: most" }]);
    expect(marks[1 - better]!.hoursWithin).toBeUndefined();
  });

  test("marks levels outside the range, in words", () => {
    expect(marks[0]!.steadyPeak).toEqual([{ kind: "out-of-range", words: "above the range" }]);
    expect(marks[1]!.lastTrough).toEqual([{ kind: "out-of-range", words: "below the range" }]);
  });

  test("calls nothing best where all are equal", () => {
    expect(judge([figures, figures], range)[0]!.hoursWithin).toBeUndefined();
  });
});
