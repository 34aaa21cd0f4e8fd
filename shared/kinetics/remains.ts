import type { Contribution } from "../contract/prediction.ts";
import { DomainError } from "../errors.ts";
import type { Course } from "./course.ts";
import { levelsAt } from "./levels.ts";
import { walk } from "./walk.ts";

/**
 * What is left at one hour of each dose given until then, and of the concentration present at the start.
 * The body is linear, so each part is the level its dose would leave alone, and the parts add up.
 *
 * @returns "start" first (where there was any), then one per dose that has begun, in the order of the course
 * @throws {DomainError} if atH is outside the course
 */
export function remainsAt(course: Course, atH: number): Contribution[] {
  if (!(atH >= 0 && atH <= course.horizonH)) throw new DomainError("remainsAtH", atH, `from 0 to ${course.horizonH}`);
  // The walk must go past atH for a bolus at atH to count, and no further for the rest of the plan.
  const horizonH = Math.max(atH * (1 + Number.EPSILON), Number.MIN_VALUE);
  const partOf = (part: Partial<Course>) =>
    levelsAt(walk({ ...course, doses: [], startConcentrationMgPerL: 0, ...part, horizonH }), [atH])[0]!;
  const parts: { dose: number | "start"; mgPerL: number }[] = [];
  if (course.startConcentrationMgPerL > 0)
    parts.push({ dose: "start", mgPerL: partOf({ startConcentrationMgPerL: course.startConcentrationMgPerL }) });
  course.doses.forEach((dose, index) => {
    const beginsH = dose.kind === "pump" ? dose.steps[0]!.atH : dose.atH;
    if (beginsH <= atH) parts.push({ dose: index, mgPerL: partOf({ doses: [dose] }) });
  });
  const total = parts.reduce((level, part) => level + part.mgPerL, 0);
  return parts.map((part) => ({ ...part, percent: total > 0 ? (100 * part.mgPerL) / total : 0 }));
}
