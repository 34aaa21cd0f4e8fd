import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type CourseInput, courseOf, effectiveMg } from "../../../shared/kinetics/course.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { gridTimesH, levelsAt, levelsEvery } from "../../../shared/kinetics/levels.ts";
import { remainsAt } from "../../../shared/kinetics/remains.ts";
import { compareWithSecondOpinion } from "../../../shared/kinetics/second-opinion.ts";
import { stretchAt, walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { hourUpTo, logarithmic, randomCourse, randomDose, randomParameters, timesWithin } from "./random-courses.ts";

/** Rounding over a few hundred events and exponentials, relative to the largest level. */
const rounding = 1e-12;

const levelsOf = (input: CourseInput, timesH: readonly number[]) => levelsAt(walk(courseOf(input)), timesH);
const withTimes = fc
  .tuple(randomCourse(), fc.nat())
  .chain(([input]) => fc.tuple(fc.constant(input), timesWithin(input.horizonH)));

function expectAll(got: ArrayLike<number>, wanted: ArrayLike<number>, tolerance: number): void {
  for (let point = 0; point < wanted.length; point++)
    expect(
      Math.abs(got[point]! - wanted[point]!),
      `at point ${point}: ${got[point]} against ${wanted[point]}`,
    ).toBeLessThanOrEqual(tolerance);
}

const peakOf = (input: CourseInput) => {
  const made = walk(courseOf(input));
  return Math.max(
    exposureOf(made, { fromH: 0, toH: input.horizonH }).peak.mgPerL,
    levelsAt(made, [input.horizonH])[0]!,
  );
};

describe("laws of a linear body", () => {
  test("superposition: two trains of doses together leave the sum of what each leaves", () => {
    checkedBy(
      fc.property(withTimes, fc.nat(), ([input, timesH], cut) => {
        const at = cut % (input.doses.length + 1);
        const one = levelsOf({ ...input, doses: input.doses.slice(0, at) }, timesH);
        const other = levelsOf({ ...input, doses: input.doses.slice(at), startConcentrationMgPerL: 0 }, timesH);
        const together = levelsOf(input, timesH);
        expectAll(
          together,
          one.map((level, point) => level + other[point]!),
          rounding * peakOf(input),
        );
      }),
    );
  });

  test("scaling: every amount, rate and the starting level times s makes every level times s", () => {
    checkedBy(
      fc.property(withTimes, logarithmic(0.01, 100), ([input, timesH], factor) => {
        const scaled = levelsOf(
          {
            ...input,
            doses: input.doses.map((dose) => scaledDose(dose, factor)),
            startConcentrationMgPerL: factor * input.startConcentrationMgPerL!,
          },
          timesH,
        );
        expectAll(
          scaled,
          levelsOf(input, timesH).map((level) => factor * level),
          rounding * factor * peakOf(input),
        );
      }),
    );
  });

  test("volume: the same amounts and k in s times the volume make levels 1/s times as high", () => {
    checkedBy(
      fc.property(
        randomCourse({ changes: "none" }),
        logarithmic(0.1, 10),
        ({ startConcentrationMgPerL: _, ...input }, factor) => {
          const volumeL = input.parameters.volumeL! * factor;
          const timesH = [0, input.horizonH / 3, input.horizonH];
          const wider = levelsOf({ ...input, parameters: { ...input.parameters, volumeL } }, timesH);
          expectAll(
            wider,
            levelsOf(input, timesH).map((level) => level / factor),
            (rounding * peakOf(input)) / factor,
          );
        },
      ),
    );
  });

  test("time shift: everything later by h leaves the same levels later by h", () => {
    checkedBy(
      fc.property(withTimes, hourUpTo(50), ([{ startConcentrationMgPerL: _, ...input }, timesH], laterH) => {
        const shifted: CourseInput = {
          ...input,
          horizonH: input.horizonH + laterH,
          doses: input.doses.map((dose) => shiftedDose(dose, laterH)),
          eliminationChanges: input.eliminationChanges!.map((change) =>
            "toH" in change
              ? { ...change, fromH: change.fromH + laterH, toH: change.toH + laterH }
              : { ...change, fromH: change.fromH + laterH },
          ),
        };
        // Times a hair after an event, so that the rounding of 8.2 + 3.3 cannot put a bolus on either side of a time.
        const times = timesH.filter((timeH) => !nearEvent(input, timeH));
        const later = times.map((timeH) => timeH + laterH);
        expectAll(levelsOf(shifted, later), levelsOf(input, times), 1e-10 * Math.max(peakOf(input), 1e-300));
      }),
    );
  });

  test("area: what has been given and cleared adds up to F S dose / CL in the end", () => {
    checkedBy(
      fc.property(randomCourse({ changes: "none" }), (input) => {
        const course = courseOf({ ...input, horizonH: 20_000 });
        const { eliminationRatePerH: k, clearanceLPerH } = course.kinetics;
        fc.pre(Math.min(k, course.absorptionRatePerH!) * 19_000 > 40); // e^-40: nothing is left to come
        const startMg = course.startConcentrationMgPerL * course.kinetics.volumeL;
        const givenMg = course.doses.reduce((sum, dose) => sum + givenBy(course, dose), startMg);
        const { aucMgHPerL } = exposureOf(walk(course), { fromH: 0, toH: 20_000 });
        expect(Math.abs(aucMgHPerL - givenMg / clearanceLPerH)).toBeLessThanOrEqual(
          (rounding * givenMg) / clearanceLPerH,
        );
      }),
    );
  });

  test("mass balance: given = in the body + at absorption sites + eliminated, on every stretch", () => {
    checkedBy(
      fc.property(randomCourse(), (input) => {
        const course = courseOf(input);
        const made = walk(course);
        const startMg = course.startConcentrationMgPerL * course.kinetics.volumeL;
        let eliminatedMg = 0;
        for (let index = 0; index < made.count; index++) {
          const fromH = made.fromH[index]!;
          const { state } = stretchAt(made, index);
          const givenMg = course.doses.reduce((sum, dose) => sum + givenUntil(course, dose, fromH), startMg);
          expect(Math.abs(state.amountMg + state.depotMg + eliminatedMg - givenMg)).toBeLessThanOrEqual(
            1e-11 * givenMg,
          );
          const untilH = made.untilH[index]!;
          if (untilH > fromH)
            eliminatedMg +=
              made.eliminationRatePerH[index]! * exposureOf(made, { fromH, toH: untilH }).aucMgHPerL * made.volumeL;
        }
      }),
    );
  });

  test("what remains: each part is the level its dose leaves alone, and the parts add up to the level", () => {
    checkedBy(
      fc.property(withTimes, ([input, timesH]) => {
        const course = courseOf(input);
        const tolerance = rounding * peakOf(input);
        for (const timeH of timesH) {
          const parts = remainsAt(course, timeH);
          const total = parts.reduce((sum, { mgPerL }) => sum + mgPerL, 0);
          expectAll([total], levelsOf(input, [timeH]), tolerance);
          for (const part of parts) {
            const alone =
              part.dose === "start"
                ? { ...input, doses: [] }
                : { ...input, doses: [input.doses[part.dose]!], startConcentrationMgPerL: 0 };
            expectAll([part.mgPerL], levelsOf(alone, [timeH]), tolerance);
          }
          if (total > 0) expect(parts.reduce((sum, { percent }) => sum + percent, 0)).toBeCloseTo(100, 9);
        }
      }),
      { runs: 100 },
    );
  });

  test("levels never fall below 0", () => {
    checkedBy(
      fc.property(withTimes, ([input, timesH]) => {
        for (const level of levelsOf(input, timesH)) expect(level).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  test("two opinions agree: the walk and the convolution lie within 1e-11 of the largest level", () => {
    checkedBy(
      fc.property(randomCourse(), (input) => {
        // The promise made to users is 1e-6; this much is what rounding can do over a course.
        expect(compareWithSecondOpinion(courseOf(input)).relative).toBeLessThanOrEqual(1e-11);
      }),
    );
  });

  test("the grid by multiply-adds agrees with the closed form within 1e-12", () => {
    checkedBy(
      fc.property(randomCourse(), fc.constantFrom(0.25, 0.1, 1 / 60, 0.7), (input, everyH) => {
        const made = walk(courseOf(input));
        const gridH = gridTimesH(input.horizonH, everyH);
        const grid = levelsEvery(made, everyH);
        expect(grid.length).toBe(gridH.length);
        // Where an event lies within rounding of a grid time the two may take either side of it.
        const exact = levelsAt(
          made,
          gridH.map((timeH) => Math.min(timeH, input.horizonH)),
        );
        const tolerance = rounding * peakOf(input);
        for (let point = 0; point < grid.length; point++)
          if (!nearEvent(input, gridH[point]!) || isQuarter(gridH[point]!))
            expectAll([grid[point]!], [exact[point]!], tolerance);
      }),
      { runs: 60 },
    );
  });
});

describe("the limit where ka meets k", () => {
  test("is reached without a jump: a relative step d of ka moves the level by less than d", () => {
    checkedBy(
      fc.property(
        randomParameters,
        logarithmic(1e-15, 1e-3),
        hourUpTo(48),
        logarithmic(1, 500),
        (parameters, step, timeH, amountMg) => {
          const k = parameters.eliminationRatePerH;
          const levelWith = (absorptionRatePerH: number) =>
            levelsOf(
              {
                parameters: { ...parameters, absorptionRatePerH },
                doses: [{ kind: "absorbed", atH: 0, amountMg, lagH: 0 }],
                horizonH: 48,
              },
              [timeH],
            )[0]!;
          // |d ln C / d ln ka| at ka = k is |1 - k t / 2|; the level itself is known to a few units in its last place.
          const allowed = (1 + (k * timeH) / 2) * step * 1.5 + 8 * Number.EPSILON;
          for (const ka of [k * (1 + step), k * (1 - step)])
            expect(Math.abs(levelWith(ka) - levelWith(k))).toBeLessThanOrEqual(allowed * levelWith(k));
        },
      ),
    );
  });

  test("keeps its digits beside it: C(5 h) with ka = 0.5 (1 + 1e-9), k = 0.5 (DER-01, at 50 digits)", () => {
    const parameters = {
      volumeL: 10,
      eliminationRatePerH: 0.5,
      absorptionRatePerH: 0.5 * (1 + 1e-9),
      bioavailability: 1,
      saltFactor: 1,
    };
    const [level] = levelsOf(
      { parameters, doses: [{ kind: "absorbed", atH: 0, amountMg: 100, lagH: 0 }], horizonH: 6 },
      [5],
    );
    expect(Math.abs(level! - 2.0521249650844386)).toBeLessThanOrEqual(4 * Number.EPSILON * 2.06);
  });
});

describe("extremes and hours", () => {
  test("peak and trough bound every level on the grid, and are reached", () => {
    checkedBy(
      fc.property(randomCourse(), hourUpTo(12), hourUpTo(12), (input, fromH, gapH) => {
        const made = walk(courseOf(input));
        const toH = input.horizonH - gapH;
        const { peak, trough } = exposureOf(made, { fromH, toH: Math.max(toH, fromH + 0.5) });
        const times = Array.from(
          { length: 400 },
          (_, index) => fromH + ((Math.max(toH, fromH + 0.5) - fromH) * index) / 400,
        );
        const slack = rounding * peakOf(input);
        for (const level of levelsAt(made, times)) {
          expect(level).toBeLessThanOrEqual(peak.mgPerL + slack);
          expect(level).toBeGreaterThanOrEqual(trough.mgPerL - slack);
        }
        for (const { atH, mgPerL } of [peak, trough]) {
          const [level] = levelsAt(made, [atH]);
          // At a bolus the level is the one after it; a trough there is the one before.
          if (nearEvent(input, atH)) expect(level).toBeGreaterThanOrEqual(mgPerL - slack);
          else expect(Math.abs(level! - mgPerL)).toBeLessThanOrEqual(slack);
        }
      }),
      { runs: 100 },
    );
  });

  test("hours above, within and below add up to the window and agree with a fine count", () => {
    checkedBy(
      fc.property(
        randomCourse(),
        fc.integer({ min: 1, max: 9 }),
        fc.integer({ min: 1, max: 9 }),
        (input, one, other) => {
          const made = walk(courseOf(input));
          const largest = peakOf(input);
          fc.pre(largest > 0 && one !== other);
          const range = { low: (Math.min(one, other) / 10) * largest, high: (Math.max(one, other) / 10) * largest };
          const window = { fromH: 0, toH: input.horizonH };
          const { hoursAbove, hoursWithin, hoursBelow } = exposureOf(made, window, range);
          expect(Math.abs(hoursAbove! + hoursWithin! + hoursBelow! - input.horizonH)).toBeLessThanOrEqual(1e-9);
          for (const hours of [hoursAbove!, hoursWithin!, hoursBelow!]) expect(hours).toBeGreaterThanOrEqual(0);
          // A count of midpoints errs by at most a cell for each time the level passes a bound.
          const cells = 4000;
          const cellH = input.horizonH / cells;
          const counted = levelsAt(
            made,
            Array.from({ length: cells }, (_, cell) => (cell + 0.5) * cellH),
          );
          const passes = 2 * (4 * input.doses.length * 2 + 10);
          expect(
            Math.abs(counted.filter((level) => level > range.high).length * cellH - hoursAbove!),
          ).toBeLessThanOrEqual(passes * cellH);
          expect(
            Math.abs(counted.filter((level) => level < range.low).length * cellH - hoursBelow!),
          ).toBeLessThanOrEqual(passes * cellH);
        },
      ),
      { runs: 100 },
    );
  });

  test("the areas of two windows add up to the area of both", () => {
    checkedBy(
      fc.property(randomCourse(), hourUpTo(20), (input, offsetH) => {
        const made = walk(courseOf(input));
        const cutH = 1 + offsetH;
        const area = (fromH: number, toH: number) => exposureOf(made, { fromH, toH }).aucMgHPerL;
        const whole = area(0, input.horizonH);
        expect(Math.abs(area(0, cutH) + area(cutH, input.horizonH) - whole)).toBeLessThanOrEqual(rounding * whole);
      }),
    );
  });
});

function scaledDose(dose: CourseInput["doses"][number], factor: number): CourseInput["doses"][number] {
  if (dose.kind !== "pump") return { ...dose, amountMg: dose.amountMg * factor };
  return { ...dose, steps: dose.steps.map(({ atH, rateMgPerH }) => ({ atH, rateMgPerH: rateMgPerH * factor })) };
}

function shiftedDose(dose: CourseInput["doses"][number], laterH: number): CourseInput["doses"][number] {
  if (dose.kind !== "pump") return { ...dose, atH: dose.atH + laterH };
  return { ...dose, steps: dose.steps.map(({ atH, rateMgPerH }) => ({ atH: atH + laterH, rateMgPerH })) };
}

type MadeCourse = ReturnType<typeof courseOf>;

function givenBy(course: MadeCourse, dose: MadeCourse["doses"][number]): number {
  return givenUntil(course, dose, Number.POSITIVE_INFINITY);
}

/** Milligrams that have left the hand by an hour: into the body, or to where they are absorbed from. */
function givenUntil(course: MadeCourse, dose: MadeCourse["doses"][number], atH: number): number {
  if (dose.kind === "infusion")
    return effectiveMg(course, dose) * Math.min(1, Math.max(0, (atH - dose.atH) / dose.durationH));
  if (dose.kind === "absorbed") return dose.atH + dose.lagH <= atH ? effectiveMg(course, dose) : 0;
  if (dose.kind === "bolus") return dose.atH <= atH ? effectiveMg(course, dose) : 0;
  return dose.steps.reduce((sum, step, index) => {
    const next = dose.steps[index + 1];
    if (next === undefined) return sum;
    const hours = Math.max(0, Math.min(next.atH, atH) - step.atH);
    return sum + course.saltFactor * step.rateMgPerH * hours;
  }, 0);
}

function nearEvent(input: CourseInput, timeH: number): boolean {
  return input.doses.some((dose) => dose.kind === "bolus" && Math.abs(dose.atH - timeH) < 1e-6);
}

function isQuarter(timeH: number): boolean {
  return Number.isInteger(4 * timeH);
}

test("randomDose makes doses of every kind", () => {
  const kinds = new Set(fc.sample(randomDose(24), 200).map(({ kind }) => kind));
  expect([...kinds].sort()).toEqual(["absorbed", "bolus", "infusion", "pump"]);
});
