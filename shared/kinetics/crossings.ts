import { DomainError } from "../errors.ts";
import { bracketedRoot } from "./bracketed-root.ts";
import { levelWithin, type MonotonePiece, monotonePieces, type TimeWindow } from "./monotone-pieces.ts";
import type { Walk } from "./walk.ts";

export interface Crossing {
  readonly atH: number;
  readonly direction: "rising" | "falling";
}

/**
 * Every time in the window at which the level passes a value, exactly: by closed form where nothing is
 * being absorbed, by a bracketed root elsewhere. A bolus that jumps over the value is a rising crossing
 * at its hour. Touching the value without passing it is no crossing.
 *
 * @returns in order of time
 * @throws {DomainError} if mgPerL is not a number of 0 or more
 */
export function crossingsOf(made: Walk, mgPerL: number, window: TimeWindow): Crossing[] {
  if (!(mgPerL >= 0)) throw new DomainError("mgPerL", mgPerL, "0 or more");
  const found: Crossing[] = [];
  let side = 0;
  let touchH: number | undefined;
  const visit = (atH: number, difference: number) => {
    const now = Math.sign(difference);
    if (now === 0) touchH ??= atH;
    if (now === 0) return;
    if (side !== 0 && now !== side) found.push({ atH: touchH ?? atH, direction: now > 0 ? "rising" : "falling" });
    side = now;
    touchH = undefined;
  };
  for (const piece of monotonePieces(made, window)) {
    visit(piece.fromH, piece.startMgPerL - mgPerL);
    const hours = crossingHours(made, piece, mgPerL);
    // From here on the level is on the far side, so the visit at the end only keeps the books.
    if (hours !== undefined) visit(piece.fromH + hours, piece.endMgPerL - mgPerL);
    visit(piece.untilH, piece.endMgPerL - mgPerL);
  }
  return found;
}

/**
 * Hours into a monotone piece at which it passes the value; undefined where it does not.
 *
 *     C(u) = Css + (C0 - Css) e^(-k u)   =>   u = ln(1 + (C0 - y) / (y - Css)) / k,   Css = R / (k V)
 */
export function crossingHours(made: Walk, piece: MonotonePiece, mgPerL: number): number | undefined {
  const { startMgPerL, endMgPerL, flow } = piece;
  if (!((startMgPerL > mgPerL && endMgPerL < mgPerL) || (startMgPerL < mgPerL && endMgPerL > mgPerL))) return undefined;
  const length = piece.untilH - piece.fromH;
  if (piece.state.depotMg !== 0) return bracketedRoot((u) => levelWithin(made, piece, u) - mgPerL, 0, length);
  const hours =
    flow.k === 0
      ? ((mgPerL - startMgPerL) * made.volumeL) / flow.rateMgPerH
      : Math.log1p((startMgPerL - mgPerL) / (mgPerL - flow.rateMgPerH / (flow.k * made.volumeL))) / flow.k;
  return Math.min(length, Math.max(0, hours));
}
