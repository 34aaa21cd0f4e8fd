import { counts } from "../contract/limits.ts";
import type { End, Order } from "../contract/schedule.ts";
import { DomainError } from "../errors.ts";
import { hoursBetween, instantAt, msPerDay, type Resolution, toInstant, toLocal } from "./clock.ts";

/** One time at which an order is due, before any exception. */
export interface DueTime {
  readonly occurrence: number;
  readonly at: string;
  readonly resolution: Resolution;
  /** Amount of this clock time, where it differs from the order's. */
  readonly amountMg?: number;
}

export interface PlanSpan {
  readonly start: string;
  readonly horizonH: number;
  readonly timeZone: string;
}

/**
 * All times at which an order is due within the plan. Occurrences are numbered from the order's own
 * beginning; an open order goes on to the end of the plan.
 *
 * @param field path of the order, for the errors
 * @throws {DomainError} if the order begins before the plan, or gives more doses than a plan may hold
 */
export function dueTimes({ when }: Order, span: PlanSpan, field: string): DueTime[] {
  const from = when.kind === "once" ? when.at : when.from;
  if (!(hoursBetween(span.start, from) >= 0))
    throw new DomainError(
      `${field}/when/${when.kind === "once" ? "at" : "from"}`,
      from,
      `at or after the start of the plan (${span.start})`,
    );
  if (when.kind === "once") return [{ occurrence: 0, at: when.at, resolution: "exact" }];
  const due = when.kind === "every" ? everyInterval(when.from, when.intervalH, span) : clockTimes(when, span);
  return taken(due, when.end, span, field);
}

/** Elapsed time, whatever the wall clock does in between. */
function* everyInterval(from: string, intervalH: number, span: PlanSpan): Generator<Omit<DueTime, "occurrence">> {
  for (let index = 0; ; index++) yield { at: instantAt(from, index * intervalH, span.timeZone), resolution: "exact" };
}

/** Wall-clock times, day after day, from the order's beginning on. */
function* clockTimes(
  when: Extract<Order["when"], { kind: "clock-times" }>,
  span: PlanSpan,
): Generator<Omit<DueTime, "occurrence">> {
  const times = [...when.times].sort((one, other) => one.time.localeCompare(other.time));
  const firstDayMs = Date.parse(`${toLocal(when.from, span.timeZone).slice(0, 10)}T00:00:00Z`);
  for (let day = 0; ; day++) {
    // Calendar days counted in UTC: the zone of the machine must not come in.
    const date = new Date(firstDayMs + day * msPerDay).toISOString().slice(0, 10);
    for (const { time, amountMg } of times) {
      const { instant, resolution } = toInstant(`${date}T${time}`, span.timeZone);
      if (hoursBetween(when.from, instant) < 0) continue;
      yield { at: instant, resolution, ...(amountMg !== undefined && { amountMg }) };
    }
  }
}

function taken(due: Iterable<Omit<DueTime, "occurrence">>, end: End, span: PlanSpan, field: string): DueTime[] {
  const made: DueTime[] = [];
  for (const time of due) {
    const over = end.kind === "until" && hoursBetween(end.at, time.at) >= 0;
    const counted = end.kind === "count" && made.length >= end.doses;
    if (over || counted || hoursBetween(span.start, time.at) >= span.horizonH) return made;
    if (made.length >= counts.doses)
      throw new DomainError(
        `${field}/when`,
        `more than ${made.length} doses`,
        `at most ${counts.doses} doses within the plan`,
      );
    made.push({ ...time, occurrence: made.length });
  }
  return made;
}
