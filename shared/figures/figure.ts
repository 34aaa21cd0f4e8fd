import type { Instant } from "../contract/schedule.ts";

/** Units a figure can be in; amounts in mg are written by the dose rules. */
export type FigureUnit = "mg/L" | "mg·h/L" | "h" | "percent" | "mg" | "mg per hour" | "mg per day" | "times";

/** A number with its unit and, where it happens at a time, elapsed hours and the instant. */
export interface Value {
  readonly value: number;
  readonly unit: FigureUnit;
  /** Elapsed hours from the plan's start. */
  readonly atH?: number;
  readonly at?: Instant;
  /** What a reader must know to read the number rightly, such as "within each cycle". */
  readonly note?: string;
}

/** A figure that a plan does not have, and why. */
export interface Absent {
  readonly absent: string;
}

export type Figure = Value | Absent;

/** Whether there is such a figure. */
export function isValue(figure: Figure): figure is Value {
  return "value" in figure;
}
