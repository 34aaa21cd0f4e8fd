import { TZDate } from "@date-fns/tz";
import { tzOffset } from "@date-fns/tz/tzOffset";
import { format } from "date-fns/format";
import type { Instant } from "../contract/schedule.ts";
import { DomainError } from "../errors.ts";

export const msPerHour = 3_600_000;
const msPerMinute = 60_000;
export const msPerDay = 86_400_000;

/** How a wall-clock time was turned into an instant. */
export type Resolution = "exact" | "skipped" | "repeated";

export interface ResolvedTime {
  readonly instant: Instant;
  readonly resolution: Resolution;
}

/**
 * The instant of a wall-clock time. The rule where the clock jumps: a time that does not exist that day
 * is moved later by the length of the gap (01:30 becomes 02:30); of a time that comes twice, the first is meant.
 *
 * @param localText "2026-03-29T01:30" or "2026-03-29 01:30", seconds allowed
 * @param zone      IANA name
 * @throws {DomainError} if the text is no date and 24-hour time, or names a day that does not exist
 */
export function toInstant(localText: string, zone: string): ResolvedTime {
  const localMs = localMsOf(localText);
  const before = offsetMs(zone, localMs - msPerDay);
  const after = offsetMs(zone, localMs + msPerDay);
  const first = localMs - Math.max(before, after);
  const second = localMs - Math.min(before, after);
  const isTrue = (instantMs: number) => instantMs + offsetMs(zone, instantMs) === localMs;
  if (isTrue(first))
    return { instant: instantOf(first, zone), resolution: second !== first && isTrue(second) ? "repeated" : "exact" };
  if (isTrue(second)) return { instant: instantOf(second, zone), resolution: "exact" };
  return { instant: instantOf(localMs - before, zone), resolution: "skipped" };
}

/** The second instant of a wall-clock time that comes twice; undefined where it comes once or not at all. */
export function secondInstant(localText: string, zone: string): Instant | undefined {
  if (toInstant(localText, zone).resolution !== "repeated") return undefined;
  const localMs = localMsOf(localText);
  return instantOf(localMs - Math.min(offsetMs(zone, localMs - msPerDay), offsetMs(zone, localMs + msPerDay)), zone);
}

/** Wall-clock date and time of an instant: "2026-03-29T02:30". */
export function toLocal(instant: Instant, zone: string): string {
  return format(inZone(instant, zone), "yyyy-MM-dd'T'HH:mm");
}

/** Elapsed hours from one instant to another. */
export function hoursBetween(start: Instant, instant: Instant): number {
  return (Date.parse(instant) - Date.parse(start)) / msPerHour;
}

/** The instant some elapsed hours later, to the second, with the offset that holds in the zone then. */
export function instantAt(start: Instant, hours: number, zone: string): Instant {
  return instantOf(Math.round((Date.parse(start) + hours * msPerHour) / 1_000) * 1_000, zone);
}

/**
 * Date and 24-hour time as they are read out: "Sun 29 Mar 2026 02:30". Of a time that comes twice the offset
 * is said too, or the two could not be told apart: "Sun 25 Oct 2026 01:30 (UTC+01:00)".
 */
export function sayClock(instant: Instant, zone: string): string {
  const said = format(inZone(instant, zone), "EEE d MMM yyyy HH:mm");
  return comesTwice(Date.parse(instant), zone) ? `${said} (UTC${sayOffset(instant, zone)})` : said;
}

/** Minutes east of Greenwich at an instant. */
export function offsetMinutes(instant: Instant, zone: string): number {
  return offsetMs(zone, Date.parse(instant)) / msPerMinute;
}

/** Hours and minutes east of Greenwich at an instant: "+01:00". */
export function sayOffset(instant: Instant, zone: string): string {
  return offsetText(offsetMs(zone, Date.parse(instant)));
}

/** Date alone: "Sun 29 Mar 2026". */
export function sayDate(instant: Instant, zone: string): string {
  return format(inZone(instant, zone), "EEE d MMM yyyy");
}

/** 24-hour time alone: "02:30". */
export function sayTime(instant: Instant, zone: string): string {
  return format(inZone(instant, zone), "HH:mm");
}

/** Local milliseconds, as if the wall clock were UTC. Only times that a calendar and a 24-hour clock have. */
function localMsOf(localText: string): number {
  const allowed = "a date and 24-hour time such as 2026-03-29 08:00, from the year 1975 to 2199";
  const found = /^(\d{4})-(\d\d)-(\d\d)[T ](\d\d):(\d\d)(?::(\d\d))?$/.exec(localText.trim());
  if (found === null) throw new DomainError("time", localText, allowed);
  const [year, month, day, hour, minute, second] = found.slice(1).map((part) => Number(part ?? 0)) as [
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  const made = new Date(Date.UTC(year, month - 1, day, hour, minute, second));
  const kept = made.getUTCMonth() === month - 1 && made.getUTCDate() === day && hour < 24 && minute < 60 && second < 60;
  if (!kept || year < 1975 || year > 2199) throw new DomainError("time", localText, allowed);
  return made.getTime();
}

/** Offsets already asked for: one lookup in the zone's rules costs more than a dose's whole prediction. */
const knownOffsets = new Map<string, Map<number, number>>();
const mostKnown = 20_000;

/** Zones change at whole minutes, so one answer serves its minute. */
function offsetMs(zone: string, instantMs: number): number {
  const known = knownOffsets.get(zone) ?? new Map<number, number>();
  knownOffsets.set(zone, known);
  const minute = Math.floor(instantMs / msPerMinute);
  const found = known.get(minute);
  if (found !== undefined) return found;
  const offset = tzOffset(zone, new Date(instantMs)) * msPerMinute;
  if (known.size >= mostKnown) known.clear();
  known.set(minute, offset);
  return offset;
}

/** Whether the wall clock shows this time once more within the hours around a change. */
function comesTwice(instantMs: number, zone: string): boolean {
  const offset = offsetMs(zone, instantMs);
  const around = [offsetMs(zone, instantMs - 3 * msPerHour), offsetMs(zone, instantMs + 3 * msPerHour)];
  return around.some((other) => other !== offset && offsetMs(zone, instantMs + offset - other) === other);
}

/** "+01:00": hours and minutes east of Greenwich. */
function offsetText(offset: number): string {
  const minutes = Math.abs(offset) / msPerMinute;
  const two = (number: number) => String(number).padStart(2, "0");
  return `${offset < 0 ? "-" : "+"}${two(Math.floor(minutes / 60))}:${two(minutes % 60)}`;
}

/** ISO 8601 with the offset that holds in the zone, "Z" where there is none; whole seconds. */
function instantOf(instantMs: number, zone: string): Instant {
  const offset = offsetMs(zone, instantMs);
  const local = new Date(instantMs + offset).toISOString().slice(0, 19);
  return `${local}${offset === 0 ? "Z" : offsetText(offset)}`;
}

function inZone(instant: Instant, zone: string): TZDate {
  return new TZDate(Date.parse(instant), zone);
}
