import { formatHours } from "../units/format.ts";
import type { CourseSubject, Rule } from "./subject.ts";

/** With k = 0 the level stays as it is for ever: seldom meant. */
export const eliminationStops: Rule<CourseSubject> = ({ course }) => {
  const piece = course.elimination.find(({ fromH, ratePerH }) => ratePerH === 0 && fromH < course.horizonH);
  if (piece === undefined) return [];
  const text = `Elimination is set to nothing from ${formatHours(piece.fromH)} into the plan: the level does not fall while that holds.`;
  return [{ code: "elimination-stops", severity: "warn", text, about: "/setting/eliminationChanges" }];
};
