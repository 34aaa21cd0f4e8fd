import { effectiveMg } from "../../kinetics/course.ts";
import { advance, stretchAt, type Walk } from "../../kinetics/walk.ts";
import { sayClock } from "../../schedule/clock.ts";
import { formatDose } from "../../units/format.ts";
import { momentAt } from "../moment.ts";
import type { Prepared } from "../prepared.ts";
import { type HandKinetics, handRate } from "./elimination-steps.ts";
import { type ArithmeticSection, type ArithmeticStep, carried, carriedHours, put, step } from "./step.ts";

/** Longer chains are not redone by hand; the chain then stops here and says so. */
const mostStretches = 40;

/** What waits to be absorbed counts as gone once it cannot show in the digits printed. */
const negligible = 1e-6;

const howToRead =
  "From one event to the next: C is the level in mg/L, t the hours between, R the rate running, G the amount waiting to be absorbed. Each line starts from the line before.";

/**
 * The plan from its start, stretch by stretch, as given: every level that a colleague needs to follow a
 * late dose or a change of elimination by hand.
 */
export function walkSection(hand: HandKinetics, prepared: Prepared): ArithmeticSection {
  const { made, course } = prepared;
  const title = "Levels from event to event";
  if (
    course.elimination.some(
      ({ ratePerH }) => Math.abs((course.absorptionRatePerH ?? Number.NaN) - ratePerH) < 0.001 * ratePerH,
    )
  )
    return {
      title,
      note: "Not shown line by line: ka and k are so close that the textbook formula loses its digits.",
      steps: [],
    };
  const shown = Math.min(made.count, mostStretches);
  const steps: ArithmeticStep[] = [];
  let state = { level: course.startConcentrationMgPerL, waitingMg: 0 };
  for (let index = 0; index < shown; index++) {
    const line = stretchLine(hand, prepared, made, index, state);
    steps.push(...line.steps);
    state = line.state;
  }
  const cut = made.count > shown ? ` The first ${shown} of ${made.count} stretches are shown.` : "";
  return { title, note: `${howToRead}${sayEffective(course)}${cut}`, steps };
}

/** How the amounts of the lines come from those ordered. */
function sayEffective({ saltFactor, bioavailability, doses }: Prepared["course"]): string {
  const salt = saltFactor === 1 ? [] : [`S = ${put(saltFactor, "")}`];
  const absorbed = bioavailability !== 1 && doses.some(({ kind }) => kind === "absorbed");
  const factors = [...salt, ...(absorbed ? [`F = ${put(bioavailability, "")} where it is absorbed`] : [])];
  return factors.length === 0 ? "" : ` Amounts and rates are those ordered times ${factors.join(", and times ")}.`;
}

interface HandState {
  readonly level: number;
  readonly waitingMg: number;
}

function stretchLine(hand: HandKinetics, prepared: Prepared, made: Walk, index: number, before: HandState) {
  const { course } = prepared;
  const { flow, state } = stretchAt(made, index);
  const fromH = made.fromH[index]!;
  const hours = carriedHours(made.untilH[index]! - fromH);
  const { k } = handRate(hand, pieceAt(course.elimination, fromH));
  const given = arrivals(prepared, fromH);
  const steps: ArithmeticStep[] = [];
  const when = sayClock(momentAt(prepared.content, fromH).at, prepared.content.timeZone);
  let { level } = before;
  if (given.bolusMg > 0) {
    const made = step({
      title: `${when}: ${formatDose(given.bolusMg)} at once`,
      formula: "C + amount ÷ V",
      substituted: `${put(level, "mg/L")} + ${put(carried(given.bolusMg), "mg")} ÷ ${put(hand.volumeL, "L")}`,
      value: level + carried(given.bolusMg) / hand.volumeL,
      unit: "mg/L",
      program: state.amountMg / course.kinetics.volumeL,
    });
    steps.push(made);
    level = made.value;
  }
  const waitingMg = carried(before.waitingMg + given.depotMg);
  const after = decay({
    level,
    waitingMg,
    k,
    ka: flow.ka,
    hours,
    rateMgPerH: carried(flow.rateMgPerH),
    volumeL: hand.volumeL,
  });
  const untilH = made.untilH[index]!;
  const end = momentAt(prepared.content, untilH).at;
  steps.push(
    step({
      title: `${when} to ${sayClock(end, prepared.content.timeZone)}`,
      formula: after.formula,
      substituted: after.substituted,
      value: after.level,
      unit: "mg/L",
      program: programEnd(made, index, course.kinetics.volumeL),
    }),
  );
  const endLevel = steps.at(-1)!.value;
  const restMg = waitingMg === 0 ? 0 : carried(waitingMg * Math.exp(-flow.ka * hours));
  return { steps, state: { level: endLevel, waitingMg: restMg < negligible * endLevel * hand.volumeL ? 0 : restMg } };
}

/** The textbook terms that apply on one stretch, in words and numbers. */
function decay(stretch: {
  level: number;
  waitingMg: number;
  k: number;
  ka: number;
  hours: number;
  rateMgPerH: number;
  volumeL: number;
}) {
  const { level, waitingMg, k, ka, hours, rateMgPerH, volumeL } = stretch;
  const survives = `e^(−${put(k, "per h")} × ${put(hours, "h")})`;
  const falling = {
    formula: "C × e^(−k × t)",
    words: `${put(level, "mg/L")} × ${survives}`,
    value: level * Math.exp(-k * hours),
  };
  const enters = rateMgPerH > 0 || waitingMg > 0;
  const terms = level === 0 && enters ? [] : [falling];
  if (rateMgPerH > 0 && k > 0)
    terms.push({
      formula: "R ÷ (k × V) × (1 − e^(−k × t))",
      words: `${put(rateMgPerH, "mg per hour")} ÷ (${put(k, "per h")} × ${put(volumeL, "L")}) × (1 − ${survives})`,
      value: (rateMgPerH / (k * volumeL)) * (1 - Math.exp(-k * hours)),
    });
  if (rateMgPerH > 0 && k === 0)
    terms.push({
      formula: "R × t ÷ V",
      words: `${put(rateMgPerH, "mg per hour")} × ${put(hours, "h")} ÷ ${put(volumeL, "L")}`,
      value: (rateMgPerH * hours) / volumeL,
    });
  if (waitingMg > 0)
    terms.push({
      formula: "G × ka ÷ [V × (ka − k)] × (e^(−k × t) − e^(−ka × t))",
      words: `${put(waitingMg, "mg")} × ${put(ka, "per h")} ÷ [${put(volumeL, "L")} × (${put(ka, "per h")} − ${put(k, "per h")})] × (${survives} − e^(−${put(ka, "per h")} × ${put(hours, "h")}))`,
      value: ((waitingMg * ka) / (volumeL * (ka - k))) * (Math.exp(-k * hours) - Math.exp(-ka * hours)),
    });
  return {
    formula: terms.map(({ formula }) => formula).join(" + "),
    substituted: terms.map(({ words }) => words).join(" + "),
    level: terms.reduce((sum, { value }) => sum + value, 0),
  };
}

function programEnd(made: Walk, index: number, volumeL: number): number {
  const { state, flow } = stretchAt(made, index);
  const after = advance(state, flow, made.untilH[index]! - made.fromH[index]!);
  return after.amountMg / volumeL;
}

/** What enters at once, and what begins to wait at the absorption site, at an event; as drug reaching the body. */
function arrivals({ course }: Prepared, fromH: number): { bolusMg: number; depotMg: number } {
  let bolusMg = 0;
  let depotMg = 0;
  for (const dose of course.doses) {
    if (dose.kind === "bolus" && dose.atH === fromH) bolusMg += effectiveMg(course, dose);
    if (dose.kind === "absorbed" && dose.atH + dose.lagH === fromH) depotMg += effectiveMg(course, dose);
  }
  return { bolusMg, depotMg };
}

function pieceAt(elimination: Prepared["course"]["elimination"], atH: number) {
  let found = elimination[0]!;
  for (const piece of elimination) if (piece.fromH <= atH) found = piece;
  return found;
}
