import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type CourseInput, courseOf } from "../../../shared/kinetics/course.ts";
import { levelsAt, levelsEvery } from "../../../shared/kinetics/levels.ts";
import { compareWithSecondOpinion } from "../../../shared/kinetics/second-opinion.ts";
import { walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { randomCourse } from "./random-courses.ts";

const parameters = {
  volumeL: 20,
  eliminationRatePerH: 0.1,
  absorptionRatePerH: 0.8,
  bioavailability: 1,
  saltFactor: 1,
};
const course = (doses: CourseInput["doses"], horizonH = 24) => courseOf({ parameters, doses, horizonH });

describe("walk", () => {
  test("tiles a random course from 0 to its end without gap or overlap", () => {
    checkedBy(
      fc.property(randomCourse(), (input) => {
        const made = walk(courseOf(input));
        expect(made.fromH[0]).toBe(0);
        expect(made.untilH[made.count - 1]).toBe(input.horizonH);
        for (let index = 1; index < made.count; index++) expect(made.fromH[index]).toBe(made.untilH[index - 1]);
      }),
    );
  });

  test("runs at exactly 0 mg/h when every infusion and pump has ended, however many overlapped", () => {
    const infusions = Array.from({ length: 999 }, (_, index) => ({
      kind: "infusion" as const,
      atH: index * 0.001,
      amountMg: 0.1 + index / 7,
      durationH: 3 + index / 300,
    }));
    const made = walk(course(infusions));
    expect(made.inputMgPerH[made.count - 1]).toBe(0);
    expect(Math.max(...made.inputMgPerH)).toBeGreaterThan(10_000);
  });

  test("counts a bolus at the very end in the level there, as it does at any other hour", () => {
    // By hand: 100 mg / 20 L just after a bolus into an empty body.
    const ending = course([{ kind: "bolus", atH: 24, amountMg: 100 }]);
    expect(Array.from(levelsAt(walk(ending), [0, 23.999, 24]))).toEqual([0, 0, 5]);
    expect(levelsEvery(walk(ending), 0.5).at(-1)).toBe(5);
    // The two opinions once told the moments before and after it apart, which refused the whole plan.
    expect(compareWithSecondOpinion(ending).relative).toBeLessThanOrEqual(1e-15);
  });

  test("leaves out what begins after the end", () => {
    const made = walk(
      course([
        { kind: "bolus", atH: 24.5, amountMg: 100 },
        { kind: "infusion", atH: 25, amountMg: 100, durationH: 1 },
        { kind: "absorbed", atH: 23.9, amountMg: 100, lagH: 0.2 },
      ]),
    );
    expect(made.count).toBe(1);
    expect(Array.from(levelsAt(made, [24]))).toEqual([0]);
  });

  test("keeps the last rate of a pump to the end of the plan", () => {
    // R/CL at the plateau, by hand: 40 mg/h over 2 L/h; e^-(0.1 x 400) is 4e-18.
    const made = walk(course([{ kind: "pump", steps: [{ atH: 0, rateMgPerH: 40 }] }], 400));
    expect(levelsAt(made, [400])[0]).toBeCloseTo(20, 12);
  });
});
