import type { FigureName } from "./figures.ts";

/** One line of the table of figures: its name in words and what it means. */
export interface FigureRow {
  readonly name: FigureName;
  readonly label: string;
  readonly meaning: string;
}

export interface FigureGroup {
  readonly title: string;
  readonly rows: readonly FigureRow[];
}

/** The order in which figures are read, on screen and on paper. */
export const figureGroups: readonly FigureGroup[] = [
  {
    title: "Peaks and troughs",
    rows: [
      { name: "highest", label: "Highest level", meaning: "anywhere in the plan" },
      { name: "lowest", label: "Lowest level", meaning: "anywhere in the plan after the first peak" },
      { name: "firstPeak", label: "First peak", meaning: "highest level between the first dose and the next" },
      { name: "firstTrough", label: "First trough", meaning: "lowest level after that peak, before the next dose" },
      {
        name: "lastPeak",
        label: "Last peak",
        meaning: "highest level after the last dose whose interval the plan holds",
      },
      { name: "lastTrough", label: "Last trough", meaning: "lowest level after that peak in the same interval" },
      {
        name: "steadyPeak",
        label: "Peak at steady state",
        meaning: "highest level of a cycle once the repeating orders have settled",
      },
      { name: "steadyTrough", label: "Trough at steady state", meaning: "lowest level of that cycle" },
    ],
  },
  {
    title: "Averages and areas",
    rows: [
      { name: "average", label: "Average over the plan", meaning: "area over the whole plan divided by its length" },
      {
        name: "steadyAverage",
        label: "Average at steady state",
        meaning: "area of a settled cycle divided by its length",
      },
      {
        name: "area24",
        label: "Area over the chosen 24 hours",
        meaning: "area under the level over 24 hours from the stated time",
      },
      {
        name: "steadyArea24",
        label: "Area over 24 hours at steady state",
        meaning: "24 hours times the average at steady state",
      },
    ],
  },
  {
    title: "Desired range",
    rows: [
      { name: "hoursAbove", label: "Hours above the range", meaning: "within the plan" },
      {
        name: "percentAbove",
        label: "Share of the plan above",
        meaning: "hours above divided by the length of the plan",
      },
      { name: "hoursWithin", label: "Hours within the range", meaning: "within the plan" },
      {
        name: "percentWithin",
        label: "Share of the plan within",
        meaning: "hours within divided by the length of the plan",
      },
      { name: "hoursBelow", label: "Hours below the range", meaning: "within the plan" },
      {
        name: "percentBelow",
        label: "Share of the plan below",
        meaning: "hours below divided by the length of the plan",
      },
      { name: "steadyPercentWithin", label: "Share of a settled cycle within", meaning: "at steady state" },
      {
        name: "firstInRange",
        label: "First within the range",
        meaning: "first time at which the level is within the range",
      },
    ],
  },
  {
    title: "Settling",
    rows: [
      {
        name: "timeTo90Percent",
        label: "Time to 90 percent of steady state",
        meaning: "ln 10 divided by k, for a constant rate without a loading dose",
      },
      {
        name: "settledFrom",
        label: "Settled from",
        meaning: "first cycle from which the level at cycle start stays within 10 percent of steady state",
      },
      {
        name: "accumulationRatio",
        label: "Accumulation ratio",
        meaning:
          "area of a settled cycle over that of the first cycle from nothing; A in the arithmetic compares levels",
      },
      { name: "swing", label: "Swing", meaning: "peak minus trough, divided by the trough, at steady state" },
      {
        name: "fluctuation",
        label: "Fluctuation",
        meaning: "peak minus trough, divided by the average, at steady state",
      },
    ],
  },
  {
    title: "Amounts",
    rows: [
      { name: "amountPerDay", label: "Amount per day", meaning: "of the repeating orders, as ordered" },
      { name: "totalAmount", label: "Amount in the plan", meaning: "everything given within the plan, as ordered" },
      { name: "highestAmount", label: "Highest single amount", meaning: "as ordered; a whole pump log is one" },
      { name: "highestRate", label: "Highest rate", meaning: "of a single infusion or pump" },
    ],
  },
];
