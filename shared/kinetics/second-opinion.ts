import type { SecondOpinion } from "../contract/case.ts";
import type { Course } from "./course.ts";
import { levelsAt } from "./levels.ts";
import { integrate } from "./quadrature.ts";
import { walk } from "./walk.ts";

/** A walk and its second opinion that differ by more than this, relative to the largest level, are refused. */
export const secondOpinionTolerance = 1e-6;

/**
 * Levels by another road: numerical convolution of the input train with the impulse response.
 *
 *     C(t) = (1/V) [ V C0 h(t, 0) + sum of m_i h(t, t_i) + integral of g(s) h(t, s) ds ],
 *     h(t, s) = e^-(K(t) - K(s)),   K(t) = integral of k from 0 to t
 *
 * The integral is done by quadrature, panel by panel between the hours where g or k jumps; a panel's
 * integral is done once, up to its end, and carried to each t by h. Nothing here is shared with the walk:
 * it reads the doses and the staircase of k anew, knows no closed form of a level, and never carries an
 * amount in the body from one event to the next.
 *
 * Cost: at most times x (doses + changes of elimination), of one exponential each.
 *
 * @param timesH elapsed hours within the plan, in any order; at a bolus, the value just after it
 * @returns      mg/L, one per time
 */
export function secondOpinionLevels(course: Course, timesH: ArrayLike<number>): Float64Array {
  const clearedBy = cumulativeElimination(course);
  const parcels = parcelsOf(course, Array.from(timesH), clearedBy);
  return Float64Array.from(timesH, (timeH) => {
    const cleared = clearedBy(timeH);
    let amountMg = 0;
    for (let index = countUntil(parcels, timeH) - 1; index >= 0; index--) {
      const parcel = parcels[index]!;
      if (cleared - parcel.cleared > faintest) break;
      amountMg += parcel.amountMg * Math.exp(parcel.cleared - cleared);
    }
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

/** Drug that is in the body at an hour, as if it had been given at once then. */
interface Parcel {
  readonly atH: number;
  /** K(atH). */
  readonly cleared: number;
  readonly amountMg: number;
}

/** e^-90 is 1e-39: no amount within the limits shows through that. */
const faintest = 90;

/** Start, boluses, and the continuous input of each panel, in order of time. */
function parcelsOf(course: Course, timesH: readonly number[], clearedBy: (atH: number) => number): Parcel[] {
  const given = [{ atH: 0, amountMg: course.startConcentrationMgPerL * course.kinetics.volumeL }];
  for (const dose of course.doses)
    if (dose.kind === "bolus") given.push({ atH: dose.atH, amountMg: course.saltFactor * dose.amountMg });
  return [...given, ...panelsOf(course, timesH)]
    .filter(({ amountMg }) => amountMg !== 0)
    .map((parcel) => ({ ...parcel, cleared: clearedBy(parcel.atH) }))
    .sort((one, other) => one.atH - other.atH);
}

/** What the continuous input of each panel leaves in the body at the panel's end. */
function panelsOf(course: Course, timesH: readonly number[]): { atH: number; amountMg: number }[] {
  const steps = stepsOf(course);
  const lastH = timesH.reduce((latest, timeH) => Math.max(latest, timeH), 0);
  const cuts = [...steps.map(({ atH }) => atH), ...timesH, ...course.elimination.map(({ fromH }) => fromH)];
  const edgesH = [...new Set([0, ...cuts])].filter((edgeH) => edgeH <= lastH).sort((one, other) => one - other);
  const ka = course.absorptionRatePerH ?? 0;
  let rateMgPerH = 0;
  let depotMg = 0;
  let step = 0;
  let change = 0;
  return edgesH.slice(1).map((untilH, panel) => {
    const fromH = edgesH[panel]!;
    for (; step < steps.length && steps[step]!.atH <= fromH; step++) {
      rateMgPerH += steps[step]!.rateMgPerH;
      depotMg += steps[step]!.depotMg;
    }
    while (change + 1 < course.elimination.length && course.elimination[change + 1]!.fromH <= fromH) change++;
    const amountMg = panelMg({ fromH, untilH, rateMgPerH, depotMg, ka, k: course.elimination[change]!.ratePerH });
    depotMg *= Math.exp(-ka * (untilH - fromH));
    return { atH: untilH, amountMg };
  });
}

/** Jumps of the continuous input: the total rate, and what lies at absorption sites. */
function stepsOf(course: Course): { atH: number; rateMgPerH: number; depotMg: number }[] {
  const { saltFactor, bioavailability } = course;
  const steps: { atH: number; rateMgPerH: number; depotMg: number }[] = [];
  for (const dose of course.doses) {
    if (dose.kind === "absorbed")
      steps.push({ atH: dose.atH + dose.lagH, rateMgPerH: 0, depotMg: saltFactor * bioavailability * dose.amountMg });
    if (dose.kind === "infusion") {
      const rateMgPerH = (saltFactor * dose.amountMg) / dose.durationH;
      steps.push({ atH: dose.atH, rateMgPerH, depotMg: 0 });
      steps.push({ atH: dose.atH + dose.durationH, rateMgPerH: -rateMgPerH, depotMg: 0 });
    }
    if (dose.kind === "pump")
      dose.steps.forEach((step, index) => {
        const rateMgPerH = saltFactor * (step.rateMgPerH - (dose.steps[index - 1]?.rateMgPerH ?? 0));
        steps.push({ atH: step.atH, rateMgPerH, depotMg: 0 });
      });
  }
  return steps.sort((one, other) => one.atH - other.atH);
}

interface Panel {
  readonly fromH: number;
  readonly untilH: number;
  readonly rateMgPerH: number;
  readonly depotMg: number;
  readonly ka: number;
  readonly k: number;
}

/** Integral of (R + ka D e^(-ka (s - from))) e^(-k (until - s)) over a panel, cut where the integrand bends. */
function panelMg({ fromH, untilH, rateMgPerH, depotMg, ka, k }: Panel): number {
  if (rateMgPerH === 0 && depotMg === 0) return 0;
  const input = (atH: number) => rateMgPerH + (depotMg === 0 ? 0 : ka * depotMg * Math.exp(-ka * (atH - fromH)));
  const bends = [1, 3, 7, 15, 30].flatMap((lives) => [untilH - lives / k, depotMg === 0 ? fromH : fromH + lives / ka]);
  const edges = bends.filter((edgeH) => edgeH > fromH && edgeH < untilH).sort((one, other) => one - other);
  let total = 0;
  let beforeH = fromH;
  for (const edgeH of [...edges, untilH]) {
    total += integrate((atH) => input(atH) * Math.exp(-k * (untilH - atH)), beforeH, edgeH);
    beforeH = edgeH;
  }
  return total;
}

/** K(t), the integral of k from 0. */
function cumulativeElimination(course: Course): (atH: number) => number {
  const pieces = course.elimination;
  const atEdge = [0];
  for (let edge = 1; edge < pieces.length; edge++)
    atEdge.push(atEdge[edge - 1]! + pieces[edge - 1]!.ratePerH * (pieces[edge]!.fromH - pieces[edge - 1]!.fromH));
  const edges = pieces.map(({ fromH }) => ({ atH: fromH }));
  return (atH) => {
    const edge = Math.max(0, countUntil(edges, atH) - 1);
    return atEdge[edge]! + pieces[edge]!.ratePerH * (atH - pieces[edge]!.fromH);
  };
}

/** How many of some things in order of time are at or before an hour. */
function countUntil(ordered: readonly { readonly atH: number }[], atH: number): number {
  let low = 0;
  let high = ordered.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (ordered[middle]!.atH <= atH) low = middle + 1;
    else high = middle;
  }
  return low;
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
