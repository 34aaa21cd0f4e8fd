import type { RangeMgPerL } from "../contract/dose.ts";
import type { Exposure } from "../contract/prediction.ts";
import { crossingHours } from "./crossings.ts";
import { expSecondDifference, phi } from "./exp-differences.ts";
import { type MonotonePiece, monotonePieces, type TimeWindow } from "./monotone-pieces.ts";
import type { BodyState, Flow, Walk } from "./walk.ts";

/** A later extreme must be this much further out to count, so that equal peaks name the first one. */
const tie = 1e-12;

/**
 * Area, average, extremes and hours against a range over one window, all exact.
 *
 * A peak or trough at a bolus names the hour of the bolus: the peak is the value just after it, the
 * trough the value just before it. A bolus at the window's end is outside the window.
 *
 * @param range hours are counted above high, below low, and within both bounds, bounds included
 * @throws {DomainError} if the window is empty or outside the walk
 */
export function exposureOf(made: Walk, window: TimeWindow, range?: RangeMgPerL): Exposure {
  const pieces = monotonePieces(made, window);
  const aucMgHPerL =
    sum(pieces.map((piece) => areaMgH(piece.state, piece.flow, piece.untilH - piece.fromH))) / made.volumeL;
  return {
    aucMgHPerL,
    averageMgPerL: aucMgHPerL / (window.toH - window.fromH),
    ...extremesOf(pieces),
    ...(range !== undefined && hoursAgainst(made, pieces, range)),
  };
}

/** Highest and lowest level of some pieces, with their hours. */
export function extremesOf(pieces: readonly MonotonePiece[]): Pick<Exposure, "peak" | "trough"> {
  const first = { atH: pieces[0]!.fromH, mgPerL: pieces[0]!.startMgPerL };
  let peak = first;
  let trough = first;
  for (const piece of pieces) {
    for (const point of [
      { atH: piece.fromH, mgPerL: piece.startMgPerL },
      { atH: piece.untilH, mgPerL: piece.endMgPerL },
    ]) {
      if (point.mgPerL > peak.mgPerL * (1 + tie)) peak = point;
      if (point.mgPerL < trough.mgPerL * (1 - tie)) trough = point;
    }
  }
  return { peak, trough };
}

/**
 * Integral of the amount in the body over `hours` of one flow, in mg h.
 *
 *     A u phi(k u) + R u^2 exp[0, 0, -k u] + ka D u^2 exp[0, -k u, -ka u]
 */
export function areaMgH(state: BodyState, flow: Flow, hours: number): number {
  const { k, ka, rateMgPerH } = flow;
  const x = k * hours;
  const decaying = state.amountMg * hours * phi(x);
  const given = rateMgPerH === 0 ? 0 : rateMgPerH * hours * hours * expSecondDifference(0, 0, x);
  const absorbed = state.depotMg === 0 ? 0 : ka * state.depotMg * hours * hours * expSecondDifference(0, x, ka * hours);
  return decaying + given + absorbed;
}

function hoursAgainst(made: Walk, pieces: readonly MonotonePiece[], range: RangeMgPerL) {
  const hoursAbove = sum(pieces.map((piece) => hoursOver(made, piece, range.high)));
  const hoursBelow = sum(pieces.map((piece) => hoursUnder(made, piece, range.low)));
  const total = sum(pieces.map((piece) => piece.untilH - piece.fromH));
  return { hoursAbove, hoursWithin: Math.max(0, total - hoursAbove - hoursBelow), hoursBelow };
}

function hoursOver(made: Walk, piece: MonotonePiece, mgPerL: number): number {
  const length = piece.untilH - piece.fromH;
  const { startMgPerL, endMgPerL } = piece;
  const crossing = crossingHours(made, piece, mgPerL);
  if (crossing !== undefined) return endMgPerL > startMgPerL ? length - crossing : crossing;
  return Math.max(startMgPerL, endMgPerL) > mgPerL && Math.min(startMgPerL, endMgPerL) >= mgPerL ? length : 0;
}

function hoursUnder(made: Walk, piece: MonotonePiece, mgPerL: number): number {
  const length = piece.untilH - piece.fromH;
  const { startMgPerL, endMgPerL } = piece;
  const crossing = crossingHours(made, piece, mgPerL);
  if (crossing !== undefined) return endMgPerL > startMgPerL ? crossing : length - crossing;
  return Math.min(startMgPerL, endMgPerL) < mgPerL && Math.max(startMgPerL, endMgPerL) <= mgPerL ? length : 0;
}

/** Compensated sum (Neumaier), so that ten thousand stretches add up to the digits of one. */
function sum(values: readonly number[]): number {
  let total = 0;
  let lost = 0;
  for (const value of values) {
    const next = total + value;
    lost += Math.abs(total) >= Math.abs(value) ? total - next + value : value - next + total;
    total = next;
  }
  return total + lost;
}
