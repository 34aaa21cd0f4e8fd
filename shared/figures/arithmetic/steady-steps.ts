import type { Settled } from "../prepared.ts";
import { type HandKinetics, handRate } from "./elimination-steps.ts";
import { partsOf } from "./parts.ts";
import { type HandCycle, levelSteps, sharesAt } from "./steady-parts.ts";
import { type ArithmeticSection, type ArithmeticStep, carried, put, step } from "./step.ts";

/** More parts than this nobody adds up by hand. */
const mostParts = 8;

const symbols =
  "A is the accumulation factor, P the length of the cycle, T the duration of an infusion, R its rate, u the hours since the dose began to reach the blood.";

/** Accumulation, peak, trough, area, average, swing and loading doses of the settled cycle. */
export function steadySection(hand: HandKinetics, settled: Settled, startMgPerL: number): ArithmeticSection {
  const title = "Steady state";
  if (settled.kind === "none") return { title, note: `There is no steady state: ${settled.why}.`, steps: [] };
  const { course, steady } = settled;
  const piece = course.elimination[0]!;
  const { k } = handRate(hand, piece);
  const steps: ArithmeticStep[] = [];
  const line = (made: ArithmeticStep): number => {
    steps.push(made);
    return made.value;
  };
  const volumeL = hand.volumeL;
  const clearanceLPerH = k === hand.eliminationRatePerH ? hand.clearanceLPerH : line(clearanceThen(k, volumeL));
  const cycleH = steady.cycleH;
  const accumulation = line(accumulationStep(k, cycleH));
  const cycle: HandCycle = { volumeL, clearanceLPerH, k, cycleH, accumulation, course };
  const area = line(areaStep(cycle, steady.auc24MgHPerL));
  const average = line(averageStep(area, steady.exposure.averageMgPerL));
  const extremes = extremeSteps(cycle, settled);
  steps.push(...extremes.steps);
  if (extremes.peak !== undefined && extremes.trough !== undefined && steady.swing !== undefined)
    line(swingStep(extremes.peak, extremes.trough, 100 * steady.swing));
  line(loadingForAverage(cycle, average, 0));
  if (startMgPerL > 0 && startMgPerL < average) line(loadingForAverage(cycle, average, startMgPerL));
  const start = loadingForCycle(cycle);
  if (start !== undefined) line(start);
  return { title, note: [symbols, extremes.note].filter(Boolean).join(" "), steps };
}

function clearanceThen(k: number, volumeL: number): ArithmeticStep {
  const substituted = `${put(k, "per h")} × ${put(volumeL, "L")}`;
  return step({
    title: "Clearance at the end of the plan",
    formula: "CL = k × V",
    substituted,
    value: k * volumeL,
    unit: "L/h",
  });
}

function accumulationStep(k: number, cycleH: number): ArithmeticStep {
  const substituted = `1 ÷ (1 − e^(−${put(k, "per h")} × ${put(cycleH, "h")}))`;
  return step({
    title: "Accumulation factor",
    formula: "A = 1 ÷ (1 − e^(−k × P))",
    substituted,
    value: 1 / (1 - Math.exp(-k * cycleH)),
    unit: "",
  });
}

/** Area of 24 hours at steady state: what reaches the body in a day, over clearance. */
function areaStep({ course, cycleH, clearanceLPerH }: HandCycle, program: number): ArithmeticStep {
  const amounts = partsOf(course).map((part) => {
    const amountMg = carried(part.kind === "rate" ? part.rateMgPerH * part.hours : part.amountMg);
    const factors = [course.saltFactor, part.kind === "absorbed" ? course.bioavailability : 1].filter(
      (factor) => factor !== 1,
    );
    return {
      words: [...factors.map((factor) => put(factor, "")), put(amountMg, "mg")].join(" × "),
      effectiveMg: factors.reduce((product, factor) => product * factor, amountMg),
    };
  });
  const sumMg = amounts.reduce((sum, { effectiveMg }) => sum + effectiveMg, 0);
  const gathered =
    amounts.length > mostParts ? put(carried(sumMg), "mg") : amounts.map(({ words }) => words).join(" + ");
  return step({
    title: "Area over 24 h at steady state",
    formula: "AUC24 = amount reaching the body in a cycle × 24 h ÷ (P × CL)",
    substituted: `(${gathered}) × 24 h ÷ (${put(cycleH, "h")} × ${put(clearanceLPerH, "L/h")})`,
    value: (sumMg * 24) / (cycleH * clearanceLPerH),
    unit: "mg·h/L",
    program,
  });
}

function averageStep(area: number, program: number): ArithmeticStep {
  const substituted = `${put(area, "mg·h/L")} ÷ 24 h`;
  return step({
    title: "Average at steady state",
    formula: "C average = AUC24 ÷ 24 h",
    substituted,
    value: area / 24,
    unit: "mg/L",
    program,
  });
}

function extremeSteps(cycle: HandCycle, settled: Extract<Settled, { kind: "cycle" }>) {
  const { peak, trough } = settled.steady.exposure;
  const parts = partsOf(cycle.course).length;
  if (parts > mostParts)
    return { steps: [], note: `Peak and trough are not shown line by line: the cycle has ${parts} parts.` };
  const peakShares = sharesAt(cycle, { atH: peak.atH, side: "after" });
  const troughShares = sharesAt(cycle, { atH: trough.atH, side: "before" });
  if (peakShares === undefined || troughShares === undefined)
    return {
      steps: [],
      note: "Peak and trough are not shown line by line: ka and k are so close that the textbook formula loses its digits.",
    };
  const peakSteps = levelSteps(
    `Peak at steady state, ${put(carried(peak.atH), "h")} into the cycle`,
    peakShares,
    peak.mgPerL,
  );
  const troughSteps = levelSteps(
    `Trough at steady state, ${put(carried(trough.atH === 0 ? cycle.cycleH : trough.atH), "h")} into the cycle`,
    troughShares,
    trough.mgPerL,
  );
  return { steps: [...peakSteps, ...troughSteps], peak: peakSteps.at(-1)!.value, trough: troughSteps.at(-1)!.value };
}

function swingStep(peak: number, trough: number, program: number): ArithmeticStep {
  const substituted = `100 × (${put(peak, "mg/L")} − ${put(trough, "mg/L")}) ÷ ${put(trough, "mg/L")}`;
  return step({
    title: "Swing at steady state",
    formula: "100 × (peak − trough) ÷ trough",
    substituted,
    value: (100 * (peak - trough)) / trough,
    unit: "percent",
    program,
  });
}

/** @param presentMgPerL the level that is there already; 0 where the body is empty */
function loadingForAverage({ volumeL, course }: HandCycle, average: number, presentMgPerL: number): ArithmeticStep {
  const saltWords = course.saltFactor === 1 ? "" : " ÷ S";
  const salt = course.saltFactor === 1 ? "" : ` ÷ ${put(course.saltFactor, "")}`;
  const present = put(presentMgPerL, "mg/L");
  const title = "Loading dose that gives the average at once, as a bolus";
  return step({
    title: presentMgPerL > 0 ? `${title}, with ${present} present` : `${title}, with no drug present`,
    formula: presentMgPerL > 0 ? `D = (C average − C present) × V${saltWords}` : `D = C average × V${saltWords}`,
    substituted: `${presentMgPerL > 0 ? `(${put(average, "mg/L")} − ${present})` : put(average, "mg/L")} × ${put(volumeL, "L")}${salt}`,
    value: ((average - presentMgPerL) * volumeL) / course.saltFactor,
    unit: "mg",
  });
}

/** With one bolus or infusion a cycle, its dose times A starts at steady state; other cycles have no such single dose. */
function loadingForCycle({ course, accumulation }: HandCycle): ArithmeticStep | undefined {
  const [only, ...others] = course.doses;
  if (only === undefined || others.length > 0 || (only.kind !== "bolus" && only.kind !== "infusion")) return undefined;
  const title =
    "Loading dose that starts at steady state, with no drug present, given like the others one cycle before them";
  const substituted = `${put(only.amountMg, "mg")} × ${put(accumulation, "")}`;
  return step({ title, formula: "D load = D × A", substituted, value: only.amountMg * accumulation, unit: "mg" });
}
