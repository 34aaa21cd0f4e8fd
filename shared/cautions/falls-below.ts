import { firstEntryH } from "../figures/first-entry.ts";
import { exposureOf } from "../kinetics/exposure.ts";
import { formatLevel, formatPercent } from "../units/format.ts";
import type { CourseSubject, Rule } from "./subject.ts";

/** A level that was in the desired range and falls below it; before its first entry it only rises to it. */
export const fallsBelow: Rule<CourseSubject> = ({ course, made, range }) => {
  const fromH = range && firstEntryH(made, range);
  if (range === undefined || fromH === undefined || !(fromH < made.horizonH)) return [];
  const { trough, hoursBelow } = exposureOf(made, { fromH, toH: made.horizonH }, range);
  const share = (100 * hoursBelow!) / course.horizonH;
  // At the end of the last stretch the level may touch the low end by rounding alone.
  if (!(trough.mgPerL < range.low * (1 - 1e-9)) || !(share > 0)) return [];
  const text = `The predicted level falls below the desired range after it was within: down to ${formatLevel(trough.mgPerL)}, where the range begins at ${formatLevel(range.low)}; then below for ${formatPercent(share)} of the plan.`;
  return [{ code: "below-range", severity: "note", text, about: "levels" }];
};
