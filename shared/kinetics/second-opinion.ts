import type { SecondOpinion } from "../contract/case.ts";
import type { Dose } from "../contract/dose.ts";
import type { Course } from "./course.ts";
import { levelsAt } from "./levels.ts";
import { integrate } from "./quadrature.ts";
import { walk } from "./walk.ts";

/** A walk and its second opinion that differ by more than this, relative to the largest level, are refused. */
export const secondOpinionTolerance = 1e-6;

/** e^-45 is 3e-20: what is weaker than that cannot show in a double. */
const faintest = 45;

/**
 * Levels by another road: numerical convolution of the input train with the impulse response.
 *
 *     C(t) = (1/V) [ V C0 h(t, 0) + sum of m_i h(t, t_i) + integral of g(s) h(t, s) ds ],
 *     h(t, s) = e^-(K(t) - K(s)),   K(t) = integral of k from 0 to t
 *
 * The integral is done by adaptive quadrature, panel by panel. Nothing here is shared with the walk: it
 * reads the doses and the staircase of k anew, and knows no closed form of a level.
 *
 * @param timesH elapsed hours, in any order; at a bolus, the value just after it
 * @returns      mg/L, one per time
 */
export function secondOpinionLevels(course: Course, timesH: ArrayLike<number>): Float64Array {
  const clearing = cumulativeElimination(course);
  return Float64Array.from(timesH, (timeH) => {
    const survives = (fromH: number) => Math.exp(clearing.until(fromH) - clearing.until(timeH));
    let amountMg = course.startConcentrationMgPerL * course.kinetics.volumeL * survives(0);
    for (const dose of course.doses) amountMg += leftOf(course, dose, timeH, clearing, survives);
    return amountMg / course.kinetics.volumeL;
  });
}

/**
 * Compares the walk with its second opinion just at, shortly after and between the events of a course,
 * and at both ends: up to 300 times.
 */
export function compareWithSecondOpinion(course: Course): SecondOpinion {
  const timesH = checkTimesH(course);
  const walked = levelsAt(walk(course), timesH);
  const convolved = secondOpinionLevels(course, timesH);
  const largestLevelMgPerL = Math.max(...convolved.map(Math.abs), ...walked.map(Math.abs));
  let worst = 0;
  for (let point = 1; point < timesH.length; point++)
    if (!(Math.abs(walked[point]! - convolved[point]!) <= Math.abs(walked[worst]! - convolved[worst]!))) worst = point;
  const largestDifferenceMgPerL = Math.abs(walked[worst]! - convolved[worst]!);
  return {
    largestDifferenceMgPerL,
    atH: timesH[worst]!,
    largestLevelMgPerL,
    relative: largestLevelMgPerL > 0 ? largestDifferenceMgPerL / largestLevelMgPerL : largestDifferenceMgPerL,
    points: timesH.length,
  };
}

/** What one dose has left in the body at one hour. */
function leftOf(course: Course, dose: Dose, timeH: number, clearing: Clearing, survives: (fromH: number) => number): number {
  const { saltFactor, bioavailability } = course;
  if (dose.kind === "bolus") return dose.atH <= timeH ? saltFactor * dose.amountMg * survives(dose.atH) : 0;
  const convolve = (input: (atH: number) => number, fromH: number, untilH: number, cuts: readonly number[]) =>
    convolved(input, fromH, Math.min(untilH, timeH), cuts, timeH, clearing, survives);
  if (dose.kind === "infusion") {
    const rateMgPerH = (saltFactor * dose.amountMg) / dose.durationH;
    return convolve(() => rateMgPerH, dose.atH, dose.atH + dose.durationH, []);
  }
  if (dose.kind === "absorbed") {
    const ka = course.absorptionRatePerH!;
    const fromH = dose.atH + dose.lagH;
    const availableMg = saltFactor * bioavailability * dose.amountMg;
    const cuts = [1, 3, 7, 15, 30].map((lives) => fromH + lives / ka);
    return convolve((atH) => availableMg * ka * Math.exp(-ka * (atH - fromH)), fromH, fromH + faintest / ka, cuts);
  }
  return dose.steps.reduce((amountMg, step, index) => {
    const rateMgPerH = saltFactor * step.rateMgPerH;
    return amountMg + (rateMgPerH === 0 ? 0 : convolve(() => rateMgPerH, step.atH, dose.steps[index + 1]?.atH ?? course.horizonH, []));
  }, 0);
}

/** Integral of input x survival, cut where k changes and where the integrand bends, skipping what has faded away. */
function convolved(
  input: (atH: number) => number,
  fromH: number,
  untilH: number,
  cuts: readonly number[],
  timeH: number,
  clearing: Clearing,
  survives: (fromH: number) => number,
): number {
  const startH = Math.max(fromH, clearing.hourAt(clearing.until(timeH) - faintest));
  if (!(untilH > startH)) return 0;
  const bends = [1, 3, 7, 15, 30].map((lives) => clearing.hourAt(clearing.until(timeH) - lives));
  const edges = [...cuts, ...bends, ...clearing.edgesH].filter((edgeH) => edgeH > startH && edgeH < untilH).sort((one, other) => one - other);
  let total = 0;
  let beforeH = startH;
  for (const edgeH of [...edges, untilH]) {
    total += integrate((atH) => input(atH) * survives(atH), beforeH, edgeH);
    beforeH = edgeH;
  }
  return total;
}

/** K(t), the integral of k from 0, and its inverse. */
interface Clearing {
  readonly edgesH: readonly number[];
  until(atH: number): number;
  /** The latest hour at which K has reached a value; 0 for values below 0. */
  hourAt(value: number): number;
}

function cumulativeElimination(course: Course): Clearing {
  const edgesH = course.elimination.map(({ fromH }) => fromH);
  const rates = course.elimination.map(({ ratePerH }) => ratePerH);
  const atEdge = [0];
  for (let edge = 1; edge < edgesH.length; edge++)
    atEdge.push(atEdge[edge - 1]! + rates[edge - 1]! * (edgesH[edge]! - edgesH[edge - 1]!));
  const lastAtMost = (values: readonly number[], value: number) => {
    let edge = values.length - 1;
    while (edge > 0 && values[edge]! > value) edge--;
    return edge;
  };
  return {
    edgesH,
    until(atH) {
      const edge = lastAtMost(edgesH, atH);
      return atEdge[edge]! + rates[edge]! * (atH - edgesH[edge]!);
    },
    hourAt(value) {
      if (value <= 0) return 0;
      const edge = lastAtMost(atEdge, value);
      return rates[edge]! > 0 ? edgesH[edge]! + (value - atEdge[edge]!) / rates[edge]! : edgesH[edge]!;
    },
  };
}

function checkTimesH(course: Course): number[] {
  const { horizonH } = course;
  const events = new Set([0, horizonH, ...course.elimination.map(({ fromH }) => fromH)]);
  for (const dose of course.doses) {
    if (dose.kind === "pump") for (const step of dose.steps) events.add(step.atH);
    else events.add(dose.atH);
    if (dose.kind === "infusion") events.add(dose.atH + dose.durationH);
    if (dose.kind === "absorbed") events.add(dose.atH + dose.lagH);
  }
  const inside = [...events].filter((atH) => atH >= 0 && atH <= horizonH).sort((one, other) => one - other);
  const times = inside.flatMap((atH, index) => {
    const gapH = (inside[index + 1] ?? atH) - atH;
    return gapH > 0 ? [atH, atH + gapH / 8, atH + gapH / 2] : [atH];
  });
  const stride = Math.ceil(times.length / 300);
  const kept = times.filter((_, index) => index % stride === 0);
  return kept.at(-1) === horizonH ? kept : [...kept, horizonH];
}
