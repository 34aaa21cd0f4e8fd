import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type CourseInput, courseOf } from "../../../shared/kinetics/course.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { sensitivitiesAt } from "../../../shared/kinetics/sensitivities.ts";
import { walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { bolus, inputOf } from "./asked.ts";
import { randomCourse, timesWithin } from "./random-courses.ts";

type Name = "eliminationRatePerH" | "volumeL" | "absorptionRatePerH";

/** Central difference of fourth order; its step balances what is cut off against what rounding loses. */
function difference(input: CourseInput, name: Name, timesH: readonly number[]): number[] {
  const value = input.parameters[name]!;
  const step = value * 1e-3;
  const at = (offset: number) =>
    levelsAt(walk(courseOf({ ...input, parameters: { ...input.parameters, [name]: value + offset * step } })), timesH);
  const [farBelow, below, above, farAbove] = [at(-2), at(-1), at(1), at(2)];
  return timesH.map(
    (_, point) => (farBelow[point]! - 8 * below[point]! + 8 * above[point]! - farAbove[point]!) / (12 * step),
  );
}

describe("sensitivitiesAt", () => {
  for (const [name, field] of [
    ["eliminationRatePerH", "perEliminationRate"],
    ["volumeL", "perVolume"],
    ["absorptionRatePerH", "perAbsorptionRate"],
  ] as const)
    test(`${field} is what a small change of ${name} does to the level`, () => {
      checkedBy(
        fc.property(
          randomCourse().chain((input) => fc.tuple(fc.constant(input), timesWithin(input.horizonH, 6))),
          ([input, timesH]) => {
            const course = courseOf(input);
            const derivative = sensitivitiesAt(course, timesH)[field];
            const wanted = difference(input, name, timesH);
            const largest = exposureOf(walk(course), { fromH: 0, toH: input.horizonH }).peak.mgPerL;
            // What the difference cuts off is of fourth order, (1e-3)^4 times a derivative that grows with k t; what it
            // loses to rounding is the level's last digits over 1e-3 of the parameter. Both stay below this.
            const fastest = Math.max(...course.elimination.map(({ ratePerH }) => ratePerH), course.absorptionRatePerH!);
            const lives = Math.min(50, Math.max(1, input.horizonH * fastest));
            const scale = (lives * Math.max(largest, ...levelsAt(walk(course), timesH))) / input.parameters[name]!;
            for (const [point, slope] of wanted.entries())
              expect(Math.abs(derivative[point]! - slope)).toBeLessThanOrEqual(1e-7 * scale);
          },
        ),
        { runs: 100 },
      );
    });

  test("a bolus, by hand: dC/dk = -t C and dC/dV = -C / V", () => {
    const course = courseOf(inputOf({ volumeL: 20, eliminationRatePerH: 0.1 }, [bolus(400)], 24));
    const { perEliminationRate, perVolume, perAbsorptionRate } = sensitivitiesAt(course, [5]);
    const level = 20 * Math.exp(-0.5);
    expect(perEliminationRate[0]).toBeCloseTo(-5 * level, 12);
    expect(perVolume[0]).toBeCloseTo(-level / 20, 12);
    expect(perAbsorptionRate[0]).toBe(0);
  });

  test("k no longer matters where a rate has been set", () => {
    const changes = { eliminationChanges: [{ fromH: 0, eliminationRatePerH: 0.2 }] };
    const course = courseOf(inputOf({ volumeL: 20, eliminationRatePerH: 0.1 }, [bolus(400)], 24, changes));
    expect(Array.from(sensitivitiesAt(course, [0, 5, 24]).perEliminationRate)).toEqual([0, 0, 0]);
  });

  test("refuses times out of order or outside the plan", () => {
    const course = courseOf(inputOf({ volumeL: 20, eliminationRatePerH: 0.1 }, [bolus(400)], 24));
    for (const timesH of [[2, 1], [25], [Number.NaN], [-1]])
      expect(() => sensitivitiesAt(course, timesH)).toThrow(/timesH\/\d must be from/);
  });
});
