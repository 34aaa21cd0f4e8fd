import { monotonePieces, type TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import type { Walk } from "../../shared/kinetics/walk.ts";

/** A level at which the curve turns. At a bolus the trough is the value just before it, the peak that just after. */
export interface TurningPoint {
  readonly kind: "peak" | "trough";
  readonly atH: number;
  readonly mgPerL: number;
}

/** Smaller changes are what rounding leaves of a level that stands still. */
const still = 1e-9;

/** Peaks and troughs within a window, in the order of time; the ends of the window are neither. */
export function turningPoints(made: Walk, window: TimeWindow): TurningPoint[] {
  const found: TurningPoint[] = [];
  let direction = 0;
  let before: { atH: number; mgPerL: number } | undefined;
  const visit = (atH: number, mgPerL: number) => {
    if (before !== undefined) {
      const change = mgPerL - before.mgPerL;
      if (Math.abs(change) <= still * Math.max(mgPerL, before.mgPerL)) return;
      const now = Math.sign(change);
      if (direction !== 0 && now !== direction) found.push({ kind: direction > 0 ? "peak" : "trough", ...before });
      direction = now;
    }
    before = { atH, mgPerL };
  };
  for (const piece of monotonePieces(made, window)) {
    visit(piece.fromH, piece.startMgPerL);
    visit(piece.untilH, piece.endMgPerL);
  }
  return found;
}

/** All of them where there is room; otherwise the highest peak and the lowest trough. */
export function pointsToMark(points: readonly TurningPoint[], room: number): readonly TurningPoint[] {
  return points.length <= room ? points : outermost(points);
}

/** The highest peak and the lowest trough, the first of each. */
export function outermost(points: readonly TurningPoint[]): TurningPoint[] {
  const peaks = points.filter(({ kind }) => kind === "peak");
  const troughs = points.filter(({ kind }) => kind === "trough");
  const highest = peaks.reduce<TurningPoint | undefined>(
    (best, each) => (best && best.mgPerL >= each.mgPerL ? best : each),
    undefined,
  );
  const lowest = troughs.reduce<TurningPoint | undefined>(
    (best, each) => (best && best.mgPerL <= each.mgPerL ? best : each),
    undefined,
  );
  return [highest, lowest].filter((point) => point !== undefined);
}
