import type { CourseSubject, Rule } from "./subject.ts";

/** A change of elimination that is put in by hand is an assumption about the future. */
export const assumedElimination: Rule<CourseSubject> = ({ course }) => {
  if (course.elimination.length < 2) return [];
  const text =
    "Elimination changes within the plan as entered. That is an assumption: measure levels when it matters, and plan anew.";
  return [{ code: "assumed-elimination", severity: "note", text, about: "/setting/eliminationChanges" }];
};
