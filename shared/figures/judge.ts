import type { RangeMgPerL } from "../contract/dose.ts";
import { type Figure, isValue } from "./figure.ts";
import type { FigureName, Figures } from "./figures.ts";

/** A mark on one figure of one alternative, to be shown as these words, never by colour alone. */
export interface Mark {
  readonly kind: "best" | "out-of-range";
  readonly words: string;
}

export type Marks = Readonly<Partial<Record<FigureName, readonly Mark[]>>>;

/**
 * Only figures on which nobody disagrees what is better. A smaller swing or a lower peak is the aim for
 * one drug and a fault for another, so those are never called best.
 */
const better: Readonly<Partial<Record<FigureName, "most" | "fewest" | "earliest">>> = {
  hoursAbove: "fewest",
  percentAbove: "fewest",
  hoursWithin: "most",
  percentWithin: "most",
  hoursBelow: "fewest",
  percentBelow: "fewest",
  steadyPercentWithin: "most",
  firstInRange: "earliest",
};

const levels: readonly FigureName[] = [
  "highest",
  "lowest",
  "firstPeak",
  "firstTrough",
  "lastPeak",
  "lastTrough",
  "steadyPeak",
  "steadyTrough",
  "average",
  "steadyAverage",
];

/** Closer than this, two alternatives share the mark. */
const sameWithin = 1e-9;

/**
 * What stands out across alternatives: the best of each figure that has a best (only where they
 * differ) and every level outside the desired range.
 *
 * @returns one set of marks per alternative, in the same order
 */
export function judge(alternatives: readonly Figures[], range?: RangeMgPerL): Marks[] {
  const best = new Map<FigureName, { value: number; word: string }>();
  for (const [name, word] of Object.entries(better) as [FigureName, "most" | "fewest" | "earliest"][]) {
    const values = alternatives.map((figures) => numberIn(figures[name])).filter((value) => value !== undefined);
    const low = Math.min(...values);
    const high = Math.max(...values);
    if (values.length < 2 || same(low, high)) continue;
    best.set(name, { value: word === "most" ? high : low, word });
  }
  return alternatives.map((figures) => ({ ...bestMarks(figures, best), ...rangeMarks(figures, range) }));
}

function bestMarks(figures: Figures, best: ReadonlyMap<FigureName, { value: number; word: string }>): Marks {
  const marks: [FigureName, Mark[]][] = [];
  for (const [name, { value, word }] of best) {
    const own = numberIn(figures[name]);
    if (own !== undefined && same(own, value)) marks.push([name, [{ kind: "best", words: `best: ${word}` }]]);
  }
  return Object.fromEntries(marks);
}

function rangeMarks(figures: Figures, range: RangeMgPerL | undefined): Marks {
  if (range === undefined) return {};
  const marks: [FigureName, Mark[]][] = [];
  for (const name of levels) {
    const value = numberIn(figures[name]);
    if (value === undefined) continue;
    if (value > range.high * (1 + sameWithin)) marks.push([name, [{ kind: "out-of-range", words: "above the range" }]]);
    if (value < range.low * (1 - sameWithin)) marks.push([name, [{ kind: "out-of-range", words: "below the range" }]]);
  }
  return Object.fromEntries(marks);
}

function numberIn(figure: Figure): number | undefined {
  return isValue(figure) ? figure.value : undefined;
}

function same(one: number, other: number): boolean {
  return Math.abs(one - other) <= sameWithin * Math.max(Math.abs(one), Math.abs(other));
}
