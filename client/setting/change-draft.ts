import { counts, type LimitName } from "../../shared/contract/limits.ts";
import type { DatedEliminationChange } from "../../shared/contract/setting.ts";
import { hoursBetween } from "../../shared/schedule/clock.ts";
import { type Draft, momentFields, momentIn, textIn } from "../case/drafts.ts";
import { plainText } from "../case/form-of-setting.ts";
import { momentText, readMoment } from "../controls/moment.ts";
import { readLimited } from "../controls/read-field.ts";
import { lengthProblem } from "../controls/text-length.ts";

export type ChangeKind = DatedEliminationChange["kind"];

/** What each kind of change is called, and the quantity it states. */
export const changeKinds: Readonly<
  Record<ChangeKind, { readonly label: string; readonly limit: LimitName; readonly value: string }>
> = {
  rate: { label: "k becomes another value", limit: "changedRatePerH", value: "New elimination rate constant k" },
  clearance: { label: "CL becomes another value", limit: "changedClearanceLPerH", value: "New clearance CL" },
  "added-clearance": { label: "clearance is added for a span", limit: "addedClearanceLPerH", value: "Added clearance" },
};

export const emptyChangeDraft: Draft = { kind: "added-clearance" };

export type ReadChange =
  | { readonly ok: true; readonly change: DatedEliminationChange }
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

export function kindOfChange(draft: Draft): ChangeKind {
  const kind = textIn(draft, "kind");
  return kind === "rate" || kind === "clearance" ? kind : "added-clearance";
}

/** A change of elimination out of its editor; every problem at once, by field. */
export function readChangeDraft(draft: Draft, id: string, timeZone: string): ReadChange {
  const kind = kindOfChange(draft);
  const { limit, value: label } = changeKinds[kind];
  const from = readMoment(momentIn(draft, "from"), timeZone, "From");
  const until = kind === "added-clearance" ? readMoment(momentIn(draft, "until"), timeZone, "Until") : undefined;
  const value = readLimited(limit, textIn(draft, "value"), label);
  const problems: Record<string, string> = {};
  const long = lengthProblem("Where it came from", textIn(draft, "note"), counts.noteCharacters);
  if (long !== undefined) problems["note"] = long;
  if (!from.ok) problems["from"] = from.problem;
  if (until?.ok === false) problems["until"] = until.problem;
  if (!value.ok) problems["value"] = value.problem;
  if (from.ok && until?.ok && !(hoursBetween(from.instant, until.instant) > 0))
    problems["until"] = `Until must be later than From (${textIn(draft, "from")}), got ${textIn(draft, "until")}`;
  if (!from.ok || !value.ok || Object.keys(problems).length > 0) return { ok: false, problems };
  const common = { id, from: from.instant, origin: { kind: "typed" as const, note: textIn(draft, "note") } };
  if (kind === "rate") return { ok: true, change: { kind, ...common, eliminationRatePerH: value.value } };
  if (kind === "clearance") return { ok: true, change: { kind, ...common, clearanceLPerH: value.value } };
  if (!until?.ok) return { ok: false, problems };
  return { ok: true, change: { kind, ...common, until: until.instant, addedClearanceLPerH: value.value } };
}

/** A change as its editor shows it. */
export function draftOfChange(change: DatedEliminationChange, timeZone: string): Draft {
  const until = change.kind === "added-clearance" ? momentFields("until", momentText(change.until, timeZone)) : {};
  return {
    kind: change.kind,
    ...momentFields("from", momentText(change.from, timeZone)),
    ...until,
    value: plainText(valueOfChange(change)),
    note: change.origin.note,
  };
}

export function valueOfChange(change: DatedEliminationChange): number {
  if (change.kind === "rate") return change.eliminationRatePerH;
  return change.kind === "clearance" ? change.clearanceLPerH : change.addedClearanceLPerH;
}
