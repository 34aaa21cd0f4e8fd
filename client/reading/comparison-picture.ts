import type { RegimenContent } from "../../shared/contract/case.ts";
import { curvePoints } from "../../shared/figures/curve-points.ts";
import { hoursBetween } from "../../shared/schedule/clock.ts";
import type { AlternativeLook } from "./alternative-look.ts";
import { type ClockTicks, clockTicks } from "./clock-ticks.ts";
import type { CurvePicture, PictureLine } from "./curve-picture.ts";
import { predictionOf } from "./predictions.ts";

export interface ComparisonInput {
  readonly before: RegimenContent;
  readonly after: RegimenContent;
  /** One for each of the two. */
  readonly looks: readonly AlternativeLook[];
  readonly plotPx: number;
}

export interface ComparisonPicture {
  readonly picture: CurvePicture;
  readonly ticks: ClockTicks;
}

/**
 * Two contents on one clock: hours count from the earlier of their starts, and each curve stands where its
 * own plan does. The range and the zone are those of the later content.
 */
export function comparisonPicture({ before, after, looks, plotPx }: ComparisonInput): ComparisonPicture {
  const plans = [before, after].map(({ setting }) => setting.plan);
  const start = hoursBetween(plans[0]!.start, plans[1]!.start) < 0 ? plans[1]!.start : plans[0]!.start;
  const toH = Math.max(...plans.map((plan) => hoursBetween(start, plan.start) + plan.horizonH));
  const window = { fromH: 0, toH };
  const ticks = clockTicks({ start, horizonH: toH, timeZone: after.timeZone }, window, plotPx);
  const { rangeMgPerL } = after.setting;
  const picture: CurvePicture = {
    window,
    scale: "linear",
    lines: [before, after].flatMap((content, place) =>
      lineOf(content, looks[place]!, hoursBetween(start, content.setting.plan.start), plotPx),
    ),
    marks: [],
    gridH: ticks.ticks.map(({ atH }) => atH),
    ...(rangeMgPerL !== undefined && { range: rangeMgPerL }),
  };
  return { picture, ticks };
}

function lineOf(content: RegimenContent, look: AlternativeLook, shiftH: number, plotPx: number): PictureLine[] {
  const prediction = predictionOf(content);
  if (!prediction.ok) return [];
  const { made } = prediction.given;
  const points = curvePoints(made, { fromH: 0, toH: made.horizonH }, plotPx).map(({ x, y }) => ({ x: x + shiftH, y }));
  return [{ ...look, points, widthPx: 2 }];
}
