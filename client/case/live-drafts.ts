import type { CaseDocument } from "./case-document.ts";
import type { DraftsByName } from "./drafts.ts";

/**
 * Drafts whose editor can be seen. One that belongs to a deleted order or a removed alternative comes back
 * with it on undo, but is no unsaved work until then.
 */
export function liveDrafts(drafts: DraftsByName, document: CaseDocument): DraftsByName {
  return Object.fromEntries(Object.entries(drafts).filter(([name]) => isLive(name, document)));
}

function isLive(name: string, { alternatives, form }: CaseDocument): boolean {
  const [kind = "", owner = "", ...rest] = name.split(":");
  if (kind === "change") return owner === "new" || form.changes.some(({ id }) => id === owner);
  if (kind !== "order" && kind !== "dose" && kind !== "save") return true;
  const schedule = alternatives.find(({ key }) => key === owner)?.schedule;
  if (schedule === undefined) return false;
  const part = rest.join(":");
  if (kind === "save" || part === "new") return true;
  if (part.startsWith("extra:")) return schedule.extras.some(({ id }) => `extra:${id}` === part);
  return schedule.orders.some(({ id }) => id === part.split("#")[0]);
}
