import type { Course } from "./course.ts";
import { advance, type BodyState } from "./walk.ts";

/** Milligrams in the body at a fixed hour of what came earlier; 0 for what comes later. */
export interface Survival {
  ofBodyMg(amountMg: number, atH: number): number;
  ofDepotMg(amountMg: number, atH: number): number;
  ofRate(rateMgPerH: number, fromH: number, untilH: number): number;
}

/** A stretch of constant elimination, with what one milligram at its end leaves in the body at the hour asked about. */
interface Leg {
  readonly fromH: number;
  readonly untilH: number;
  readonly k: number;
  readonly ofBody: number;
  readonly ofDepot: number;
}

/**
 * How much of a milligram survives until one hour, worked backwards once over the changes of elimination,
 * so that each of ten thousand doses can be asked about without a walk of its own.
 */
export function survivalUntil(course: Course, atH: number): Survival {
  const ka = course.absorptionRatePerH ?? 0;
  const legs = legsUntil(course, atH, ka);
  const left = (state: BodyState, fromH: number): number => {
    if (fromH > atH) return 0;
    const leg = legs[legHolding(legs, fromH)]!;
    const end = advance(state, { k: leg.k, ka, rateMgPerH: 0 }, leg.untilH - fromH);
    return end.amountMg * leg.ofBody + end.depotMg * leg.ofDepot;
  };
  return {
    ofBodyMg: (amountMg, fromH) => left({ amountMg, depotMg: 0 }, fromH),
    ofDepotMg: (depotMg, fromH) => left({ amountMg: 0, depotMg }, fromH),
    ofRate(rateMgPerH, fromH, untilH) {
      const stopH = Math.min(untilH, atH);
      let total = 0;
      for (let index = legHolding(legs, fromH), beginH = fromH; beginH < stopH; index++) {
        const { k, untilH: legEndH } = legs[index]!;
        const endH = Math.min(stopH, legEndH);
        const given = advance({ amountMg: 0, depotMg: 0 }, { k, ka, rateMgPerH }, endH - beginH);
        total += left(given, endH);
        beginH = endH;
      }
      return total;
    },
  };
}

function legsUntil(course: Course, atH: number, ka: number): Leg[] {
  const legs: Leg[] = [];
  let ofBody = 1;
  let ofDepot = 0;
  let untilH = atH;
  for (const { fromH, ratePerH: k } of course.elimination
    .filter((piece) => piece.fromH < atH || piece.fromH === 0)
    .reverse()) {
    legs.push({ fromH, untilH, k, ofBody, ofDepot });
    const flow = { k, ka, rateMgPerH: 0 };
    const unit = advance({ amountMg: 0, depotMg: 1 }, flow, untilH - fromH);
    ofDepot = unit.amountMg * ofBody + unit.depotMg * ofDepot;
    ofBody *= advance({ amountMg: 1, depotMg: 0 }, flow, untilH - fromH).amountMg;
    untilH = fromH;
  }
  return legs.reverse();
}

/** Index of the leg that holds an hour; the last one for hours after it. */
function legHolding(legs: readonly Leg[], atH: number): number {
  let low = 0;
  let high = legs.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (legs[middle]!.untilH <= atH) low = middle + 1;
    else high = middle;
  }
  return low;
}
