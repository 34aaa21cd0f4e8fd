import type { RegimenContent } from "../contract/case.ts";
import { exposureOf } from "../kinetics/exposure.ts";
import { amountPerDay, highestAmount, highestRate, totalAmount } from "./amounts.ts";
import { areaOver } from "./area-over.ts";
import { type Figure, type FigureUnit, isValue } from "./figure.ts";
import { firstEntryH } from "./first-entry.ts";
import { firstInterval, type Interval, lastInterval } from "./intervals.ts";
import { momentAt } from "./moment.ts";
import { type Prepared, prepare, type Which } from "./prepared.ts";
import { sayInCycle } from "./settled-clock.ts";
import { settledFrom } from "./settling.ts";

/**
 * Everything that one alternative is judged by. Peaks and troughs of the first interval (first dose to
 * the next), of the last complete interval of the plan and of a cycle at steady state. A trough is the
 * lowest level after the peak of its interval, so that an empty start does not count as one.
 */
export interface Figures {
  /** Over the whole plan. */
  readonly highest: Figure;
  /** From the first peak to the end of the plan. */
  readonly lowest: Figure;
  readonly firstPeak: Figure;
  readonly firstTrough: Figure;
  readonly lastPeak: Figure;
  readonly lastTrough: Figure;
  readonly steadyPeak: Figure;
  readonly steadyTrough: Figure;
  /** Over the whole plan. */
  readonly average: Figure;
  readonly steadyAverage: Figure;
  /** Over 24 h from the chosen hour. */
  readonly area24: Figure;
  readonly steadyArea24: Figure;
  readonly hoursAbove: Figure;
  readonly hoursWithin: Figure;
  readonly hoursBelow: Figure;
  readonly percentAbove: Figure;
  readonly percentWithin: Figure;
  readonly percentBelow: Figure;
  readonly steadyPercentWithin: Figure;
  readonly firstInRange: Figure;
  /** ln 10 / k: by then nine tenths of the steady-state level are there, whatever the dose, without a loading dose. */
  readonly timeTo90Percent: Figure;
  readonly settledFrom: Figure;
  readonly accumulationRatio: Figure;
  /** (peak - trough) / trough at steady state, in percent. */
  readonly swing: Figure;
  /** (peak - trough) / average at steady state, in percent. */
  readonly fluctuation: Figure;
  readonly amountPerDay: Figure;
  readonly totalAmount: Figure;
  readonly highestAmount: Figure;
  readonly highestRate: Figure;
}

export type FigureName = keyof Figures;

export interface FigureOptions {
  readonly which?: Which;
  /** Where the chosen 24 h begin; 0 is the plan's start. */
  readonly areaFromH?: number;
}

/** Figures of what was given with the plan going on, or, by `which`, of the plan alone. */
export function figuresOf(content: RegimenContent, options: FigureOptions = {}): Figures {
  return figuresOfPrepared(prepare(content, options.which), options);
}

/** As `figuresOf`, for an alternative that is already walked. Cost: a few passes over its stretches. */
export function figuresOfPrepared(
  prepared: Prepared,
  { areaFromH = 0 }: Pick<FigureOptions, "areaFromH"> = {},
): Figures {
  const { content } = prepared;
  const nothing = prepared.doses.length === 0 ? "no dose is given" : undefined;
  const first = extremes(prepared, firstInterval(prepared), "no dose is given");
  const last = extremes(
    prepared,
    lastInterval(prepared),
    nothing ?? "only one dose is given, so there is no later interval",
  );
  return {
    ...furthest(prepared, first.peak),
    firstPeak: first.peak,
    firstTrough: first.trough,
    lastPeak: last.peak,
    lastTrough: last.trough,
    area24: areaOver(prepared, areaFromH),
    ...wholeFigures(prepared),
    ...steadyFigures(prepared),
    totalAmount: totalAmount(prepared),
    amountPerDay: amountPerDay(prepared),
    highestAmount: highestAmount(prepared),
    highestRate: highestRate(prepared),
    firstInRange: firstInRange(content, prepared),
    timeTo90Percent: timeTo90Percent(prepared),
  };
}

/** The first rise is no trough, so the lowest level is looked for after the first peak. */
function furthest({ content, made }: Prepared, firstPeak: Figure): Pick<Figures, "highest" | "lowest"> {
  const level = ({ mgPerL, atH }: { mgPerL: number; atH: number }): Figure => ({
    value: mgPerL,
    unit: "mg/L",
    ...momentAt(content, atH),
  });
  const highest = level(exposureOf(made, { fromH: 0, toH: made.horizonH }).peak);
  const fromH = isValue(firstPeak) ? (firstPeak.atH ?? 0) : 0;
  if (!(fromH < made.horizonH)) return { highest, lowest: { absent: "the level still rises when the plan ends" } };
  return { highest, lowest: level(exposureOf(made, { fromH, toH: made.horizonH }).trough) };
}

function extremes(
  prepared: Prepared,
  interval: Interval | undefined,
  absent: string,
): { peak: Figure; trough: Figure } {
  if (interval === undefined) return { peak: { absent }, trough: { absent } };
  const { content, made } = prepared;
  const { fromH, note } = interval;
  const toH = Math.min(interval.toH, made.horizonH);
  if (!(toH > fromH)) return { peak: { absent: "the interval is empty" }, trough: { absent: "the interval is empty" } };
  const { peak } = exposureOf(made, { fromH, toH });
  const noted = note !== undefined && { note };
  const peakFigure: Figure = { value: peak.mgPerL, unit: "mg/L", ...momentAt(content, peak.atH), ...noted };
  if (!(toH > peak.atH))
    return { peak: peakFigure, trough: { absent: "the level still rises when the interval ends" } };
  const { trough } = exposureOf(made, { fromH: peak.atH, toH });
  return {
    peak: peakFigure,
    trough: { value: trough.mgPerL, unit: "mg/L", ...momentAt(content, trough.atH), ...noted },
  };
}

type WholeFigures = Pick<
  Figures,
  "average" | "hoursAbove" | "hoursWithin" | "hoursBelow" | "percentAbove" | "percentWithin" | "percentBelow"
>;

function wholeFigures({ content, made }: Prepared): WholeFigures {
  const { averageMgPerL, hoursAbove, hoursWithin, hoursBelow } = exposureOf(
    made,
    { fromH: 0, toH: made.horizonH },
    content.setting.rangeMgPerL,
  );
  const hours = (value: number | undefined): Figure => (value === undefined ? noRange : { value, unit: "h" });
  const percent = (value: number | undefined): Figure =>
    value === undefined ? noRange : { value: (100 * value) / made.horizonH, unit: "percent" };
  return {
    average: { value: averageMgPerL, unit: "mg/L" },
    hoursAbove: hours(hoursAbove),
    hoursWithin: hours(hoursWithin),
    hoursBelow: hours(hoursBelow),
    percentAbove: percent(hoursAbove),
    percentWithin: percent(hoursWithin),
    percentBelow: percent(hoursBelow),
  };
}

/** With the elimination that holds at the end of the plan; a constant rate settles like any cycle. */
function timeTo90Percent({ course }: Prepared): Figure {
  const { ratePerH } = course.elimination.at(-1)!;
  return ratePerH > 0
    ? { value: Math.LN10 / ratePerH, unit: "h" }
    : { absent: "elimination stops, so the level never settles" };
}

const noRange: Figure = { absent: "no desired range is given" };

function firstInRange(content: RegimenContent, { made }: Prepared): Figure {
  const range = content.setting.rangeMgPerL;
  if (range === undefined) return noRange;
  const atH = firstEntryH(made, range);
  return atH === undefined
    ? { absent: "the level never enters the range within the plan" }
    : { value: atH, unit: "h", ...momentAt(content, atH) };
}

type SteadyFigures = Pick<
  Figures,
  | "steadyPeak"
  | "steadyTrough"
  | "steadyAverage"
  | "steadyArea24"
  | "steadyPercentWithin"
  | "settledFrom"
  | "accumulationRatio"
  | "swing"
  | "fluctuation"
>;

function steadyFigures(prepared: Prepared): SteadyFigures {
  const { settled } = prepared;
  if (settled.kind === "none") return allAbsent(settled.why);
  const { steady } = settled;
  const { exposure, cycleH } = steady;
  const inCycle = (value: number, atH: number): Figure => ({
    value,
    unit: "mg/L",
    note: sayInCycle(prepared, settled, atH),
  });
  const plain = (value: number | undefined, unit: FigureUnit, absent: string): Figure =>
    value === undefined ? { absent } : { value, unit };
  return {
    steadyPeak: inCycle(exposure.peak.mgPerL, exposure.peak.atH),
    steadyTrough: inCycle(exposure.trough.mgPerL, exposure.trough.atH === 0 ? cycleH : exposure.trough.atH),
    steadyAverage: { value: exposure.averageMgPerL, unit: "mg/L" },
    steadyArea24: { value: steady.auc24MgHPerL, unit: "mg·h/L" },
    steadyPercentWithin: plain(
      exposure.hoursWithin === undefined ? undefined : (100 * exposure.hoursWithin) / cycleH,
      "percent",
      "no desired range is given",
    ),
    settledFrom: settledFigure(prepared),
    accumulationRatio: plain(steady.accumulationRatio, "times", "the first cycle leaves no level"),
    swing: plain(steady.swing === undefined ? undefined : 100 * steady.swing, "percent", "the trough is 0"),
    fluctuation: { value: 100 * steady.fluctuation, unit: "percent" },
  };
}

function settledFigure(prepared: Prepared): Figure {
  const found = settledFrom(prepared);
  if (found === undefined) return { absent: "not reached within the plan" };
  return {
    value: found.atH,
    unit: "h",
    ...momentAt(prepared.content, found.atH),
    note: `from cycle ${found.cycle} on`,
  };
}

function allAbsent(absent: string): SteadyFigures {
  return {
    steadyPeak: { absent },
    steadyTrough: { absent },
    steadyAverage: { absent },
    steadyArea24: { absent },
    steadyPercentWithin: { absent },
    settledFrom: { absent },
    accumulationRatio: { absent },
    swing: { absent },
    fluctuation: { absent },
  };
}
