import { DomainError } from "../errors.ts";
import { expDifference, phi } from "./exp-differences.ts";
import { advance, stretchAt, type Walk } from "./walk.ts";

/** Points between two exact values on a uniform grid: 512 multiply-adds stay below 2e-13 relative. */
const pointsPerAnchor = 512;

/**
 * Grid times this much before an event, relative to its hour, count as at it: n x everyH rounds twice and
 * an hour made from clock times once, and 3 x 0.1 h must meet a dose at 0.3 h either way.
 */
const gridSlack = 8 * Number.EPSILON;

/**
 * Levels at given times.
 *
 * @param timesH ascending elapsed hours within [0, horizonH]; at a bolus, the value just after it
 * @returns      mg/L, one per time
 * @throws {DomainError} if a time is outside the walk or out of order
 */
export function levelsAt(made: Walk, timesH: ArrayLike<number>): Float64Array {
  const levels = new Float64Array(timesH.length);
  let index = 0;
  let beforeH = 0;
  for (let point = 0; point < timesH.length; point++) {
    const timeH = timesH[point]!;
    if (!(timeH >= beforeH && timeH <= made.horizonH))
      throw new DomainError(`timesH/${point}`, timeH, `from ${beforeH} to ${made.horizonH}, in ascending order`);
    while (index < made.count - 1 && made.untilH[index]! <= timeH) index++;
    const { state, flow } = stretchAt(made, index);
    levels[point] = advance(state, flow, timeH - made.fromH[index]!).amountMg / made.volumeL;
    beforeH = timeH;
  }
  return levels;
}

/**
 * Levels on the grid 0, everyH, 2 everyH, ... up to the horizon: one multiply-add a point (two where
 * drug is being absorbed), re-anchored to the closed form every 512 points and at every event.
 *
 * @returns mg/L, one per grid point
 * @throws {DomainError} if everyH is not positive
 */
export function levelsEvery(made: Walk, everyH: number): Float64Array {
  if (!(everyH > 0)) throw new DomainError("everyH", everyH, "greater than 0");
  const points = pointsUpTo(made.horizonH, everyH);
  const levels = new Float64Array(points);
  let next = 0;
  for (let index = 0; index < made.count; index++) {
    const last = index === made.count - 1;
    const end = last ? points : Math.min(points, Math.ceil((made.untilH[index]! * (1 - gridSlack)) / everyH));
    while (next < end) {
      const block = Math.min(end, next + pointsPerAnchor);
      fillBlock(made, index, everyH, levels, next, block);
      next = block;
    }
  }
  return levels;
}

/** The grid that `levelsEvery` answers on. */
export function gridTimesH(horizonH: number, everyH: number): Float64Array {
  const timesH = new Float64Array(pointsUpTo(horizonH, everyH));
  for (let point = 0; point < timesH.length; point++) timesH[point] = point * everyH;
  return timesH;
}

function pointsUpTo(horizonH: number, everyH: number): number {
  return Math.floor((horizonH * (1 + gridSlack)) / everyH) + 1;
}

function fillBlock(made: Walk, index: number, everyH: number, levels: Float64Array, begin: number, end: number): void {
  const { state, flow } = stretchAt(made, index);
  const anchor = advance(state, flow, Math.max(0, begin * everyH - made.fromH[index]!));
  const keep = Math.exp(-flow.k * everyH);
  const gain = (flow.rateMgPerH * everyH * phi(flow.k * everyH)) / made.volumeL;
  let level = anchor.amountMg / made.volumeL;
  if (anchor.depotMg === 0) {
    for (let point = begin; point < end; point++) {
      levels[point] = level;
      level = level * keep + gain;
    }
    return;
  }
  const absorbedPart = flow.ka * everyH * expDifference(flow.k * everyH, flow.ka * everyH);
  const keepDepot = Math.exp(-flow.ka * everyH);
  let depot = anchor.depotMg / made.volumeL;
  for (let point = begin; point < end; point++) {
    levels[point] = level;
    level = level * keep + gain + depot * absorbedPart;
    depot *= keepDepot;
  }
}
