import type { Prepared } from "../../shared/figures/prepared.ts";
import { remainsAt } from "../../shared/kinetics/remains.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";

/** What one dose, or the concentration present at the start, still contributes. */
export interface Part {
  readonly source: ScheduledDose | "start";
  readonly mgPerL: number;
  readonly percent: number;
}

export interface GatheredParts {
  /** In the order of time. */
  readonly shown: readonly Part[];
  /** The smallest ones, in the order of time; empty where all are shown. */
  readonly gathered: readonly Part[];
  readonly sumMgPerL: number;
}

/** More rows than this are read by nobody at once. */
const mostShown = 10;

/** The level at one hour split into its parts, the smallest of many gathered. */
export function partsAt(prepared: Prepared, atH: number): GatheredParts {
  const parts = remainsAt(prepared.course, atH).map(
    ({ dose, mgPerL, percent }): Part => ({
      source: dose === "start" ? "start" : prepared.doses[dose]!,
      mgPerL,
      percent,
    }),
  );
  return { ...gather(parts), sumMgPerL: parts.reduce((sum, { mgPerL }) => sum + mgPerL, 0) };
}

/** Splits off the smallest parts where there are more than a table should show; one alone is never split off. */
export function gather(parts: readonly Part[]): Pick<GatheredParts, "shown" | "gathered"> {
  if (parts.length <= mostShown + 1) return { shown: parts, gathered: [] };
  const largest = new Set([...parts].sort((one, other) => other.mgPerL - one.mgPerL).slice(0, mostShown));
  return { shown: parts.filter((part) => largest.has(part)), gathered: parts.filter((part) => !largest.has(part)) };
}

/** What gathered parts are called: "24 older doses", or smaller ones where some are not older. */
export function sayGathered(gathered: readonly Part[], shown: readonly Part[]): string {
  const hourOf = ({ source }: Part) => (source === "start" ? 0 : source.atH);
  const older = Math.max(...gathered.map(hourOf)) <= Math.min(...shown.map(hourOf));
  const start = gathered.some(({ source }) => source === "start");
  const doses = gathered.length - (start ? 1 : 0);
  return `${doses} ${older ? "older" : "smaller"} ${doses === 1 ? "dose" : "doses"}${start ? " and the start" : ""}`;
}
