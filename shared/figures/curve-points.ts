import { levelsAt } from "../kinetics/levels.ts";
import type { Walk } from "../kinetics/walk.ts";
import { levelBefore } from "./level-before.ts";

/** A drawn curve: hours and levels, one pair a point; at a bolus two points share their hour. */
export interface CurvePoints {
  readonly timesH: readonly number[];
  readonly mgPerL: readonly number[];
}

/**
 * Points to draw a level with: evenly spread, and exact just before and just after every event, so that
 * no peak is cut off by the spacing.
 *
 * @param points how many evenly spread points, at least 2
 */
export function curvePoints(
  made: Walk,
  window: { readonly fromH: number; readonly toH: number },
  points: number,
): CurvePoints {
  const { fromH, toH } = window;
  const even = Array.from({ length: points }, (_, index) => fromH + ((toH - fromH) * index) / (points - 1));
  const events = new Set(Array.from(made.fromH).filter((atH) => atH > fromH && atH < toH));
  const timesH = [...new Set([...even, ...events])].sort((one, other) => one - other);
  const levels = levelsAt(made, timesH);
  const drawn: { timesH: number[]; mgPerL: number[] } = { timesH: [], mgPerL: [] };
  timesH.forEach((timeH, index) => {
    if (events.has(timeH)) {
      drawn.timesH.push(timeH);
      drawn.mgPerL.push(levelBefore(made, timeH));
    }
    drawn.timesH.push(timeH);
    drawn.mgPerL.push(levels[index]!);
  });
  return drawn;
}
