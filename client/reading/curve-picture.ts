import type { RangeMgPerL } from "../../shared/contract/dose.ts";
import type { LevelScale } from "../../shared/figures/bends.ts";
import type { CurvePoint } from "../../shared/figures/curve-points.ts";
import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";

/** One curve. Colours are names of tokens, so that a picture holds in the light and in the dark. */
export interface PictureLine {
  readonly points: readonly CurvePoint[];
  readonly colour: string;
  readonly dash: readonly number[];
  readonly widthPx: number;
  /** Written at the curve's right end; none for a line that only accompanies another. */
  readonly letter?: string;
}

export interface PictureMark {
  readonly kind: "peak" | "trough";
  readonly x: number;
  readonly y: number;
  readonly colour: string;
  /** The level in words, where there is room for it. */
  readonly text?: string;
}

/** Everything on one chart, as plain data. */
export interface CurvePicture {
  readonly window: TimeWindow;
  readonly scale: LevelScale;
  readonly lines: readonly PictureLine[];
  readonly marks: readonly PictureMark[];
  readonly range?: RangeMgPerL;
  /** Hours at which a line crosses the plot from top to bottom. */
  readonly gridH: readonly number[];
}

/** A logarithmic axis shows at most this many powers of ten below the top: a level that decays for ever has no bottom. */
const decadesShown = 4;

/** Lowest and highest level of an axis that holds the lines and the range, in steps, so that it rests while a curve moves a little. */
export function levelBounds({ lines, range, scale }: CurvePicture): { readonly low: number; readonly high: number } {
  let high = range?.high ?? 0;
  let lowestPositive = range !== undefined && range.low > 0 ? range.low : Infinity;
  for (const { points } of lines) {
    for (const { y } of points) {
      if (y > high) high = y;
      if (y > 0 && y < lowestPositive) lowestPositive = y;
    }
  }
  if (!(high > 0)) high = 1;
  if (scale === "linear") return { low: 0, high: inSteps(high * 1.06, Math.ceil) };
  const low = Math.max(Math.min(lowestPositive, high / 10) * 0.9, high / 10 ** decadesShown);
  return { low: inSteps(low, Math.floor), high: inSteps(high * 1.2, Math.ceil) };
}

/** Two digits of a level, rounded away from the curves. */
function inSteps(mgPerL: number, round: (steps: number) => number): number {
  const step = 10 ** (Math.floor(Math.log10(mgPerL)) - 1);
  return round(mgPerL / step) * step;
}
