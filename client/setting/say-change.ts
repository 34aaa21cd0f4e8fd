import type { DatedEliminationChange } from "../../shared/contract/setting.ts";
import { hoursBetween, sayClock } from "../../shared/schedule/clock.ts";
import { formatDuration, formatQuantity } from "../../shared/units/format.ts";
import { printedUnit } from "../../shared/units/printed-unit.ts";
import { changeKinds, valueOfChange } from "./change-draft.ts";

/** A change of elimination as a sentence without its full stop. */
export function sayChange(change: DatedEliminationChange, timeZone: string): string {
  const value = formatQuantity(valueOfChange(change), printedUnit(changeKinds[change.kind].limit), 12);
  const from = sayClock(change.from, timeZone);
  if (change.kind === "rate") return `k becomes ${value} from ${from}`;
  if (change.kind === "clearance") return `CL becomes ${value} from ${from}`;
  const length = formatDuration(hoursBetween(change.from, change.until));
  return `${value} of clearance added from ${from} until ${sayClock(change.until, timeZone)} (${length})`;
}
