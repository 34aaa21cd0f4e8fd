import type { Give } from "../../shared/contract/schedule.ts";
import { type Draft, textIn } from "../case/drafts.ts";
import { plainText } from "../case/form-of-setting.ts";
import { readLimited } from "../controls/read-field.ts";
import { pumpLogReader } from "./pump-log-reader.ts";

export type GiveKind = Give["kind"];

export const giveKinds: readonly { readonly value: GiveKind; readonly label: string }[] = [
  { value: "bolus", label: "bolus" },
  { value: "infusion", label: "infusion" },
  { value: "absorbed", label: "absorbed dose" },
  { value: "pump", label: "pump log" },
];

export function giveKindOf(draft: Draft): GiveKind {
  return giveKinds.find(({ value }) => value === textIn(draft, "kind"))?.value ?? "infusion";
}

export interface GiveSetting {
  readonly timeZone: string;
  /** When it is given; undefined while that field has a problem of its own. */
  readonly startsAt: string | undefined;
}

/**
 * What is given, out of an editor's fields "kind", "amount", "duration" and "pump".
 *
 * @param problems takes what is wrong, by field
 */
export function readGive(
  draft: Draft,
  { timeZone, startsAt }: GiveSetting,
  problems: Record<string, string>,
): Give | undefined {
  const kind = giveKindOf(draft);
  if (kind === "pump") return startsAt === undefined ? undefined : readPump(draft, timeZone, startsAt, problems);
  const amount = readLimited("amountMg", textIn(draft, "amount"));
  if (!amount.ok) problems["amount"] = amount.problem;
  const duration = kind === "infusion" ? readLimited("durationH", textIn(draft, "duration")) : undefined;
  if (duration?.ok === false) problems["duration"] = duration.problem;
  if (!amount.ok) return undefined;
  if (kind !== "infusion") return { kind, amountMg: amount.value };
  return duration?.ok ? { kind, amountMg: amount.value, durationH: duration.value } : undefined;
}

/** What is given, as fields of its editor. */
export function draftOfGive(give: Give): Draft {
  if (give.kind === "pump") return { kind: "pump", pump: pumpText(give.steps) };
  const amount = { kind: give.kind, amount: plainText(give.amountMg) };
  return give.kind === "infusion" ? { ...amount, duration: plainText(give.durationH) } : amount;
}

function readPump(
  draft: Draft,
  timeZone: string,
  startsAt: string,
  problems: Record<string, string>,
): Give | undefined {
  const read = pumpLogReader();
  if (read === undefined) {
    problems["pump"] = "Pump log cannot be read yet: the page is still fetching its reader. Apply again in a moment";
    return undefined;
  }
  const log = read(textIn(draft, "pump"), { timeZone, startsAt });
  if (log.ok) return { kind: "pump", steps: [...log.steps] };
  const shown = log.problems.slice(0, 5).map(({ line, detail }) => `line ${line}: ${detail}`);
  const rest = log.problems.length - shown.length;
  problems["pump"] = `Pump log, ${shown.join("; ")}${rest > 0 ? `; and ${rest} more lines` : ""}`;
  return undefined;
}

function pumpText(steps: readonly { readonly afterH: number; readonly rateMgPerH: number }[]): string {
  return steps.map(({ afterH, rateMgPerH }) => `${plainText(afterH)},${plainText(rateMgPerH)}`).join("\n");
}
