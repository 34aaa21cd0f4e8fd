import { levelWithin, type MonotonePiece, monotonePieces, type TimeWindow } from "../kinetics/monotone-pieces.ts";
import type { Walk } from "../kinetics/walk.ts";
import { bends, heightOn, type LevelScale } from "./bends.ts";

/** One point of a curve: elapsed hours and mg/L. */
export interface CurvePoint {
  readonly x: number;
  readonly y: number;
}

/** Between two events a level is smooth, so a point every other pixel cannot be told from more. */
const pixelsPerPoint = 2;
const mostPointsPerPixel = 4;

/**
 * A curve as it is drawn: exact at every event (just before and just after a bolus) and at every turn, with
 * points between them as dense as the pixels. Where events are denser than pixels, each pixel column keeps
 * its first, lowest, highest and last point, so that no peak is lost.
 *
 * @param widthPx width of the plot for the whole window
 * @param drawnOn the axis it is drawn on: points that no eye could tell from a straight line are left out
 */
export function curvePoints(made: Walk, window: TimeWindow, widthPx: number, drawnOn?: LevelScale): CurvePoint[] {
  const pieces = monotonePieces(made, window);
  const pixelsPerH = Math.max(1, widthPx) / (window.toH - window.fromH);
  const heightPx = drawnOn && heightOn(drawnOn, highestOf(pieces));
  const points: CurvePoint[] = [];
  pieces.forEach((piece, index) => {
    points.push({ x: piece.fromH, y: piece.startMgPerL });
    const inside = insideOf(made, piece, pixelsPerH);
    if (heightPx === undefined) points.push(...inside);
    else {
      const end = { x: piece.untilH, y: piece.endMgPerL };
      points.push(...bends([points.at(-1)!, ...inside, end], pixelsPerH, heightPx));
    }
    const next = pieces[index + 1];
    if (next === undefined || next.startMgPerL !== piece.endMgPerL)
      points.push({ x: piece.untilH, y: piece.endMgPerL });
  });
  return points.length > mostPointsPerPixel * widthPx ? thinned(points, window, pixelsPerH) : points;
}

function highestOf(pieces: readonly MonotonePiece[]): number {
  return pieces.reduce((high, piece) => Math.max(high, piece.startMgPerL, piece.endMgPerL), 0);
}

function insideOf(made: Walk, piece: MonotonePiece, pixelsPerH: number): CurvePoint[] {
  const points: CurvePoint[] = [];
  const lengthH = piece.untilH - piece.fromH;
  const steps = Math.ceil((lengthH * pixelsPerH) / pixelsPerPoint);
  for (let step = 1; step < steps; step++) {
    const intoH = (lengthH * step) / steps;
    points.push({ x: piece.fromH + intoH, y: levelWithin(made, piece, intoH) });
  }
  return points;
}

function thinned(points: readonly CurvePoint[], window: TimeWindow, pixelsPerH: number): CurvePoint[] {
  const kept: CurvePoint[] = [];
  for (let begin = 0; begin < points.length; ) {
    const column = Math.floor((points[begin]!.x - window.fromH) * pixelsPerH);
    let end = begin + 1;
    let lowest = begin;
    let highest = begin;
    for (; end < points.length && Math.floor((points[end]!.x - window.fromH) * pixelsPerH) === column; end++) {
      if (points[end]!.y < points[lowest]!.y) lowest = end;
      if (points[end]!.y > points[highest]!.y) highest = end;
    }
    const indices = new Set([begin, lowest, highest, end - 1]);
    for (const index of [...indices].sort((one, other) => one - other)) kept.push(points[index]!);
    begin = end;
  }
  return kept;
}
