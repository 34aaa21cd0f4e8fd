import type { Instant } from "../contract/schedule.ts";
import { hoursBetween, instantAt, msPerHour, toInstant, toLocal } from "../schedule/clock.ts";
import { formatHours } from "../units/format.ts";
import type { Prepared, Settled } from "./prepared.ts";

type Cycle = Extract<Settled, { kind: "cycle" }>;

const minutesPerDay = 1_440;

/** More clock times than this a day are no help to anybody. */
const mostClockTimes = 4;

/**
 * When a cycle begins, in elapsed hours; 0 is the first. Cycles of clock times begin at the same clock time
 * whatever daylight saving does; cycles of intervals keep their hours.
 */
export function cycleStartH({ content }: Prepared, { startsAt, startsAtH, steady, keepsClock }: Cycle, number: number) {
  if (!keepsClock) return startsAtH + number * steady.cycleH;
  const localMs = Date.parse(`${toLocal(startsAt, content.timeZone)}:00Z`) + number * steady.cycleH * msPerHour;
  const { instant } = toInstant(new Date(localMs).toISOString().slice(0, 16), content.timeZone);
  return number === 0 ? startsAtH : hoursBetween(content.setting.plan.start, instant);
}

/**
 * Where in a settled cycle something happens: hours into it, and the clock times where they are the same
 * every day. Never a date: the first cycle that has one is far from settled.
 */
export function sayInCycle(prepared: Prepared, cycle: Cycle, atH: number): string {
  const { cycleH } = cycle.steady;
  const times = clockTimes(prepared, cycle, atH);
  const said = times.length > 1 ? `${times.slice(0, -1).join(", ")} and ${times.at(-1)!}` : times[0];
  return `${formatHours(atH)} into a settled cycle of ${formatHours(cycleH)}${said === undefined ? "" : `, by the clock at ${said}`}`;
}

function clockTimes(prepared: Prepared, cycle: Cycle, atH: number): string[] {
  const { cycleH } = cycle.steady;
  const perDay = cycleH < 24 ? 24 / cycleH : 1;
  const sameEveryDay = Number.isInteger(perDay) && Number.isInteger((perDay * cycleH) / 24);
  if (!sameEveryDay || perDay > mostClockTimes) return [];
  const first = minutesOfDay(prepared, cycle, atH);
  return Array.from({ length: perDay }, (_, index) => Math.floor(first + index * cycleH * 60) % minutesPerDay)
    .sort((one, other) => one - other)
    .map((minutes) => `${pad(Math.floor(minutes / 60))}:${pad(minutes % 60)}`);
}

/** By the clock that holds at the end of the plan; clock times keep theirs. */
function minutesOfDay({ content, course }: Prepared, cycle: Cycle, atH: number): number {
  const { startsAt, startsAtH, steady, keepsClock } = cycle;
  if (keepsClock) return minutesIn(startsAt, content.timeZone) + Math.floor(atH * 60);
  const cycles = Math.max(0, Math.floor((course.horizonH - startsAtH) / steady.cycleH));
  return minutesIn(instantAt(startsAt, cycles * steady.cycleH + atH, content.timeZone), content.timeZone);
}

function minutesIn(instant: Instant, zone: string): number {
  const [hours, minutes] = toLocal(instant, zone).slice(11).split(":").map(Number);
  return hours! * 60 + minutes!;
}

function pad(number: number): string {
  return String(number).padStart(2, "0");
}
