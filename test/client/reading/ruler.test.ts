import { describe, expect, test } from "vitest";
import { clockTicks } from "../../../client/reading/clock-ticks.ts";
import { type MarksApart, placeMarks } from "../../../client/reading/mark-layout.ts";
import { holding, hourAt, panned, pixelAt, windowWithin, zoomed } from "../../../client/reading/plot-scale.ts";
import { snappedH, steppedH, withinPlan } from "../../../client/reading/snap.ts";
import type { ScheduledDose } from "../../../shared/schedule/scheduled-dose.ts";

const span = { start: "2026-03-02T08:07:00Z", horizonH: 72, timeZone: "Europe/London" };

describe("snapping", () => {
  test("goes by the wall clock, not by hours after the start", () => {
    expect(snappedH(0.1, "15", span)).toBeCloseTo(8 / 60, 12); // 08:13 is nearest to 08:15
    expect(snappedH(0.1, "free", span)).toBeCloseTo(0.1, 12); // 08:13 is a whole minute
  });

  test("steps to the next multiple, four of them with Shift, and back", () => {
    expect(steppedH(0, 1, "15", "usual", span)).toBeCloseTo(8 / 60, 12); // 08:07 to 08:15
    expect(steppedH(8 / 60, 1, "15", "usual", span)).toBeCloseTo(23 / 60, 12); // 08:15 to 08:30
    expect(steppedH(8 / 60, 1, "15", "larger", span)).toBeCloseTo(68 / 60, 12); // 08:15 to 09:15
    expect(steppedH(8 / 60, -1, "60", "usual", span)).toBeCloseTo(-7 / 60, 12); // 08:15 to 08:00
  });

  test("snaps to the clock of a zone that is 45 minutes off the hour (Kathmandu, UTC+05:45)", () => {
    const nepal = { start: "2026-03-02T08:00:00+05:45", horizonH: 24, timeZone: "Asia/Kathmandu" };
    expect(snappedH(1.4, "60", nepal)).toBeCloseTo(1, 12); // 09:24 to 09:00
  });

  test("keeps a dose within the plan and says so", () => {
    expect(withinPlan(-1, span)).toMatchObject({ atH: 0, why: expect.stringContaining("before the plan starts") });
    expect(withinPlan(72, span).atH).toBeLessThan(72);
    expect(withinPlan(3, span)).toEqual({ atH: 3 });
  });
});

describe("the window", () => {
  test("zooms about an hour, pans and stays within the plan", () => {
    const whole = { fromH: 0, toH: 72 };
    const half = zoomed(whole, 0.5, 36, 72);
    expect(half).toEqual({ fromH: 18, toH: 54 });
    expect(panned(half, 100, 72)).toEqual({ fromH: 36, toH: 72 });
    expect(zoomed(half, 10, 20, 72)).toEqual(whole);
    expect(holding(half, 60, 72)).toEqual({ fromH: 24, toH: 60 });
    expect(windowWithin({ fromH: -5, toH: -4.9 }, 72)).toEqual({ fromH: 0, toH: 0.5 });
    expect(hourAt(pixelAt(30, half, 500), half, 500)).toBeCloseTo(30, 12);
  });
});

describe("clockTicks", () => {
  test("stand at round clock times of the zone", () => {
    const { ticks, stretches } = clockTicks(span, { fromH: 0, toH: 24 }, 600);
    expect(ticks[0]!.text).toBe("09:00");
    expect(ticks[0]!.atH).toBeCloseTo(53 / 60, 12);
    expect(ticks.find(({ weight }) => weight === "strong")?.text).toBe("00:00");
    expect(stretches.map(({ text }) => text)).toEqual(["Mon 2 Mar 2026", "Tue 3 Mar 2026"]);
  });

  test("leave out the hour that a day in spring does not have and show twice the one that comes twice in autumn", () => {
    const spring = { start: "2026-03-29T00:00:00Z", horizonH: 6, timeZone: "Europe/London" };
    expect(clockTicks(spring, { fromH: 0, toH: 4 }, 400).ticks.map(({ text }) => text)).toEqual([
      "00:00",
      "02:00",
      "03:00",
      "04:00",
      "05:00",
    ]);
    const autumn = { start: "2026-10-25T00:00:00+01:00", horizonH: 6, timeZone: "Europe/London" };
    expect(clockTicks(autumn, { fromH: 0, toH: 3 }, 300).ticks.map(({ text, atH }) => `${text} ${atH}`)).toEqual([
      "00:00 0",
      "01:00 1",
      "01:00 2",
      "02:00 3",
    ]);
  });

  test("name days where times have no room, and have no two labels closer than they are wide", () => {
    const { ticks, stretches } = clockTicks(span, { fromH: 0, toH: 24 * 30 }, 300);
    expect(ticks.every(({ text }) => /^[A-Z][a-z]{2} \d{1,2}$/.test(text))).toBe(true);
    const gaps = ticks.slice(1).map(({ atH }, index) => ((atH - ticks[index]!.atH) / 720) * 300);
    expect(Math.min(...gaps)).toBeGreaterThanOrEqual(58);
    expect(stretches[0]!.text).toBe("March 2026");
  });
});

describe("placeMarks", () => {
  const dose = (key: string, atH: number) => ({ key, atH }) as ScheduledDose;
  const place = (hours: readonly number[], apart?: MarksApart) =>
    placeMarks(
      hours.map((atH, index) => dose(`d${index}`, atH)),
      (atH) => atH,
      1_000,
      apart,
    );

  test("keeps one row while there is room, then uses up to three", () => {
    expect(place([0, 30, 60]).map(({ row }) => row)).toEqual([0, 0, 0]);
    expect(place([0, 0, 0, 30]).map(({ row }) => row)).toEqual([0, 1, 2, 0]);
  });

  test("gathers doses that are too close, loses none, and lets no two targets overlap", () => {
    const placed = place(Array.from({ length: 200 }, (_, index) => index * 3));
    const count = placed.reduce((sum, mark) => sum + (mark.kind === "bunch" ? mark.doses.length : 1), 0);
    expect(count).toBe(200);
    for (const [index, mark] of placed.entries())
      for (const other of placed.slice(index + 1))
        expect(mark.row !== other.row || Math.abs(mark.xPx - other.xPx) >= 24).toBe(true);
  });

  test("leaves out what is not in view, but never the dose in hand, which keeps its own mark", () => {
    expect(place([-5, 10, 1_001]).length).toBe(1);
    const held = place([10, 12, 14, 16, 2_000], { heldKey: "d4" });
    expect(held.find((mark) => mark.kind === "dose" && mark.dose.key === "d4")).toMatchObject({ row: 0, xPx: 2_000 });
  });

  test("gathers the dose that the keyboard is on into no bunch, and lets it touch no other", () => {
    const placed = place(
      Array.from({ length: 40 }, (_, index) => index * 3),
      { activeKey: "d20" },
    );
    const own = placed.find((mark) => mark.kind === "dose" && mark.dose.key === "d20")!;
    expect(own).toMatchObject({ xPx: 60 });
    expect(placed.filter((mark) => mark !== own && mark.row === own.row)).toEqual([]);
    expect(placed.reduce((sum, mark) => sum + (mark.kind === "bunch" ? mark.doses.length : 1), 0)).toBe(40);
  });
});
