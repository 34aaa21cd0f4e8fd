import type { RegimenContent } from "../contract/case.ts";
import { wholeAmount } from "../contract/limits.ts";
import type { StatedKinetics } from "../contract/setting.ts";
import { type Course, type CourseInput, courseOf } from "../kinetics/course.ts";
import { givenDoses } from "./doses-given.ts";
import { elapsedDose } from "./elapsed-dose.ts";
import { elapsedElimination } from "./elapsed-elimination.ts";
import { plannedDoses } from "./expand-orders.ts";
import type { ScheduledDose } from "./scheduled-dose.ts";

export interface DatedCourse {
  readonly course: Course;
  /** One per dose of `course`, at the same index; omitted doses are in neither. */
  readonly doses: readonly ScheduledDose[];
}

/**
 * One alternative as the engine takes it.
 *
 * @param which "given": the past as it was recorded, the rest as planned; "planned": as if nothing had gone otherwise
 * @throws {DomainError} with the path within the content, if kinetics or schedule cannot be computed
 */
export function courseOfContent(content: RegimenContent, which: "planned" | "given"): DatedCourse {
  const { setting } = content;
  const all = which === "planned" ? plannedDoses(content) : givenDoses(content);
  const doses = all.filter(({ status }) => status !== "omitted");
  const lagH = setting.kinetics.lagH?.value ?? 0;
  const course = courseOf({
    parameters: parametersOf(setting.kinetics),
    eliminationChanges: elapsedElimination(content),
    startConcentrationMgPerL: setting.startConcentration?.valueMgPerL ?? 0,
    doses: doses.map(({ give, atH }) => elapsedDose(give, atH, lagH)),
    horizonH: setting.plan.horizonH,
  });
  return { course, doses };
}

/** Whether anything was recorded that is not as planned. */
export function givenDiffers(content: RegimenContent): boolean {
  const { records, extras } = content.schedule;
  return extras.length > 0 || records.some(({ outcome }) => outcome.kind !== "as-planned");
}

/** Stated kinetics without their origins. */
export function parametersOf(kinetics: StatedKinetics): CourseInput["parameters"] {
  const { lagH: _, ...rest } = kinetics;
  const values = Object.fromEntries(Object.entries(rest).map(([name, { value }]) => [name, value]));
  return { bioavailability: wholeAmount, saltFactor: wholeAmount, ...values };
}
