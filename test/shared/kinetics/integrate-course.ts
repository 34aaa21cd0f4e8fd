import { createRequire } from "node:module";
import type { CourseInput } from "../../../shared/kinetics/course.ts";

/** What is used of odex, a general extrapolation solver that knows nothing of this model. */
interface OdeSolver {
  relativeTolerance: number;
  absoluteTolerance: number;
  solve(
    slope: (x: number, y: number[]) => number[],
    from: number,
    start: number[],
    to: number,
  ): { y: number[]; outcome: number };
}

// The package ships its source as TypeScript, without declarations: a plain import would type-check that source.
const require = createRequire(import.meta.url);
const { Solver }: { Solver: new (equations: number) => OdeSolver } = require("odex");

/**
 * Levels by integrating the two differential equations, started anew wherever an input or k jumps.
 * It reads doses and elimination changes itself, so it shares nothing with the walk but the question.
 *
 * @param timesH elapsed hours in ascending order; at a bolus, the value just after it
 * @returns      mg/L, one per time
 */
export function integrateCourse(input: CourseInput, timesH: readonly number[]): number[] {
  const { volumeL = Number.NaN, absorptionRatePerH: ka = 0, saltFactor, bioavailability } = input.parameters;
  const restarts = new Set([0, ...timesH]);
  for (const dose of input.doses) for (const atH of jumpsOf(dose)) restarts.add(atH);
  for (const change of input.eliminationChanges ?? [])
    for (const atH of "toH" in change ? [change.fromH, change.toH] : [change.fromH]) restarts.add(atH);
  const lastH = timesH.at(-1)!;
  const edgesH = [...restarts].filter((atH) => atH <= lastH).sort((one, other) => one - other);
  const totalMg = input.doses.reduce(
    (sum, dose) => sum + ("amountMg" in dose ? dose.amountMg : 0),
    (input.startConcentrationMgPerL ?? 0) * volumeL,
  );
  const solver = new Solver(2);
  solver.relativeTolerance = 1e-13;
  solver.absoluteTolerance = 1e-14 * Math.max(1, totalMg);
  let bodyMg = (input.startConcentrationMgPerL ?? 0) * volumeL;
  let depotMg = 0;
  const levels = new Map<number, number>();
  edgesH.forEach((edgeH, index) => {
    for (const dose of input.doses) {
      if (dose.kind === "bolus" && dose.atH === edgeH) bodyMg += saltFactor * dose.amountMg;
      if (dose.kind === "absorbed" && dose.atH + dose.lagH === edgeH)
        depotMg += saltFactor * bioavailability * dose.amountMg;
    }
    levels.set(edgeH, bodyMg / volumeL);
    const nextH = edgesH[index + 1];
    if (nextH === undefined) return;
    const middleH = edgeH + (nextH - edgeH) / 2;
    const k = eliminationAt(input, middleH);
    const rate = saltFactor * input.doses.reduce((sum, dose) => sum + rateAt(dose, middleH), 0);
    const end = solver.solve(
      (_, [body, depot]) => [rate + ka * depot! - k * body!, -ka * depot!],
      edgeH,
      [bodyMg, depotMg],
      nextH,
    );
    if (end.outcome !== 0) throw new Error(`the solver gave up between ${edgeH} h and ${nextH} h`);
    [bodyMg, depotMg] = [end.y[0]!, end.y[1]!];
  });
  return timesH.map((timeH) => levels.get(timeH)!);
}

type Dose = CourseInput["doses"][number];

function jumpsOf(dose: Dose): number[] {
  if (dose.kind === "pump") return dose.steps.map(({ atH }) => atH);
  if (dose.kind === "infusion") return [dose.atH, dose.atH + dose.durationH];
  return [dose.kind === "absorbed" ? dose.atH + dose.lagH : dose.atH];
}

function rateAt(dose: Dose, atH: number): number {
  if (dose.kind === "infusion")
    return dose.atH < atH && atH < dose.atH + dose.durationH ? dose.amountMg / dose.durationH : 0;
  if (dose.kind === "pump") return dose.steps.findLast((step) => step.atH < atH)?.rateMgPerH ?? 0;
  return 0;
}

function eliminationAt(input: CourseInput, atH: number): number {
  const volumeL = input.parameters.volumeL!;
  let [k, sinceH] = [input.parameters.eliminationRatePerH!, 0];
  let added = 0;
  for (const change of input.eliminationChanges ?? []) {
    if ("toH" in change) added += change.fromH < atH && atH < change.toH ? change.addedClearanceLPerH : 0;
    else if (change.fromH < atH && change.fromH >= sinceH) {
      k = "eliminationRatePerH" in change ? change.eliminationRatePerH : change.clearanceLPerH / volumeL;
      sinceH = change.fromH;
    }
  }
  return k + added / volumeL;
}
