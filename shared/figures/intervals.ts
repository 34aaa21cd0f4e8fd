import type { ScheduledDose } from "../schedule/scheduled-dose.ts";
import type { Prepared } from "./prepared.ts";

/** From one dose to the next, in elapsed hours. */
export interface Interval {
  readonly fromH: number;
  readonly toH: number;
  /** Set where no dose closes the interval. */
  readonly note?: string;
}

/** Doses closer than this count as given together. */
const togetherH = 1 / 3_600;

/** From the first dose to the next one; to the end of the plan where nothing follows it. */
export function firstInterval({ doses, course }: Prepared): Interval | undefined {
  const starts = startsOf(doses);
  const [fromH, toH] = starts;
  if (fromH === undefined) return undefined;
  if (toH !== undefined) return { fromH, toH };
  return { fromH, toH: course.horizonH, note: "to the end of the plan, as only one dose is given" };
}

/**
 * The last complete interval. In a cycle the last dose opens one where the plan goes on long enough after
 * it: as long as the gap one cycle earlier. Without a cycle nothing follows the last dose, so its interval
 * is the rest of the plan.
 */
export function lastInterval({ doses, course, settled }: Prepared): Interval | undefined {
  const starts = startsOf(doses);
  if (starts.length < 2) return undefined;
  const lastH = starts.at(-1)!;
  const beforeH = starts.at(-2)!;
  if (settled.kind === "none")
    return { fromH: lastH, toH: course.horizonH, note: "to the end of the plan, as no dose follows" };
  const gapH = gapAt(starts, lastH - settled.steady.cycleH) ?? lastH - beforeH;
  const closesAtH = lastH + gapH;
  // Rounding of clock times to hours must not lose the interval that ends with the plan.
  if (closesAtH <= course.horizonH + togetherH) return { fromH: lastH, toH: Math.min(closesAtH, course.horizonH) };
  return { fromH: beforeH, toH: lastH };
}

function startsOf(doses: Prepared["doses"]): number[] {
  const sorted = doses.map(beginsAtH).sort((one, other) => one - other);
  return sorted.filter((atH, index) => index === 0 || atH - sorted[index - 1]! > togetherH);
}

/** A pump log may wait before it gives anything. */
function beginsAtH({ atH, give }: ScheduledDose): number {
  if (give.kind !== "pump") return atH;
  return atH + (give.steps.find(({ rateMgPerH }) => rateMgPerH > 0)?.afterH ?? 0);
}

function gapAt(starts: readonly number[], atH: number): number | undefined {
  const index = starts.findIndex((start) => Math.abs(start - atH) <= togetherH);
  const next = starts[index + 1];
  return index < 0 || next === undefined ? undefined : next - starts[index]!;
}
