import type { RegimenContent } from "../contract/case.ts";
import type { Caution } from "../contract/caution.ts";
import { instantAt, offsetMinutes, sayClock, sayDate } from "../schedule/clock.ts";
import { spanOf } from "../schedule/expand-orders.ts";
import { type DueTime, dueTimes } from "../schedule/order-times.ts";
import { formatDuration } from "../units/format.ts";
import type { ContentSubject, Rule } from "./subject.ts";

/** Clock times that do not exist, or come twice, on the day the clock is changed. */
export const unclearClockTimes: Rule<ContentSubject> = ({ content }) =>
  content.schedule.orders.flatMap((order, index) => {
    const due = dueTimes(order, spanOf(content), `schedule/orders/${index}`);
    const about = `/schedule/orders/${index}/when`;
    return due.flatMap((time): Caution[] => {
      if (time.resolution === "exact") return [];
      return [
        { code: `clock-time-${time.resolution}`, severity: "warn", text: sayResolution(time, content.timeZone), about },
      ];
    });
  });

/** Intervals over the night in which the clock is changed are longer or shorter than they look. */
export const clockChanges: Rule<ContentSubject> = ({ content }) => {
  const repeating = content.schedule.orders.filter(({ when }) => when.kind !== "once");
  if (repeating.length === 0) return [];
  return changesOf(content).map(({ atH, minutes }) => {
    const { start } = content.setting.plan;
    const size = formatDuration(Math.abs(minutes) / 60);
    const direction = minutes > 0 ? "forward" : "back";
    const kinds = new Set(repeating.map(({ when }) => when.kind));
    const clock = kinds.has("clock-times")
      ? ` Doses at clock times lie ${size} ${minutes > 0 ? "closer together" : "further apart"} then.`
      : "";
    const every = kinds.has("every")
      ? ` Doses at intervals keep their hours and come ${size} ${minutes > 0 ? "later" : "earlier"} by the clock afterwards.`
      : "";
    const text = `The clock goes ${direction} by ${size} on ${sayDate(instantAt(start, atH, content.timeZone), content.timeZone)}.${clock}${every}`;
    return { code: "clock-changes", severity: "note", text, about: "/schedule" };
  });
};

function sayResolution({ at, resolution }: DueTime, zone: string): string {
  return resolution === "skipped"
    ? `A clock time does not exist on the day the clock goes forward: the dose is moved later by the gap, to ${sayClock(at, zone)}.`
    : `A clock time comes twice on the day the clock goes back: the first one is meant, ${sayClock(at, zone)}.`;
}

/** Changes of the zone's offset within the plan, to the hour; `minutes` is how far the clock jumps forward. */
function changesOf(content: RegimenContent): { atH: number; minutes: number }[] {
  const { start, horizonH } = content.setting.plan;
  const offsetAt = (atH: number) => offsetMinutes(instantAt(start, atH, "UTC"), content.timeZone);
  const changes: { atH: number; minutes: number }[] = [];
  for (let fromH = 0, before = offsetAt(0); fromH < horizonH; fromH += 24) {
    const toH = Math.min(fromH + 24, horizonH);
    const after = offsetAt(toH);
    if (after !== before) changes.push({ atH: firstHourWith(after, fromH, toH, offsetAt), minutes: after - before });
    before = after;
  }
  return changes;
}

function firstHourWith(offset: number, fromH: number, toH: number, offsetAt: (atH: number) => number): number {
  let atH = fromH;
  while (atH < toH && offsetAt(atH) !== offset) atH += 0.5;
  return Math.min(atH, toH);
}
