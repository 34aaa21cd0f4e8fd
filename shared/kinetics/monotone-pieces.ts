import { DomainError } from "../errors.ts";
import { bracketedRoot } from "./bracketed-root.ts";
import { advance, type BodyState, type Flow, stretchAt, type Walk } from "./walk.ts";

/** A part of one stretch on which the level only rises or only falls. */
export interface MonotonePiece {
  readonly fromH: number;
  readonly untilH: number;
  /** State at fromH, after anything given then. */
  readonly state: BodyState;
  readonly flow: Flow;
  readonly startMgPerL: number;
  /** Level at untilH, before anything given then. */
  readonly endMgPerL: number;
}

export interface TimeWindow {
  readonly fromH: number;
  readonly toH: number;
}

/**
 * The window cut where a stretch begins and where the level turns. On one stretch the slope is a sum of
 * two exponentials, so it changes sign at most once: a piece has its extremes and crossings at its ends.
 *
 * @throws {DomainError} if the window is empty or outside the walk
 */
export function monotonePieces(made: Walk, window: TimeWindow): readonly MonotonePiece[] {
  const { fromH, toH } = window;
  if (!(fromH === 0 && toH === made.horizonH)) return cut(made, window);
  const known = wholeWalks.get(made) ?? cut(made, window);
  wholeWalks.set(made, known);
  return known;
}

/** Exposure, first entry and cautions all ask for the whole of one walk, and a walk never changes. */
const wholeWalks = new WeakMap<Walk, readonly MonotonePiece[]>();

function cut(made: Walk, { fromH, toH }: TimeWindow): MonotonePiece[] {
  if (!(fromH >= 0 && fromH < made.horizonH))
    throw new DomainError("window/fromH", fromH, `from 0 to below ${made.horizonH}`);
  if (!(toH > fromH && toH <= made.horizonH))
    throw new DomainError("window/toH", toH, `above ${fromH} and at most ${made.horizonH}`);
  const pieces: MonotonePiece[] = [];
  for (let index = stretchHolding(made, fromH); index < made.count && made.fromH[index]! < toH; index++) {
    const beginH = Math.max(fromH, made.fromH[index]!);
    const untilH = Math.min(toH, made.untilH[index]!);
    const { state, flow } = stretchAt(made, index);
    const begin = beginH === made.fromH[index]! ? state : advance(state, flow, beginH - made.fromH[index]!);
    const turn = turningHours(begin, flow, untilH - beginH);
    if (turn === undefined) pieces.push(pieceOf(made, beginH, untilH, begin, flow));
    else {
      pieces.push(pieceOf(made, beginH, beginH + turn, begin, flow));
      pieces.push(pieceOf(made, beginH + turn, untilH, advance(begin, flow, turn), flow));
    }
  }
  return pieces;
}

/** Level `hours` into a piece. */
export function levelWithin(made: Walk, piece: MonotonePiece, hours: number): number {
  return advance(piece.state, piece.flow, hours).amountMg / made.volumeL;
}

/** Index of the stretch that holds an hour, found by halving: windows are often asked of long walks. */
function stretchHolding(made: Walk, atH: number): number {
  let low = 0;
  let high = made.count - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (made.untilH[middle]! <= atH) low = middle + 1;
    else high = middle;
  }
  return low;
}

function pieceOf(made: Walk, fromH: number, untilH: number, state: BodyState, flow: Flow): MonotonePiece {
  return {
    fromH,
    untilH,
    state,
    flow,
    startMgPerL: state.amountMg / made.volumeL,
    endMgPerL: advance(state, flow, untilH - fromH).amountMg / made.volumeL,
  };
}

/** Hours to the interior maximum or minimum, if there is one. Without absorption there is none. */
function turningHours(state: BodyState, flow: Flow, hours: number): number | undefined {
  if (state.depotMg === 0) return undefined;
  const slope = (u: number) => {
    const { amountMg, depotMg } = advance(state, flow, u);
    return flow.rateMgPerH + flow.ka * depotMg - flow.k * amountMg;
  };
  const first = slope(0);
  const last = slope(hours);
  if (!(first * last < 0)) return undefined;
  const turn = bracketedRoot(slope, 0, hours);
  return turn > 0 && turn < hours ? turn : undefined;
}
