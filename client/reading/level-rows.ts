import { levelsAt } from "../../shared/kinetics/levels.ts";
import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import type { Walk } from "../../shared/kinetics/walk.ts";

/** A multiple of the step counts as within the window when only rounding puts it outside. */
const slack = 1e-9;

/** Hours of a table: the multiples of the step after the start of the plan that lie in the window. */
export function tableHours({ fromH, toH }: TimeWindow, stepH: number): number[] {
  // Never -0, which would be printed as it is.
  const first = Math.max(0, Math.ceil(fromH / stepH - slack));
  const last = Math.floor(toH / stepH + slack);
  return Array.from({ length: last - first + 1 }, (_, index) => Math.min((first + index) * stepH, toH));
}

/** Levels of several walks at the same hours, one array a walk. */
export function levelColumns(walks: readonly Walk[], hours: readonly number[]): Float64Array[] {
  return walks.map((made) => levelsAt(made, hours));
}
