import type { Give, Order, When } from "../../shared/contract/schedule.ts";
import { amountGivenMg } from "../../shared/figures/amounts.ts";
import { sayClock } from "../../shared/schedule/clock.ts";
import { formatDose, formatDuration, formatRate } from "../../shared/units/format.ts";

/** What is given: "500 mg over 30 min, infusion". */
export function sayGive(give: Give): string {
  if (give.kind === "bolus") return `${formatDose(give.amountMg)}, bolus`;
  if (give.kind === "absorbed") return `${formatDose(give.amountMg)}, absorbed dose`;
  if (give.kind === "infusion")
    return `${formatDose(give.amountMg)} over ${formatDuration(give.durationH)}, infusion (${formatRate(give.amountMg / give.durationH)})`;
  const lastH = give.steps.at(-1)?.afterH ?? 0;
  const firstH = give.steps.find(({ rateMgPerH }) => rateMgPerH > 0)?.afterH ?? 0;
  const waits = firstH > 0 ? `, the first rate after ${formatDuration(firstH)}` : "";
  return `pump log of ${give.steps.length} steps over ${formatDuration(lastH)}${waits}, ${formatDose(amountGivenMg(give))} in all`;
}

/** An order as one sentence without its full stop. */
export function sayOrder({ give, when }: Order, timeZone: string): string {
  return `${sayGive(give)}; ${sayWhen(when, timeZone)}`;
}

function sayWhen(when: When, timeZone: string): string {
  if (when.kind === "once") return `once, ${sayClock(when.at, timeZone)}`;
  const from = `from ${sayClock(when.from, timeZone)}`;
  const rhythm = when.kind === "every" ? `every ${formatDuration(when.intervalH)}` : `at ${sayTimes(when.times)}`;
  return [rhythm, from, sayEnd(when.end, timeZone)].filter(Boolean).join(" ");
}

function sayTimes(times: Extract<When, { kind: "clock-times" }>["times"]): string {
  return times
    .map(({ time, amountMg }) => (amountMg === undefined ? time : `${time} (${formatDose(amountMg)})`))
    .join(" and ");
}

function sayEnd(end: Extract<When, { kind: "every" }>["end"], timeZone: string): string {
  if (end.kind === "open") return "";
  if (end.kind === "count") return end.doses === 1 ? "for 1 dose" : `for ${end.doses} doses`;
  return `until before ${sayClock(end.at, timeZone)}`;
}
