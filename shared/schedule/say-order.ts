import type { Give, Order, When } from "../contract/schedule.ts";
import { formatDose, formatDuration, formatHours, formatRate } from "../units/format.ts";
import { sayClock } from "./clock.ts";
import { amountGivenMg } from "./given-amount.ts";

/** An order as one sentence without its full stop. */
export function sayOrder({ give, when }: Order, zone: string): string {
  return `${sayGive(give)}; ${sayWhen(when, zone)}`;
}

/** What is given, in words: "500 mg over 1 h (500 mg per hour)". */
export function sayGive(give: Give): string {
  if (give.kind === "infusion") return `${sayGiven(give)} (${formatRate(give.amountMg / give.durationH)})`;
  if (give.kind !== "pump") return sayGiven(give);
  const highest = give.steps.reduce((most, { rateMgPerH }) => Math.max(most, rateMgPerH), 0);
  const rates = give.steps.length - 1;
  const firstH = give.steps.find(({ rateMgPerH }) => rateMgPerH > 0)?.afterH ?? 0;
  const waits = firstH > 0 ? `, the first rate after ${formatDuration(firstH)}` : "";
  const lasts = formatDuration(give.steps.at(-1)!.afterH);
  return `pump log of ${rates} ${rates === 1 ? "rate" : "rates"} over ${lasts}${waits}, ${formatDose(amountGivenMg(give))} in all, at most ${formatRate(highest)}`;
}

/** The same in brief: amount and, where there is one, duration, "500 mg over 1 h". */
export function sayGiven(give: Give): string {
  if (give.kind === "infusion") return `${formatDose(give.amountMg)} over ${formatDuration(give.durationH)}`;
  if (give.kind === "bolus") return `${formatDose(give.amountMg)} as a bolus`;
  if (give.kind === "absorbed") return `${formatDose(give.amountMg)} to be absorbed`;
  return `pump log over ${formatHours(give.steps.at(-1)!.afterH)}`;
}

/** When it is given, in words, with date and 24-hour time. */
export function sayWhen(when: When, zone: string): string {
  if (when.kind === "once") return `once, ${sayClock(when.at, zone)}`;
  const rhythm = when.kind === "every" ? `every ${formatDuration(when.intervalH)}` : `daily at ${sayTimes(when.times)}`;
  return `${rhythm}, from ${sayClock(when.from, zone)}${sayEnd(when.end, zone)}`;
}

function sayTimes(times: Extract<When, { kind: "clock-times" }>["times"]): string {
  const each = [...times]
    .sort((one, other) => one.time.localeCompare(other.time))
    .map(({ time, amountMg }) => (amountMg === undefined ? time : `${time} (${formatDose(amountMg)})`));
  return each.length === 1 ? each[0]! : `${each.slice(0, -1).join(", ")} and ${each.at(-1)}`;
}

function sayEnd(end: Extract<When, { kind: "every" }>["end"], zone: string): string {
  if (end.kind === "open") return ", with no end set";
  if (end.kind === "until") return `, until before ${sayClock(end.at, zone)}`;
  return end.doses === 1 ? ", 1 dose" : `, ${end.doses} doses`;
}
