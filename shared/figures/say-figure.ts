import { sayClock } from "../schedule/clock.ts";
import { formatDose, formatQuantity } from "../units/format.ts";
import { type Figure, isValue } from "./figure.ts";

/** A figure as text: the number with its unit, or why there is none. */
export function sayFigure(figure: Figure): string {
  if (!isValue(figure)) return figure.absent;
  if (figure.unit === "mg") return formatDose(figure.value);
  return formatQuantity(figure.value, figure.unit);
}

/** When a figure happens: date, 24-hour time and elapsed hours; undefined where it has no time. */
export function sayMoment(figure: Figure, timeZone: string): string | undefined {
  if (!isValue(figure) || figure.at === undefined || figure.atH === undefined) return undefined;
  return `${sayClock(figure.at, timeZone)} (${formatQuantity(figure.atH, "h")} into the plan)`;
}
