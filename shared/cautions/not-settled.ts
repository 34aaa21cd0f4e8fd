import { formatHours } from "../units/format.ts";
import type { ContentSubject, Rule } from "./subject.ts";

/** Steady-state figures of a plan that ends before nine tenths of steady state are reached describe later days. */
export const notSettled: Rule<ContentSubject> = ({ content, course }) => {
  const slowest = Math.min(...course.elimination.map(({ ratePerH }) => ratePerH));
  const repeats = content.schedule.orders.some(({ when }) => when.kind !== "once");
  if (!repeats || !(slowest > 0)) return [];
  const neededH = Math.LN10 / slowest;
  if (neededH <= course.horizonH) return [];
  const text = `90 percent of steady state takes ${formatHours(neededH)}, longer than the plan of ${formatHours(course.horizonH)}: figures at steady state describe a time after it.`;
  return [{ code: "not-settled", severity: "note", text, about: "/setting/plan/horizonH" }];
};
