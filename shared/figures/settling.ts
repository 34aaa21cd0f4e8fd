import { levelBefore } from "./level-before.ts";
import type { Prepared } from "./prepared.ts";
import { cycleStartH } from "./settled-clock.ts";

/** Within this part of the steady-state level a cycle counts as settled. */
export const settledWithin = 0.1;

/**
 * The first cycle from which the level at every cycle start, just before anything given then, stays
 * within 10 percent of the level it will have at steady state.
 *
 * @returns its number (1 is the first cycle) and start in hours; undefined where the plan ends first
 */
export function settledFrom(prepared: Prepared): { cycle: number; atH: number } | undefined {
  const { made, doses, settled } = prepared;
  if (settled.kind === "none") return undefined;
  const { steady } = settled;
  const lastDoseH = doses.reduce((latest, { atH }) => Math.max(latest, atH), 0);
  let found: { cycle: number; atH: number } | undefined;
  for (let cycle = 1; ; cycle++) {
    const atH = cycleStartH(prepared, settled, cycle - 1);
    if (atH > Math.min(lastDoseH, made.horizonH)) return found;
    const apart = Math.abs(levelBefore(made, atH) - steady.startMgPerL);
    if (apart > settledWithin * steady.startMgPerL) found = undefined;
    else found ??= { cycle, atH };
  }
}
