import type { Course, EliminationPiece } from "../../kinetics/course.ts";
import { type ArithmeticSection, type ArithmeticStep, carriedHours, put, step } from "./step.ts";

/** V, CL and k as the lines print them and carry them on. */
export interface HandKinetics {
  readonly volumeL: number;
  readonly clearanceLPerH: number;
  readonly eliminationRatePerH: number;
  readonly section: ArithmeticSection;
}

// biome-ignore lint/suspicious/noApproximativeNumericConstant: the lines are worked with the digits they print.
const ln2 = 0.693147;

/** k, CL, V and half-life from the two values that were given. */
export function handKinetics({ kinetics }: Course): HandKinetics {
  const given = new Set(kinetics.given);
  const steps: ArithmeticStep[] = [];
  const line = (made: ArithmeticStep): number => {
    steps.push(made);
    return made.value;
  };
  let { volumeL, clearanceLPerH, eliminationRatePerH } = kinetics;
  if (given.has("halfLifeH")) eliminationRatePerH = line(rateFromHalfLife(kinetics.halfLifeH, eliminationRatePerH));
  if (!given.has("clearanceLPerH")) {
    const substituted = `${put(eliminationRatePerH, "per h")} × ${put(volumeL, "L")}`;
    const value = eliminationRatePerH * volumeL;
    clearanceLPerH = line(
      step({ title: "Clearance", formula: "CL = k × V", substituted, value, unit: "L/h", program: clearanceLPerH }),
    );
  } else if (!given.has("volumeL")) {
    const substituted = `${put(clearanceLPerH, "L/h")} ÷ ${put(eliminationRatePerH, "per h")}`;
    const value = clearanceLPerH / eliminationRatePerH;
    volumeL = line(
      step({ title: "Volume of distribution", formula: "V = CL ÷ k", substituted, value, unit: "L", program: volumeL }),
    );
  } else {
    const substituted = `${put(clearanceLPerH, "L/h")} ÷ ${put(volumeL, "L")}`;
    const title = "Elimination rate constant";
    const value = clearanceLPerH / volumeL;
    eliminationRatePerH = line(
      step({ title, formula: "k = CL ÷ V", substituted, value, unit: "per h", program: eliminationRatePerH }),
    );
  }
  if (!given.has("halfLifeH")) {
    const substituted = `${ln2} ÷ ${put(eliminationRatePerH, "per h")}`;
    const value = ln2 / eliminationRatePerH;
    line(
      step({
        title: "Half-life",
        formula: "half-life = ln 2 ÷ k",
        substituted,
        value,
        unit: "h",
        program: kinetics.halfLifeH,
      }),
    );
  }
  return {
    volumeL,
    clearanceLPerH,
    eliminationRatePerH,
    section: { title: "Elimination", note: "ln 2 is 0.693147.", steps },
  };
}

function rateFromHalfLife(halfLifeH: number, program: number): ArithmeticStep {
  return step({
    title: "Elimination rate constant",
    formula: "k = ln 2 ÷ half-life",
    substituted: `${ln2} ÷ ${put(halfLifeH, "h")}`,
    value: ln2 / halfLifeH,
    unit: "per h",
    program,
  });
}

/** k on one piece of the elimination staircase; undefined `step` where it is the base k or stated as it is. */
export function handRate(hand: HandKinetics, piece: EliminationPiece): { k: number; step?: ArithmeticStep } {
  const title = `Elimination rate constant from ${put(carriedHours(piece.fromH), "h")} into the plan`;
  const common = { title, unit: "per h", program: piece.ratePerH };
  const clearance = put(tidy(piece.clearanceLPerH), "L/h");
  const volume = put(hand.volumeL, "L");
  if (piece.base === "clearance") {
    const value = piece.clearanceLPerH / hand.volumeL;
    const made = step({ ...common, formula: "k = CL then ÷ V", substituted: `${clearance} ÷ ${volume}`, value });
    return { k: made.value, step: made };
  }
  // A stated k carries its clearance within ratePerH; taking it out again may leave a tail of digits.
  const before =
    piece.base === "base" ? hand.eliminationRatePerH : tidy(piece.ratePerH - piece.clearanceLPerH / hand.volumeL);
  if (!(piece.clearanceLPerH > 0)) return { k: before };
  const substituted = `${put(before, "per h")} + ${clearance} ÷ ${volume}`;
  const value = before + piece.clearanceLPerH / hand.volumeL;
  const made = step({ ...common, formula: "k = k before + CL added ÷ V", substituted, value });
  return { k: made.value, step: made };
}

/** Without the digits that a sum of decimals leaves behind. */
function tidy(value: number): number {
  return Number(value.toPrecision(10));
}

/** How k changes over the plan, each value once. */
export function changesSection(hand: HandKinetics, course: Course): ArithmeticSection | undefined {
  const steps = new Map<string, ArithmeticStep>();
  for (const piece of course.elimination) {
    const made = handRate(hand, piece).step;
    if (made !== undefined && !steps.has(made.substituted)) steps.set(made.substituted, made);
  }
  if (course.elimination.length < 2 && steps.size === 0) return undefined;
  const spans = course.elimination.length;
  const note = `Elimination has ${spans} spans in this plan. Each value of k that has to be worked out is shown once, where it first holds.`;
  return { title: "Changed elimination", note, steps: [...steps.values()] };
}
