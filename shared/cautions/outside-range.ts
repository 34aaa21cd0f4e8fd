import { exposureOf } from "../kinetics/exposure.ts";
import { formatLevel, formatPercent } from "../units/format.ts";
import type { CourseSubject, Rule } from "./subject.ts";

/** Predicted levels outside the desired range, anywhere in the plan. */
export const outsideRange: Rule<CourseSubject> = ({ course, made, range, exposure }) => {
  if (range === undefined) return [];
  const { peak, hoursAbove, hoursWithin } = exposure ?? exposureOf(made, { fromH: 0, toH: made.horizonH }, range);
  const share = (hours: number) => formatPercent((100 * hours) / course.horizonH);
  const above = `The predicted level goes above the desired range: up to ${formatLevel(peak.mgPerL)}, where the range ends at ${formatLevel(range.high)}; above for ${share(hoursAbove!)} of the plan.`;
  const never = `The predicted level is never within the desired range of ${formatLevel(range.low)} to ${formatLevel(range.high)}.`;
  return [
    ...(hoursAbove! > 0 ? [{ code: "above-range", severity: "warn" as const, text: above, about: "levels" }] : []),
    ...(hoursWithin! > 0 ? [] : [{ code: "never-in-range", severity: "warn" as const, text: never, about: "levels" }]),
  ];
};
