import type { Give } from "../contract/schedule.ts";
import { formatDose } from "../units/format.ts";
import type { ContentSubject, Rule } from "./subject.ts";

const slip = 10;

/** One dose ten times another of the same schedule is what a misplaced decimal point looks like. */
export const tenfoldDoses: Rule<ContentSubject> = ({ doses }) => {
  const amounts = doses.flatMap(({ give }) => amountOf(give));
  if (amounts.length < 2) return [];
  const lowest = amounts.reduce((low, amountMg) => Math.min(low, amountMg));
  const highest = amounts.reduce((high, amountMg) => Math.max(high, amountMg));
  if (!(highest >= slip * lowest)) return [];
  const text = `The largest dose (${formatDose(highest)}) is ${slip} or more times the smallest (${formatDose(lowest)}). Check the decimal points.`;
  return [{ code: "tenfold-doses", severity: "warn", text, about: "/schedule" }];
};

function amountOf(give: Give): number[] {
  return give.kind === "pump" ? [] : [give.amountMg];
}
