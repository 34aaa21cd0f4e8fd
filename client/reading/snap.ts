import { instantAt, offsetMinutes } from "../../shared/schedule/clock.ts";

/** What snapping needs of the plan: clock times are counted from here, in this zone. */
export interface ClockSpan {
  readonly start: string;
  readonly horizonH: number;
  readonly timeZone: string;
}

/** Steps of the ruler in minutes; "free" keeps to whole minutes. */
export const snapSteps = ["5", "15", "30", "60", "free"] as const;
export type SnapStep = (typeof snapSteps)[number];

/** Shift makes a step of the keyboard this many times as long. */
const largerBy = 4;
const minutesPerH = 60;

export function minutesOf(step: SnapStep): number {
  return step === "free" ? 1 : Number(step);
}

/** The nearest hour whose clock time is a multiple of the step, so that 08:07 becomes 08:00 or 08:15. */
export function snappedH(atH: number, step: SnapStep, span: ClockSpan): number {
  return fromLocal(atH, span, (localMin) => Math.round(localMin / minutesOf(step)) * minutesOf(step));
}

/** The next multiple of the step in one direction; with "larger", four steps on. */
export function steppedH(
  atH: number,
  direction: -1 | 1,
  step: SnapStep,
  size: "usual" | "larger",
  span: ClockSpan,
): number {
  const minutes = minutesOf(step);
  const times = size === "larger" ? largerBy : 1;
  return fromLocal(atH, span, (localMin) =>
    direction > 0
      ? (Math.floor(localMin / minutes) + times) * minutes
      : (Math.ceil(localMin / minutes) - times) * minutes,
  );
}

export interface Clamped {
  readonly atH: number;
  /** Why the dose does not stand where it was put; undefined where it does. */
  readonly why?: string;
}

/** A time for a dose: never before the plan starts, always at least a minute before it ends. */
export function withinPlan(atH: number, { horizonH }: ClockSpan): Clamped {
  if (!(atH >= 0)) return { atH: 0, why: "Nothing can be given before the plan starts: the dose stands at its start" };
  const lastH = Math.max(0, horizonH - 1 / minutesPerH);
  if (atH > lastH) return { atH: lastH, why: "The plan ends here: the dose stands at its last minute" };
  return { atH };
}

/** Rounds on the wall clock: the offset that holds at the hour itself is taken off again. */
function fromLocal(atH: number, { start, timeZone }: ClockSpan, round: (localMin: number) => number): number {
  const offsetMin = offsetMinutes(instantAt(start, atH, timeZone), timeZone);
  const startMin = Date.parse(start) / 60_000;
  // Whole seconds: what is left of a third of an hour must not count as just before or after a step.
  const localMin = Math.round((startMin + atH * minutesPerH + offsetMin) * 60) / 60;
  return (round(localMin) - offsetMin - startMin) / minutesPerH;
}
