import type { RegimenContent } from "../../shared/contract/case.ts";
import type { RangeMgPerL } from "../../shared/contract/dose.ts";
import type { LevelScale } from "../../shared/figures/bends.ts";
import { type CurvePoint, curvePoints } from "../../shared/figures/curve-points.ts";
import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import type { Walk } from "../../shared/kinetics/walk.ts";
import { formatLevel } from "../../shared/units/format.ts";
import { lookAt } from "./alternative-look.ts";
import type { CurvePicture, PictureLine, PictureMark } from "./curve-picture.ts";
import { predictionOf } from "./predictions.ts";
import { outermost, pointsToMark, type TurningPoint, turningPoints } from "./turning-points.ts";

export interface CasePictureInput {
  /** In the order of the case: its place gives each alternative its look. */
  readonly contents: ReadonlyMap<string, RegimenContent>;
  readonly selectedKey: string | undefined;
  readonly window: TimeWindow;
  readonly plotPx: number;
  readonly scale: LevelScale;
  readonly gridH: readonly number[];
  readonly range: RangeMgPerL | undefined;
  /** While a dose is in the hand the other alternatives step back: thick or dashed lines cost a frame where doses are dense. */
  readonly motion: "at-rest" | "in-hand";
}

const pixelsPerMark = 40;

/** The curves of all alternatives; the selected one is thicker and lies on top, a plan that was not followed is thin. */
export function pictureOf(input: CasePictureInput): CurvePicture {
  const { contents, selectedKey, window, plotPx, scale, gridH, range, motion } = input;
  const lines: PictureLine[] = [];
  const marks: PictureMark[] = [];
  const inOrder = [...contents].map(([key, content], place) => ({
    content,
    selected: key === selectedKey,
    look: lookAt(place),
  }));
  for (const { content, selected, look } of [
    ...inOrder.filter((each) => !each.selected),
    ...inOrder.filter((each) => each.selected),
  ]) {
    const prediction = predictionOf(content);
    if (!prediction.ok) continue;
    const { colour, letter } = look;
    const stepsBack = motion === "in-hand" && !selected;
    const dash = stepsBack ? [] : look.dash;
    if (prediction.planned)
      lines.push({ points: drawn(prediction.planned.made, window, plotPx, scale).points, colour, dash, widthPx: 1 });
    const { points, turns } = drawn(prediction.given.made, window, plotPx, scale);
    lines.push({ points, colour, dash, widthPx: selected ? 2.75 : stepsBack ? 1 : 1.75, letter });
    const named = outermost(turns);
    for (const turn of selected ? pointsToMark(turns, plotPx / pixelsPerMark) : named) {
      const text = selected && named.includes(turn) && { text: `${turn.kind} ${formatLevel(turn.mgPerL)}` };
      marks.push({ kind: turn.kind, x: turn.atH, y: turn.mgPerL, colour, ...text });
    }
  }
  return { window, scale, lines, marks, gridH, ...(range !== undefined && { range }) };
}

interface Drawn {
  readonly window: TimeWindow;
  readonly plotPx: number;
  readonly scale: LevelScale;
  readonly points: readonly CurvePoint[];
  readonly turns: readonly TurningPoint[];
}

const known = new WeakMap<Walk, Drawn>();

/** Remembered by walk, so that moving a dose of one alternative draws the others from what is there. */
function drawn(made: Walk, window: TimeWindow, plotPx: number, scale: LevelScale): Drawn {
  const found = known.get(made);
  if (found?.window === window && found.plotPx === plotPx && found.scale === scale) return found;
  const points = curvePoints(made, window, plotPx, scale);
  const fresh = { window, plotPx, scale, points, turns: turningPoints(made, window) };
  known.set(made, fresh);
  return fresh;
}
