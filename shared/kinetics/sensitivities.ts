import { DomainError } from "../errors.ts";
import type { Course, EliminationPiece } from "./course.ts";
import { expDifference, expSecondDifference } from "./exp-differences.ts";
import { advance, type BodyState, type Flow, stretchAt, walk } from "./walk.ts";

/** How the level moves with each parameter, one number per time, in mg/L per unit of the parameter. */
export interface Sensitivities {
  /** dC/dk at constant V, in mg/L per 1/h; stretches on which k or CL was set to a value do not move. */
  readonly perEliminationRate: Float64Array;
  /** dC/dV at constant k, in mg/L per L; set and added clearances keep their L/h, so their k moves with V. */
  readonly perVolume: Float64Array;
  /** dC/dka, in mg/L per 1/h; all zero where nothing is absorbed. */
  readonly perAbsorptionRate: Float64Array;
}

/** Derivatives of the amounts with respect to one parameter. */
interface Tangent {
  readonly amount: number;
  readonly depot: number;
}

/**
 * Sensitivities of the level from the same closed forms as the level itself: each derivative of a
 * divided difference is the next divided difference. A concentration present at the start is a fact of
 * measurement and does not move with V.
 *
 * @param timesH ascending elapsed hours within the plan
 * @throws {DomainError} if a time is outside the plan or out of order
 */
export function sensitivitiesAt(course: Course, timesH: ArrayLike<number>): Sensitivities {
  const made = walk(course);
  const answer = {
    perEliminationRate: new Float64Array(timesH.length),
    perVolume: new Float64Array(timesH.length),
    perAbsorptionRate: new Float64Array(timesH.length),
  };
  const { volumeL } = made;
  let byRate: Tangent = { amount: 0, depot: 0 };
  let byVolume: Tangent = { amount: course.startConcentrationMgPerL, depot: 0 };
  let byAbsorption: Tangent = { amount: 0, depot: 0 };
  let index = 0;
  let piece = 0;
  let point = 0;
  for (let beforeH = 0; index < made.count; index++) {
    const { state, flow } = stretchAt(made, index);
    const fromH = made.fromH[index]!;
    while (course.elimination[piece + 1] !== undefined && course.elimination[piece + 1]!.fromH <= fromH) piece++;
    const moves = rateMoves(course.elimination[piece]!, volumeL);
    const at = (u: number) => ({
      byRate: carry(byRate, state, flow, u, { rate: moves.perRate, absorption: 0 }),
      byVolume: carry(byVolume, state, flow, u, { rate: moves.perVolume, absorption: 0 }),
      byAbsorption: carry(byAbsorption, state, flow, u, { rate: 0, absorption: made.absorptionRatePerH > 0 ? 1 : 0 }),
    });
    for (; point < timesH.length && (timesH[point]! < made.untilH[index]! || index === made.count - 1); point++) {
      const timeH = timesH[point]!;
      if (!(timeH >= beforeH && timeH <= made.horizonH))
        throw new DomainError(`timesH/${point}`, timeH, `from ${beforeH} to ${made.horizonH}, in ascending order`);
      const u = timeH - fromH;
      const tangents = at(u);
      answer.perEliminationRate[point] = tangents.byRate.amount / volumeL;
      answer.perVolume[point] = (tangents.byVolume.amount - advance(state, flow, u).amountMg / volumeL) / volumeL;
      answer.perAbsorptionRate[point] = tangents.byAbsorption.amount / volumeL;
      beforeH = timeH;
    }
    ({ byRate, byVolume, byAbsorption } = at(made.untilH[index]! - fromH));
  }
  return answer;
}

/** dk/d(base k) and dk/dV on one piece of elimination; k = base or set, plus clearance / V. */
function rateMoves(piece: EliminationPiece, volumeL: number): { perRate: number; perVolume: number } {
  return { perRate: piece.base === "base" ? 1 : 0, perVolume: -piece.clearanceLPerH / (volumeL * volumeL) };
}

/**
 * A tangent `u` hours on, where the parameter moves k by `rate` and ka by `absorption`.
 *
 *     dA/dk  = -[A u e^(-k u) + R u^2 exp[0, -k u, -k u] + ka D u^2 exp[-k u, -k u, -ka u]]
 *     dA/dka = D [u exp[-k u, -ka u] - ka u^2 exp[-k u, -ka u, -ka u]],   dD/dka = -D u e^(-ka u)
 */
function carry(
  tangent: Tangent,
  state: BodyState,
  flow: Flow,
  u: number,
  moves: { rate: number; absorption: number },
): Tangent {
  const { k, ka, rateMgPerH } = flow;
  const { amountMg, depotMg } = state;
  const x = k * u;
  const y = ka * u;
  const carried = advance({ amountMg: tangent.amount, depotMg: tangent.depot }, { k, ka, rateMgPerH: 0 }, u);
  const absorbing = depotMg !== 0;
  const byRate =
    moves.rate === 0
      ? 0
      : -moves.rate *
        u *
        (amountMg * Math.exp(-x) +
          rateMgPerH * u * expSecondDifference(0, x, x) +
          (absorbing ? ka * depotMg * u * expSecondDifference(x, x, y) : 0));
  const byAbsorption =
    moves.absorption === 0 || !absorbing ? 0 : depotMg * u * (expDifference(x, y) - y * expSecondDifference(x, y, y));
  return {
    amount: carried.amountMg + byRate + byAbsorption,
    depot: carried.depotMg - (moves.absorption === 0 || !absorbing ? 0 : depotMg * u * Math.exp(-y)),
  };
}
