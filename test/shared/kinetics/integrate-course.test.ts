import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { courseOf } from "../../../shared/kinetics/course.ts";
import { exposureOf } from "../../../shared/kinetics/exposure.ts";
import { levelsAt } from "../../../shared/kinetics/levels.ts";
import { secondOpinionLevels } from "../../../shared/kinetics/second-opinion.ts";
import { walk } from "../../../shared/kinetics/walk.ts";
import { checkedBy } from "../property-run.ts";
import { integrateCourse } from "./integrate-course.ts";
import { randomCourse, timesWithin } from "./random-courses.ts";

describe("on random courses, against a general ODE solver", () => {
  test("the walk and its second opinion both lie within 1e-9 of the largest level", () => {
    let worst = 0;
    checkedBy(
      fc.property(
        randomCourse().chain((input) => fc.tuple(fc.constant(input), timesWithin(input.horizonH))),
        ([input, timesH]) => {
          const course = courseOf(input);
          const made = walk(course);
          const walked = levelsAt(made, timesH);
          const convolved = secondOpinionLevels(course, timesH);
          const integrated = integrateCourse(input, timesH);
          const largest = Math.max(exposureOf(made, { fromH: 0, toH: input.horizonH }).peak.mgPerL, ...integrated);
          integrated.forEach((level, point) => {
            // The solver is asked for 1e-13 a step and takes up to some hundred steps.
            const allowed = 1e-9 * largest;
            if (largest > 0) worst = Math.max(worst, Math.abs(walked[point]! - level) / largest);
            expect(Math.abs(walked[point]! - level)).toBeLessThanOrEqual(allowed);
            expect(Math.abs(convolved[point]! - level)).toBeLessThanOrEqual(allowed);
          });
        },
      ),
      { runs: 300 },
    );
    console.info(
      `largest difference between walk and solver, relative to the largest level: ${worst.toExponential(1)}`,
    );
  });
});
