import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type CourseInput, courseOf, eliminationPieces } from "../../../shared/kinetics/course.ts";
import { resolveKinetics } from "../../../shared/kinetics/disposition.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { remainsAt } from "../../../shared/kinetics/remains.ts";
import { walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { absorbed, bolus, inputOf } from "./asked.ts";
import { logarithmic } from "./random-courses.ts";

describe("resolveKinetics", () => {
  test("any two independent values give the same four", () => {
    checkedBy(
      fc.property(logarithmic(0.1, 1000), logarithmic(0.001, 5), (volumeL, eliminationRatePerH) => {
        const clearanceLPerH = volumeL * eliminationRatePerH;
        const halfLifeH = Math.LN2 / eliminationRatePerH;
        for (const given of [
          { volumeL, clearanceLPerH },
          { volumeL, eliminationRatePerH },
          { volumeL, halfLifeH },
          { clearanceLPerH, eliminationRatePerH },
          { clearanceLPerH, halfLifeH },
        ]) {
          const resolved = resolveKinetics(given);
          if (!resolved.ok) throw new Error(resolved.problem);
          const { kinetics } = resolved;
          expect(Math.abs(kinetics.volumeL / volumeL - 1)).toBeLessThanOrEqual(1e-15);
          expect(Math.abs(kinetics.clearanceLPerH / clearanceLPerH - 1)).toBeLessThanOrEqual(1e-15);
          expect(Math.abs(kinetics.eliminationRatePerH / eliminationRatePerH - 1)).toBeLessThanOrEqual(1e-15);
          expect(Math.abs(kinetics.halfLifeH / halfLifeH - 1)).toBeLessThanOrEqual(1e-15);
          expect(kinetics.given).toEqual(Object.keys(given));
        }
      }),
    );
  });

  test("keeps stated digits: 5 L/h from 40 L stays 5 L/h", () => {
    expect(resolveKinetics({ volumeL: 40, clearanceLPerH: 5 })).toMatchObject({
      kinetics: { volumeL: 40, clearanceLPerH: 5, eliminationRatePerH: 0.125 },
    });
  });

  test("accepts a third value that agrees to 0.5 percent and refuses one that does not, with the discrepancy", () => {
    expect(resolveKinetics({ volumeL: 40, clearanceLPerH: 5, halfLifeH: 5.55 }).ok).toBe(true); // ln 2 / 0.125 is 5.545
    expect(resolveKinetics({ volumeL: 40, clearanceLPerH: 5, halfLifeH: 6 })).toEqual({
      ok: false,
      field: "halfLifeH",
      problem: "6 disagrees with volumeL and clearanceLPerH, which give 5.54518: 8.2 percent apart",
    });
  });

  test("asks for two independent values: k and half-life are one", () => {
    expect(resolveKinetics({})).toMatchObject({
      ok: false,
      field: "volumeL",
      problem: expect.stringMatching(/give two independent values .* got none/),
    });
    expect(resolveKinetics({ volumeL: 40 })).toMatchObject({
      ok: false,
      field: "clearanceLPerH",
      problem: expect.stringMatching(/got only volumeL/),
    });
    expect(resolveKinetics({ eliminationRatePerH: 0.1, halfLifeH: 6.93 })).toMatchObject({
      ok: false,
      field: "volumeL",
    });
  });
});

describe("eliminationPieces", () => {
  const resolved = resolveKinetics({ volumeL: 40, clearanceLPerH: 4 });
  const kinetics = resolved.ok ? resolved.kinetics : undefined;
  const ratesOf = (changes: CourseInput["eliminationChanges"]) =>
    eliminationPieces(kinetics!, changes!).map(({ fromH, ratePerH }) => [fromH, ratePerH]);

  test("two dialysis sessions that overlap add up, and leave exactly what was there before", () => {
    // By hand: 4 / 40 = 0.1 per h; with 6 L/h more 0.25; with 6 and 2 L/h more 0.3.
    const pieces = ratesOf([
      { fromH: 2, toH: 6, addedClearanceLPerH: 6 },
      { fromH: 4, toH: 8, addedClearanceLPerH: 2 },
    ]);
    expect(pieces.map(([fromH]) => fromH)).toEqual([0, 2, 4, 6, 8]);
    for (const [index, rate] of [0.1, 0.25, 0.3, 0.15, 0.1].entries()) expect(pieces[index]![1]).toBeCloseTo(rate, 14);
    expect(pieces[4]![1]).toBe(kinetics!.eliminationRatePerH);
  });

  test("a change of k or CL holds until the next; at one hour the later in the list wins", () => {
    expect(
      ratesOf([
        { fromH: 10, clearanceLPerH: 8 },
        { fromH: 5, eliminationRatePerH: 0.05 },
        { fromH: 5, eliminationRatePerH: 0.06 },
      ]),
    ).toEqual([
      [0, 0.1],
      [5, 0.06],
      [10, 0.2],
    ]);
  });

  test("a thousand overlapping sessions end at the rate they began with", () => {
    const changes = Array.from({ length: 1000 }, (_, index) => ({
      fromH: index * 0.7,
      toH: index * 0.7 + 300,
      addedClearanceLPerH: 0.1 + index / 999,
    }));
    expect(ratesOf(changes).at(-1)).toEqual([999 * 0.7 + 300, kinetics!.eliminationRatePerH]);
  });
});

describe("refusals at the engine's door", () => {
  const body = { volumeL: 40, clearanceLPerH: 4 };

  test("an absorbed dose without ka", () => {
    expect(() => courseOf(inputOf(body, [absorbed(100)], 24))).toThrow(
      "absorptionRatePerH must be given, because a dose is absorbed, got undefined",
    );
  });

  test("kinetics that two values do not fix, or three contradict", () => {
    expect(() => courseOf(inputOf({ volumeL: 40 }, [], 24))).toThrow(
      "clearanceLPerH must be such that the kinetics are fixed (give two independent values of volumeL, clearanceLPerH, eliminationRatePerH and halfLifeH; got only volumeL), got undefined",
    );
    expect(() => courseOf(inputOf({ ...body, halfLifeH: 20 }, [], 24))).toThrow(
      /halfLifeH .*disagrees with volumeL and clearanceLPerH/,
    );
  });

  test("a plan of no length", () => {
    for (const horizonH of [0, -1, Number.NaN])
      expect(() => courseOf(inputOf(body, [], horizonH))).toThrow("horizonH must be greater than 0");
  });

  test("windows that are empty, backwards or outside the plan", () => {
    const made = walk(courseOf(inputOf(body, [bolus(100)], 24)));
    for (const [fromH, toH] of [
      [-1, 5],
      [24, 25],
      [Number.NaN, 5],
    ] as const)
      expect(() => exposureOf(made, { fromH, toH })).toThrow(/window\/fromH must be from 0 to below 24/);
    for (const [fromH, toH] of [
      [5, 5],
      [5, 4],
      [5, 24.1],
      [5, Number.NaN],
    ] as const)
      expect(() => exposureOf(made, { fromH, toH })).toThrow(/window\/toH must be above 5 and at most 24/);
  });

  test("what remains outside the plan", () => {
    const course = courseOf(inputOf(body, [bolus(100)], 24));
    for (const atH of [-1, 24.1, Number.NaN])
      expect(() => remainsAt(course, atH)).toThrow(/remainsAtH must be from 0 to 24/);
    expect(remainsAt(course, 0)).toEqual([{ dose: 0, mgPerL: 2.5, percent: 100 }]);
  });
});
