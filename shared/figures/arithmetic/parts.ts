import type { Dose } from "../../contract/dose.ts";
import type { Course } from "../../kinetics/course.ts";

/**
 * Everything given, cut into the pieces for which a textbook formula holds: an amount at once, a constant
 * rate for some hours, an amount absorbed from a time on.
 */
export type Part =
  | { readonly kind: "bolus"; readonly dose: number; readonly atH: number; readonly amountMg: number }
  | {
      readonly kind: "rate";
      readonly dose: number;
      readonly atH: number;
      readonly hours: number;
      readonly rateMgPerH: number;
    }
  | { readonly kind: "absorbed"; readonly dose: number; readonly atH: number; readonly amountMg: number };

/** Parts of a course in the order of its doses; `dose` is the index in it. Amounts are as ordered. */
export function partsOf(course: Course): Part[] {
  return course.doses.flatMap((dose, index) => partsOfDose(dose, index, course.horizonH));
}

function partsOfDose(given: Dose, dose: number, horizonH: number): Part[] {
  if (given.kind === "bolus") return [{ kind: "bolus", dose, atH: given.atH, amountMg: given.amountMg }];
  if (given.kind === "absorbed")
    return [{ kind: "absorbed", dose, atH: given.atH + given.lagH, amountMg: given.amountMg }];
  if (given.kind === "infusion")
    return [
      { kind: "rate", dose, atH: given.atH, hours: given.durationH, rateMgPerH: given.amountMg / given.durationH },
    ];
  return given.steps.flatMap((step, index): Part[] => {
    const untilH = given.steps[index + 1]?.atH ?? horizonH;
    if (step.rateMgPerH === 0 || !(untilH > step.atH)) return [];
    return [{ kind: "rate", dose, atH: step.atH, hours: untilH - step.atH, rateMgPerH: step.rateMgPerH }];
  });
}
