import type { CurvePoint } from "./curve-points.ts";

/** How a level axis is divided. */
export type LevelScale = "linear" | "logarithmic";

/** A line this far from the curve cannot be told from it. */
const unseenPx = 0.1;

/** At most as high as a plot, and as high as one power of ten can be drawn. */
const plotHeightPx = 400;

/** Levels so far below the highest are below a logarithmic axis. */
const lowestShare = 1e-5;

/** Pixels of a level above the bottom of an axis, or more of them than there will be. */
export function heightOn(scale: LevelScale, highMgPerL: number): (mgPerL: number) => number {
  const high = highMgPerL > 0 ? highMgPerL : 1;
  if (scale === "linear") return (mgPerL) => (mgPerL / high) * plotHeightPx;
  return (mgPerL) => Math.log10(Math.max(mgPerL / high, lowestShare)) * plotHeightPx;
}

/**
 * The points between the first and the last of a smooth run at which a line through them must bend, so that
 * it stays within a tenth of a pixel of all of them. One pass: a sleeve is narrowed until a point lies beside it.
 */
export function bends(
  run: readonly CurvePoint[],
  pixelsPerH: number,
  heightPx: (mgPerL: number) => number,
): CurvePoint[] {
  const kept: CurvePoint[] = [];
  let anchor = run[0]!;
  let anchorPx = heightPx(anchor.y);
  let [lowest, highest] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (let index = 1; index < run.length; index++) {
    const point = run[index]!;
    const rise = (besidePx: number) => (heightPx(point.y) + besidePx - anchorPx) / ((point.x - anchor.x) * pixelsPerH);
    if (index > 1 && !(rise(0) >= lowest && rise(0) <= highest)) {
      anchor = run[index - 1]!;
      anchorPx = heightPx(anchor.y);
      kept.push(anchor);
      [lowest, highest] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
    }
    lowest = Math.max(lowest, rise(-unseenPx));
    highest = Math.min(highest, rise(unseenPx));
  }
  return kept;
}
