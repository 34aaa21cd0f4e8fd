import { describe, expect, test } from "vitest";
import { courseOf } from "../../../shared/kinetics/course.ts";
import { gridTimesH, levelsAt, levelsEvery } from "../../../shared/kinetics/levels.ts";
import { walk } from "../../../shared/kinetics/walk.ts";

const parameters = { volumeL: 31.16221288320161, clearanceLPerH: 7.2, bioavailability: 1, saltFactor: 1 };

describe("levelsAt", () => {
  test("gives the plateau of a constant infusion: R/CL (1 - 1/e) after one mean life", () => {
    const course = courseOf({
      parameters: { volumeL: 10, clearanceLPerH: 1, bioavailability: 1, saltFactor: 1 },
      doses: [{ kind: "infusion", atH: 0, amountMg: 1000, durationH: 100 }],
      horizonH: 100,
    });
    // R/CL (1 - 1/e): 10 x OEIS A068996. exp and expm1: 1 ulp each; products: 1/2.
    const [level] = levelsAt(walk(course), [10]);
    expect(Math.abs(level! - 6.321205588285577)).toBeLessThanOrEqual(4 * Number.EPSILON * 6.4);
  });
});

describe("levelsEvery", () => {
  test("agrees with the closed form at every grid point of a mixed course", () => {
    const course = courseOf({
      parameters: { ...parameters, absorptionRatePerH: 0.9 },
      doses: [
        { kind: "bolus", atH: 8.2, amountMg: 100 },
        { kind: "infusion", atH: 3, amountMg: 300, durationH: 30 },
        { kind: "absorbed", atH: 10, amountMg: 250, lagH: 0.5 },
      ],
      horizonH: 100,
    });
    const made = walk(course);
    const grid = levelsEvery(made, 0.01);
    const exact = levelsAt(made, gridTimesH(100, 0.01));
    const largest = Math.max(...exact);
    // 512 multiply-adds at half an ulp each, relative to the level carried along.
    for (let point = 0; point < exact.length; point++) {
      if (point === 820) continue; // the grid meets the bolus at 8.2 h; 820 x 0.01 does too, or lies an ulp before it
      expect(Math.abs(grid[point]! - exact[point]!)).toBeLessThanOrEqual(1e-12 * largest);
    }
  });
});

describe("the grid and its events", () => {
  test("meet at 0.3 h, which 3 x 0.1 misses upwards, and at 2.3 h, which 23 x 0.1 hits", () => {
    for (const [atH, point] of [
      [0.3, 3],
      [2.3, 23],
      [8.2, 82],
      [1.7, 17],
      [4.35, 261],
    ] as const) {
      const everyH = atH === 4.35 ? 1 / 60 : 0.1;
      const made = walk(courseOf({ parameters, doses: [{ kind: "bolus", atH, amountMg: 100 }], horizonH: 24 }));
      const levels = levelsEvery(made, everyH);
      expect(levels[point - 1], `just before ${atH} h`).toBe(0);
      expect(levels[point], `at ${atH} h`).toBeCloseTo(100 / parameters.volumeL, 12);
    }
  });

  test("has its last point at the end: 24 h by 0.1 h is 241 points, two years by minutes 1,054,081", () => {
    expect(gridTimesH(24, 0.1).length).toBe(241);
    expect(gridTimesH(17_568, 1 / 60).length).toBe(1_054_081);
    expect(gridTimesH(10, 3).length).toBe(4);
  });

  test("refuses times out of order, outside the plan or not a number, and a step that is not above 0", () => {
    const made = walk(courseOf({ parameters, doses: [], horizonH: 24 }));
    expect(() => levelsAt(made, [1, 0.5])).toThrow("timesH/1 must be from 1 to 24, in ascending order, got 0.5");
    expect(() => levelsAt(made, [25])).toThrow("timesH/0");
    expect(() => levelsAt(made, [-1])).toThrow("timesH/0");
    expect(() => levelsAt(made, [Number.NaN])).toThrow("timesH/0");
    for (const everyH of [0, -1, Number.NaN])
      expect(() => levelsEvery(made, everyH)).toThrow("everyH must be greater than 0");
  });
});
