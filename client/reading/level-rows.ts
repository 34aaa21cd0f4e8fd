import { levelsAt } from "../../shared/kinetics/levels.ts";
import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import type { Walk } from "../../shared/kinetics/walk.ts";

/** Hours of a table: multiples of the step after the start of the plan, and both ends of the window. */
export function tableHours(window: TimeWindow, stepH: number): number[] {
  const hours: number[] = [];
  for (let index = Math.ceil(window.fromH / stepH - 1e-9); index * stepH <= window.toH + 1e-9; index++)
    hours.push(Math.min(index * stepH, window.toH));
  return hours;
}

/** Levels of several walks at the same hours, one array a walk. */
export function levelColumns(walks: readonly Walk[], hours: readonly number[]): Float64Array[] {
  return walks.map((made) => levelsAt(made, hours));
}
