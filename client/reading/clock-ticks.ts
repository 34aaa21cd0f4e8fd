import type { TimeWindow } from "../../shared/kinetics/monotone-pieces.ts";
import { hoursBetween, instantAt, secondInstant, toInstant, toLocal } from "../../shared/schedule/clock.ts";
import type { ClockSpan } from "./snap.ts";

/** A line across the plot with its clock time or day below it. */
export interface ClockTick {
  readonly atH: number;
  readonly text: string;
  /** A day begins here. */
  readonly weight: "strong" | "light";
}

/** A day (or a month, where days are too narrow), named at its first hour in view. */
export interface NamedStretch {
  readonly fromH: number;
  readonly text: string;
}

export interface ClockTicks {
  readonly ticks: readonly ClockTick[];
  readonly stretches: readonly NamedStretch[];
}

const stepsMin = [5, 15, 30, 60, 120, 180, 360, 720];
const stepsDays = [1, 2, 7, 14, 28, 56, 91, 182];
const narrowestTimePx = 54;
const narrowestDayPx = 60;
const characterPx = 7.2;
const msPerDay = 86_400_000;

/** Ticks at round clock times of the case's zone, as many as have room; days that a clock change made 23 or 25 h long stay so. */
export function clockTicks(span: ClockSpan, window: TimeWindow, plotPx: number): ClockTicks {
  const pxPerH = plotPx / (window.toH - window.fromH);
  const stepMin = stepsMin.find((minutes) => (minutes / 60) * pxPerH >= narrowestTimePx);
  const days = daysIn(span, window);
  if (stepMin !== undefined)
    return { ticks: timeTicks(span, window, days, stepMin), stretches: named(days, window, pxPerH, dayNames) };
  const everyDays = stepsDays.find((count) => count * 24 * pxPerH >= narrowestDayPx) ?? stepsDays.at(-1)!;
  return { ticks: dayTicks(days, window, everyDays), stretches: named(months(days), window, pxPerH, monthNames) };
}

interface LocalDay {
  readonly date: string;
  readonly dayNumber: number;
  readonly fromH: number;
}

function daysIn(span: ClockSpan, window: TimeWindow): LocalDay[] {
  const days: LocalDay[] = [];
  const first = toLocal(instantAt(span.start, window.fromH, span.timeZone), span.timeZone).slice(0, 10);
  for (let dayNumber = Date.parse(`${first}T00:00:00Z`) / msPerDay; ; dayNumber++) {
    const date = new Date(dayNumber * msPerDay).toISOString().slice(0, 10);
    const fromH = hoursBetween(span.start, toInstant(`${date}T00:00`, span.timeZone).instant);
    if (days.length > 0 && fromH >= window.toH) return days;
    days.push({ date, dayNumber, fromH });
  }
}

function timeTicks(span: ClockSpan, window: TimeWindow, days: readonly LocalDay[], stepMin: number): ClockTick[] {
  const ticks: ClockTick[] = [];
  for (const { date } of days) {
    for (let minute = 0; minute < 1_440; minute += stepMin) {
      const text = [Math.floor(minute / 60), minute % 60].map((part) => String(part).padStart(2, "0")).join(":");
      const { instant, resolution } = toInstant(`${date}T${text}`, span.timeZone);
      if (resolution === "skipped") continue;
      const second = resolution === "repeated" ? secondInstant(`${date}T${text}`, span.timeZone) : undefined;
      for (const each of second === undefined ? [instant] : [instant, second])
        ticks.push({ atH: hoursBetween(span.start, each), text, weight: minute === 0 ? "strong" : "light" });
    }
  }
  return ticks.filter(({ atH }) => atH >= window.fromH && atH <= window.toH).sort((one, other) => one.atH - other.atH);
}

function dayTicks(days: readonly LocalDay[], window: TimeWindow, everyDays: number): ClockTick[] {
  return days
    .filter(({ dayNumber, fromH }) => dayNumber % everyDays === 0 && fromH >= window.fromH && fromH <= window.toH)
    .map(({ date, fromH }) => ({ atH: fromH, text: say(date, { weekday: "short", day: "numeric" }), weight: "light" }));
}

function months(days: readonly LocalDay[]): LocalDay[] {
  return days.filter(({ date }, index) => index === 0 || date.endsWith("-01"));
}

const dayNames: readonly Intl.DateTimeFormatOptions[] = [
  { weekday: "short", day: "numeric", month: "short", year: "numeric" },
  { weekday: "short", day: "numeric", month: "short" },
  { day: "numeric", month: "short" },
];
const monthNames: readonly Intl.DateTimeFormatOptions[] = [
  { month: "long", year: "numeric" },
  { month: "short", year: "numeric" },
  { month: "short" },
];

/** Each stretch gets the longest of its names that it has room for, or none. */
function named(
  stretches: readonly LocalDay[],
  window: TimeWindow,
  pxPerH: number,
  names: readonly Intl.DateTimeFormatOptions[],
): NamedStretch[] {
  return stretches.flatMap(({ date, fromH: beginsH }, index) => {
    const fromH = Math.max(window.fromH, beginsH);
    const roomPx = ((stretches[index + 1]?.fromH ?? window.toH) - fromH) * pxPerH;
    const text = names.map((options) => say(date, options)).find((name) => name.length * characterPx <= roomPx);
    return text === undefined ? [] : [{ fromH, text }];
  });
}

/** Made by hand from the parts, so that a date reads the same as everywhere else: "Mon 2 Mar 2026". */
function say(date: string, options: Intl.DateTimeFormatOptions): string {
  const parts = new Intl.DateTimeFormat("en-GB", { ...options, timeZone: "UTC" }).formatToParts(
    new Date(`${date}T00:00:00Z`),
  );
  const part = (type: string) => parts.find((each) => each.type === type)?.value;
  return [part("weekday"), part("day"), part("month"), part("year")].filter(Boolean).join(" ");
}
