import { counts } from "../../shared/contract/limits.ts";
import type { ExtraDose } from "../../shared/contract/schedule.ts";
import { type Draft, momentFields, momentIn, textIn } from "../case/drafts.ts";
import { momentText, readMoment } from "../controls/moment.ts";
import { lengthProblem } from "../controls/text-length.ts";
import { draftOfGive, readGive } from "../orders/give-draft.ts";

export type ReadExtra =
  | { readonly ok: true; readonly extra: ExtraDose }
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

/** An extra dose out of its editor; every problem at once, by field. */
export function readExtraDraft(draft: Draft, id: string, timeZone: string): ReadExtra {
  const problems: Record<string, string> = {};
  const at = readMoment(momentIn(draft, "at"), timeZone, "Given at");
  if (!at.ok) problems["at"] = at.problem;
  const give = readGive(draft, { timeZone, startsAt: at.ok ? at.instant : undefined }, problems);
  const long = lengthProblem("Note", textIn(draft, "note"), counts.noteCharacters);
  if (long !== undefined) problems["note"] = long;
  if (!at.ok || give === undefined || long !== undefined) return { ok: false, problems };
  return { ok: true, extra: { id, at: at.instant, give, note: textIn(draft, "note") } };
}

/** An extra dose as its editor shows it. */
export function draftOfExtra({ at, give, note }: ExtraDose, timeZone: string): Draft {
  return { ...draftOfGive(give), ...momentFields("at", momentText(at, timeZone)), note };
}
