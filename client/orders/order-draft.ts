import { counts } from "../../shared/contract/limits.ts";
import type { End, Order, When } from "../../shared/contract/schedule.ts";
import { readNumber } from "../../shared/units/read-number.ts";
import { type Draft, momentFields, momentIn, textIn } from "../case/drafts.ts";
import { plainText } from "../case/form-of-setting.ts";
import { momentText, readMoment } from "../controls/moment.ts";
import { readLimited, readOptional } from "../controls/read-field.ts";
import { lengthProblem } from "../controls/text-length.ts";
import { draftOfGive, giveKindOf, readGive } from "./give-draft.ts";
import { fromFirstLine } from "./pump-start.ts";

export type WhenKind = When["kind"];
export type EndKind = End["kind"];

/** A new order as its editor opens it; its time is to be typed. */
export const emptyOrderDraft: Draft = { kind: "infusion", when: "every", end: "open", times: "2" };

export type ReadOrder =
  | { readonly ok: true; readonly order: Order }
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

export function whenKindOf(draft: Draft): WhenKind {
  const when = textIn(draft, "when");
  return when === "once" || when === "clock-times" ? when : "every";
}

export function endKindOf(draft: Draft): EndKind {
  const end = textIn(draft, "end");
  return end === "until" || end === "count" ? end : "open";
}

/** How many rows of clock times the editor shows. */
export function timeRows(draft: Draft): number {
  const rows = Number(textIn(draft, "times"));
  return rows >= 1 && rows <= counts.clockTimesPerOrder ? Math.floor(rows) : 1;
}

/**
 * An order out of its editor; every problem at once, by field.
 *
 * @param kept what the editor does not show and the order keeps
 */
export function readOrderDraft(draft: Draft, kept: Pick<Order, "id" | "exceptions">, timeZone: string): ReadOrder {
  const problems: Record<string, string> = {};
  const when = whenKindOf(draft);
  const at = readMoment(momentIn(draft, "at"), timeZone, when === "once" ? "Given at" : "From");
  if (!at.ok) problems["at"] = at.problem;
  const startsAt = at.ok ? at.instant : undefined;
  const give = readGive(draft, { timeZone, startsAt }, problems);
  const read = readWhen(draft, when, startsAt, timeZone, problems);
  const long = lengthProblem("Note", textIn(draft, "note"), counts.noteCharacters);
  if (long !== undefined) problems["note"] = long;
  if (give === undefined || read === undefined || Object.keys(problems).length > 0) return { ok: false, problems };
  return {
    ok: true,
    order: {
      ...kept,
      exceptions: [...kept.exceptions],
      ...fromFirstLine({ give, when: read }, timeZone),
      note: textIn(draft, "note"),
    },
  };
}

/** An order as its editor shows it. */
export function draftOfOrder({ give, when, note }: Order, timeZone: string): Draft {
  const start = when.kind === "once" ? when.at : when.from;
  return {
    ...emptyOrderDraft,
    ...draftOfGive(give),
    ...momentFields("at", momentText(start, timeZone)),
    when: when.kind,
    ...(when.kind === "every" && { interval: plainText(when.intervalH) }),
    ...(when.kind === "clock-times" && draftOfTimes(when.times)),
    ...(when.kind !== "once" && draftOfEnd(when.end, timeZone)),
    note,
  };
}

function readWhen(
  draft: Draft,
  kind: WhenKind,
  from: string | undefined,
  timeZone: string,
  problems: Record<string, string>,
): When | undefined {
  if (kind === "once") return from === undefined ? undefined : { kind, at: from };
  const end = readEnd(draft, from, timeZone, problems);
  if (kind === "every") {
    const interval = readLimited("intervalH", textIn(draft, "interval"));
    if (!interval.ok) problems["interval"] = interval.problem;
    return from && end && interval.ok ? { kind, from, intervalH: interval.value, end } : undefined;
  }
  const times = readTimes(draft, problems);
  return from && end && times ? { kind, from, times, end } : undefined;
}

function readEnd(
  draft: Draft,
  from: string | undefined,
  timeZone: string,
  problems: Record<string, string>,
): End | undefined {
  const kind = endKindOf(draft);
  if (kind === "open") return { kind };
  if (kind === "count") {
    const doses = readNumber(textIn(draft, "doses"));
    if (doses.ok && Number.isInteger(doses.value) && doses.value >= 1 && doses.value <= counts.doses)
      return { kind, doses: doses.value };
    problems["doses"] =
      `Number of doses must be a whole number from 1 to 10,000, got ${textIn(draft, "doses").trim() || "nothing"}`;
    return undefined;
  }
  const until = readMoment(momentIn(draft, "until"), timeZone, "Until");
  if (!until.ok) problems["until"] = until.problem;
  else if (from !== undefined && !(Date.parse(until.instant) > Date.parse(from)))
    problems["until"] =
      `Until must be later than From (${textIn(draft, "at").trim()}), got ${textIn(draft, "until").trim()}`;
  else return { kind, at: until.instant };
  return undefined;
}

type Times = Extract<When, { kind: "clock-times" }>["times"];

/** Empty rows do not count; an amount is only stated where it differs from the order's. */
function readTimes(draft: Draft, problems: Record<string, string>): Times | undefined {
  const times: Times = [];
  for (let row = 0; row < timeRows(draft); row++) {
    const time = textIn(draft, `time.${row}`).trim();
    const amountText = giveKindOf(draft) === "pump" ? "" : textIn(draft, `amount.${row}`);
    if (time === "" && amountText.trim() === "") continue;
    if (!/^([01]\d|2[0-3]):[0-5]\d$/.test(time))
      problems[`time.${row}`] = `Clock time ${row + 1} must be a 24-hour time such as 08:00, got ${time || "nothing"}`;
    else if (times.some((other) => other.time === time))
      problems[`time.${row}`] = `Clock time ${row + 1} must not name ${time} twice`;
    const amount = readOptional("amountMg", amountText, `Amount at clock time ${row + 1}`);
    if (amount?.ok === false) problems[`amount.${row}`] = amount.problem;
    times.push({ time, ...(amount?.ok && { amountMg: amount.value }) });
  }
  if (times.length === 0) problems["time.0"] = "Clock time 1 is empty; write a 24-hour time such as 08:00";
  return times.length === 0 ? undefined : times;
}

function draftOfTimes(times: Times): Draft {
  const rows = times.flatMap(({ time, amountMg }, row) => [
    [`time.${row}`, time],
    [`amount.${row}`, amountMg === undefined ? "" : plainText(amountMg)],
  ]);
  return { times: String(times.length), ...Object.fromEntries(rows) };
}

function draftOfEnd(end: End, timeZone: string): Draft {
  if (end.kind === "open") return { end: "open" };
  if (end.kind === "count") return { end: "count", doses: String(end.doses) };
  return { end: "until", ...momentFields("until", momentText(end.at, timeZone)) };
}
